export {
  type GmresOptions,
  type GmresResult,
  gmres,
  KrylovSpace,
} from './gmres.ts';
export {
  type ComplexLu,
  conditionEstimate,
  factoriseLu,
  solveLu,
  solveLuAdjoint,
} from './lu.ts';
export { type ComplexVector, norm2 } from './vector.ts';
