/** Tables as text: numbers that read back, digits that the error allows, totals, details, nothing that is not finite. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { caseFromData } from '../../src/input/index.ts';
import type { Case } from '../../src/model/index.ts';
import { Problem } from '../../src/problem.ts';
import { type FrequencyTable, frequencyTable, tableDetail } from '../../src/sweep/index.ts';
import { csvField, engineering, runOf, TABLE_FORMATS, tableText } from '../../src/writers/index.ts';
import { tableOf } from '../cli/fake-io.ts';

async function caseOf(changes: object = {}): Promise<Case> {
  const result = await caseFromData({
    rimflow: 1,
    title: 'two loops',
    length: '3 m',
    wires: {
      a: { diameter: '2 mm', at: ['0 mm', '0 mm'] },
      b: { diameter: '1 mm', at: ['500 mm', '0 mm'] },
      c: { diameter: '1 mm', material: 'aluminium', at: ['0 mm', '500 mm'] },
    },
    loops: {
      one: { go: 'a', return: 'b', extra: { resistance: '2 mohm', inductance: '15 nH' } },
      two: { go: 'c', return: 'b' },
    },
    frequencies: ['0 Hz', '50 Hz', '1 MHz'],
    ...changes,
  });
  if (result.case === undefined) throw new Error(result.problems.map((p) => p.line()).join('\n'));
  return result.case;
}

/** CSV of RFC 4180 without quoted fields: names, and rows of texts. */
function parse(csv: string): { names: string[]; rows: string[][] } {
  expect(csv.endsWith('\r\n')).toBe(true);
  const [head, ...rows] = csv.slice(0, -2).split('\r\n');
  return { names: head.split(','), rows: rows.map((row) => row.split(',')) };
}

const c = await caseOf();
const table = await frequencyTable(c);

describe('csv', () => {
  it('has the columns of the loops, then the mutual terms; errors beside them when asked for', () => {
    expect(parse(tableText(table, 'csv')).names).toEqual([
      'frequency_Hz',
      'one_R_ohm_per_m',
      'one_L_H_per_m',
      'two_R_ohm_per_m',
      'two_L_H_per_m',
      'one.two_R_ohm_per_m',
      'one.two_L_H_per_m',
    ]);
    expect(parse(tableText(table, 'csv', { withErrors: true })).names).toEqual([
      'frequency_Hz',
      'one_R_ohm_per_m',
      'one_L_H_per_m',
      'one_R_error',
      'one_L_error',
      'two_R_ohm_per_m',
      'two_L_H_per_m',
      'two_R_error',
      'two_L_error',
      'one.two_R_ohm_per_m',
      'one.two_L_H_per_m',
      'one.two_error',
    ]);
  });
  it('reads back to the same doubles, whatever they are', () => {
    const finite = fc.double({ noNaN: true, noDefaultInfinity: true });
    fc.assert(
      fc.property(fc.tuple(finite, finite, finite), (values) => {
        const t = tableOf(c);
        t.loops[0].resistance.set(values);
        const { rows } = parse(tableText(t, 'csv'));
        // minus zero is written as zero
        expect(rows.map((row) => Number(row[1]))).toEqual(values.map((x) => x + 0));
      }),
      { seed: 20_260_101 },
    );
  });
  it('quotes as RFC 4180 says', () => {
    expect(['plain', 'a,b', 'a"b', 'a\nb'].map(csvField)).toEqual(['plain', '"a,b"', '"a""b"', '"a\nb"']);
  });
  it('has the currents of each wire with --currents: what goes out comes back', () => {
    const { names, rows } = parse(tableText(table, 'csv', { currents: true }));
    const value = (name: string) => Number(rows[2][names.indexOf(name)]);
    expect(value('one_I_a_re_A_per_A')).toBe(1);
    expect(value('one_I_b_re_A_per_A')).toBe(-1);
    expect(names).not.toContain('one_I_c_re_A_per_A');
  });
});

describe('json', () => {
  it('has the keys of the contract and the values of the table', () => {
    const json = JSON.parse(tableText(table, 'json', { currents: true }));
    expect(json).toMatchObject({
      title: 'two loops',
      tolerance: 1e-8,
      unit: { frequency: 'Hz', resistance: 'ohm/m', inductance: 'H/m' },
      frequency: [0, 50, 1e6],
      mutual: [{ between: ['one', 'two'] }],
      cautions: [{ code: 'SHORT_RUN' }],
    });
    expect(json.loops.one.resistance).toEqual([...table.loops[0].resistance]);
    expect(json.loops.two.inductance_error).toEqual([...table.loops[1].inductanceError]);
    expect(json.mutual[0].inductance).toEqual([...table.mutual[0].inductance]);
    expect(json.currents.one.b[0]).toEqual([-1, 0]);
    expect('currents' in JSON.parse(tableText(table, 'json'))).toBe(false);
  });
  it('keeps loops and wires with the names of object members', async () => {
    const odd = { ...c, loops: [{ ...c.loops[0], name: '__proto__' }] };
    const t = tableOf(odd, {
      currents: [
        { loop: '__proto__', wire: 'constructor', re: new Float64Array(3), im: new Float64Array(3) },
      ],
    });
    const text = tableText(t, 'json', { currents: true });
    expect(text).toContain('"__proto__": {\n      "resistance"');
    expect(text).toContain('"constructor": [[0, 0], [0, 0], [0, 0]]');
  });
});

describe('total', () => {
  it('is length times the value per metre plus the lumped parts; mutual terms have none', () => {
    const { names, rows } = parse(tableText(table, 'csv', { total: runOf(c) }));
    const column = (name: string) => rows.map((row) => Number(row[names.indexOf(name)]));
    expect(column('one_R_ohm')).toEqual([...table.loops[0].resistance].map((r) => r * 3 + 2e-3));
    expect(column('one_L_H')).toEqual([...table.loops[0].inductance].map((l) => l * 3 + 15e-9));
    expect(column('two_R_ohm')).toEqual([...table.loops[1].resistance].map((r) => r * 3));
    expect(column('one.two_L_H')).toEqual([...table.mutual[0].inductance].map((l) => l * 3));
    expect(JSON.parse(tableText(table, 'json', { total: runOf(c) })).unit).toEqual({
      frequency: 'Hz',
      resistance: 'ohm',
      inductance: 'H',
    });
  });
  it('keeps the absolute error of the run', () => {
    const t = tableOf(c);
    const json = JSON.parse(tableText(t, 'json', { total: runOf(c) }));
    json.loops.one.resistance_error.forEach((error: number, i: number) => {
      const absolute = error * json.loops.one.resistance[i];
      expect(absolute / (t.loops[0].resistanceError[i] * t.loops[0].resistance[i] * 3)).toBeCloseTo(1, 12);
      const ofL = json.loops.one.inductance_error[i] * json.loops.one.inductance[i];
      expect(ofL / (t.loops[0].inductanceError[i] * t.loops[0].inductance[i] * 3)).toBeCloseTo(1, 12);
    });
  });
  it('makes the absolute error of a zero R relative to the lumped part, and leaves it absolute without one', () => {
    const t = tableOf(c);
    for (const loop of t.loops) loop.resistance.fill(0);
    const { loops } = JSON.parse(tableText(t, 'json', { total: runOf(c) }));
    expect(loops.one.resistance_error[0]).toBeCloseTo((1e-9 * 3) / 2e-3, 15);
    expect(loops.two.resistance_error[0]).toBeCloseTo(1e-9 * 3, 18);
  });
  it('needs a length: NO_LENGTH', () => {
    expect(() => runOf({ ...c, length: undefined })).toThrow(expect.objectContaining({ code: 'NO_LENGTH' }));
  });
});

describe('detail', () => {
  const detail = tableDetail(c, table);
  it('has mu0/8pi of each wire as internal inductance at 0 Hz, whatever its radius and metal', () => {
    // J. C. Maxwell 1873, and every textbook since: 50 nH/m a wire
    for (const loop of detail.loops) expect(loop.internalInductance[0] / 1e-7).toBeCloseTo(1, 12);
  });
  it('has (mu0/2pi) ln(D^2/(a b)) as external inductance of thin wires far apart', () => {
    // D/a = 500: the metal of the neighbour changes it by about (a/D)^2
    const expected = 2e-7 * Math.log(500 ** 2 / (1 * 0.5));
    for (const external of detail.loops[0].externalInductance) expect(external / expected).toBeCloseTo(1, 5);
  });
  it('weighs each wire by the square of its current, out of phase too', () => {
    // 0.6 - 0.8j and 1: each of magnitude 1; 50 nH/m a wire at 0 Hz
    const currents = [
      { loop: 'one', wire: 'a', re: new Float64Array(3).fill(0.6), im: new Float64Array(3).fill(-0.8) },
      { loop: 'one', wire: 'b', re: new Float64Array(3).fill(-2), im: new Float64Array(3) },
    ];
    const { loops } = tableDetail(c, tableOf(c, { currents }));
    expect(loops[0].internalInductance[0] / 50e-9).toBeCloseTo(1 + 4, 12);
    expect(loops[1].internalInductance[0]).toBe(0);
  });
  it('adds up to L', () => {
    detail.loops.forEach((loop, k) => {
      loop.internalInductance.forEach((internal, i) => {
        expect((internal + loop.externalInductance[i]) / table.loops[k].inductance[i]).toBeCloseTo(1, 14);
      });
    });
  });
  it('has the skin depth of each metal: copper 66.1 um at 1 MHz (66 um in handbooks, from memory)', () => {
    const { names, rows } = parse(tableText(table, 'csv', { detail }));
    const at = names.indexOf('skin_depth_copper_m');
    expect(rows[0][at]).toBe('');
    expect(Number(rows[2][at])).toBeCloseTo(66.1e-6, 7);
    expect(names).toContain('skin_depth_aluminium_m');
    const json = JSON.parse(tableText(table, 'json', { detail }));
    expect(json.skin_depth.copper[0]).toBeNull();
    expect(json.loops.one.resistance_ratio[0]).toBe(1);
  });
  it('tells metals at two temperatures apart by a wire', async () => {
    const warm = await caseOf({
      wires: {
        a: { diameter: '2 mm', at: ['0 mm', '0 mm'] },
        b: { diameter: '1 mm', at: ['500 mm', '0 mm'] },
        c: { diameter: '1 mm', temperature: '70 °C', at: ['0 mm', '500 mm'] },
      },
    });
    const names = tableDetail(warm, await frequencyTable(warm)).skinDepths.map(({ name }) => name);
    expect(names).toEqual(['copper.a', 'copper.c']);
  });
  it('has no ratio and no skin depth of perfect conductors', async () => {
    const perfect = await caseOf({
      wires: {
        a: { diameter: '2 mm', material: 'perfect', at: ['0 mm', '0 mm'] },
        b: { diameter: '1 mm', material: 'perfect', at: ['500 mm', '0 mm'] },
        c: { diameter: '1 mm', material: 'perfect', at: ['0 mm', '500 mm'] },
      },
    });
    const t = await frequencyTable(perfect);
    const json = JSON.parse(tableText(t, 'json', { detail: tableDetail(perfect, t) }));
    expect([json.loops.one.resistance_ratio, json.skin_depth]).toEqual([null, {}]);
    for (const format of TABLE_FORMATS) {
      expect(tableText(t, format, { detail: tableDetail(perfect, t) })).not.toMatch(/NaN|Infinity/);
    }
  });
});

describe('text and markdown', () => {
  /** Cells of the first loop's R as text shows them, for one value and its stated error. */
  function shown(value: number, error: number): string {
    const t = tableOf({ ...c, frequencies: [50] });
    t.loops[0].resistance[0] = value;
    t.loops[0].resistanceError[0] = error;
    const line = tableText(t, 'text').split('\n')[4];
    return line.trim().split(/ {2,}/)[1];
  }
  it.each([
    [1.23456789, 1e-9, '1.234568'],
    [1.23456789, 1e-4, '1.235'],
    [1.23456789, 0.9e-2, '1.2'],
    [123.456789, 1e-4, '123.5'],
    [0.123456789, 1e-3, '123'],
    [999.9996, 1e-4, '1000'],
    [0, 1e-9, '0'],
    [1000, 1e-4, '1.000'],
    [0.001, 1e-4, '1.000'],
    [1e-15, 1e-4, '1.000'],
  ])('shows %d with a relative error of %d as %s', (value, error, expected) => {
    expect(shown(value, error)).toBe(expected);
  });
  it('never shows a digit that the error denies, nor drops one that it allows (up to seven)', () => {
    const value = fc.double({ min: 1e-6, max: 1e6, noNaN: true });
    const exponent = fc.double({ min: 1, max: 12, noNaN: true });
    fc.assert(
      fc.property(value, exponent, (v, e) => {
        const error = 10 ** -e;
        const text = shown(v, error);
        const digits = text.replace(/^0\.0*|\./g, '').length;
        const allowed = Math.min(7, Math.floor(e));
        // whole numbers may end in zeros that stand for places only
        if (text.includes('.')) expect(digits).toBe(allowed);
        else expect(digits).toBeGreaterThanOrEqual(allowed);
      }),
      { seed: 20_260_102 },
    );
  });
  it('shows mutual terms with the digits that an error relative to the loops leaves', () => {
    const t = tableOf(
      { ...c, frequencies: [0] },
      {
        mutual: [
          {
            between: ['one', 'two'],
            resistance: Float64Array.of(0.0123456),
            inductance: Float64Array.of(1.23456e-9),
            error: Float64Array.of(1e-6),
          },
        ],
      },
    );
    t.loops[0].inductance[0] = 4e-6;
    t.loops[1].inductance[0] = 1e-8;
    t.loops[0].resistance[0] = 4;
    // 1e-6 sqrt(4 ohm 1 ohm) = 2 uohm of 12.3 mohm; 1e-6 sqrt(4 uH 10 nH) = 0.2 pH of 1.2 nH: three digits each
    expect(tableText(t, 'text').split('\n')[4]).toMatch(/ 12\.3 +1\.23$/);
  });
  it('marks the rows that miss the tolerance', () => {
    const t = tableOf(c, { reached: false });
    t.loops[0].inductanceError[1] = 1e-5;
    const lines = tableText(t, 'text').split('\n');
    expect(lines.filter((line) => line.includes('Hz *')).map((line) => line.trim().split('   ')[0])).toEqual([
      '50 Hz *',
    ]);
    expect(lines.join()).toMatch(/NOT within the wanted 1e-8/);
    expect(tableText(t, 'markdown')).toMatch(/\| 50 Hz \\\* \|/);
  });
  it('aligns columns: all rows as wide as their heads say', () => {
    const lines = tableText(table, 'text').split('\n').slice(2, 7);
    const ends = (line: string) => [...line.matchAll(/\S(?= {2,}|$)/g)].map(({ index }) => index);
    expect(ends(lines[2]).length).toBe(7);
    expect(ends(lines[0])[0]).toBe(ends(lines[2])[0]);
  });
  it('has as many cells in each row of markdown as in its head', () => {
    const t = tableOf(c, { title: 'a | b *c*', cautions: [{ code: 'MAGNETIC', text: 'x|y' }] });
    const text = tableText(t, 'markdown', { withErrors: true });
    const rows = text.split('\n').filter((line) => line.startsWith('|'));
    const cells = rows.map((row) => row.split(/(?<!\\)\|/).length);
    expect(new Set(cells).size).toBe(1);
    expect(text).toMatch(/^## a \\\| b \\\*c\\\*\n/);
    expect(text).toContain('- MAGNETIC: x\\|y');
  });
});

describe('engineering', () => {
  it.each([
    [0, '0 Hz'],
    [1e-9, '1 nHz'],
    [999.9999999, '1 kHz'],
    [12589.254, '12.5893 kHz'],
    [1e6, '1 MHz'],
    [1e21, '1000 EHz'],
  ])('%d', (value, expected) => {
    expect(engineering(value, 'Hz')).toBe(expected);
  });
});

describe('a number that is not finite', () => {
  const spoil: [string, (t: FrequencyTable) => void][] = [
    ['R', (t) => t.loops[0].resistance.fill(Number.NaN, 1, 2)],
    ['L', (t) => t.loops[1].inductance.fill(Number.POSITIVE_INFINITY)],
    ['f', (t) => t.frequency.fill(Number.NaN, 2)],
  ];
  it.each(spoil)('in %s: INTERNAL in every format', (_, change) => {
    for (const format of TABLE_FORMATS) {
      const t = tableOf(c);
      change(t);
      let code = 'none';
      try {
        tableText(t, format);
      } catch (error) {
        code = error instanceof Problem ? error.code : String(error);
      }
      expect([format, code]).toEqual([format, 'INTERNAL']);
    }
  });
});
