export type { Case, Loop, LumpedExtra, Wire } from './case.ts';
export { MU0, SPEED_OF_LIGHT } from './constants.ts';
