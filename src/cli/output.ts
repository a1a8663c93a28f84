/** Where results, cautions and notes go. */
import { type Caution, Problem } from '../problem.ts';
import { cautionLine } from '../writers/index.ts';
import { ClosedPipe } from './ending.ts';
import { reason } from './files.ts';
import type { Io } from './io.ts';
import type { CommonOptions } from './options.ts';

/** `-` means standard output, as for input; so do its names in the file system, where a file may stand behind it. */
const STANDARD_OUTPUT: readonly (string | undefined)[] = ['-', '/dev/stdout', '/dev/fd/1', '/proc/self/fd/1'];

export function outPath({ out }: CommonOptions): string | undefined {
  return STANDARD_OUTPUT.includes(out) ? undefined : out;
}

/** Refuses a path that can not be written before anything is computed. */
export function checkOut(file: string | undefined, options: CommonOptions, io: Io): void {
  const path = outPath(options);
  if (path === undefined) return;
  if (path === '') throw new Problem('USAGE', '--out has an empty path; name a file');
  io.files.checkTarget(path);
  if (file !== undefined && io.files.same(file, path)) {
    throw new Problem('USAGE', `--out ${path} would write over the input; name another file`);
  }
}

/** The result, to its file or to standard output. */
export async function deliver(text: string, what: string, options: CommonOptions, io: Io): Promise<void> {
  const path = outPath(options);
  if (path === undefined) return print(text, io);
  await io.files.writeWhole(path, text);
  if (options.quiet !== true) await say(`wrote ${path} (${what})`, io);
}

/** @throws ClosedPipe where nobody reads; Problem WRITE_FAILED */
export async function print(text: string, io: Io): Promise<void> {
  try {
    await io.stdout.write(text);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'EPIPE') throw new ClosedPipe();
    throw new Problem('WRITE_FAILED', `standard output can not be written: ${reason(error)}`);
  }
}

/** A line to standard error; where that is closed, nobody can be told. */
export async function say(line: string, io: Io): Promise<void> {
  await io.stderr.write(`${line}\n`).catch(() => undefined);
}

/**
 * Says the cautions, unless the result on the terminal has just shown them.
 * @returns exit status: 1 where cautions are to fail
 */
export async function sayCautions(
  cautions: readonly Caution[],
  shown: boolean,
  options: CommonOptions,
  io: Io,
): Promise<number> {
  const onScreen = shown && outPath(options) === undefined && io.stdout.isTerminal;
  if (!onScreen) for (const caution of cautions) await say(`caution ${cautionLine(caution)}`, io);
  if (options.failOnCaution !== true || cautions.length === 0) return 0;
  const problem = new Problem(
    'LIMIT',
    `${cautions.length} caution${cautions.length > 1 ? 's' : ''}, and --fail-on-caution was given`,
  );
  await say(problem.line(), io);
  return problem.exitStatus;
}
