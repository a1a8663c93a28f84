/** Kelvin functions, derived from I and K of complex argument, against printed tables. */
import { describe, expect, test } from 'vitest';
import { readRows } from '../../scripts/accuracy-skin.mjs';
import { kelvinFirst, kelvinSecond } from '../../src/skin/index.ts';
import { lastDigit, origin, published } from './published.ts';

function kelvin(name: string, x: number): number {
  switch (name) {
    case 'ber':
      return kelvinFirst(x).ber;
    case 'bei':
      return kelvinFirst(x).bei;
    case 'berp':
      return kelvinFirst(x).berPrime;
    case 'beip':
      return kelvinFirst(x).beiPrime;
    case 'ker':
      return kelvinSecond(x).ker;
    case 'kei':
      return kelvinSecond(x).kei;
    case 'kerp':
      return kelvinSecond(x).kerPrime;
    case 'keip':
      return kelvinSecond(x).keiPrime;
    default:
      throw new Error(`no Kelvin function ${name}`);
  }
}

describe('printed tables', () => {
  for (const id of ['kelvin-zhang-jin-7s', 'kelvin-ber-halfstep', 'kelvin-as-9-12']) {
    const group = published(id);
    test(`${id}: ${origin(group)}`, () => {
      expect(group.values.length).toBeGreaterThan(10);
      for (const { inputs, value, printed } of group.values) {
        // kei 0 is printed: the limit, ker has its pole there
        const got = kelvin(
          String(inputs.f),
          inputs.x === 0 && inputs.f === 'kei' ? 1e-100 : Number(inputs.x),
        );
        // half a unit of the last printed digit; the handbook entry from memory may be one unit off; the 17th digit of
        // a double is not its own
        const units = group.provenance === 'from-memory' ? 1 : 0.5;
        const allowed = units * lastDigit(printed) + 2.3e-16 * Math.abs(value);
        expect(Math.abs(got - value), `${inputs.f} ${inputs.x}`).toBeLessThanOrEqual(allowed);
      }
    });
  }

  const digits = published('kelvin-19-digit');
  test(`kelvin-19-digit, 1e-10 to 1000: ${origin(digits)}`, () => {
    expect(digits.values.length).toBe(88);
    for (const { inputs, printed } of digits.values) {
      const got = kelvin(String(inputs.f), Number(inputs.x));
      // 2 units of rounding: the printed number rounded to double and ours
      expect(Math.abs(got / Number(printed) - 1), `${inputs.f} ${inputs.x}`).toBeLessThan(4.5e-16);
    }
  });

  const zeros = published('kelvin-zeros-8d');
  test(`kelvin-zeros-8d: the functions change sign within the last printed digit: ${origin(zeros)}`, () => {
    expect(zeros.values.length).toBe(40);
    for (const { inputs, value } of zeros.values) {
      const below = kelvin(String(inputs.f), value - 5e-9);
      const above = kelvin(String(inputs.f), value + 5e-9);
      expect(below * above, `${inputs.f} ${inputs.m}`).toBeLessThan(0);
    }
  });
});

test('at the doubles next to their zeros the functions keep 14 digits', () => {
  const [{ kelvin: rows }] = readRows('zeros.json') as [{ kelvin: [string, number, string][] }];
  for (const [name, x, wanted] of rows) {
    // the value is about 1e-16 of the scale of the function, of 31 digits 15 are left
    expect(Math.abs(kelvin(name, x) / Number(wanted) - 1), `${name} ${x}`).toBeLessThan(1e-14);
  }
});

test('derivatives are those of the functions', () => {
  for (const x of [0.3, 1.7, 6.1, 23]) {
    const h = 1e-4 * x;
    for (const name of ['ber', 'bei', 'ker', 'kei']) {
      const difference = (kelvin(name, x + h) - kelvin(name, x - h)) / (2 * h);
      const scale = Math.abs(kelvin(name, x)) + Math.abs(difference);
      // central difference: h^2/6 of the third derivative, which is near the function itself for x > 1
      expect(Math.abs(kelvin(`${name}p`, x) - difference)).toBeLessThan(1e-5 * scale);
    }
  }
});

test('limits and domain', () => {
  expect(kelvinFirst(0)).toEqual({ ber: 1, bei: 0, berPrime: 0, beiPrime: 0 });
  // ker x -> -ln(x/2) - gamma, kei x -> -pi/4 (DLMF 10.65)
  expect(kelvinSecond(1e-100).kei).toBeCloseTo(-Math.PI / 4, 15);
  expect(kelvinSecond(1e-100).ker).toBeCloseTo(-Math.log(0.5e-100) - 0.5772156649015329, 12);
  for (const bad of [-1, NaN, Infinity, 1e10]) {
    expect(() => kelvinFirst(bad)).toThrow(expect.objectContaining({ code: 'DOMAIN' }));
    expect(() => kelvinSecond(bad)).toThrow(expect.objectContaining({ code: 'DOMAIN' }));
  }
  expect(() => kelvinSecond(0)).toThrow(expect.objectContaining({ code: 'DOMAIN' }));
  expect(() => kelvinFirst(1020)).toThrow(expect.objectContaining({ code: 'DOMAIN' }));
  expect(kelvinSecond(1100)).toEqual({ ker: 0, kei: 0, kerPrime: 0, keiPrime: 0 });
});
