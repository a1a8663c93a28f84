/**
 * Where the model stops to hold for a case: two-dimensional, quasi-static, local conductivity, smooth surface, linear
 * permeability. Only what lies within the frequencies of the case is said; one caution a code, from the lowest
 * frequency where it applies.
 */
import { type Case, conductivityAt, findMetal, MU0, SPEED_OF_LIGHT, type Wire } from '../model/index.ts';
import type { Caution, CautionCode } from '../problem.ts';

/** [1] Part of a wavelength from which fields are no longer those of steady currents (common practice, no source). */
const WAVELENGTH_PART = 20;

/**
 * [1] Least length over the largest spacing. The inductance of a go and return pair with open ends is smaller than
 * that of the same piece of an endless one by about mu0 d / pi (Grover 1946, parallel wires of finite length, from
 * memory): at ten spacings some per cent of a usual loop.
 */
const LEAST_SPACINGS = 10;

/**
 * [1] Skin depth over mean free path. The parameter of Reuter and Sondheimer (1948), alpha = 1.5 (path / depth)^2, is
 * 0.015 there: two decades below the region of alpha near 1 where the local law fails outright.
 */
const FREE_PATHS = 10;

/** [m] rms height of a usual drawn surface (common practice, no source). */
const ROUGHNESS = 0.3e-6;

/**
 * [1] Skin depth over roughness where the resistance is 1 % higher: (2/pi) atan(1.4 (rms / depth)^2) = 0.01 (Hammerstad
 * and Jensen 1980, from memory).
 */
const ROUGHNESS_DEPTHS = Math.sqrt(1.4 / Math.tan(0.005 * Math.PI));

/**
 * The cautions of the file and those that follow from its sizes, metals and frequencies.
 */
export function caseCautions(c: Case): Caution[] {
  const highest = c.frequencies.reduce((most, f) => Math.max(most, f), 0);
  const found = [
    ...wavelength(c),
    ...shortRun(c),
    ...anomalousSkin(c.wires),
    ...roughness(c.wires),
    ...magnetic(c.wires),
  ];
  return [...c.cautions, ...found.filter(({ from_hz }) => from_hz === undefined || from_hz <= highest)];
}

/** [m] largest distance of two centres. */
function largestSpacing({ wires }: Case): number {
  let most = 0;
  for (let i = 0; i < wires.length; i++) {
    for (let j = 0; j < i; j++) {
      most = Math.max(most, Math.hypot(wires[i].x - wires[j].x, wires[i].y - wires[j].y));
    }
  }
  return most;
}

function wavelength(c: Case): Caution[] {
  const spacing = largestSpacing(c);
  if (spacing === 0) return [];
  return [
    {
      code: 'WAVELENGTH',
      text:
        `the largest spacing, ${millimetres(spacing)}, is over 1/${WAVELENGTH_PART} of the wavelength in air: ` +
        'radiation and travel time are left out',
      from_hz: SPEED_OF_LIGHT / (WAVELENGTH_PART * spacing),
    },
  ];
}

function shortRun(c: Case): Caution[] {
  const spacing = largestSpacing(c);
  if (c.length === undefined || c.length >= LEAST_SPACINGS * spacing) return [];
  return [
    {
      code: 'SHORT_RUN',
      text:
        `the length, ${millimetres(c.length)}, is below ${LEAST_SPACINGS} times the largest spacing, ` +
        `${millimetres(spacing)}: the ends, which are left out, count for some per cent or more`,
    },
  ];
}

/** [Hz] where the skin depth of a metal falls to `depth` [m]. */
function frequencyOfDepth(depth: number, conductivity: number, relativePermeability: number): number {
  return 1 / (Math.PI * MU0 * relativePermeability * conductivity * depth * depth);
}

/** Mean free paths are known at room temperature and go with the conductivity (Gall 2016: their ratio is constant). */
function anomalousSkin(wires: readonly Wire[]): Caution[] {
  const starts = wires.flatMap((wire) => {
    const metal = findMetal(wire.material);
    if (metal?.meanFreePath === undefined || wire.conductivity === Number.POSITIVE_INFINITY) return [];
    // a strand taken as one wire conducts less as a whole; its metal does not
    const sigma = conductivityAt(metal, wire.temperature);
    const path = (metal.meanFreePath * sigma) / conductivityAt(metal, metal.referenceTemperature);
    return [{ wire, from_hz: frequencyOfDepth(FREE_PATHS * path, sigma, wire.relativePermeability) }];
  });
  return lowest(starts, 'ANOMALOUS_SKIN', (wire) => {
    const depths = `${FREE_PATHS} mean free paths of the electrons`;
    return `the skin depth in ${wire.material} is below ${depths}: the true resistance is higher (anomalous skin effect)`;
  });
}

function roughness(wires: readonly Wire[]): Caution[] {
  const starts = wires
    .filter((wire) => wire.conductivity < Number.POSITIVE_INFINITY)
    .map((wire) => ({
      wire,
      from_hz: frequencyOfDepth(ROUGHNESS_DEPTHS * ROUGHNESS, wire.conductivity, wire.relativePermeability),
    }));
  return lowest(
    starts,
    'ROUGHNESS',
    (wire) =>
      `the skin depth in ${wire.material} is so small that a surface rough by ${ROUGHNESS * 1e6} um rms, usual for ` +
      'drawn wire, adds over 1 % to the resistance',
  );
}

/** The caution of the wire where it starts first. */
function lowest(
  starts: readonly { readonly wire: Wire; readonly from_hz: number }[],
  code: CautionCode,
  text: (wire: Wire) => string,
): Caution[] {
  if (starts.length === 0) return [];
  const first = starts.reduce((a, b) => (b.from_hz < a.from_hz ? b : a));
  return [{ code, text: text(first.wire), from_hz: first.from_hz }];
}

function magnetic(wires: readonly Wire[]): Caution[] {
  const names = wires.filter((wire) => wire.relativePermeability > 1).map((wire) => `"${wire.name}"`);
  if (names.length === 0) return [];
  const several = names.length > 1;
  return [
    {
      code: 'MAGNETIC',
      text:
        `${several ? 'wires' : 'wire'} ${names.slice(0, 6).join(', ')}${names.length > 6 ? ', ..' : ''} ` +
        `${several ? 'are' : 'is'} magnetic and taken as linear: permeability varies with the current and between ` +
        'samples, and hysteresis adds loss',
    },
  ];
}

function millimetres(metres: number): string {
  return `${Number((metres * 1e3).toPrecision(4))} mm`;
}
