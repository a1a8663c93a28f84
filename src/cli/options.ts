/** Options that several commands share, as the parser hands them over. */
import { Problem } from '../problem.ts';

export interface CommonOptions {
  readonly format?: string;
  readonly out?: string;
  /** each `NAME=VALUE` */
  readonly set?: readonly string[];
  readonly quiet?: boolean;
  readonly failOnCaution?: boolean;
}

/** A go and return pair without a file; texts as in a file. */
export interface QuickOptions {
  readonly gauge?: string;
  readonly diameter?: string;
  readonly spacing?: string;
  readonly material?: string;
  readonly temperature?: string;
  readonly insulation?: string;
  readonly length?: string;
  readonly from?: string;
  readonly to?: string;
  readonly tolerance?: string;
}

export const QUICK_OPTIONS = [
  'gauge',
  'diameter',
  'spacing',
  'material',
  'temperature',
  'insulation',
  'length',
  'from',
  'to',
  'tolerance',
] as const satisfies readonly (keyof QuickOptions)[];

/**
 * `--set NAME=VALUE` as a map.
 * @throws Problem USAGE for another shape, or a name that stands twice
 */
export function setValues(set: readonly string[] = []): Record<string, string> {
  const values = new Map<string, string>();
  for (const item of set) {
    const at = item.indexOf('=');
    const name = item.slice(0, at).trim();
    if (at < 0 || name === '') {
      throw new Problem('USAGE', `--set "${item}" has no NAME=VALUE; write for example --set "gap=2 mm"`);
    }
    if (values.has(name)) throw new Problem('USAGE', `--set gives "${name}" twice; give it once`);
    values.set(name, item.slice(at + 1).trim());
  }
  return Object.fromEntries(values);
}
