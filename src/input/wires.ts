/** Wires of a file: size, metal, temperature, insulation. Where they stand is `placement.ts`. */
import { parseWireSize, resistivityAt } from '../model/index.ts';
import type { Caution } from '../problem.ts';
import { isLaterKey } from './later-keys.ts';
import { MAX_WIRES } from './limits.ts';
import { type Material, type Materials, readMaterialName, TEMPERATURE } from './materials.ts';
import { readNames } from './names.ts';
import { quote, quoteList } from './quote.ts';
import { type Range, type Reading, readQuantity, readText, report, reportAt } from './reading.ts';
import { isGiven, isMapValue, type Path, valueAt } from './source.ts';
import {
  givenConductivity,
  solidConductivity,
  strandedConductivity,
  temperatureCaution,
  type WireMetal,
} from './wire-metal.ts';

/** Ends of what the model describes: a few hundred atoms, and more than any conductor built. */
const DIAMETER: Range = { min: 1e-9, max: 100, text: '1 nm to 100 m' };
const RADIUS: Range = { min: 5e-10, max: 50, text: '0.5 nm to 50 m' };
const AREA: Range = { min: 1e-18, max: 1e4, text: '1e-18 m² to 1e4 m²' };
const INSULATION: Range = { min: 0, max: 100, text: '0 to 100 m' };

/** A wire without its place; parts that could not be read are undefined. */
export interface WireDraft {
  readonly name: string;
  /** [m] */
  readonly radius: number | undefined;
  /** [S/m] */
  readonly conductivity: number | undefined;
  readonly material: Material | undefined;
  /** [°C] */
  readonly temperature: number;
  /** [m] */
  readonly insulation: number;
}

export interface WireDrafts {
  readonly wires: readonly WireDraft[];
  readonly cautions: readonly Caution[];
}

/** @param temperature [°C] of wires that say nothing */
export function readWires(reading: Reading, materials: Materials, temperature: number): WireDrafts {
  const names = readNames(reading, 'wires');
  if (names.length > MAX_WIRES) {
    report(reading, 'TOO_LARGE', `${names.length} wires; the most is ${MAX_WIRES}`, ['wires']);
    return { wires: [], cautions: [] };
  }
  if (names.length === 0 && isMapValue(valueAt(reading.source.data, ['wires']))) {
    report(reading, 'MISSING', 'no wires; give at least two', ['wires']);
  }
  const wires = names.map((name) => readWire(reading, name, materials, temperature));
  return { wires, cautions: cautionsOf(reading, wires) };
}

function readWire(reading: Reading, name: string, materials: Materials, common: number): WireDraft {
  const path: Path = ['wires', name];
  const written = valueAt(reading.source.data, path);
  const key = (k: string): Path => [...path, k];
  const radius = isMapValue(written) ? readRadius(reading, path, written) : undefined;
  const own = readQuantity(reading, key('temperature'), 'temperature', TEMPERATURE);
  const temperature = own ?? common;
  const insulation = readQuantity(reading, key('insulation'), 'length', INSULATION) ?? 0;
  const material = readMaterialName(reading, key('material'), materials);
  const draft = {
    name,
    radius,
    conductivity: undefined,
    material,
    temperature,
    insulation,
  };
  if (!isMapValue(written) || radius === undefined || material === undefined) return draft;
  return {
    ...draft,
    conductivity: conductivityOf(reading, path, written, {
      material,
      temperature,
      radius,
    }),
  };
}

function conductivityOf(
  reading: Reading,
  path: Path,
  written: Record<string, unknown>,
  wire: WireMetal,
): number | undefined {
  const key = (k: string): Path => [...path, k];
  const stranded = isGiven(written, 'stranded');
  const resistance = isGiven(written, 'resistance');
  if (stranded && resistance) {
    report(reading, 'WRONG_TYPE', 'stranded and resistance exclude each other; give one', key('resistance'));
    return undefined;
  }
  if (wire.material.resistivity === 0 && (stranded || resistance)) {
    report(
      reading,
      'WRONG_TYPE',
      'a perfect conductor has no resistance; name a metal, or leave it out',
      key(stranded ? 'stranded' : 'resistance'),
    );
    return undefined;
  }
  if (stranded) return strandedConductivity(reading, key('stranded'), wire);
  if (resistance) return givenConductivity(reading, key('resistance'), wire);
  return solidConductivity(reading, key('temperature'), wire);
}

const SIZE_KEYS = ['diameter', 'radius', 'area', 'gauge'] as const;

/** [m] */
function readRadius(reading: Reading, path: Path, written: Record<string, unknown>): number | undefined {
  const key = (k: string): Path => [...path, k];
  const given = SIZE_KEYS.filter((k) => isGiven(written, k));
  if (given.length > 1) {
    report(reading, 'WRONG_TYPE', `${given.join(' and ')} exclude each other; give one size`, key(given[1]!));
    return undefined;
  }
  const size = given[0];
  if (size === undefined) {
    reportNoSize(reading, path);
    return undefined;
  }
  if (isGiven(written, 'stranded') && (size === 'area' || size === 'gauge')) {
    const text = `stranded says the metal area; give the outer diameter beside it, not ${size}`;
    report(reading, 'WRONG_TYPE', text, key(size));
    return undefined;
  }
  switch (size) {
    case 'diameter':
      return half(readQuantity(reading, key(size), 'length', DIAMETER));
    case 'radius':
      return readQuantity(reading, key(size), 'length', RADIUS);
    case 'area': {
      const area = readQuantity(reading, key(size), 'area', AREA);
      return area === undefined ? undefined : Math.sqrt(area / Math.PI);
    }
    case 'gauge':
      return half(readGauge(reading, key(size)));
  }
}

const half = (diameter: number | undefined) => (diameter === undefined ? undefined : diameter / 2);

/** A misspelt or later key explains the missing size: then no second line. */
function reportNoSize(reading: Reading, path: Path): void {
  const known = new Set<string>([
    ...SIZE_KEYS,
    'stranded',
    'resistance',
    'material',
    'temperature',
    'insulation',
    'at',
  ]);
  if (reading.source.keys(path).some((k) => !known.has(k) || isLaterKey(path, k))) return;
  const text = `wire ${quote(path.at(-1))} has no size; give diameter, radius, area or gauge`;
  reportAt(reading, 'MISSING', text, reading.source.keyPlace(path));
}

/** [m] diameter */
function readGauge(reading: Reading, path: Path): number | undefined {
  const text = readText(reading, path);
  if (text === undefined) return undefined;
  const size = parseWireSize(text);
  if (size !== undefined) return size.diameter;
  const hint = /^[\d/]+$/.test(text)
    ? `; write AWG ${text} or SWG ${text}`
    : '; gauges are AWG 4/0 to AWG 56 and SWG 7/0 to SWG 50, for other sizes give diameter or area';
  report(reading, 'UNKNOWN_GAUGE', `no wire size ${quote(text)}${hint}`, path);
  return undefined;
}

function cautionsOf(reading: Reading, wires: readonly WireDraft[]): Caution[] {
  const cautions: Caution[] = [];
  const texts = new Set<string>();
  for (const { material, temperature } of wires) {
    const text = material === undefined ? undefined : temperatureCaution(material, temperature);
    if (text !== undefined) texts.add(text);
  }
  for (const text of texts) cautions.push({ code: 'TEMPERATURE_RANGE', text });
  const strands = wires.filter((wire) => isStrand(reading, wire));
  if (strands.length > 0) {
    const names = quoteList(strands.map((w) => w.name));
    const text = `${names}: more resistance than solid metal of this diameter has: taken as a strand, one round wire of its outer diameter and of its resistance (no lay is added); currents between strands are not modelled`;
    cautions.push({ code: 'STRAND_AS_WIRE', text });
  }
  return cautions;
}

/** [1] resistance above that of solid metal by more than purity and tolerance explain: the wire is a strand. */
const STRAND_RATIO = 1.05;

function isStrand(reading: Reading, wire: WireDraft): boolean {
  if (valueAt(reading.source.data, ['wires', wire.name, 'stranded']) !== undefined) return true;
  if (wire.conductivity === undefined || wire.material === undefined) return false;
  return wire.conductivity * resistivityAt(wire.material, wire.temperature) < 1 / STRAND_RATIO;
}
