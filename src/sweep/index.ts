export type { CurrentSeries, FrequencyTable, LoopSeries, MutualSeries } from './table.ts';
