/** Runs the solver with progress on a terminal, and with turns for Ctrl-C everywhere. */
import type { Case } from '../model/index.ts';
import { type Caution, Problem } from '../problem.ts';
import type { FrequencyTable } from '../sweep/index.ts';
import type { Io } from './io.ts';
import type { CommonOptions } from './options.ts';
import { say, sayCautions } from './output.ts';

/** [ms] of work without a turn for signals. */
const TURN_EVERY = 50;
/** [ms] before which no progress is shown: most runs are over by then. */
const SHOW_AFTER = 400;
/** [ms] between two pictures of the bar. */
const REDRAW_EVERY = 100;
const BAR_WIDTH = 24;
const CLEAR_LINE = '\r\u001b[K';

export async function solve(c: Case, options: CommonOptions, io: Io): Promise<FrequencyTable> {
  const start = io.now();
  const visible = io.stderr.isTerminal && options.quiet !== true;
  let turned = start;
  let drawn: number | undefined;
  try {
    return await io.solve(c, {
      onProgress: async (done, total) => {
        const now = io.now();
        if (visible && now - start > SHOW_AFTER && now - (drawn ?? 0) > REDRAW_EVERY) {
          drawn = now;
          await io.stderr.write(bar(done, total)).catch(() => undefined);
        }
        if (now - turned > TURN_EVERY) {
          await io.turn();
          turned = io.now();
        }
      },
    });
  } finally {
    if (drawn !== undefined) await io.stderr.write(CLEAR_LINE).catch(() => undefined);
  }
}

function bar(done: number, total: number): string {
  const full = Math.round((BAR_WIDTH * done) / total);
  return `${CLEAR_LINE}solving ${'='.repeat(full)}${'.'.repeat(BAR_WIDTH - full)} ${done} of ${total} frequencies`;
}

/**
 * Says the cautions and whether the tolerance was met.
 * @param shown the result itself shows the cautions
 * @returns exit status
 */
export async function conclude(
  table: Pick<FrequencyTable, 'reached' | 'tolerance'> & { readonly cautions: readonly Caution[] },
  shown: boolean,
  options: CommonOptions,
  io: Io,
): Promise<number> {
  const status = await sayCautions(table.cautions, shown, options, io);
  if (table.reached) return status;
  const problem = new Problem(
    'NOT_REACHED',
    `the wanted tolerance ${table.tolerance} was not reached everywhere; the result is written with its errors: use ` +
      'what suffices, allow a larger tolerance, or widen the closest gap',
  );
  await say(problem.line(), io);
  return problem.exitStatus;
}
