import { describe, expect, test } from 'vitest';
import fixture from '../../fixtures/fit/nnls.json' with { type: 'json' };
import { nonNegativeLeastSquares } from '../../src/fit/nnls.ts';

/** Gradient of |A x - b|^2 / 2, and the residual norm. */
function gradient(
  problem: { rows: number; columns: number; values: number[]; rhs: number[] },
  x: Float64Array,
) {
  const { rows, columns, values, rhs } = problem;
  const residual = rhs.map((b, i) => x.reduce((sum, xj, j) => sum + xj * values[j * rows + i], -b));
  const slopes = Array.from({ length: columns }, (_, j) =>
    residual.reduce((sum, r, i) => sum + r * values[j * rows + i], 0),
  );
  return { slopes, norm: Math.hypot(...residual) };
}

describe(`non-negative least squares against ${fixture.source}`, () => {
  test.each(fixture.problems.map((p) => [p.kind, p.rows, p.columns, p] as const))(
    '%s %i x %i',
    (_kind, rows, columns, problem) => {
      const values = Float64Array.from(problem.values);
      const x = nonNegativeLeastSquares({ rows, columns, values }, Float64Array.from(problem.rhs));
      const { slopes, norm } = gradient(problem, x);
      expect(norm).toBeLessThanOrEqual(problem.residual * (1 + 1e-12));
      // optimality (Karush, Kuhn, Tucker): the slope is zero where x > 0 and not negative where x = 0
      const scale = Math.hypot(...problem.rhs) * Math.sqrt(rows);
      for (let j = 0; j < columns; j++) {
        expect(x[j]).toBeGreaterThanOrEqual(0);
        if (x[j] > 0) expect(Math.abs(slopes[j])).toBeLessThan(1e-12 * scale);
        else expect(slopes[j]).toBeGreaterThan(-1e-12 * scale);
      }
    },
  );

  test('a column twice is used once and does not stall', () => {
    const values = Float64Array.from([1, 0, 0, 1, 0, 0, 0, 1, 0]);
    const x = nonNegativeLeastSquares({ rows: 3, columns: 3, values }, Float64Array.from([2, 3, 1]));
    expect(x[0] + x[1]).toBeCloseTo(2, 14);
    expect(x[2]).toBeCloseTo(3, 14);
  });

  test('a right side that points away from every column gives zeros', () => {
    const x = nonNegativeLeastSquares(
      { rows: 2, columns: 2, values: Float64Array.from([1, 0, 0.6, 0.8]) },
      Float64Array.from([-1, -1]),
    );
    expect(Array.from(x)).toEqual([0, 0]);
  });
});
