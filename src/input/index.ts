export type { ReadResult } from './case-from-source.ts';
export { decodeText } from './decode-text.ts';
export { FAMILIES, type Family } from './families.ts';
export { MAX_FILE_BYTES } from './limits.ts';
export { editDistance, nearest } from './nearest.ts';
export { SMALLEST_GAP } from './placement.ts';
export {
  caseFromData,
  parseQuantity,
  type QuickPairOptions,
  quickPair,
  type ReadOptions,
  readCase,
} from './read-case.ts';
export type { Range } from './reading.ts';
