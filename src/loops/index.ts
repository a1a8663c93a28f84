export { type Circuit, circuitOf } from './circuit.ts';
export { impedanceAt, type LoopImpedance } from './impedance.ts';
export { type PreparedCase, prepareCase } from './prepared.ts';
