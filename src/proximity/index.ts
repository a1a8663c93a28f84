export {
  type Circle,
  decayRates,
  type Layout,
  MAX_TABLE_ENTRIES,
  prepareLayout,
} from './layout.ts';
export { pairing } from './monopole.ts';
export { MAX_ORDER, predictedOrders } from './orders.ts';
export {
  type ActiveModes,
  activeModes,
  type ProductScratch,
  productScratch,
} from './product.ts';
export { reflectionRoots } from './reflection-roots.ts';
export {
  type CurrentFeedback,
  type MultipoleSolution,
  type MultipoleSystem,
  solveMultipoles,
  solveMultipolesDense,
} from './solve.ts';
export { incomingField, type SurfaceField } from './surface.ts';
export { type TruncationTail, truncationTail } from './truncation.ts';
