export { frequencyTable, type SweepOptions } from './frequency-table.ts';
export type {
  CurrentSeries,
  FrequencyTable,
  LoopSeries,
  MutualSeries,
} from './table.ts';
