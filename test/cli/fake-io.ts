/** A machine in memory, and the command line run on it. */

import type { Io } from '../../src/cli/io.ts';
import { main } from '../../src/cli/main.ts';
import type { Case } from '../../src/model/index.ts';
import { Problem } from '../../src/problem.ts';
import type { FrequencyTable } from '../../src/sweep/index.ts';

export const PAIR = `rimflow: 1
title: a pair
let: { gap: 1 mm }
length: 2 m
wires:
  plus:  { diameter: 2 mm, at: [0 mm, 0 mm] }
  minus: { diameter: 2 mm, at: [2 mm + gap, 0 mm] }
loops:
  supply: { go: plus, return: minus, extra: { resistance: 1 mohm, inductance: 10 nH } }
frequencies: [50 Hz, 1 kHz, 1 MHz]
`;

/** A table of round numbers for a case: R = 1, 2, 3 .. ohm/m, L = 4e-7 H/m, errors 1e-9. */
export function tableOf(c: Case, changes: Partial<FrequencyTable> = {}): FrequencyTable {
  const n = c.frequencies.length;
  const list = (value: (i: number) => number) => Float64Array.from({ length: n }, (_, i) => value(i));
  return {
    title: c.title,
    tolerance: c.tolerance,
    reached: true,
    frequency: Float64Array.from(c.frequencies),
    loops: c.loops.map(({ name }) => ({
      name,
      resistance: list((i) => 1 + i),
      inductance: list(() => 4e-7),
      resistanceIncrement: list((i) => i),
      resistanceDc: 1,
      resistanceError: list(() => 1e-9),
      inductanceError: list(() => 2e-9),
    })),
    mutual: [],
    currents: [],
    cautions: c.cautions,
    ...changes,
  };
}

export interface Run {
  readonly status: number;
  readonly out: string;
  readonly err: string;
  /** what was written with --out, by path */
  readonly written: Map<string, string>;
}

export interface Machine {
  readonly stdin?: string | AsyncIterable<Uint8Array>;
  readonly terminal?: boolean;
  readonly env?: Record<string, string>;
  readonly solve?: Io['solve'];
  /** system error of each write to standard output */
  readonly stdoutError?: string;
  /** presses Ctrl-C as soon as it can be */
  readonly interrupt?: boolean;
  /** [ms] that pass between two looks at the clock */
  readonly tick?: number;
}

/** Runs a call; `pair.yaml` is there and holds PAIR. */
export async function run(argv: readonly string[], machine: Machine = {}): Promise<Run> {
  let out = '';
  let err = '';
  let clock = 0;
  const written = new Map<string, string>();
  const terminal = machine.terminal === true;
  const io: Io = {
    stdin:
      typeof machine.stdin === 'object'
        ? machine.stdin
        : (async function* () {
            yield new TextEncoder().encode((machine.stdin as string | undefined) ?? '');
          })(),
    stdout: {
      isTerminal: terminal,
      write: async (text) => {
        if (machine.stdoutError !== undefined) {
          throw Object.assign(new Error('write'), { code: machine.stdoutError });
        }
        out += text;
      },
    },
    stderr: {
      isTerminal: terminal,
      write: async (text) => {
        err += text;
      },
    },
    files: {
      read: async (path) => {
        if (path !== 'pair.yaml') throw new Problem('READ_FAILED', 'no such file', { file: path });
        return new TextEncoder().encode(PAIR);
      },
      checkTarget: () => undefined,
      same: (a, b) => a === b,
      writeWhole: async (path, text) => {
        written.set(path, text);
      },
    },
    env: machine.env ?? {},
    solve: machine.solve ?? (async (c) => tableOf(c)),
    now: () => {
      clock += machine.tick ?? 0;
      return clock;
    },
    turn: async () => undefined,
    onInterrupt: (callback) => {
      if (machine.interrupt === true) setTimeout(callback, 0);
    },
  };
  const status = await main(argv, io);
  return { status, out, err, written };
}
