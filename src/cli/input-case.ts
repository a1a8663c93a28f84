/** The case of a call: from a file, from standard input, or from the few options of a pair. */
import { decodeText, MAX_FILE_BYTES, quickPair, readCase } from '../input/index.ts';
import type { Case } from '../model/index.ts';
import { Problem } from '../problem.ts';
import { ProblemList } from './ending.ts';
import { reason, tooLarge } from './files.ts';
import type { Io } from './io.ts';
import { type CommonOptions, QUICK_OPTIONS, type QuickOptions, setValues } from './options.ts';

export interface InputCase {
  readonly case: Case;
  /** what names the case: the file without folder and ending, `pair`, or undefined for standard input */
  readonly name: string | undefined;
}

/** Name of standard input in messages. */
const STDIN_NAME = '<stdin>';

/** @throws Problem, or ProblemList with all problems of the file */
export async function inputCase(
  file: string | undefined,
  options: CommonOptions & QuickOptions,
  io: Io,
): Promise<InputCase> {
  const set = setValues(options.set);
  if (file === undefined) return { case: await quickCase(options), name: 'pair' };
  const stray = QUICK_OPTIONS.find((name) => options[name] !== undefined);
  if (stray !== undefined) {
    throw new Problem(
      'USAGE',
      `--${stray} describes a pair without a file, and the file ${file} was given too; change the file (or a let name ` +
        'of it with --set), or leave it out',
    );
  }
  const shownName = file === '-' ? STDIN_NAME : file;
  const bytes = file === '-' ? await readStdin(io) : await io.files.read(file, MAX_FILE_BYTES);
  const result = await readCase(decodeText(bytes, shownName), { file: shownName, set });
  if (result.case === undefined) throw new ProblemList(result.problems);
  return { case: result.case, name: file === '-' ? undefined : baseName(file) };
}

async function quickCase(options: CommonOptions & QuickOptions): Promise<Case> {
  const { spacing } = options;
  const given = QUICK_OPTIONS.filter((name) => options[name] !== undefined);
  if (given.length === 0) {
    throw new Problem(
      'USAGE',
      'no FILE; name one, - for standard input, or give --gauge and --spacing of a pair',
    );
  }
  if (spacing === undefined) {
    throw new Problem(
      'USAGE',
      `--${given[0]} without --spacing; give the distance of the centres, such as "4.1 mm"`,
    );
  }
  if (options.gauge === undefined && options.diameter === undefined) {
    throw new Problem('USAGE', '--spacing without a size; give --gauge, such as "AWG 12", or --diameter');
  }
  if (options.set !== undefined && options.set.length > 0) {
    throw new Problem('USAGE', '--set changes a let name of a file, and there is no FILE; leave it out');
  }
  const values = Object.fromEntries(given.map((name) => [name, options[name]!]));
  return quickPair({ ...values, spacing });
}

/** Ends at the limit, whether the input ends or not. */
async function readStdin(io: Io): Promise<Uint8Array> {
  const parts: Uint8Array[] = [];
  let total = 0;
  try {
    for await (const part of io.stdin) {
      total += part.length;
      if (total > MAX_FILE_BYTES) throw tooLarge(STDIN_NAME, MAX_FILE_BYTES);
      parts.push(part);
    }
  } catch (error) {
    if (error instanceof Problem) throw error;
    throw new Problem('READ_FAILED', `can not be read: ${reason(error)}`, { file: STDIN_NAME });
  }
  const bytes = new Uint8Array(total);
  let at = 0;
  for (const part of parts) {
    bytes.set(part, at);
    at += part.length;
  }
  return bytes;
}

function baseName(path: string): string {
  const name = path.slice(Math.max(path.lastIndexOf('/'), path.lastIndexOf('\\')) + 1);
  return name.replace(/\.(ya?ml|json)$/i, '');
}
