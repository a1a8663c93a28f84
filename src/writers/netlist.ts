/**
 * One loop's circuit as a subcircuit for SPICE-type simulators: resistors and inductors with literal values
 * only, the common subset of the SPICE2G and SPICE3 families. The text depends on its input alone, so equal
 * cases give equal files.
 */
import type { SectionModel } from '../fit/index.ts';
import { type LumpedExtra, SPEED_OF_LIGHT } from '../model/index.ts';
import { type Caution, Problem } from '../problem.ts';
import { asciiText, commentLines, isSafeSubcircuitName } from './netlist-text.ts';

export interface NetlistInput {
  /** of the subcircuit; see `safeSubcircuitName` */
  readonly name: string;
  /** of the case */
  readonly title: string;
  readonly loop: string;
  /** per metre */
  readonly model: SectionModel;
  /** [m] of the run, > 0 */
  readonly length: number;
  /** lumped parts in series with the run */
  readonly extra?: LumpedExtra;
  /** of the tool */
  readonly version: string;
  readonly cautions?: readonly Caution[];
  /** for the line that shows how to include the file */
  readonly fileName?: string;
}

/** The knee of an edge: rise time times bandwidth (common practice, one-pole response). */
const RISE_TIME_BANDWIDTH = 0.35;

/**
 * `.subckt NAME a1 b1` to `.ends`, below a header of comments: R_dc, L_inf, the sections and the lumped
 * parts in series between a1 (go end) and b1 (return end), for the whole length. Elements of zero value are
 * left out.
 * @throws Problem NAME for a name that is not letters, digits and _ from a letter on
 * @throws Problem DOMAIN for a length that is not above zero, or a circuit without any element
 */
export function netlistText(input: NetlistInput): string {
  const { name, length, model } = input;
  if (!isSafeSubcircuitName(name)) {
    throw new Problem(
      'NAME',
      `subcircuit name "${name}": a letter, then letters, digits and _ only, at most 60 of them`,
    );
  }
  if (!(length > 0 && Number.isFinite(length))) {
    throw new Problem(
      'DOMAIN',
      `a netlist for a length of ${length} m was asked for; the length must be above 0 m`,
    );
  }
  const body = chain([
    [['Rdc', model.resistanceDc * length]],
    [['Linf', model.inductanceInfinity * length]],
    ...model.sections.map((section, k): Element[] => [
      [`R${k + 1}`, section.resistance * length],
      [`L${k + 1}`, section.inductance * length],
    ]),
    [['Rextra', input.extra?.resistance ?? 0]],
    [['Lextra', input.extra?.inductance ?? 0]],
  ]);
  if (body.length === 0) throw new Problem('DOMAIN', `loop "${input.loop}": a circuit without any element`);
  return [...header(input), `.subckt ${name} a1 b1`, ...body, `.ends ${name}`, ''].join('\n');
}

/** Name and value of an element. */
type Element = readonly [string, number];

/**
 * Element lines of groups in series, the elements of a group in parallel; elements of zero value leave no
 * trace.
 */
function chain(groups: readonly (readonly Element[])[]): string[] {
  const present = groups
    .map((group) => group.filter(([, value]) => value > 0))
    .filter((group) => group.length > 0);
  return present.flatMap((group, k) => {
    const from = k === 0 ? 'a1' : `n${k}`;
    const to = k === present.length - 1 ? 'b1' : `n${k + 1}`;
    // 15 digits, and a plain exponent: letters after a number are scale factors in SPICE
    return group.map(([element, value]) => `${element} ${from} ${to} ${value.toExponential(14)}`);
  });
}

function header(input: NetlistInput): string[] {
  const { model, length, loop } = input;
  const { from, to } = model.band;
  const { fitted, unseen } = model.counts;
  const paragraphs = [
    asciiText(input.title) || `loop "${asciiText(loop)}"`,
    `Series impedance of loop "${asciiText(loop)}" over a run of ${engineering(length, 'm')}, ` +
      'with skin and proximity effect, between a1 (go end) and b1 (return end).',
    `${parts(input)} in series, all values positive: passive at every frequency.`,
    `Written by rimflow ${asciiText(input.version)}.`,
    '',
    `fitted band: ${engineering(from, 'Hz')} to ${engineering(to, 'Hz')}`,
    `worst error of R: ${percentUp(model.errors.resistance)} of R`,
    `worst error of L: ${percentUp(model.errors.inductance)} of L`,
    `Both of the run, measured against the computed table at ${fitted} fitted frequencies, ` +
      `at ${unseen} more between them, and at the peaks between neighbours.`,
    ...lumpedLines(input),
    '',
    'use:',
    `  .include ${input.fileName === undefined ? 'NAME-OF-THIS-FILE' : quotedName(asciiText(input.fileName))}`,
    `  Xrun GO RETURN ${input.name}`,
    '',
    ...validityLines(input),
    ...(input.cautions ?? []).map(({ code, text, from_hz }) => {
      const since = from_hz === undefined ? '' : ` from ${engineering(from_hz, 'Hz')}`;
      return `caution ${code}${since}: ${asciiText(text)}`;
    }),
  ];
  return paragraphs.flatMap(commentLines);
}

function lumpedLines({ extra }: NetlistInput): string[] {
  if (extra === undefined || (extra.resistance === 0 && extra.inductance === 0)) return [];
  const values = [
    ...(extra.resistance > 0 ? [`${engineering(extra.resistance, 'ohm')} (Rextra)`] : []),
    ...(extra.inductance > 0 ? [`${engineering(extra.inductance, 'H')} (Lextra)`] : []),
  ];
  return [`Lumped parts on top of the run, exact: ${values.join(', ')}.`];
}

/** Simulators end a name at a space unless it is quoted. */
function quotedName(name: string): string {
  return /\s/.test(name) ? `"${name}"` : name;
}

/** [1] a run of this share of a wavelength is short */
const SHORT_RUN = 1 / 20;

function validityLines({ model, extra, length }: NetlistInput): string[] {
  const wave = engineering(Number(((SHORT_RUN * SPEED_OF_LIGHT) / length).toPrecision(2)), 'Hz');
  const edge = engineering(Number((RISE_TIME_BANDWIDTH / model.band.to).toPrecision(2)), 's');
  return [
    'Valid within the fitted band. Below it only R at 0 Hz is exact; above it the circuit is an extrapolation: ' +
      `edges faster than about ${edge} reach beyond it. Quasi-static and without capacitance: the run must stay ` +
      `short against the wavelength (in air it is a twentieth of one at ${wave}). ` +
      'Metals are linear, at the temperatures of the case.',
    ...(model.resistanceDc === 0 && !(extra !== undefined && extra.resistance > 0)
      ? ['No resistance at 0 Hz: across an ideal voltage source it has no operating point; add a resistor.']
      : []),
  ];
}

/** What stands between the terminals, in words. */
function parts({ model }: NetlistInput): string {
  const { resistanceDc, inductanceInfinity, sections } = model;
  const list = [
    ...(resistanceDc > 0 ? ['Rdc'] : []),
    ...(inductanceInfinity > 0 ? ['Linf'] : []),
    ...(sections.length > 0
      ? [`${count(sections.length, 'section')} of a resistor parallel to an inductor`]
      : []),
  ];
  return list.length > 1 ? `${list.slice(0, -1).join(', ')} and ${list[list.length - 1]}` : list.join('');
}

const PREFIXES = ['p', 'n', 'u', 'm', '', 'k', 'M', 'G', 'T'];

/** Up to 6 digits with a prefix of the unit; comments only, for a simulator would read M as milli. */
function engineering(value: number, unit: string): string {
  if (value === 0) return `0 ${unit}`;
  const group = Math.max(-4, Math.min(4, Math.floor(Math.log10(value * (1 + 1e-6)) / 3)));
  return `${Number((value / 1000 ** group).toPrecision(6))} ${PREFIXES[group + 4]}${unit}`;
}

/** Rounded up in the third digit, so that the figure stays a bound. */
function percentUp(part: number): string {
  if (part === 0) return '0 %';
  const percent = 100 * part;
  const unit = 10 ** (Math.floor(Math.log10(percent)) - 2);
  return `${Number((Math.ceil(percent / unit) * unit).toPrecision(3))} %`;
}

function count(number: number, noun: string): string {
  return `${number} ${noun}${number === 1 ? '' : 's'}`;
}
