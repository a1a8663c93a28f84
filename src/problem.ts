/**
 * The closed list of error and caution codes, and the one class that carries an error.
 * A leaf: any folder may import it, it imports nothing.
 */

/** Error codes with the exit status of the command line that each leads to. */
export const EXIT_STATUS = {
  /** a wrong call: command, option or argument */
  USAGE: 2,
  /** the text is not YAML or JSON */
  SYNTAX: 2,
  /** the file is larger, deeper or slower to read than allowed */
  TOO_LARGE: 2,
  /** the bytes are not text */
  NOT_TEXT: 2,
  /** the version under `rimflow:` is missing or unknown */
  FORMAT_VERSION: 2,
  UNKNOWN_KEY: 2,
  /** a key or option of a later version */
  NOT_SUPPORTED: 2,
  /** a required key is missing */
  MISSING: 2,
  /** a value of the wrong kind, or keys that exclude each other */
  WRONG_TYPE: 2,
  /** a unit is missing, unknown or of the wrong family */
  UNIT: 2,
  /** a number outside its allowed range */
  RANGE: 2,
  /** an expression that can not be evaluated or is not allowed */
  EXPRESSION: 2,
  /** definitions that lead back to themselves */
  CIRCULAR: 2,
  /** a name with wrong letters, a reserved one, or one that clashes with a unit or metal */
  NAME: 2,
  /** two names alike, or alike but for case */
  DUPLICATE: 2,
  /** a reference to a wire that is not there */
  UNKNOWN_WIRE: 2,
  UNKNOWN_MATERIAL: 2,
  UNKNOWN_GAUGE: 2,
  OVERLAP: 2,
  /** a loop without go or return, or with a net current */
  EMPTY_LOOP: 2,
  /** a wire on both sides of one loop */
  BOTH_SIDES: 2,
  /** groups that share a wire but are not the same list */
  GROUP_CONFLICT: 2,
  NO_FREQUENCIES: 2,
  /** an argument of a library function outside its domain */
  DOMAIN: 2,
  /** a command needs `length` and the file has none */
  NO_LENGTH: 2,
  /** the wanted accuracy was not reached */
  NOT_REACHED: 3,
  /** a bounded iteration ran out */
  NO_CONVERGENCE: 3,
  /** a limit or a caution that the user asked to fail on */
  LIMIT: 1,
  READ_FAILED: 74,
  WRITE_FAILED: 74,
  INTERRUPTED: 130,
  /** a fault of the program */
  INTERNAL: 70,
} as const;

export type ErrorCode = keyof typeof EXIT_STATUS;

/** Where the two-dimensional, quasi-static, linear model stops to hold (or what was assumed on the way). */
export const CAUTION_CODES = [
  /** the largest spacing is over a twentieth of the wavelength */
  'WAVELENGTH',
  /** the run is shorter than ten spacings: end effects */
  'SHORT_RUN',
  /** skin depth near the mean free path of the electrons */
  'ANOMALOUS_SKIN',
  /** skin depth near a usual surface roughness */
  'ROUGHNESS',
  /** a magnetic metal: linear permeability, no saturation or hysteresis */
  'MAGNETIC',
  /** a temperature outside the range where resistivity is linear */
  'TEMPERATURE_RANGE',
  /** bare wires placed as touching stand at the smallest legal gap */
  'SMALLEST_GAP',
  /** a strand taken as one round wire */
  'STRAND_AS_WIRE',
  /** the wanted tolerance was not reached at some frequency */
  'TOLERANCE',
] as const;

export type CautionCode = (typeof CAUTION_CODES)[number];

/** A remark on a valid result; `from_hz` [Hz] is where it starts to hold, absent when it always does. */
export interface Caution {
  readonly code: CautionCode;
  readonly text: string;
  readonly from_hz?: number;
}

/** A position in an input text; line and column count from 1. */
export interface Place {
  readonly file: string;
  readonly line?: number;
  readonly column?: number;
}

/** An error that a user can act on: code, place, what was found, what is allowed, what to do. */
export class Problem extends Error {
  override readonly name = 'Problem';
  readonly code: ErrorCode;
  readonly place: Place | undefined;

  /** @param text one line: what was found, what is allowed, what to do */
  constructor(code: ErrorCode, text: string, place?: Place) {
    super(text);
    this.code = code;
    this.place = place;
  }

  /** Exit status of the command line for this error. */
  get exitStatus(): number {
    return EXIT_STATUS[this.code];
  }

  /** `file:line:column CODE text`, the parts of the place as far as they are known. */
  line(): string {
    const p = this.place;
    if (p === undefined) return `${this.code} ${this.message}`;
    const at = [p.file, p.line, p.column].filter((part) => part !== undefined).join(':');
    return `${at} ${this.code} ${this.message}`;
  }
}
