/** The run of a case: what turns values per metre into totals. */
import type { Case, LumpedExtra } from '../model/index.ts';
import { Problem } from '../problem.ts';

/** The run whose total is wanted. */
export interface Run {
  /** [m] > 0 */
  readonly length: number;
  /** lumped parts by the name of the loop */
  readonly extra: ReadonlyMap<string, LumpedExtra>;
}

/**
 * The run of a case.
 * @throws Problem NO_LENGTH where the case has no length
 */
export function runOf(c: Case): Run {
  if (c.length === undefined) {
    throw new Problem(
      'NO_LENGTH',
      'the totals of a run need its length and the case has none; add length: 12 m, or ask for values per metre',
    );
  }
  return { length: c.length, extra: new Map(c.loops.map((loop) => [loop.name, loop.extra])) };
}
