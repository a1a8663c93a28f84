/** Files of all keys, against values worked out by hand. */
import { describe, expect, it } from 'vitest';
import { SMALLEST_GAP } from '../../src/input/index.ts';
import { caseOf, fixture, pair, resistanceOf } from './helpers.ts';

describe('contract.yaml', async () => {
  const c = await caseOf(fixture('good/contract.yaml'));
  const wire = (name: string) => c.wires.find((w) => w.name === name)!;

  it('reads the top', () => {
    expect(c.title).toBe('Greenhouse pump, flat pair with a drain');
    expect(c.length).toBe(12);
    expect(c.tolerance).toBe(1e-8);
    expect(c.wires.map((w) => w.name)).toEqual(['plus', 'minus', 'drain', 'lead', 'known', 'bare']);
  });

  it('reads sizes', () => {
    // AWG 12 is 80.81 mil (NBS Handbook 100)
    expect(2 * wire('plus').radius).toBeCloseTo(80.81e-3 * 0.0254, 7);
    expect(wire('minus').radius).toBe(2.05e-3 / 2);
    expect(Math.PI * wire('drain').radius ** 2).toBeCloseTo(1.5e-6, 18);
    expect(wire('plus').insulation).toBe(0.8e-3);
  });

  it('reads temperatures and metals', () => {
    expect(wire('plus').temperature).toBe(60);
    expect(wire('minus').temperature).toBe(75);
    // copper by IEC 60028: 1/58 ohm mm2/m, 0.00393 per kelvin
    expect(1 / wire('plus').conductivity).toBeCloseTo((1 + 0.00393 * 40) / 58e6, 20);
    expect(1 / wire('minus').conductivity).toBeCloseTo((1 + 0.00393 * 55) / 58e6, 20);
    expect(1 / wire('bare').conductivity).toBeCloseTo((1 + 0.0039 * 40) / 55e6, 20);
    expect(wire('bare').material).toBe('busbar-alloy');
  });

  it('gives a strand the resistance of its metal, a catalogue wire the stated one', () => {
    expect(resistanceOf(wire('lead'))).toBeCloseTo((1 + 0.00393 * 40) / 58e6 / 35e-6, 15);
    expect(2 * wire('lead').radius).toBeCloseTo(9.2e-3, 15);
    expect(resistanceOf(wire('known'))).toBeCloseTo(5.9e-3 * (1 + 0.00393 * 40), 15);
    // 5.9 ohm/km is 7.5 % above solid copper of 2 mm (5.49 ohm/km): a strand as well
    expect(c.cautions.find((k) => k.code === 'STRAND_AS_WIRE')?.text).toMatch(/^"lead", "known": /);
  });

  it('places wires', () => {
    expect(wire('minus').x).toBeCloseTo(4.05e-3, 15);
    expect(wire('known').x).toBeCloseTo(15e-3, 15);
    expect(wire('known').y).toBeCloseTo(1e-3 + 8e-3 * Math.sqrt(0.75), 15);
    expect(wire('bare').x).toBe(wire('known').x);
    expect(wire('bare').y - wire('known').y).toBeCloseTo(2e-3 * (1 + SMALLEST_GAP), 15);
    expect(c.cautions.find((k) => k.code === 'SMALLEST_GAP')?.text).toContain('"bare"');
  });

  it('steps through a decade by equal ratios, to the last digit but one', () => {
    for (const [k, f] of c.frequencies.entries())
      expect(Math.abs(f / 10 ** (1 + k / 10) - 1)).toBeLessThan(1e-15);
  });

  it('reads loops and frequencies', () => {
    expect(c.loops.map((l) => [l.name, l.go, l.return, l.series])).toEqual([
      ['supply', [0], [1, 3], false],
      ['earth', [2], [5], false],
    ]);
    expect(c.loops[1]!.extra).toEqual({ resistance: 2e-3, inductance: 15e-9 });
    expect(c.frequencies.length).toBe(61);
    expect(c.frequencies[0]).toBe(10);
    expect(c.frequencies[60]).toBe(1e7);
    expect(c.frequencies[10]).toBe(100);
  });
});

describe('turns.yaml', async () => {
  const c = await caseOf(fixture('good/turns.yaml'));

  it('reads series loops, bonded groups and open wires', () => {
    expect(c.loops[0]).toMatchObject({ go: [0, 1], return: [2, 3], series: true });
    expect(c.bonded).toEqual([[4, 5]]);
    expect(c.wires[6]).toMatchObject({ name: 'probe', temperature: 20, material: 'brass' });
  });

  it('reads let expressions', () => {
    expect(c.wires[1]!.x).toBeCloseTo(1.5e-3, 15);
    expect(c.wires[3]!.x).toBeCloseTo(1.5e-3 * Math.cos(Math.PI / 6), 15);
    expect(c.wires[3]!.y).toBeCloseTo(20e-3 + 0.75e-3, 15);
  });

  it('reads a linear range from 0 Hz', () => {
    expect(c.frequencies).toEqual(Array.from({ length: 11 }, (_, k) => k * 1e5));
  });
});

describe('common-return.yaml', async () => {
  const c = await caseOf(fixture('good/common-return.yaml'));

  it('gives a shared group one order of members', () => {
    expect(c.loops.map((l) => [l.go, l.return])).toEqual([
      [[0], [2, 3]],
      [[1], [2, 3]],
      [[2, 3], [4]],
    ]);
  });

  it('reads inches, feet, mils and circular mils', () => {
    // 250 kcmil is 126.7 mm2 (common practice: 1 kcmil = 0.5067 mm2)
    expect(Math.PI * c.wires[0]!.radius ** 2 * 1e6).toBeCloseTo(126.68, 2);
    expect(c.wires[0]!.insulation).toBeCloseTo(80 * 25.4e-6, 15);
    expect(c.wires[1]!.x).toBe(0.0254);
    expect(c.length).toBeCloseTo(30.48, 12);
  });
});

it('reads JSON with tabs, sorts frequencies and drops doubles', async () => {
  const c = await caseOf(fixture('good/exact.json'));
  expect(c.frequencies).toEqual([0, 50, 1000]);
  expect(c.wires[0]!.radius).toBe(c.wires[1]!.radius);
});

describe('one meaning, several spellings', () => {
  it.each([
    ['gauge: AWG 0', 'gauge: AWG 1/0'],
    ['gauge: awg 00', 'gauge: 2/0 AWG'],
    ['radius: 1 mm', 'diameter: 2 mm'],
    ['diameter: 2 mm, material: aluminum', 'diameter: 2 mm, material: aluminium'],
    ['diameter: 2 mm, temperature: 60 °C', 'diameter: 2 mm, temperature: 333.15 K'],
    ['diameter: 2 mm', 'diameter: size', 'let: { size: 2 mm }'],
    [
      'gauge: AWG 12, material: silver',
      'gauge: size, material: metal',
      'let: { size: AWG 12, metal: silver }',
    ],
    ['diameter: 2 mm', 'diameter: a', 'let: { a: b, b: c, c: 2 mm }'],
    ['diameter: 2 mm', 'diameter: n * 1 mm', 'let: { n: 2 }'],
  ])('%s = %s', async (one, other, sections = '') => {
    const [a, b] = [await caseOf(pair(one, sections)), await caseOf(pair(other, sections))];
    expect({ ...b.wires[0], material: '' }).toEqual({ ...a.wires[0], material: '' });
  });

  it('lets --set override a let name, in expressions too', async () => {
    const text = pair('diameter: d', 'let: { d: n * 1 mm, n: 1 }');
    expect((await caseOf(text)).wires[0]!.radius).toBeCloseTo(0.5e-3, 18);
    expect((await caseOf(text, { n: '3' })).wires[0]!.radius).toBeCloseTo(1.5e-3, 18);
    expect((await caseOf(text, { d: '5 mm' })).wires[0]!.radius).toBe(2.5e-3);
  });

  it('keeps the order of the file, integer-like names too', async () => {
    const text = pair('diameter: 1 mm').replace(/\bb\b/g, '2').replace(/\ba\b/g, '10');
    expect((await caseOf(text)).wires.map((w) => w.name)).toEqual(['10', '2']);
  });

  it('takes a let name that is part of the word it stands for', async () => {
    const own = 'materials: { busbar-alloy: { conductivity: 50 MS/m } }\nlet: { alloy: busbar-alloy }';
    expect((await caseOf(pair('diameter: 1 mm, material: alloy', own))).wires[0]!.conductivity).toBe(50e6);
  });

  it('reads a long chain of let names', async () => {
    const chain = Array.from({ length: 990 }, (_, k) => `a${k}: a${k + 1} * 1.001`).join(', ');
    const c = await caseOf(pair('diameter: a0', `let: { ${chain}, a990: 1 mm }`));
    expect(c.wires[0]!.radius).toBeCloseTo(0.5e-3 * 1.001 ** 990, 12);
  });

  it('takes a few aliases', async () => {
    const text = pair('diameter: &d 2 mm').replace('diameter: 1 mm', 'diameter: *d');
    expect((await caseOf(text)).wires.map((w) => w.radius)).toEqual([1e-3, 1e-3]);
  });

  it('puts a title on one line', async () => {
    expect((await caseOf(`${pair('diameter: 1 mm')}title: "a\\n.end\\n  b"`)).title).toBe('a .end b');
  });
});

it('carries the permeability of a metal and of a material', async () => {
  const own = 'materials: { core: { resistivity: 100 nohm m, relative_permeability: 250 } }';
  expect((await caseOf(pair('diameter: 1 mm, material: nickel'))).wires[0]!.relativePermeability).toBe(100);
  expect((await caseOf(pair('diameter: 1 mm, material: core', own))).wires[0]!.relativePermeability).toBe(
    250,
  );
});

it('takes a reference temperature of a material', async () => {
  const own =
    'materials: { alloy: { resistivity: 20 nohm m, temperature_coefficient: 0.004 1/K, reference_temperature: 0 °C } }';
  const [wire] = (await caseOf(pair('diameter: 1 mm, material: alloy, temperature: 50 °C', own))).wires;
  expect(1 / wire!.conductivity).toBeCloseTo(20e-9 * 1.2, 22);
});

it('drops a bonded group that is a side of a loop: it is bonded there', async () => {
  const c = await caseOf(`rimflow: 1
wires:
  a: { diameter: 1 mm, at: [0 mm, 0 mm] }
  b: { diameter: 1 mm, at: [2 mm, 0 mm] }
  c: { diameter: 1 mm, at: [4 mm, 0 mm] }
  d: { diameter: 1 mm, at: [6 mm, 0 mm] }
  e: { diameter: 1 mm, at: [8 mm, 0 mm] }
loops: { pair: { go: a, return: [b, c] } }
bonded: [[c, b], [d, e]]
frequencies: { from: 20 Hz, to: 1 kHz, per_decade: 3 }`);
  expect(c.bonded).toEqual([[3, 4]]);
  // both ends kept, the last step short
  expect(c.frequencies.map((f) => Math.round(f))).toEqual([20, 43, 93, 200, 431, 928, 1000]);
});

it('steps by count through round numbers without noise in the last digits', async () => {
  const c = await caseOf(`rimflow: 1
wires:
  a: { diameter: 1 mm, at: [0 mm, 0 mm] }
  b: { diameter: 1 mm, at: [2 mm, 0 mm] }
loops: { pair: { go: a, return: b } }
frequencies: { from: 50 Hz, to: 5 kHz, count: 5 }`);
  expect([c.frequencies[0], c.frequencies[2], c.frequencies[4]]).toEqual([50, 500, 5000]);
});

describe('touching', () => {
  const two = (a: string, b: string) => `rimflow: 1
wires:
  a: { diameter: 2 mm${a}, at: [1 mm, 2 mm] }
  b: { diameter: 1 mm${b}, at: { from: a, touching: true, angle: 180° } }
loops: { pair: { go: a, return: b } }
frequencies: [50 Hz]`;

  it('stands insulation to insulation, without a caution', async () => {
    const c = await caseOf(two(', insulation: 0.3 mm', ', insulation: 0.2 mm'));
    expect(c.wires[1]!.x).toBeCloseTo(1e-3 - 2e-3, 15);
    expect(c.wires[1]!.y).toBe(2e-3);
    expect(c.cautions).toEqual([]);
  });

  it('stops bare wires at the smallest gap, with a caution', async () => {
    const c = await caseOf(two('', ''));
    expect(c.wires[0]!.x - c.wires[1]!.x).toBeCloseTo(1.5e-3 + SMALLEST_GAP * 1e-3, 15);
    expect(c.cautions.map((k) => k.code)).toEqual(['SMALLEST_GAP']);
  });

  it('does not call contact of insulation an overlap for the rounding of decimals', async () => {
    // 0.1 + 0.2 is not 0.3 in binary: a drawing in tenths of a millimetre touches in thousands of ways
    for (let tenths = 1; tenths <= 200; tenths++) {
      const text = `rimflow: 1
wires:
  a: { diameter: ${tenths / 10} mm, insulation: 0.1 mm, at: [0 mm, 0 mm] }
  b: { diameter: 0.7 mm, insulation: 0.2 mm, at: [${(tenths / 20 + 0.65).toFixed(2)} mm, 0 mm] }
loops: { pair: { go: a, return: b } }
frequencies: [50 Hz]`;
      expect((await caseOf(text)).wires.length).toBe(2);
    }
  });
});

describe('cautions on temperature', () => {
  it('names a metal outside its linear range, once', async () => {
    const c = await caseOf(pair('diameter: 1 mm', 'temperature: 400 °C'));
    expect(c.cautions).toEqual([
      {
        code: 'TEMPERATURE_RANGE',
        text: 'copper at 400 °C: its resistivity is taken as linear in temperature, which holds from -75 °C to 200 °C',
      },
    ]);
  });

  it('names a material without a coefficient away from its reference', async () => {
    const own = 'materials: { alloy: { conductivity: 30 MS/m } }';
    const hot = await caseOf(pair('diameter: 1 mm, material: alloy, temperature: 75 °C', own));
    expect(hot.cautions.map((k) => k.code)).toEqual(['TEMPERATURE_RANGE']);
    expect(hot.wires[0]!.conductivity).toBeCloseTo(30e6, 3);
    const cold = await caseOf(pair('diameter: 1 mm, material: alloy', own));
    expect(cold.cautions).toEqual([]);
  });
});
