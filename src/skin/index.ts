export { solidReflections } from './reflections.ts';
export type { RoundWire } from './round-wire.ts';
export { solidInternalInductance, solidResistanceDc } from './solid.ts';
