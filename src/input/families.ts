/** Families of quantities: what a value of the file must measure, with an example for messages. */

/** Exponents of [kg, m, s, A, K, rad]. */
export type Dimension = readonly [number, number, number, number, number, number];

export const DIMENSIONLESS: Dimension = [0, 0, 0, 0, 0, 0];

/** Plain family: the value is SI. `temperature` is read in °C. */
export const FAMILIES = {
  number: { name: 'a number', dimension: DIMENSIONLESS, example: '3' },
  ratio: { name: 'a ratio', dimension: DIMENSIONLESS, example: '1 %' },
  length: { name: 'a length', dimension: [0, 1, 0, 0, 0, 0], example: '2 mm' },
  area: { name: 'an area', dimension: [0, 2, 0, 0, 0, 0], example: '1.5 mm²' },
  temperature: {
    name: 'a temperature',
    dimension: [0, 0, 0, 0, 1, 0],
    example: '60 °C',
  },
  frequency: {
    name: 'a frequency',
    dimension: [0, 0, -1, 0, 0, 0],
    example: '50 Hz',
  },
  angle: { name: 'an angle', dimension: [0, 0, 0, 0, 0, 1], example: '60°' },
  resistance: {
    name: 'a resistance',
    dimension: [1, 2, -3, -2, 0, 0],
    example: '2 mohm',
  },
  inductance: {
    name: 'an inductance',
    dimension: [1, 2, -2, -2, 0, 0],
    example: '15 nH',
  },
  resistancePerLength: {
    name: 'a resistance per length',
    dimension: [1, 1, -3, -2, 0, 0],
    example: '0.554 ohm/km',
  },
  resistivity: {
    name: 'a resistivity',
    dimension: [1, 3, -3, -2, 0, 0],
    example: '17.2 nohm m',
  },
  conductivity: {
    name: 'a conductivity',
    dimension: [-1, -3, 3, 2, 0, 0],
    example: '55 MS/m',
  },
  temperatureCoefficient: {
    name: 'a temperature coefficient',
    dimension: [0, 0, 0, 0, -1, 0],
    example: '0.0039 1/K',
  },
} as const satisfies Record<string, { name: string; dimension: Dimension; example: string }>;

export type Family = keyof typeof FAMILIES;

/** Exponents may be fractions (sqrt), so compared within rounding. */
export function sameDimension(a: Dimension, b: Dimension): boolean {
  return a.every((exponent, k) => Math.abs(exponent - b[k]!) < 1e-9);
}

/** `a length`, or `something else` where no family fits. */
export function familyOf(dimension: Dimension): string {
  const found = Object.values(FAMILIES).find((family) => sameDimension(family.dimension, dimension));
  return found?.name ?? 'of no known kind';
}
