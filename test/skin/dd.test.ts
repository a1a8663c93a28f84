/** Double-double arithmetic against exact fixed-point arithmetic in BigInt, and its functions against laws and digits. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  type Dd,
  type DdComplex,
  dc,
  dcAdd,
  dcDivide,
  dcExp,
  dcLog,
  dcMultiply,
  dcSqrt,
  dcSubtract,
  ddAdd,
  ddDivide,
  ddMultiply,
  ddTimes,
  scaled,
  scaledAdd,
  scaledDivide,
  scaledMultiply,
  scaledPower,
  scaledToComplex,
} from '../../src/skin/dd/index.ts';
import { distance } from './relative.ts';

const SEED = 20240611;
const runs = { seed: SEED, numRuns: 500 };

/** x 2^400, exact for every double-double used here */
const big = (x: Dd): bigint => BigInt(x.hi * 2 ** 400) + BigInt(x.lo * 2 ** 400);
const ONE = 2n ** 400n;
const abs = (x: bigint): bigint => (x < 0n ? -x : x);

/** normalised: |lo| <= ulp(hi)/2 */
const real: fc.Arbitrary<Dd> = fc
  .tuple(
    fc.double({ min: 0.001, max: 1000, noNaN: true }),
    fc.double({ min: -0.5, max: 0.5, noNaN: true }),
    fc.boolean(),
  )
  .map(([hi, fraction, negative]) => {
    const lo = fraction * 2 ** (Math.floor(Math.log2(hi)) - 53);
    return negative ? { hi: -hi, lo: -lo } : { hi, lo };
  })
  // a lo below 2^-300 would leave the fixed point
  .filter(({ lo }) => lo === 0 || Math.abs(lo) > 2 ** -200);

describe('one operation is exact to 2^-102', () => {
  const near = (got: bigint, wanted: bigint, size: bigint) =>
    expect(abs(got - wanted) * 2n ** 102n <= size, `${got} ${wanted}`).toBe(true);

  test('sum', () => {
    // relative to the sum itself, also where the two nearly cancel
    fc.assert(
      fc.property(real, real, (a, b) => {
        const wanted = big(a) + big(b);
        near(big(ddAdd(a, b)), wanted, abs(wanted));
      }),
      runs,
    );
  });

  test('product, by a double too', () => {
    fc.assert(
      fc.property(real, real, (a, b) => {
        const wanted = (big(a) * big(b)) / ONE;
        near(big(ddMultiply(a, b)), wanted, abs(wanted));
        const byDouble = (big(a) * big({ hi: b.hi, lo: 0 })) / ONE;
        near(big(ddTimes(a, b.hi)), byDouble, abs(byDouble));
      }),
      runs,
    );
  });

  test('quotient', () => {
    fc.assert(
      fc.property(real, real, (a, b) => {
        const wanted = (big(a) * ONE) / big(b);
        near(big(ddDivide(a, b)), wanted, abs(wanted));
      }),
      runs,
    );
  });
});

const point: fc.Arbitrary<DdComplex> = fc.tuple(real, real).map(([re, im]) => ({ re, im }));

describe('complex', () => {
  test('(a b) / b = a and sums', () => {
    fc.assert(
      fc.property(point, point, (a, b) => {
        expect(distance(scaled(dcDivide(dcMultiply(a, b), b)), scaled(a))).toBeLessThan(1e-30);
        expect(distance(scaled(dcSubtract(dcAdd(a, b), b)), scaled(a))).toBeLessThan(1e-24);
      }),
      runs,
    );
  });

  test('root and logarithm', () => {
    fc.assert(
      fc.property(point, (z) => {
        const root = dcSqrt(z);
        expect(root.re.hi).toBeGreaterThanOrEqual(0);
        expect(distance(scaled(dcMultiply(root, root)), scaled(z))).toBeLessThan(1e-30);
        expect(distance(dcExp(dcLog(z)), scaled(z))).toBeLessThan(1e-29);
      }),
      runs,
    );
  });

  test('exp(a + b) = exp(a) exp(b)', () => {
    fc.assert(
      fc.property(point, point, (a, b) => {
        const product = scaledMultiply(dcExp(a), dcExp(b));
        // the error of a + b is 1e-32 of up to 2000
        expect(distance(dcExp(dcAdd(a, b)), product)).toBeLessThan(1e-28);
      }),
      runs,
    );
  });

  test('any size: powers, sums, quotients', () => {
    const z = scaled(dc(1.5, -0.75));
    const power = scaledPower(z, 4001);
    expect(distance(scaledDivide(power, scaledPower(z, 4000)), z)).toBeLessThan(1e-27);
    expect(distance(scaledAdd(power, scaledPower(z, 10)), power)).toBe(0);
    expect(scaledPower(z, 0).value.re.hi * 2 ** scaledPower(z, 0).exponent).toBe(1);
    expect(scaledToComplex(power).re).not.toBeLessThan(Infinity);
    expect(Math.abs(scaledToComplex(scaledDivide(z, power)).re)).toBe(0);
  });
});

/** hi + lo against a decimal of 36 digits */
function expectDigits(got: Dd, decimal: string, tolerance: number): void {
  const negative = decimal.startsWith('-');
  const digits = decimal.replace('-', '').split('.');
  const wanted = (BigInt(digits[0]! + digits[1]!) * ONE) / 10n ** BigInt(digits[1]!.length);
  const error = Number(abs(big(got) - (negative ? -wanted : wanted))) / Number(ONE);
  expect(error, decimal).toBeLessThan(tolerance * Math.abs(Number(decimal)));
}

// mpmath at 60 digits
const COS_SIN: [number, string, string][] = [
  [0.25, '0.9689124217106447841445954494941891998', '0.2474039592545229295968487048493891959'],
  [1.0, '0.5403023058681397174009366074429766037', '0.8414709848078965066525023216302989996'],
  [22.0, '-0.9999608263946371264541747392126937741', '-0.008851309290403875921690256815772332463'],
  [355.0, '-0.9999999995456589801659358416927540811', '-0.00003014435335948844921433028000865009959'],
  [1000000.0, '0.9367521275331447869385325350749187757', '-0.3499935021712929521176524867807714691'],
  [123456789.0, '0.1402596815339096299506554932787677397', '0.9901147518020354442291637380068317371'],
  [1000000000.0, '0.8378871813639023343897756435515723561', '0.545843449448699564244387270897514529'],
];

describe('digits', () => {
  test.each(COS_SIN)('cosine and sine of %d', (y, cosine, sine) => {
    const { value, exponent } = dcExp(dc(0, y));
    const factor = 2 ** exponent;
    expectDigits({ hi: value.re.hi * factor, lo: value.re.lo * factor }, cosine, 1e-30);
    expectDigits({ hi: value.im.hi * factor, lo: value.im.lo * factor }, sine, 1e-30);
  });

  test('e and ln 10', () => {
    const { value, exponent } = dcExp(dc(1, 0));
    expectDigits(
      { hi: value.re.hi * 2 ** exponent, lo: value.re.lo * 2 ** exponent },
      '2.718281828459045235360287471352662498',
      1e-31,
    );
    expectDigits(dcLog(dc(10, 0)).re, '2.302585092994045684017991454684364208', 1e-31);
  });

  test('arguments beyond the reduction are refused', () => {
    expect(() => dcExp(dc(0, 2e10))).toThrow(expect.objectContaining({ code: 'DOMAIN' }));
    expect(() => dcExp(dc(2e10, 0))).toThrow(expect.objectContaining({ code: 'DOMAIN' }));
  });
});
