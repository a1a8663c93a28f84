/**
 * Solves here or in a thread. The solver does not let go of its thread before a frequency is done; large cases, where
 * that takes long, run in one of their own, so that Ctrl-C works at once. For small ones a thread would cost more than
 * the job.
 */
import { Worker } from 'node:worker_threads';
import type { Case } from '../model/index.ts';
import { Problem } from '../problem.ts';
import type { FrequencyTable, SweepOptions } from '../sweep/index.ts';
import type { WorkerMessage } from './solve-worker.ts';

/** [1] wires up to which one frequency takes a fraction of a second, at the smallest gaps and radii 100:1 too */
const SMALL_CASE = 4;

export async function solveOnNode(c: Case, options: SweepOptions): Promise<FrequencyTable> {
  if (c.wires.length > SMALL_CASE) return solveInThread(c, options);
  const { frequencyTable } = await import('../sweep/index.ts');
  return frequencyTable(c, options);
}

function solveInThread(c: Case, options: SweepOptions): Promise<FrequencyTable> {
  return new Promise((resolve, reject) => {
    const worker = new Worker(new URL('./solve-worker.js', import.meta.url), { workerData: c });
    worker.on('message', (message: WorkerMessage) => {
      if (message.kind === 'progress') options.onProgress?.(message.done, message.total);
      else if (message.kind === 'table') resolve(message.table);
      else reject(new Problem(message.code, message.text, message.place));
    });
    worker.on('error', reject);
    // after a table or an error this changes nothing any more
    worker.on('exit', (status) => reject(new Error(`the solver's thread ended with status ${status}`)));
  });
}
