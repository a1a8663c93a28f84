/**
 * The units that a file may use. Common ones are read here, without loading anything and by exact powers of ten;
 * every other allowed one (long names, rare prefixes, compounds) goes through mathjs, which `unit-names` limits.
 */
import { DIMENSIONLESS, type Dimension, FAMILIES } from './families.ts';

/** A unit as a power of ten (exact in decimal) or as a factor. */
export interface UnitScale {
  readonly power: number;
  readonly factor: number;
  readonly dimension: Dimension;
}

const { length, area, frequency, resistance, inductance, resistivity, conductivity } = FAMILIES;

/** 1 circular mil is the area of a circle of 1 mil: pi/4 (25.4e-6 m)^2. */
const CIRCULAR_MIL = (Math.PI / 4) * 25.4e-6 * 25.4e-6;

const factor = (value: number, dimension: Dimension): UnitScale => ({
  power: 0,
  factor: value,
  dimension,
});

/** Units of the trade that mathjs does not know. */
export const OWN_UNITS: ReadonlyMap<string, UnitScale> = new Map<string, UnitScale>([
  ['percent', { power: -2, factor: 1, dimension: DIMENSIONLESS }],
  ['ppm', { power: -6, factor: 1, dimension: DIMENSIONLESS }],
  ['mils', factor(25.4e-6, length.dimension)],
  ['thou', factor(25.4e-6, length.dimension)],
  ['metre', factor(1, length.dimension)],
  ['metres', factor(1, length.dimension)],
  ['cmil', factor(CIRCULAR_MIL, area.dimension)],
  ['kcmil', factor(1000 * CIRCULAR_MIL, area.dimension)],
  ['MCM', factor(1000 * CIRCULAR_MIL, area.dimension)],
]);

/** Prefixes by their power of ten; `.` stands for none. */
const POWER: Readonly<Record<string, number>> = {
  p: -12,
  n: -9,
  u: -6,
  m: -3,
  c: -2,
  d: -1,
  '.': 0,
  k: 3,
  M: 6,
  G: 9,
  T: 12,
};

/** The unit `tail` with each of the prefixes, `shift` further powers of ten aside. */
function prefixed(prefixes: string, tail: string, dimension: Dimension, shift = 0): [string, UnitScale][] {
  return Array.from(prefixes.replaceAll(' ', ''), (prefix) => {
    const scale = { power: POWER[prefix]! + shift, factor: 1, dimension };
    return [prefix === '.' ? tail : prefix + tail, scale];
  });
}

const plain = (name: string, dimension: Dimension, power = 0): [string, UnitScale] => [
  name,
  { power, factor: 1, dimension },
];

const coefficient = FAMILIES.temperatureCoefficient.dimension;

/** Unit text (one space for a product, none around `/` and `^`) -> scale. Temperatures are treated by the reader. */
export const COMMON_UNITS: ReadonlyMap<string, UnitScale> = new Map<string, UnitScale>([
  ...OWN_UNITS,
  ...prefixed('p n u m c d . k', 'm', length.dimension),
  ['in', factor(0.0254, length.dimension)],
  ['inch', factor(0.0254, length.dimension)],
  ['ft', factor(0.3048, length.dimension)],
  ['mil', factor(25.4e-6, length.dimension)],
  plain('m^2', area.dimension),
  plain('cm^2', area.dimension, -4),
  plain('mm^2', area.dimension, -6),
  plain('um^2', area.dimension, -12),
  ...prefixed('m . k M G T', 'Hz', frequency.dimension),
  ...prefixed('n u m . k M', 'ohm', resistance.dimension),
  ...prefixed('p n u m .', 'H', inductance.dimension),
  ...prefixed('n u m . k', 'ohm/m', FAMILIES.resistancePerLength.dimension),
  ...prefixed('u m .', 'ohm/km', FAMILIES.resistancePerLength.dimension, -3),
  ...prefixed('n u m .', 'ohm m', resistivity.dimension),
  plain('uohm cm', resistivity.dimension, -8),
  plain('ohm mm^2/m', resistivity.dimension, -6),
  ...prefixed('. k M', 'S/m', conductivity.dimension),
  ...['1/K', '/K', 'K^-1', '1/degC', '/degC'].map((name) => plain(name, coefficient)),
  ...['ppm/K', 'ppm/degC'].map((name) => plain(name, coefficient, -6)),
  ...['percent/K', 'percent/degC'].map((name) => plain(name, coefficient, -2)),
  plain('K', FAMILIES.temperature.dimension),
  plain('rad', FAMILIES.angle.dimension),
  ['deg', factor(Math.PI / 180, FAMILIES.angle.dimension)],
]);
