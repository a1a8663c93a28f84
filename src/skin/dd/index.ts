export {
  DC_ONE,
  DC_ZERO,
  type DdComplex,
  dc,
  dcAdd,
  dcDivide,
  dcMultiply,
  dcNegate,
  dcOver,
  dcScale,
  dcSize,
  dcSubtract,
  dcTimes,
  dcTimesJ,
} from './complex.ts';
export { DD_EULER_GAMMA, DD_PI, DD_SQRT_HALF, dcExp, dcLog, dcSqrt } from './elementary.ts';
export { DD_ONE, type Dd, dd, ddAdd, ddDivide, ddMultiply, ddNegate, ddTimes } from './real.ts';
export {
  type Scaled,
  scaled,
  scaledAdd,
  scaledDivide,
  scaledMultiply,
  scaledPower,
  scaledToComplex,
  scaledToDd,
} from './scaled.ts';
