/** Groups of fixtures/published/skin.json: printed values with source, conditions and provenance. */
import { readFileSync } from 'node:fs';

export interface PrintedValue {
  readonly inputs: Readonly<Record<string, number | string | boolean>>;
  readonly value: number;
  /** the digits as printed */
  readonly printed: string;
  readonly [more: string]: unknown;
}

export interface PublishedGroup {
  readonly id: string;
  readonly source: { readonly author: string; readonly title: string; readonly year: number | string };
  readonly provenance: string;
  readonly values: readonly PrintedValue[];
}

const { groups } = JSON.parse(
  readFileSync(new URL('../../fixtures/published/skin.json', import.meta.url), 'utf8'),
) as { groups: PublishedGroup[] };

export function published(id: string): PublishedGroup {
  return groups.find((group) => group.id === id)!;
}

/** Author, year and how the value was obtained: for the name of a test. */
export function origin(group: PublishedGroup): string {
  return `${group.source.author} (${group.source.year}), ${group.provenance}`;
}

/** One unit of the last printed digit. */
export function lastDigit(printed: string): number {
  const [mantissa, exponent] = printed.toLowerCase().split('e');
  const decimals = (mantissa.split('.')[1] ?? '').length;
  return 10 ** (Number(exponent ?? 0) - decimals);
}
