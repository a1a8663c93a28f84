/** Why a single value can not be read; the reader adds the place and makes a Problem of it. */
import type { ErrorCode } from '../problem.ts';

export class Fault extends Error {
  readonly code: ErrorCode;

  constructor(code: ErrorCode, text: string) {
    super(text);
    this.code = code;
  }
}

/** Thrown where the cause was reported already, so that one mistake gives one line. */
export class Reported extends Error {}

/** Thrown where an expression is met before the expression reader is loaded: load it and read again. */
export class NeedsExpressions extends Error {}
