/** The committed JSON Schema: up to date, and of one mind with the reader on files of the right shape. */
import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { parse } from 'yaml';
import { z } from 'zod';
import { fixture } from './helpers.ts';

const root = new URL('../..', import.meta.url);
const schema = JSON.parse(readFileSync(new URL('src/input/case.schema.json', root), 'utf8'));

describe('case.schema.json', () => {
  it('is what scripts/schema.mjs writes', () => {
    const run = () =>
      execFileSync(process.execPath, ['scripts/schema.mjs', '--check'], { cwd: root, stdio: 'pipe' });
    expect(run).not.toThrow();
  });

  it('is of the 2020-12 edition and closed', () => {
    expect(schema.$schema).toBe('https://json-schema.org/draft/2020-12/schema');
    expect(schema.additionalProperties).toBe(false);
    expect(schema.properties.wires.additionalProperties.additionalProperties).toBe(false);
    expect(schema.required).toEqual(['rimflow', 'wires', 'loops', 'frequencies']);
  });

  const reader = z.fromJSONSchema(schema);
  it.each(['good/contract.yaml', 'good/turns.yaml', 'good/common-return.yaml', 'good/exact.json'])(
    'accepts %s',
    (name) => {
      expect(reader.safeParse(parse(fixture(name))).success).toBe(true);
    },
  );
  it.each(['bad/unknown-keys.yaml', 'bad/frequencies-none.yaml'])('refuses the shape of %s', (name) => {
    expect(reader.safeParse(parse(fixture(name))).success).toBe(false);
  });
  it('refuses a bare number where a unit is needed, not where none is', () => {
    const data = parse(fixture('good/contract.yaml'));
    expect(reader.safeParse({ ...data, length: 12 }).success).toBe(false);
    expect(reader.safeParse({ ...data, tolerance: 1e-6 }).success).toBe(true);
  });
});
