/**
 * The text of a netlist: plain lines that any SPICE-type simulator reads, an honest header, and nothing
 * that can break out of it.
 */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fitSections, sectionImpedance } from '../../src/fit/index.ts';
import { Problem } from '../../src/problem.ts';
import { type NetlistInput, netlistText, safeSubcircuitName } from '../../src/writers/index.ts';
import { pairSamples, THIN_COPPER } from '../fit/wide-pair.ts';

const model = fitSections(pairSamples([THIN_COPPER], 10, 1e7), { within: 0.01 });
const input: NetlistInput = {
  name: 'pump',
  title: 'Pump feed',
  loop: 'supply',
  model,
  length: 12,
  version: '0.1.0',
};

function elements(text: string): { name: string; from: string; to: string; value: number; digits: string }[] {
  return text
    .split('\n')
    .filter((line) => /^[RL]/.test(line))
    .map((line) => {
      const [name, from, to, digits] = line.split(' ');
      return { name, from, to, value: Number(digits), digits };
    });
}

function codeOf(action: () => unknown): string {
  try {
    action();
  } catch (problem) {
    if (problem instanceof Problem) return problem.code;
    throw problem;
  }
  return 'none';
}

describe('the lines', () => {
  test('first a comment, then a subcircuit of R and L lines only, closed; none over 80 columns, all ASCII', () => {
    const lines = netlistText(input).split('\n');
    expect(lines[0]).toMatch(/^\* /);
    expect(lines.pop()).toBe('');
    const body = lines.filter((line) => !line.startsWith('*'));
    expect(body[0]).toBe('.subckt pump a1 b1');
    expect(body[body.length - 1]).toBe('.ends pump');
    for (const line of body.slice(1, -1))
      expect(line).toMatch(/^[RL][a-z0-9]+ [abn]\d+ [abn]\d+ \d\.\d{14}e[+-]\d+$/);
    for (const line of lines) expect(line).toMatch(/^[ -~]{1,80}$/);
  });

  test('names are unique without regard to case, nodes form one chain from a1 to b1', () => {
    const list = elements(netlistText({ ...input, extra: { resistance: 1e-3, inductance: 1e-8 } }));
    expect(new Set(list.map((e) => e.name.toLowerCase())).size).toBe(list.length);
    expect(list.length).toBe(2 + 2 * model.sections.length + 2);
    let node = 'a1';
    for (const [k, { from, to }] of list.entries()) {
      if (from !== node) expect(from).toBe(list[k - 1].from);
      else node = to;
    }
    expect(node).toBe('b1');
  });

  test('the elements add up to the model times the length, to 14 digits, plus the lumped parts', () => {
    const list = elements(netlistText({ ...input, extra: { resistance: 0.25, inductance: 3e-6 } }));
    for (const f of [0, 1e3, 1e5, 3e6]) {
      const w = 2 * Math.PI * f;
      const z = { r: 0, x: 0 };
      for (const { name, value, from } of list) {
        const twin = list.find((e) => e.from === from && e.name !== name);
        const isResistor = name.startsWith('R');
        if (twin !== undefined && isResistor) {
          const below = value ** 2 + (w * twin.value) ** 2;
          z.r += (value * (w * twin.value) ** 2) / below;
          z.x += (value ** 2 * w * twin.value) / below;
        } else if (twin === undefined) {
          z.r += isResistor ? value : 0;
          z.x += isResistor ? 0 : w * value;
        }
      }
      const { resistance, inductance } = sectionImpedance(model, f);
      expect(Math.abs(z.r / (12 * resistance + 0.25) - 1)).toBeLessThan(1e-13);
      expect(Math.abs(z.x - w * (12 * inductance + 3e-6))).toBeLessThanOrEqual(1e-13 * z.x);
    }
  });

  test('nothing of zero value: perfect wires leave one inductor and a word of caution', () => {
    const perfect = { ...model, resistanceDc: 0, sections: [], inductanceInfinity: 8e-7 };
    const text = netlistText({ ...input, model: perfect });
    expect(elements(text)).toEqual([
      { name: 'Linf', from: 'a1', to: 'b1', value: 9.6e-6, digits: '9.60000000000000e-6' },
    ]);
    expect(text).toContain('No resistance at 0 Hz');
    expect(netlistText(input)).not.toContain('No resistance at 0 Hz');
    expect(codeOf(() => netlistText({ ...input, model: { ...perfect, inductanceInfinity: 0 } }))).toBe(
      'DOMAIN',
    );
  });

  test('equal input gives equal text', () => {
    expect(netlistText({ ...input })).toBe(netlistText(structuredClone(input)));
  });
});

describe('the header', () => {
  test('states title, loop, length, version, band, errors rounded up, sample counts, and how to include it', () => {
    const text = netlistText({ ...input, fileName: 'pump.cir' });
    expect(text.startsWith('* Pump feed\n')).toBe(true);
    for (const part of [
      'loop "supply"',
      '12 m',
      '\n* Written by rimflow 0.1.0.\n',
      '* fitted band: 10 Hz to 10 MHz\n',
      '61 fitted frequencies,',
      '60 more between them',
      '*   .include pump.cir\n',
      '*   Xrun GO RETURN pump\n',
      'edges faster than about 35 ns',
    ]) {
      expect(text).toContain(part);
    }
    // c/(20 * 12 m)
    expect(text.replaceAll('\n* ', ' ')).toContain('in air it is a twentieth of one at 1.2 MHz');
    for (const [quantity, exact] of [
      ['R', model.errors.resistance],
      ['L', model.errors.inductance],
    ] as const) {
      const stated = Number(
        new RegExp(`^\\* worst error of ${quantity}: ([\\d.e-]+) % of ${quantity}$`, 'm').exec(text)![1],
      );
      expect(stated / 100).toBeGreaterThanOrEqual(exact * (1 - 1e-12));
      expect(stated / 100).toBeLessThan(1.01 * exact);
    }
  });

  test('quotes a file name with spaces, names a loop without title, and only the lumped parts there are', () => {
    const text = netlistText({
      ...input,
      title: '',
      fileName: '12 volt.cir',
      extra: { resistance: 0.25, inductance: 0 },
    });
    expect(text.startsWith('* loop "supply"\n')).toBe(true);
    expect(text).toContain('\n*   .include "12 volt.cir"\n');
    expect(text).toContain('exact: 250 mohm (Rextra).');
    expect(text).not.toContain('Lextra');
  });

  test('lists cautions with the frequency from which they hold', () => {
    const cautions = [
      { code: 'WAVELENGTH', text: 'spacing over \u03bb/20', from_hz: 3e8 },
      { code: 'MAGNETIC', text: 'linear permeability' },
    ] as const;
    const text = netlistText({ ...input, cautions });
    expect(text).toContain('* caution WAVELENGTH from 300 MHz: spacing over lambda/20\n');
    expect(text).toContain('* caution MAGNETIC: linear permeability\n');
  });

  test('no title, loop or file name can add a line, an element or a control card', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), fc.string({ unit: 'grapheme', maxLength: 300 }), (a, b) => {
        const evil = `${a}\n.end\r\nRx a1 b1 1\u2028${b}\u0085`;
        const text = netlistText({ ...input, title: evil, loop: evil, fileName: evil, version: evil });
        const lines = text.split(/\r\n|[\n\r\u2028\u2029\u0085\v\f]/);
        expect(lines.filter((line) => !line.startsWith('*')).length).toBe(
          elements(netlistText(input)).length + 3,
        );
        for (const line of lines) expect(line).toMatch(/^[ -~]{0,80}$/);
      }),
      { seed: 31337, numRuns: 200 },
    );
  });
});

describe('names', () => {
  test.each([
    ['pump', 'pump'],
    ['feed-pair.yaml', 'feed_pair_yaml'],
    ['Gew\u00e4chshaus Nr. 4', 'Gewachshaus_Nr_4'],
    ['2x1.5', 'loop_2x1_5'],
    ['', 'loop'],
    ['\u6e29\u5ba4', 'loop'],
    ['x'.repeat(90), 'x'.repeat(60)],
  ])('%s becomes %s', (text, name) => {
    expect(safeSubcircuitName(text)).toBe(name);
  });

  test('any text becomes a name that the writer takes, and a name stays as it is', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), (text) => {
        const name = safeSubcircuitName(text);
        expect(safeSubcircuitName(name)).toBe(name);
        expect(netlistText({ ...input, name })).toContain(`.subckt ${name} a1 b1\n`);
      }),
      { seed: 4711, numRuns: 200 },
    );
  });

  test('an unsafe name or a length of zero is refused', () => {
    for (const name of ['', '2x', 'a b', 'a\n.end', 'x'.repeat(61)]) {
      expect(codeOf(() => netlistText({ ...input, name }))).toBe('NAME');
    }
    for (const length of [0, -1, Number.NaN, Infinity]) {
      expect(codeOf(() => netlistText({ ...input, length }))).toBe('DOMAIN');
    }
  });
});
