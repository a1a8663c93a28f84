/** Ways in which a command ends before its time. */
import { EXIT_STATUS, type Problem } from '../problem.ts';

/** All problems of a file. */
export class ProblemList extends Error {
  readonly problems: readonly Problem[];

  /** @param problems at least one */
  constructor(problems: readonly Problem[]) {
    super(`${problems.length} problems`);
    this.problems = problems;
  }
}

/** Nobody reads the standard output any more, such as behind `| head`. */
export class ClosedPipe extends Error {}

/** Exit statuses with their meaning, for help. */
export const EXIT_HELP = [
  ['0', 'done'],
  [EXIT_STATUS.LIMIT, 'a caution, with --fail-on-caution'],
  [EXIT_STATUS.USAGE, 'the input or the call is wrong'],
  [EXIT_STATUS.NOT_REACHED, 'the wanted accuracy was not reached; the results are written and marked'],
  [EXIT_STATUS.INTERNAL, 'a fault of the program'],
  [EXIT_STATUS.WRITE_FAILED, 'reading or writing failed'],
  [EXIT_STATUS.INTERRUPTED, 'stopped by Ctrl-C'],
] as const;
