/** Arithmetic of quantities: dimensions are checked, temperatures in °C are points, never to be added or scaled. */
import { DIMENSIONLESS, type Dimension, familyOf, sameDimension } from './families.ts';
import { Fault } from './fault.ts';
import { MAX_EXPONENT } from './limits.ts';
import type { Quantity } from './quantity.ts';

const plain = (value: number, dimension: Dimension, ...from: readonly Quantity[]): Quantity => ({
  value,
  dimension,
  celsius: false,
  difference: from.some(({ difference }) => difference === true),
});

function combine(a: Dimension, b: Dimension, sign: number): Dimension {
  return a.map((exponent, k) => exponent + sign * b[k]!) as unknown as Dimension;
}

/** Throws EXPRESSION where a temperature in °C is scaled: twice 30 °C is not 60 °C. */
export function notCelsius(x: Quantity): Quantity {
  if (x.celsius) {
    throw new Fault(
      'EXPRESSION',
      'a temperature in °C can only be compared, or shifted by a difference in K, such as ambient + 40 K',
    );
  }
  return x;
}

function sameKind(a: Quantity, b: Quantity, verb: string): void {
  if (!sameDimension(a.dimension, b.dimension)) {
    const kinds = `${familyOf(a.dimension)} and ${familyOf(b.dimension)}`;
    throw new Fault('UNIT', `${kinds} can not be ${verb}; both need units of one kind`);
  }
}

/** Point + difference is a point; the sum of two points has no meaning. */
export function add(a: Quantity, b: Quantity): Quantity {
  sameKind(a, b, 'added');
  if (a.celsius && b.celsius) notCelsius(a);
  return {
    value: a.value + b.value,
    dimension: a.dimension,
    celsius: a.celsius || b.celsius,
    difference: !(a.celsius || b.celsius) && (a.difference === true || b.difference === true),
  };
}

/** Point - point is a difference, point - difference a point. */
export function subtract(a: Quantity, b: Quantity): Quantity {
  sameKind(a, b, 'subtracted');
  if (b.celsius && !a.celsius) notCelsius(b);
  return {
    value: a.value - b.value,
    dimension: a.dimension,
    celsius: a.celsius && !b.celsius,
    difference: b.celsius || (!a.celsius && (a.difference === true || b.difference === true)),
  };
}

export function multiply(a: Quantity, b: Quantity): Quantity {
  return plain(notCelsius(a).value * notCelsius(b).value, combine(a.dimension, b.dimension, 1), a, b);
}

/** Throws RANGE for a division by zero. */
export function divide(a: Quantity, b: Quantity): Quantity {
  if (b.value === 0) throw new Fault('RANGE', 'a division by zero');
  return plain(notCelsius(a).value / notCelsius(b).value, combine(a.dimension, b.dimension, -1), a, b);
}

export function negate(a: Quantity): Quantity {
  return plain(-notCelsius(a).value, a.dimension, a);
}

/** The exponent is a number without unit, of magnitude up to MAX_EXPONENT. */
export function power(base: Quantity, exponent: Quantity): Quantity {
  notCelsius(base);
  if (exponent.celsius || !sameDimension(exponent.dimension, DIMENSIONLESS)) {
    throw new Fault('UNIT', 'an exponent must be a number without a unit');
  }
  const e = exponent.value;
  if (!(Math.abs(e) <= MAX_EXPONENT)) {
    throw new Fault('RANGE', `an exponent of ${e}; allowed are -${MAX_EXPONENT} to ${MAX_EXPONENT}`);
  }
  return plain(base.value ** e, base.dimension.map((k) => k * e) as unknown as Dimension);
}
