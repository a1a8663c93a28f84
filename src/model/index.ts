export type { Case, Loop, LumpedExtra, Wire } from './case.ts';
export { MU0, SPEED_OF_LIGHT } from './constants.ts';
export {
  conductivityAt,
  findMetal,
  IACS,
  isOutsideLinearRange,
  METALS,
  type Metal,
  metalNames,
  resistivityAt,
} from './metals.ts';
export {
  awgDiameter,
  listWireSizes,
  parseWireSize,
  type WireSize,
} from './wire-sizes.ts';
