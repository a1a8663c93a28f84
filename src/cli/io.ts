/** What the command line needs of the machine, so that tests can stand in for it. */
import type { Case } from '../model/index.ts';
import type { FrequencyTable, SweepOptions } from '../sweep/index.ts';

export interface OutputStream {
  readonly isTerminal: boolean;
  /** Writes all of it. Rejects with the error of the system, EPIPE where nobody reads any more. */
  write(text: string): Promise<void>;
}

export interface Files {
  /**
   * At most `limit` bytes of a file, refused beyond without being read whole.
   * @throws Problem READ_FAILED or TOO_LARGE
   */
  read(path: string, limit: number): Promise<Uint8Array>;
  /** @throws Problem WRITE_FAILED where the path can not be written, as far as can be told without writing */
  checkTarget(path: string): void;
  /** True when both are the same file. */
  same(a: string, b: string): boolean;
  /**
   * The whole text or nothing: written beside and renamed.
   * @throws Problem WRITE_FAILED, with nothing left behind
   */
  writeWhole(path: string, text: string): Promise<void>;
}

export interface Io {
  readonly stdin: AsyncIterable<Uint8Array>;
  readonly stdout: OutputStream;
  readonly stderr: OutputStream;
  readonly files: Files;
  /** environment variables */
  readonly env: Readonly<Record<string, string | undefined>>;
  /** solver of a case: `frequencyTable`, or a stand-in */
  readonly solve: (c: Case, options: SweepOptions) => Promise<FrequencyTable>;
  /** [ms] of a clock that never goes back */
  now(): number;
  /** Lets signals and streams have their turn. */
  turn(): Promise<void>;
  /** Calls back on Ctrl-C. */
  onInterrupt(callback: () => void): void;
}
