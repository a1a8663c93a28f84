export { caseCautions } from './cautions.ts';
export { type LoopDetail, type SkinDepthSeries, type TableDetail, tableDetail } from './detail.ts';
export { frequencyTable, type SweepOptions } from './frequency-table.ts';
export type {
  CurrentSeries,
  FrequencyTable,
  LoopSeries,
  MutualSeries,
} from './table.ts';
