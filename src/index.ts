/**
 * The library, in the order in which the data goes: read or build a case, prepare and solve it, sweep, fit, write. ES
 * modules, typed, no side effect at import, nothing of the machine touched.
 */

// a circuit of a loop
export {
  type FitPlan,
  type FitSize,
  fitFrequencies,
  fitSections,
  type LoopSamples,
  loneWireCircuit,
  type Section,
  type SectionCircuit,
  type SectionModel,
  type SeriesImpedance,
  sectionImpedance,
  type WorstErrors,
} from './fit/index.ts';
// a case: read from text, or built in code
export {
  caseFromData,
  decodeText,
  type Family,
  MAX_FILE_BYTES,
  parseQuantity,
  type QuickPairOptions,
  quickPair,
  type Range,
  type ReadOptions,
  type ReadResult,
  readCase,
} from './input/index.ts';
// geometry once, then one frequency after the other
export { impedanceAt, type LoopImpedance, type PreparedCase, prepareCase } from './loops/index.ts';
export {
  type Case,
  conductivityAt,
  findMetal,
  type Loop,
  type LumpedExtra,
  listWireSizes,
  METALS,
  type Metal,
  parseWireSize,
  resistivityAt,
  type Wire,
  type WireSize,
} from './model/index.ts';
// errors and cautions
export {
  CAUTION_CODES,
  type Caution,
  type CautionCode,
  type ErrorCode,
  EXIT_STATUS,
  type Place,
  Problem,
} from './problem.ts';
// one wire alone, and the functions behind it
export {
  type BinaryComplex,
  besselI,
  besselIBinary,
  besselIRatio,
  besselIScaled,
  besselJ,
  besselJ1Zeros,
  besselK,
  besselKBinary,
  besselKRatio,
  besselKScaled,
  type ComplexPoint,
  type KelvinFirst,
  type KelvinSecond,
  kelvinFirst,
  kelvinSecond,
  type RoundWire,
  type SkinMetal,
  skinDepth,
  solidCurrentDensity,
  solidDecayRates,
  solidInteriorRatio,
  solidInternalImpedance,
  solidInternalImpedances,
  solidInternalInductance,
  solidReflection,
  solidReflections,
  solidResistanceDc,
  solidSurfaceImpedance,
} from './skin/index.ts';

// all frequencies of a case
export {
  type CurrentSeries,
  caseCautions,
  type FrequencyTable,
  frequencyTable,
  type LoopDetail,
  type LoopSeries,
  type MutualSeries,
  type SkinDepthSeries,
  type SweepOptions,
  type TableDetail,
  tableDetail,
} from './sweep/index.ts';
export { VERSION } from './version.ts';

// text
export {
  type NetlistInput,
  netlistText,
  type Run,
  runOf,
  safeSubcircuitName,
  TABLE_FORMATS,
  type TableChoices,
  type TableFormat,
  tableText,
} from './writers/index.ts';
