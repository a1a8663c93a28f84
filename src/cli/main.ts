/** The command line as a function: arguments in, exit status out; everything else goes through `io`. */
import { Problem } from '../problem.ts';
import { plainLine } from '../writers/index.ts';
import { ClosedPipe, ProblemList } from './ending.ts';
import type { Io } from './io.ts';
import { runProgram } from './program.ts';

/** @returns exit status; never throws */
export async function main(argv: readonly string[], io: Io): Promise<number> {
  const interrupted = new Promise<never>((_, reject) => {
    io.onInterrupt(() => reject(new Problem('INTERRUPTED', 'stopped by Ctrl-C')));
  });
  // told of below, or of no interest any more
  interrupted.catch(() => undefined);
  try {
    return await Promise.race([runProgram(argv, io), interrupted]);
  } catch (error) {
    return await tell(error, io);
  }
}

async function tell(error: unknown, io: Io): Promise<number> {
  // whoever read has gone, and wants nothing more
  if (error instanceof ClosedPipe) return 0;
  const problems = problemsOf(error);
  const lines = problems.map((problem) => `${shown(problem, hasColour(io))}\n`);
  await io.stderr.write(lines.join('')).catch(() => undefined);
  return problems[0].exitStatus;
}

function problemsOf(error: unknown): readonly Problem[] {
  if (error instanceof ProblemList) return error.problems;
  if (error instanceof Problem && error.code !== 'INTERNAL') return [error];
  const what = error instanceof Error ? error.message : String(error);
  return [
    new Problem(
      'INTERNAL',
      `a fault of the program, not of the input: ${what}; please report it with the command and the file`,
    ),
  ];
}

function shown(problem: Problem, colour: boolean): string {
  const line = plainLine(problem.line());
  return colour ? line.replace(problem.code, `\u001b[1;31m${problem.code}\u001b[0m`) : line;
}

/** Colour on a terminal only, and never against NO_COLOR. */
function hasColour(io: Io): boolean {
  const { NO_COLOR, TERM } = io.env;
  return io.stderr.isTerminal && (NO_COLOR === undefined || NO_COLOR === '') && TERM !== 'dumb';
}
