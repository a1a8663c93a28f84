/** A physical value and the common way to write one: a number and a unit, read exactly and without any library. */

import { type Dimension, FAMILIES, type Family, familyOf, sameDimension } from './families.ts';
import { Fault } from './fault.ts';
import { COMMON_UNITS } from './units.ts';

/** 0 °C in kelvin. */
export const ZERO_CELSIUS = 273.15;

export interface Quantity {
  /** [SI]; kelvin for temperatures */
  readonly value: number;
  readonly dimension: Dimension;
  /** true for a temperature written in °C: a point on the scale, which can not be added to another point */
  readonly celsius: boolean;
  /** true for what came of a difference of two points of the scale: 40 K between 60 °C and 20 °C, no temperature */
  readonly difference?: boolean;
}

const NUMBER = /^([+-]?(?:\d+\.?\d*|\.\d+))(?:e([+-]?\d+))?(?![\w.])/i;
const NUMBER_AND_UNIT =
  /^([+-]?\s?(?:\d+\.?\d*|\.\d+))(?:e([+-]?\d+))?\s?([A-Za-z/1][^+*(),-]*(?:\^-\d)?)?$/i;

/** Digits times a power of ten in one rounding: 4.1 mm is the number nearest to 0.0041. */
function decimal(digits: string, exponent: string | undefined, power: number): number {
  return Number(`${digits.replace(' ', '')}e${Number(exponent ?? 0) + power}`);
}

/** `plainUnits` text of the form `number` or `number unit` with a common unit; undefined for anything else. */
export function commonQuantity(text: string): Quantity | undefined {
  if (NUMBER.exec(text)?.[0] === text) {
    return {
      value: Number(text),
      dimension: FAMILIES.number.dimension,
      celsius: false,
    };
  }
  const match = NUMBER_AND_UNIT.exec(text.replace(/\s?\*\s?(?=[A-Za-z])/g, ' '));
  if (match === null) return undefined;
  const [, digits, exponent, unitText] = match;
  const unit = unitText!.replace(/\s?([/^])\s?/g, '$1').trim();
  if (unit === 'degC') {
    const value = decimal(digits!, exponent, 0) + ZERO_CELSIUS;
    return { value, dimension: FAMILIES.temperature.dimension, celsius: true };
  }
  const scale = COMMON_UNITS.get(unit);
  if (scale === undefined) return undefined;
  const value = decimal(digits!, exponent, scale.power) * scale.factor;
  return { value, dimension: scale.dimension, celsius: false };
}

/** [SI, °C for temperatures] the value, once it is of the family. Throws UNIT or RANGE. */
export function valueIn(family: Family, quantity: Quantity, shown: string): number {
  const wanted = FAMILIES[family];
  if (!Number.isFinite(quantity.value)) {
    throw new Fault(
      'RANGE',
      `${shown} is not a finite number; give ${wanted.name} such as ${wanted.example}`,
    );
  }
  if (!sameDimension(quantity.dimension, wanted.dimension)) {
    const bare = sameDimension(quantity.dimension, FAMILIES.number.dimension);
    const found = bare ? 'has no unit' : `is ${familyOf(quantity.dimension)}`;
    throw new Fault(
      'UNIT',
      `${shown} ${found}; write ${wanted.name} with its unit, such as ${wanted.example}`,
    );
  }
  if (family !== 'temperature') return quantity.value;
  if (quantity.difference === true) {
    const kelvin = Number(quantity.value.toPrecision(6));
    throw new Fault(
      'UNIT',
      `${shown} is a difference of temperatures, ${kelvin} K; to shift a temperature give the shift in K: Ta - 20 K`,
    );
  }
  // the way to kelvin and back leaves rounding in the fourteenth digit, which would show in a table of inputs
  return Math.round((quantity.value - ZERO_CELSIUS) * 1e10) / 1e10;
}
