/**
 * Whether a fit is the best there is: equal extremes where theory wants them, and nothing better from
 * random starts.
 */
import { describe, expect, test } from 'vitest';
import { minimaxDescent } from '../../src/fit/descent.ts';
import { errorSlopes, relativeErrors, type Target, targetOf } from '../../src/fit/error.ts';
import { fitSections } from '../../src/fit/index.ts';
import { HAIR_COPPER, pairSamples, STEEL, THICK_COPPER, THIN_COPPER } from './wide-pair.ts';

/** Park and Miller 1988, minimal standard generator. */
function generator(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

function randomStart(target: Target, sections: number, random: () => number): Float64Array {
  const { omega, increment, inductance } = target;
  const span = omega[omega.length - 1] / omega[0];
  const poles = Array.from({ length: sections }, () => omega[0] * span ** (1.2 * random() - 0.05));
  const resistances = poles.map((p) => {
    const at = Math.max(
      0,
      omega.findIndex((w) => w > p),
    );
    return (0.3 + random()) * 0.5 * (Math.abs(increment[at]) + 1e-4 * omega[at] * inductance[at]);
  });
  return Float64Array.from([...resistances, ...poles, 0.9 * inductance[omega.length - 1]]);
}

describe('the optimum', () => {
  const cases = [
    ['1 mm pair', [THIN_COPPER], 1, 1e8, 4],
    ['1 mm pair', [THIN_COPPER], 1, 1e8, 6],
    ['steel', [STEEL], 10, 1e7, 5],
    ['steel and hair', [STEEL, HAIR_COPPER], 1, 1e9, 6],
    ['thick, thin and hair', [THICK_COPPER, THIN_COPPER, HAIR_COPPER], 1, 1e9, 5],
  ] as const;

  test.each(cases)('%s %#: twelve random starts find nothing better', (name, pairs, from, to, sections) => {
    const samples = pairSamples(pairs, from, to);
    const target = targetOf(samples, 0, 2);
    const model = fitSections(samples, { sections });
    const found = Math.max(model.fittedErrors.resistance, model.fittedErrors.inductance);
    const seed = 7919 * sections;
    const random = generator(seed);
    let best = Infinity;
    let same = 0;
    for (let k = 0; k < 12; k++) {
      const { worst } = minimaxDescent(target, randomStart(target, sections, random));
      best = Math.min(best, worst);
      if (Math.abs(worst / found - 1) < 1e-3) same++;
    }
    console.log(
      `${name}, ${sections} sections: ${found.toExponential(3)}; ${same} of 12 random starts end there (seed ${seed})`,
    );
    // 1e-3: the descent ends when a step promises less than 1e-5 of the error
    expect(found).toBeLessThan(best * (1 + 1e-3));
    expect(same).toBeGreaterThan(0);
  });

  test.each([1, 2, 3, 4, 5])('%i sections: 2 N + 2 equal extremes of R and L together', (sections) => {
    const samples = pairSamples([THIN_COPPER], 10, 1e7);
    const target = targetOf(samples, 0, 2);
    const model = fitSections(samples, { sections });
    const parameters = Float64Array.from([
      ...model.sections.map((s) => s.resistance),
      ...model.sections.map((s) => s.resistance / s.inductance),
      model.inductanceInfinity,
    ]);
    const errors = relativeErrors(target, parameters, new Float64Array(2 * target.omega.length));
    const worst = Math.max(...errors.map(Math.abs));
    const equal = errors.filter((e) => Math.abs(e) > worst * (1 - 1e-3)).length;
    // 2 N + 1 parameters and the height: a strict local optimum of a minimax problem (Cheney 1966, chapter 2)
    expect(equal).toBeGreaterThanOrEqual(2 * sections + 2);
  });

  test('the slopes are those of the errors (central differences)', () => {
    const target = targetOf(pairSamples([STEEL], 10, 1e7), 0, 2);
    const parameters = randomStart(target, 3, generator(5));
    const rows = 2 * target.omega.length;
    const unit = 1e-6;
    const slopes = new Float64Array(rows * 7);
    errorSlopes(target, parameters, unit, slopes);
    const step = 1e-5;
    for (let j = 0; j < 7; j++) {
      const at = (sign: number) => {
        const shifted = parameters.map((v, k) =>
          k !== j ? v : j < 6 ? v * Math.exp(sign * step) : v + sign * step * unit,
        );
        return relativeErrors(target, shifted, new Float64Array(rows));
      };
      const [up, down] = [at(1), at(-1)];
      for (let i = 0; i < rows; i++) {
        const slope = (up[i] - down[i]) / (2 * step);
        expect(Math.abs(slope - slopes[i * 7 + j])).toBeLessThan(1e-8 * (1 + Math.abs(slope)));
      }
    }
  });
});
