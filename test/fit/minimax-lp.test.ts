import { describe, expect, test } from 'vitest';
import fixture from '../../fixtures/fit/minimax-lp.json' with { type: 'json' };
import type { MinimaxProblem } from '../../src/fit/held-set.ts';
import { minimaxStep } from '../../src/fit/minimax-lp.ts';

type Stored = (typeof fixture.problems)[number];

function problemOf(stored: Stored): MinimaxProblem {
  return {
    errors: Float64Array.from(stored.errors),
    slopes: Float64Array.from(stored.slopes),
    low: Float64Array.from(stored.low),
    high: Float64Array.from(stored.high),
  };
}

function worstAfter({ errors, slopes }: MinimaxProblem, step: Float64Array): number {
  const n = step.length;
  return errors.reduce(
    (worst, e, i) => Math.max(worst, Math.abs(step.reduce((sum, d, j) => sum + d * slopes[i * n + j], e))),
    0,
  );
}

describe(`linear minimax step against ${fixture.source}`, () => {
  test.each(fixture.problems.map((p) => [p.kind, p.errors.length, p.low.length, p] as const))(
    '%s, %i errors in %i variables',
    (_kind, _rows, _n, stored) => {
      const problem = problemOf(stored);
      const { step, worst, exchanges, settled } = minimaxStep(problem);
      expect(settled).toBe(true);
      // 3e-6: the traces in the cost that break ties may cost twice 1e-6 of the largest error
      const largest = Math.max(...stored.errors.map(Math.abs));
      expect(worst - stored.worst).toBeLessThan(3e-6 * largest);
      expect(worst - stored.worst).toBeGreaterThan(-1e-9 * largest);
      expect(worstAfter(problem, step)).toBeCloseTo(worst, 14);
      step.forEach((d, j) => {
        expect(d).toBeGreaterThanOrEqual(stored.low[j]);
        expect(d).toBeLessThanOrEqual(stored.high[j]);
      });
      expect(exchanges).toBeLessThan(30 * (stored.low.length + 1));
    },
  );

  test('a warm start from its own optimum needs no exchange, one from a like problem gives the same value', () => {
    for (const stored of fixture.problems) {
      const problem = problemOf(stored);
      const cold = minimaxStep(problem);
      expect(minimaxStep(problem, cold.held).exchanges).toBe(0);
      const errors = problem.errors.map((e, i) => e * (1 + 0.1 * Math.sin(i)));
      const like = { ...problem, errors };
      const largest = Math.max(...errors.map(Math.abs));
      expect(Math.abs(minimaxStep(like, cold.held).worst - minimaxStep(like).worst)).toBeLessThan(
        4e-6 * largest,
      );
    }
  });

  test('a held set that is of no use here is passed over', () => {
    for (const stored of fixture.problems) {
      const problem = problemOf(stored);
      // the upper sides of the first errors, and all of them at once, whatever their slopes
      const useless = Int32Array.from(
        { length: stored.low.length + 1 },
        (_, k) => 2 * (k % stored.errors.length),
      );
      const { worst } = minimaxStep(problem, useless);
      expect(worst - stored.worst).toBeLessThan(3e-6 * Math.max(...stored.errors.map(Math.abs)));
    }
  });

  test('one variable, by hand: |1 - d| and |d| meet at one half; a box of 0.2 stops at 0.8', () => {
    const errors = Float64Array.from([1, 0]);
    const slopes = Float64Array.from([-1, 1]);
    const open = minimaxStep({ errors, slopes, low: Float64Array.of(-9), high: Float64Array.of(9) });
    expect(open.worst).toBeCloseTo(0.5, 12);
    const boxed = minimaxStep({ errors, slopes, low: Float64Array.of(-0.2), high: Float64Array.of(0.2) });
    expect(boxed.worst).toBeCloseTo(0.8, 12);
  });

  test('slopes of zero leave the errors as they are', () => {
    const still = minimaxStep({
      errors: Float64Array.from([0.3, -0.7]),
      slopes: new Float64Array(4),
      low: Float64Array.from([-1, 0]),
      high: Float64Array.from([1, 1]),
    });
    expect(still.worst).toBe(0.7);
  });
});
