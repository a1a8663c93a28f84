/** The real machine: file descriptors, signals, clock. */
import { writeSync } from 'node:fs';
import { isatty } from 'node:tty';
import { nodeFiles } from './files.ts';
import type { Io, OutputStream } from './io.ts';
import { solveOnNode } from './node-solve.ts';

/** [ms] between two tries on a pipe that is full and does not block. */
const PIPE_WAIT = 5;

export function nodeIo(): Io {
  return {
    stdin: process.stdin,
    stdout: output(1),
    stderr: output(2),
    files: nodeFiles(),
    env: process.env,
    solve: solveOnNode,
    now: () => performance.now(),
    turn: () => new Promise((resolve) => setImmediate(resolve)),
    onInterrupt: (callback) => {
      process.on('SIGINT', callback);
    },
  };
}

/** Writes until all is written: a stream object would not tell of a disk that fills half-way. */
function output(descriptor: number): OutputStream {
  return {
    isTerminal: isatty(descriptor),
    async write(text) {
      const bytes = Buffer.from(text);
      let at = 0;
      while (at < bytes.length) {
        try {
          at += writeSync(descriptor, bytes, at);
        } catch (error) {
          if ((error as NodeJS.ErrnoException).code !== 'EAGAIN') throw error;
          await new Promise((resolve) => setTimeout(resolve, PIPE_WAIT));
        }
      }
    },
  };
}
