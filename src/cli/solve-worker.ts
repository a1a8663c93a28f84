/** The solver in a thread of its own: takes a case, tells of its progress, gives the table or what went wrong. */
import { parentPort, workerData } from 'node:worker_threads';
import type { Case } from '../model/index.ts';
import { type ErrorCode, type Place, Problem } from '../problem.ts';
import { type FrequencyTable, frequencyTable } from '../sweep/index.ts';

/** What the thread says. */
export type WorkerMessage =
  | { readonly kind: 'progress'; readonly done: number; readonly total: number }
  | { readonly kind: 'table'; readonly table: FrequencyTable }
  | {
      readonly kind: 'problem';
      readonly code: ErrorCode;
      readonly text: string;
      readonly place: Place | undefined;
    };

const say = (message: WorkerMessage) => parentPort?.postMessage(message);

try {
  const onProgress = (done: number, total: number) => say({ kind: 'progress', done, total });
  say({ kind: 'table', table: await frequencyTable(workerData as Case, { onProgress }) });
} catch (error) {
  // anything else ends the thread with an error, which the other side hears of by itself
  if (!(error instanceof Problem)) throw error;
  say({ kind: 'problem', code: error.code, text: error.message, place: error.place });
}
