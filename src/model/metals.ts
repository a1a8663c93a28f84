/**
 * Built-in metals: resistivity at a reference temperature and its linear law
 * rho(T) = rho_ref (1 + alpha_ref (T - T_ref)). Every figure names its source; `from memory` marks those whose source
 * text was not at hand when the figure was entered. Mean free paths: D. Gall, J. Appl. Phys. 119, 085101 (2016),
 * table I, room temperature, from memory.
 */
import { Problem } from '../problem.ts';

/** A metal with its linear law of resistivity. */
export interface Metal {
  readonly name: string;
  /** other names that a file may use */
  readonly aliases: readonly string[];
  /** [ohm m] at the reference temperature; 0 for a perfect conductor */
  readonly resistivity: number;
  /** [1/K] relative rise of the resistivity per kelvin, at the reference temperature */
  readonly temperatureCoefficient: number;
  /** [°C] */
  readonly referenceTemperature: number;
  /** [1] */
  readonly relativePermeability: number;
  /** [°C] lowest and highest temperature where the linear law holds; undefined where unknown */
  readonly linearRange: readonly [number, number] | undefined;
  /** [m] mean free path of the electrons at room temperature; undefined where unknown */
  readonly meanFreePath: number | undefined;
  readonly source: string;
}

/** [S/m] 100 % IACS: annealed copper of 1/58 ohm mm2/m at 20 °C (IEC 60028:1925). */
export const IACS = 58e6;

/** [1/K] of annealed copper at 20 °C (IEC 60028:1925). */
const COPPER_COEFFICIENT = 0.00393;

/** Fraction of IACS of hard-drawn copper; the coefficient of copper falls in proportion to its conductivity. */
const HARD_DRAWN = 0.973;

const MATULA = 'R. A. Matula, J. Phys. Chem. Ref. Data 8, 1147 (1979)';
const SLOPE = 'coefficient: slope between 273 K and 400 K of the same table';
const CIRCULAR_74 = 'US Bureau of Standards, Circular 74 (1937), table of resistivities';

interface Entry {
  aliases?: string[];
  resistivity: number;
  coefficient: number;
  permeability?: number;
  range: [number, number];
  meanFreePath?: number;
  source: string;
}

function metal(name: string, entry: Entry): Metal {
  return {
    name,
    aliases: entry.aliases ?? [],
    resistivity: entry.resistivity,
    temperatureCoefficient: entry.coefficient,
    referenceTemperature: 20,
    relativePermeability: entry.permeability ?? 1,
    linearRange: entry.range,
    meanFreePath: entry.meanFreePath,
    source: entry.source,
  };
}

/** In the order in which they are listed to users. */
export const METALS: readonly Metal[] = [
  metal('copper', {
    aliases: ['annealed-copper'],
    resistivity: 1 / IACS,
    coefficient: COPPER_COEFFICIENT,
    range: [-75, 200],
    meanFreePath: 39.9e-9,
    source: 'annealed, 100 % IACS: IEC 60028:1925',
  }),
  metal('hard-drawn-copper', {
    resistivity: 1 / (HARD_DRAWN * IACS),
    coefficient: COPPER_COEFFICIENT * HARD_DRAWN,
    range: [-75, 150],
    meanFreePath: 39.9e-9,
    source:
      '97.3 % IACS: T. A. Short, Electric Power Distribution Handbook (2004) p. 44; coefficient in proportion to conductivity: NBS Handbook 100 (1966), from memory',
  }),
  metal('aluminium', {
    aliases: ['aluminum', 'aluminium-1350', 'aluminum-1350'],
    resistivity: 1 / (0.612 * IACS),
    coefficient: 0.00403,
    range: [-75, 200],
    meanFreePath: 18.9e-9,
    source:
      '1350-H19, 61.2 % IACS: The Aluminum Association, Aluminum Electrical Conductor Handbook (1989), table 4-4; coefficient: IEC 60287-1-1, table 1',
  }),
  metal('silver', {
    resistivity: 1.587e-8,
    coefficient: 0.00384,
    range: [-75, 200],
    meanFreePath: 53.3e-9,
    source: `pure: ${MATULA}, 293 K; ${SLOPE}; from memory`,
  }),
  metal('gold', {
    resistivity: 2.214e-8,
    coefficient: 0.00376,
    range: [-75, 200],
    meanFreePath: 37.7e-9,
    source: `pure: ${MATULA}, 293 K; ${SLOPE}; from memory (plating and bonding wire lie up to 10 % higher)`,
  }),
  metal('brass', {
    resistivity: 7e-8,
    coefficient: 0.002,
    range: [-50, 150],
    source: `typical, alloys lie between 6e-8 and 8e-8 ohm m: ${CIRCULAR_74}; from memory`,
  }),
  metal('bronze', {
    resistivity: 3.5e-8,
    coefficient: 0.003,
    range: [-50, 150],
    source: 'as used in cables: IEC 60287-1-1, table 1; from memory',
  }),
  metal('tin', {
    resistivity: 1.15e-7,
    coefficient: 0.0042,
    range: [-50, 100],
    source: `${CIRCULAR_74}; from memory`,
  }),
  metal('nickel', {
    resistivity: 6.93e-8,
    coefficient: 0.006,
    permeability: 100,
    range: [-10, 100],
    meanFreePath: 5.87e-9,
    source:
      'pure: CRC Handbook of Chemistry and Physics, electrical resistivity of pure metals, 293 K; coefficient: US Bureau of Standards, Circular 74 (1937), table of resistivities; from memory. Relative permeability: typical of weak fields, common practice, no source',
  }),
  metal('steel', {
    aliases: ['mild-steel'],
    resistivity: 1.38e-7,
    coefficient: 0.0045,
    permeability: 100,
    range: [-25, 100],
    source:
      'IEC 60287-1-1, table 1; from memory. Relative permeability: typical of mild steel in weak fields, common practice, no source; give your own material where it matters',
  }),
  {
    name: 'perfect',
    aliases: [],
    resistivity: 0,
    temperatureCoefficient: 0,
    referenceTemperature: 20,
    relativePermeability: 1,
    linearRange: undefined,
    meanFreePath: undefined,
    source: 'a perfect conductor: no internal field',
  },
];

/** The built-in metal of this name or alias. */
export function findMetal(name: string): Metal | undefined {
  return METALS.find((m) => m.name === name || m.aliases.includes(name));
}

/** Names and aliases of all built-in metals. */
export function metalNames(): string[] {
  return METALS.flatMap((m) => [m.name, ...m.aliases]);
}

/**
 * [ohm m] resistivity at a temperature [°C] by the linear law; 0 for a perfect conductor.
 * @throws Problem RANGE where the law gives no positive resistivity
 */
export function resistivityAt(metal: Metal, temperature: number): number {
  if (metal.resistivity === 0) return 0;
  const factor = 1 + metal.temperatureCoefficient * (temperature - metal.referenceTemperature);
  const resistivity = metal.resistivity * factor;
  if (resistivity > 0 && Number.isFinite(resistivity)) return resistivity;
  throw new Problem(
    'RANGE',
    `the linear law gives ${metal.name} no positive resistivity at ${temperature} °C; choose a temperature nearer to ${metal.referenceTemperature} °C, or own constants under materials`,
  );
}

/** [S/m] conductivity at a temperature [°C]; Infinity for a perfect conductor. Throws as `resistivityAt`. */
export function conductivityAt(metal: Metal, temperature: number): number {
  return 1 / resistivityAt(metal, temperature);
}

/** True when the linear law is known not to hold well at this temperature [°C]. */
export function isOutsideLinearRange(metal: Metal, temperature: number): boolean {
  if (metal.linearRange === undefined) return false;
  const [low, high] = metal.linearRange;
  return temperature < low || temperature > high;
}
