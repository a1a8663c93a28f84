/** What the tests of `input` share. */
import { readFileSync } from 'node:fs';
import { decodeText, readCase } from '../../src/input/index.ts';
import type { Case, Wire } from '../../src/model/index.ts';
import type { Problem } from '../../src/problem.ts';

export function fixture(name: string): string {
  return decodeText(readFileSync(new URL(`../../fixtures/input/${name}`, import.meta.url)), name);
}

/** The case of a good text; fails with its problems. */
export async function caseOf(text: string, set?: Record<string, string>): Promise<Case> {
  const result = await readCase(text, { file: 'test.yaml', ...(set === undefined ? {} : { set }) });
  if (result.case === undefined) throw new Error(lines(result.problems).join('\n'));
  return result.case;
}

export async function problemsOf(text: string, set?: Record<string, string>): Promise<readonly Problem[]> {
  const result = await readCase(text, { file: 'test.yaml', ...(set === undefined ? {} : { set }) });
  return result.problems ?? [];
}

/** `line:column CODE text` of each problem. */
export function lines(problems: readonly Problem[]): string[] {
  return problems.map((p) => `${p.place?.line}:${p.place?.column} ${p.code} ${p.message}`);
}

/** A pair with the given keys of its first wire, and the given further sections. */
export function pair(wire: string, sections = ''): string {
  return `rimflow: 1
wires:
  a: { ${wire}, at: [0 mm, 0 mm] }
  b: { diameter: 1 mm, at: [1 m, 0 mm] }
loops:
  pair: { go: a, return: b }
frequencies: [50 Hz]
${sections}`;
}

/** The first wire of a pair with these keys. */
export async function wireOf(wire: string, sections = '', set?: Record<string, string>): Promise<Wire> {
  return (await caseOf(pair(wire, sections), set)).wires[0]!;
}

/** [ohm/m] direct-current resistance of a wire of a case. */
export function resistanceOf(wire: Wire): number {
  return 1 / (wire.conductivity * Math.PI * wire.radius ** 2);
}
