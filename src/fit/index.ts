export { loneWireCircuit } from './lone-wire.ts';
export type { WorstErrors } from './measure.ts';
export {
  type Section,
  type SectionCircuit,
  type SeriesImpedance,
  sectionImpedance,
} from './model.ts';
export { type FitPlan, fitFrequencies, type LoopSamples } from './samples.ts';
export {
  type FitSize,
  fitSections,
  LEAST_WITHIN,
  MOST_SECTIONS,
  type SectionModel,
} from './sections.ts';
