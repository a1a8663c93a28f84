/** Conductivity of a wire: from its metal and temperature, a given resistance, or the metal area of a strand. */
import { isOutsideLinearRange, parseWireSize, resistivityAt } from '../model/index.ts';
import { Problem } from '../problem.ts';
import { Fault } from './fault.ts';
import type { Material } from './materials.ts';
import { TEMPERATURE } from './materials.ts';
import { valueIn } from './quantity.ts';
import { quote } from './quote.ts';
import { guard, quantityOf, type Reading, readText } from './reading.ts';
import type { Path } from './source.ts';

/**
 * A given resistance may lie this far below that of solid metal (constants of the metal and of the catalogue differ);
 * farther below it is a slip of a unit or of the material.
 */
const LEAST_RESISTANCE_RATIO = 0.9;
/** And this far above it: a strand of foil and air, or a slip. */
const GREATEST_RESISTANCE_RATIO = 20;

/** [ohm m] resistivity of a metal at a temperature [°C], the fault placed by the caller. */
function rho(material: Material, temperature: number): number {
  try {
    return resistivityAt(material, temperature);
  } catch (error) {
    if (error instanceof Problem) throw new Fault(error.code, error.message);
    throw error;
  }
}

/** What the conductivity of a wire depends on. */
export interface WireMetal {
  readonly material: Material;
  /** [°C] */
  readonly temperature: number;
  /** [m] */
  readonly radius: number;
}

/** [S/m] of solid metal at the wire's temperature; Infinity for a perfect conductor. */
export function solidConductivity(reading: Reading, path: Path, wire: WireMetal): number | undefined {
  return guard(reading, path, () => 1 / rho(wire.material, wire.temperature));
}

/** [S/m] that gives the wire the resistance of a strand of this metal area: the strand's area over the circle's. */
export function strandedConductivity(reading: Reading, path: Path, wire: WireMetal): number | undefined {
  const text = readText(reading, path);
  if (text === undefined) return undefined;
  return guard(reading, path, () => {
    const circle = Math.PI * wire.radius ** 2;
    const area = strandArea(reading, text);
    if (!(area > 0)) throw new Fault('RANGE', `${quote(text)} is no metal area; give one above zero`);
    if (area > circle * (1 + 1e-9)) {
      const most = `${(circle * 1e6).toPrecision(5)} mm²`;
      throw new Fault('RANGE', `${quote(text)} does not fit into the wire's ${most}; raise the diameter`);
    }
    return Math.min(1, area / circle) / rho(wire.material, wire.temperature);
  });
}

/** [m2] */
function strandArea(reading: Reading, text: string): number {
  const size = parseWireSize(text);
  if (size !== undefined) return (Math.PI / 4) * size.diameter ** 2;
  return valueIn('area', quantityOf(text, reading.parser, reading.lets), quote(text));
}

/**
 * [S/m] that gives the wire a resistance per length such as `0.554 ohm/km at 20 °C`, carried to the wire's
 * temperature by the law of its metal. Without `at` the resistance must hold at the wire's temperature of 20 °C:
 * elsewhere the two readings differ, and the file has to say which is meant.
 */
export function givenConductivity(reading: Reading, path: Path, wire: WireMetal): number | undefined {
  const text = readText(reading, path);
  if (text === undefined) return undefined;
  return guard(reading, path, () => {
    const [valueText, atText] = splitAt(text);
    const value = resolveQuantity(reading, valueText, 'resistancePerLength');
    if (!(value > 0)) throw new Fault('RANGE', `${quote(text)} is no resistance; give one above zero`);
    if (atText === undefined && wire.temperature !== 20) {
      const say = `${valueText} at 20 °C, or ${valueText} at ${wire.temperature} °C`;
      throw new Fault('MISSING', `the temperature where ${quote(text)} holds; write ${say}`);
    }
    const at = atText === undefined ? 20 : resolveQuantity(reading, atText, 'temperature');
    if (!(at >= TEMPERATURE.min && at <= TEMPERATURE.max)) {
      throw new Fault('RANGE', `${quote(atText)} is outside ${TEMPERATURE.text}`);
    }
    const circle = Math.PI * wire.radius ** 2;
    const solid = rho(wire.material, at) / circle;
    const ratio = value / solid;
    if (!(ratio >= LEAST_RESISTANCE_RATIO && ratio <= GREATEST_RESISTANCE_RATIO)) {
      const own = `solid ${wire.material.name} of this size has ${(solid * 1e3).toPrecision(4)} ohm/km there`;
      throw new Fault('RANGE', `${quote(text)} does not fit the wire: ${own}; check unit, size and material`);
    }
    return 1 / (ratio * rho(wire.material, wire.temperature));
  });
}

function resolveQuantity(
  reading: Reading,
  text: string,
  family: 'resistancePerLength' | 'temperature',
): number {
  const value = reading.lets.resolve(text);
  return valueIn(family, quantityOf(String(value), reading.parser, reading.lets), quote(text));
}

/** `0.554 ohm/km at 20 °C` -> its two parts. */
function splitAt(text: string): [string, string | undefined] {
  const parts = text.split(/\s+at\s+/);
  if (parts.length > 2) throw new Fault('EXPRESSION', `${quote(text)} says at more than once`);
  return [parts[0]!.trim(), parts[1]?.trim()];
}

/** Remark on a metal used where its constants are not known to hold, or undefined. */
export function temperatureCaution(material: Material, temperature: number): string | undefined {
  if (isOutsideLinearRange(material, temperature)) {
    const [low, high] = material.linearRange!;
    return `${material.name} at ${temperature} °C: its resistivity is taken as linear in temperature, which holds from ${low} °C to ${high} °C`;
  }
  if (!material.coefficientGiven && temperature !== material.referenceTemperature) {
    return `${material.name} has no temperature_coefficient: its resistivity at ${material.referenceTemperature} °C is used at ${temperature} °C`;
  }
  return undefined;
}
