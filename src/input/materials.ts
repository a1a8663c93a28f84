/** Own metals of a file, and the choice of a metal by name. */
import { findMetal, type Metal, metalNames } from '../model/index.ts';
import { readNames } from './names.ts';
import { quote } from './quote.ts';
import { type Range, type Reading, readQuantity, readText, report, reportAt, suggest } from './reading.ts';
import { isGiven, isMapValue, type Path, valueAt } from './source.ts';

/** From better than the purest metal near absolute zero to worse than graphite. */
const RESISTIVITY: Range = { min: 1e-13, max: 1, text: '1e-13 to 1 ohm m' };
const CONDUCTIVITY: Range = { min: 1, max: 1e13, text: '1 to 1e13 S/m' };
const COEFFICIENT: Range = { min: -0.1, max: 0.1, text: '-0.1 to 0.1 1/K' };
const PERMEABILITY: Range = { min: 1, max: 1e6, text: '1 to 1e6' };
/** Absolute zero to beyond the boiling point of every metal. */
export const TEMPERATURE: Range = {
  min: -273.15,
  max: 6000,
  text: '-273.15 °C to 6000 °C',
};

/** A metal, built in or of the file; `coefficientGiven` false: its resistivity is taken at any temperature. */
export interface Material extends Metal {
  readonly coefficientGiven: boolean;
}

/** Own materials by name; a value of undefined marks a name that is there but could not be read. */
export type Materials = ReadonlyMap<string, Material | undefined>;

export function readMaterials(reading: Reading): Materials {
  const materials = new Map<string, Material | undefined>();
  for (const name of readNames(reading, 'materials')) {
    if (findMetal(name) !== undefined) {
      const text = `${quote(name)} is a built-in metal; take another name`;
      reportAt(reading, 'NAME', text, reading.source.keyPlace(['materials', name]));
    }
    if (reading.lets.resolve(name) !== name) {
      const text = `${quote(name)} is a let name and a material; rename one`;
      reportAt(reading, 'NAME', text, reading.source.keyPlace(['materials', name]));
    }
    materials.set(name, readMaterial(reading, name));
  }
  return materials;
}

function readMaterial(reading: Reading, name: string): Material | undefined {
  const path: Path = ['materials', name];
  const written = valueAt(reading.source.data, path);
  if (!isMapValue(written)) return undefined;
  const conductivity = readQuantity(reading, [...path, 'conductivity'], 'conductivity', CONDUCTIVITY);
  const resistivity = readQuantity(reading, [...path, 'resistivity'], 'resistivity', RESISTIVITY);
  const both = isGiven(written, 'conductivity') && isGiven(written, 'resistivity');
  const none = !isGiven(written, 'conductivity') && !isGiven(written, 'resistivity');
  if (both) {
    report(reading, 'WRONG_TYPE', `material ${quote(name)} has conductivity and resistivity; give one`, [
      ...path,
      'resistivity',
    ]);
  }
  if (none) {
    const text = `material ${quote(name)} has neither conductivity nor resistivity; give one, such as 55 MS/m`;
    reportAt(reading, 'MISSING', text, reading.source.keyPlace(path));
  }
  const key = (k: string): Path => [...path, k];
  const coefficient = readQuantity(
    reading,
    key('temperature_coefficient'),
    'temperatureCoefficient',
    COEFFICIENT,
  );
  const reference = readQuantity(reading, key('reference_temperature'), 'temperature', TEMPERATURE);
  const permeability = readQuantity(reading, key('relative_permeability'), 'number', PERMEABILITY);
  const rho = resistivity ?? (conductivity === undefined ? undefined : 1 / conductivity);
  if (rho === undefined) return undefined;
  return {
    name,
    aliases: [],
    resistivity: rho,
    temperatureCoefficient: coefficient ?? 0,
    referenceTemperature: reference ?? 20,
    relativePermeability: permeability ?? 1,
    linearRange: undefined,
    meanFreePath: undefined,
    source: 'the file',
    coefficientGiven: coefficient !== undefined,
  };
}

/** The metal named at a path, copper where none is named; undefined where it is unknown (reported) or unreadable. */
export function readMaterialName(reading: Reading, path: Path, materials: Materials): Material | undefined {
  if (valueAt(reading.source.data, path) === undefined) return builtIn('copper');
  const name = readText(reading, path);
  if (name === undefined) return undefined;
  if (materials.has(name)) return materials.get(name);
  const found = builtIn(name);
  if (found === undefined) {
    const known = [...materials.keys(), ...metalNames()];
    const list = `known are ${known.slice(0, 30).join(', ')}`;
    const text = `no material ${quote(name)}${suggest(reading, name, known)}; ${list}, or define it under materials`;
    report(reading, 'UNKNOWN_MATERIAL', text, path);
  }
  return found;
}

function builtIn(name: string): Material | undefined {
  const metal = findMetal(name);
  return metal === undefined ? undefined : { ...metal, coefficientGiven: true };
}
