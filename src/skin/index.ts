export type { ComplexPoint } from './bessel/argument.ts';
export {
  type BinaryComplex,
  besselI,
  besselIBinary,
  besselIRatio,
  besselIScaled,
  besselK,
  besselKBinary,
  besselKRatio,
  besselKScaled,
} from './bessel/functions.ts';
export { besselJ, besselJ1Zeros } from './bessel/j.ts';
export { type KelvinFirst, type KelvinSecond, kelvinFirst, kelvinSecond } from './bessel/kelvin.ts';
export { solidDecayRates } from './decay-rates.ts';
export { solidReflections } from './reflections.ts';
export type { RoundWire } from './round-wire.ts';
export { type SkinMetal, skinDepth } from './skin-depth.ts';
export { solidInternalInductance, solidResistanceDc } from './solid.ts';
export { solidInternalImpedances } from './solid-batch.ts';
export {
  solidCurrentDensity,
  solidInteriorRatio,
  solidInternalImpedance,
  solidReflection,
  solidSurfaceImpedance,
} from './solid-edge.ts';
