/**
 * Wire gauges. AWG by its law (ASTM B258): 39 equal ratios from 4/0 (0.46 in) to 36 (0.005 in). SWG by its table
 * (British standard wire gauge, legal since 1884, later BS 3737), from memory.
 */

/** One size of a gauge. */
export interface WireSize {
  /** as users write it, such as `AWG 2/0` */
  readonly name: string;
  readonly gauge: 'AWG' | 'SWG';
  /** [m] */
  readonly diameter: number;
}

/** [m] */
const INCH = 0.0254;

/** Sizes of ASTM B258: 4/0 (number -3) to 56. */
const AWG_FIRST = -3;
const AWG_LAST = 56;

/** [m] diameter of AWG size n (0 for 1/0, -1 for 2/0, ..): 0.005 in 92^((36-n)/39), ASTM B258. */
export function awgDiameter(n: number): number {
  return 0.005 * INCH * 92 ** ((36 - n) / 39);
}

/** [mil] diameters of SWG 7/0, 6/0, .., 2/0, 0, 1, .., 50. */
const SWG_MILS = [
  500, 464, 432, 400, 372, 348, 324, 300, 276, 252, 232, 212, 192, 176, 160, 144, 128, 116, 104, 92, 80, 72,
  64, 56, 48, 40, 36, 32, 28, 24, 22, 20, 18, 16.4, 14.8, 13.6, 12.4, 11.6, 10.8, 10, 9.2, 8.4, 7.6, 6.8, 6,
  5.2, 4.8, 4.4, 4, 3.6, 3.2, 2.8, 2.4, 2, 1.6, 1.2, 1,
];
const SWG_FIRST = -6;
const SWG_LAST = SWG_FIRST + SWG_MILS.length - 1;

function awg(n: number): WireSize {
  return {
    name: `AWG ${n < 1 ? `${1 - n}/0` : n}`,
    gauge: 'AWG',
    diameter: awgDiameter(n),
  };
}

/** The trade writes SWG 0, but AWG 1/0. */
function swg(n: number): WireSize {
  const diameter = SWG_MILS[n - SWG_FIRST]! * 1e-3 * INCH;
  return { name: `SWG ${n < 0 ? `${1 - n}/0` : n}`, gauge: 'SWG', diameter };
}

/** All sizes, thick to thin, AWG before SWG. */
export function listWireSizes(): WireSize[] {
  const sizes: WireSize[] = [];
  for (let n = AWG_FIRST; n <= AWG_LAST; n++) sizes.push(awg(n));
  for (let n = SWG_FIRST; n <= SWG_LAST; n++) sizes.push(swg(n));
  return sizes;
}

/** Number of a size: `12`, `0`, `1/0`, `2/0`, `00`, `000`; undefined for anything else. */
function sizeNumber(text: string): number | undefined {
  const aught = /^([1-9])\/0$/.exec(text);
  if (aught !== null) return 1 - Number(aught[1]);
  if (/^0+$/.test(text)) return 1 - text.length;
  return /^[1-9]\d?$/.test(text) ? Number(text) : undefined;
}

/** Reads `AWG 12`, `12 AWG`, `AWG 2/0`, `AWG 00`, `SWG 20`; undefined for no size of these gauges. */
export function parseWireSize(text: string): WireSize | undefined {
  const match = /^(?:(AWG|SWG)\s*([\d/]+)|([\d/]+)\s*(AWG|SWG))$/i.exec(text.trim());
  if (match === null) return undefined;
  const gauge = (match[1] ?? match[4])!.toUpperCase();
  const n = sizeNumber((match[2] ?? match[3])!);
  if (n === undefined) return undefined;
  if (gauge === 'AWG') return n >= AWG_FIRST && n <= AWG_LAST ? awg(n) : undefined;
  return n >= SWG_FIRST && n <= SWG_LAST ? swg(n) : undefined;
}
