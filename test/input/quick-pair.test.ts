/** Cases without a file: the quick pair of the command line, and data built in code. */
import { describe, expect, it } from 'vitest';
import { caseFromData, quickPair } from '../../src/input/index.ts';
import { Problem } from '../../src/problem.ts';
import { caseOf, fixture } from './helpers.ts';

async function lineOf(action: () => Promise<unknown>): Promise<string> {
  try {
    await action();
  } catch (error) {
    if (error instanceof Problem) return error.line();
    throw error;
  }
  throw new Error('no problem');
}

describe('quickPair', () => {
  it('is a go and return pair, 10 Hz to 100 MHz', async () => {
    const c = await quickPair({ gauge: 'AWG 12', spacing: '4.1 mm' });
    expect(c.wires.map((w) => [w.name, w.x, w.y])).toEqual([
      ['go', 0, 0],
      ['return', 4.1e-3, 0],
    ]);
    expect(c.loops).toEqual([
      { name: 'pair', go: [0], return: [1], series: false, extra: { resistance: 0, inductance: 0 } },
    ]);
    expect(c.frequencies.length).toBe(71);
    expect([c.frequencies[0], c.frequencies[70]]).toEqual([10, 1e8]);
    expect(c.tolerance).toBe(1e-8);
    expect(c.wires[0]!.material).toBe('copper');
  });

  it('takes a range of frequencies, both ends kept', async () => {
    const c = await quickPair({ diameter: '1 mm', spacing: '3 mm', from: '50 Hz', to: '2 kHz' });
    expect([c.frequencies[0], c.frequencies.at(-1)]).toEqual([50, 2000]);
    // 10 a decade over 1.6 decades, and the end
    expect(c.frequencies.length).toBe(18);
  });

  it('takes the other keys of a wire', async () => {
    const c = await quickPair({
      diameter: '2*1 mm',
      spacing: '5 mm',
      material: 'silver',
      temperature: '60 °C',
      insulation: '0.3 mm',
      length: '3 m',
      tolerance: '1e-6',
    });
    const wire = { radius: 1e-3, material: 'silver', temperature: 60, insulation: 0.3e-3 };
    expect(c.wires[1]).toMatchObject(wire);
    expect(c.length).toBe(3);
    expect(c.tolerance).toBe(1e-6);
  });

  it.each([
    [{ gauge: 'AWG 99', spacing: '4 mm' }, '--gauge UNKNOWN_GAUGE no wire size "AWG 99"'],
    [{ gauge: 'AWG 12', spacing: '4' }, '--spacing UNIT at[0]: "4" has no unit'],
    [{ gauge: 'AWG 12', spacing: '1 mm' }, '--spacing OVERLAP wires "go" and "return" are 1 mm apart'],
    [{ gauge: 'AWG 12', spacing: '4 mm', to: '1 Hz' }, '--from RANGE from is above to'],
    [{ gauge: 'AWG 12', spacing: '4 mm', to: '1 m' }, '--to UNIT'],
    [{ diameter: '0 mm', spacing: '1 mm' }, '--diameter RANGE diameter: "0 mm" is outside'],
    [
      { gauge: 'AWG 12', material: 'coper', spacing: '4 mm' },
      '--material UNKNOWN_MATERIAL no material "coper"',
    ],
    [
      { gauge: 'AWG 12', spacing: '4 mm', temperature: '60' },
      '--temperature UNIT temperature: "60" has no unit',
    ],
    [{ spacing: '4 mm' }, 'wires.go MISSING wire "go" has no size'],
  ])('%o', async (options, start) => {
    expect((await lineOf(() => quickPair(options))).slice(0, start.length)).toBe(start);
  });
});

describe('caseFromData', () => {
  it('reads the same keys as a file', async () => {
    const data = JSON.parse(fixture('good/exact.json')) as unknown;
    const result = await caseFromData(data);
    expect(result.case).toEqual(await caseOf(fixture('good/exact.json')));
  });

  it('places problems by their path', async () => {
    const result = await caseFromData({
      rimflow: 1,
      wires: { a: { diameter: 2, at: ['0 mm', '0 mm'] } },
      loops: {},
    });
    expect(result.problems?.map((p) => p.line().replace(/ [a-z"].*/, ''))).toEqual([
      'frequencies NO_FREQUENCIES',
      'wires.a.diameter UNIT',
      'loops MISSING',
    ]);
  });

  it.each([undefined, null, 5, 'x', [], new Map(), () => 1])('refuses %s', async (data) => {
    const result = await caseFromData(data);
    expect(result.problems?.length).toBeGreaterThan(0);
  });
});
