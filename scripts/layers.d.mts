/** One broken rule: file below src/, line from 1. */
export interface Break {
  file: string;
  line: number;
  text: string;
}
export const LEAVES: readonly string[];
export const ARROWS: Readonly<Record<string, readonly string[]>>;
/** @param src folder that holds the layers */
export function checkLayers(src: string): Break[];
