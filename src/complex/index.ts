export {
  type ComplexVector,
  type GmresOptions,
  type GmresResult,
  gmres,
  KrylovSpace,
  norm2,
} from './gmres.ts';
export {
  type ComplexLu,
  conditionEstimate,
  factoriseLu,
  solveLu,
  solveLuAdjoint,
} from './lu.ts';
