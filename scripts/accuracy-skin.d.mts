/** Worst and root-mean-square relative error [1] and number of values. */
export interface AccuracyEntry {
  worst: number;
  rms: number;
  count: number;
}
/** Rows of one file of fixtures/bessel. */
export function readRows(name: string): unknown[];
/** @param api the functions to measure, by name */
export function measureAccuracy(api: Readonly<Record<string, unknown>>): Record<string, AccuracyEntry>;
