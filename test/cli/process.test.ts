/** The built command as a process: streams, signals, disks, and the time it takes to start. */
import { spawn, spawnSync } from 'node:child_process';
import {
  copyFileSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  readlinkSync,
  rmSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import ledger from '../../fixtures/solver/ledger.json' with { type: 'json' };
import { readCase } from '../../src/input/index.ts';
import type { Case } from '../../src/model/index.ts';
import { frequencyTable } from '../../src/sweep/index.ts';
import { tableText } from '../../src/writers/index.ts';
import { PAIR } from './fake-io.ts';

const cli = fileURLToPath(new URL('../../dist/cli', import.meta.url));
const bin = join(cli, 'bin.js');
let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'rimflow-cli-'));
  writeFileSync(join(folder, 'pair.yaml'), PAIR);
});
afterAll(() => rmSync(folder, { recursive: true }));

interface Result {
  status: number | null;
  out: string;
  err: string;
}

function command(args: string[], options: { input?: string; bin?: string } = {}): Result {
  const { status, stdout, stderr } = spawnSync(process.execPath, [options.bin ?? bin, ...args], {
    cwd: folder,
    encoding: 'utf8',
    input: options.input ?? '',
    timeout: 30_000,
  });
  return { status, out: stdout, err: stderr };
}

/** In a shell, with `rimflow` as a word. */
function shell(script: string): Result {
  const { status, stdout, stderr } = spawnSync(
    'bash',
    ['-c', `rimflow() { "$NODE" "$BIN" "$@"; }\n${script}`],
    {
      cwd: folder,
      encoding: 'utf8',
      env: { ...process.env, NODE: process.execPath, BIN: bin },
      input: '',
      timeout: 30_000,
    },
  );
  return { status, out: stdout, err: stderr };
}

const leftovers = () => readdirSync(folder).filter((name) => name.includes('unfinished'));

describe('streams', () => {
  it('a file gives CSV on a pipe, nothing on standard error, status 0', () => {
    const { status, out, err } = command(['table', 'pair.yaml']);
    expect([status, err]).toEqual([0, '']);
    expect(out).toMatch(/^frequency_Hz,supply_R_ohm_per_m,supply_L_H_per_m\r\n50,/);
  });
  it('standard input is read for -', () => {
    expect(command(['table', '-'], { input: PAIR }).out).toBe(command(['table', 'pair.yaml']).out);
  });
  it('an empty standard input is a problem of the input: 2', () => {
    expect(command(['table', '-'])).toMatchObject({ status: 2, out: '' });
  });
  it('a closed pipe ends quietly: 0', () => {
    // the reader has gone before anything is written
    const { out, err } = shell('{ sleep 0.3; rimflow list wires; echo "status $?" >&2; } | true');
    expect([out, err]).toEqual(['', 'status 0\n']);
  });
  it('a closed standard error changes nothing', () => {
    const { out } = shell('rimflow table missing.yaml 2>&-; echo "status $?"');
    expect(out).toBe('status 74\n');
  });
  it.skipIf(!existsSync('/dev/full'))('a full device behind standard output: WRITE_FAILED, 74', () => {
    const { status, err } = shell('rimflow table pair.yaml > /dev/full');
    expect(status).toBe(74);
    expect(err).toMatch(/^WRITE_FAILED standard output can not be written: no space left on the device.*\n$/);
  });
  it('an endless standard input: TOO_LARGE, 2', () => {
    const { status, err } = shell('yes | rimflow table -');
    expect(status).toBe(2);
    expect(err).toMatch(/^<stdin> TOO_LARGE .*\n$/);
  });
});

describe('--out', () => {
  it('writes the same bytes as standard output', () => {
    expect(command(['table', 'pair.yaml', '--out', 'a.csv', '--quiet'])).toEqual({
      status: 0,
      out: '',
      err: '',
    });
    expect(readFileSync(join(folder, 'a.csv'), 'utf8')).toBe(command(['table', 'pair.yaml']).out);
    expect(leftovers()).toEqual([]);
  });
  it('into a missing folder: WRITE_FAILED, 74', () => {
    const { status, err } = command(['table', 'pair.yaml', '--out', 'not/there.csv']);
    expect(status).toBe(74);
    expect(err).toMatch(/^not\/there\.csv WRITE_FAILED the folder not is not there; make it first.*\n$/);
  });
  it('onto a folder, or below a file: WRITE_FAILED, 74', () => {
    mkdirSync(join(folder, 'sub'), { recursive: true });
    for (const path of ['sub', 'pair.yaml/x.csv']) {
      const { status, err } = command(['table', 'pair.yaml', '--out', path]);
      expect([status, err.split(' ')[1]]).toEqual([74, 'WRITE_FAILED']);
    }
  });
  it.skipIf(!existsSync('/dev/full'))('onto a full device: WRITE_FAILED, 74, the device stays', () => {
    const { status, err } = command(['table', 'pair.yaml', '--out', '/dev/full']);
    expect([status, err.split(' ').slice(0, 2)]).toEqual([74, ['/dev/full', 'WRITE_FAILED']]);
    expect(statSync('/dev/full').isCharacterDevice()).toBe(true);
  });
  it('on a disk that fills half-way: WRITE_FAILED, 74, the old file as it was and nothing beside it', () => {
    // a limit of 1024 bytes on the size of a file stands for the disk
    writeFileSync(join(folder, 'old.csv'), 'old');
    const { status, err } = shell("trap '' XFSZ; ulimit -f 1; rimflow list wires --out old.csv");
    expect(status).toBe(74);
    expect(err).toMatch(/^old\.csv WRITE_FAILED can not be written: .*\n$/);
    expect(readFileSync(join(folder, 'old.csv'), 'utf8')).toBe('old');
    expect(leftovers()).toEqual([]);
  });
  it('/dev/stdout is standard output, and what stands in its file before and behind stays', () => {
    const { status, err } = shell(
      '{ echo before; rimflow list materials --out /dev/stdout; echo behind; } > all.txt',
    );
    expect([status, err]).toEqual([0, '']);
    expect(readFileSync(join(folder, 'all.txt'), 'utf8')).toMatch(/^before\n[\s\S]*copper[\s\S]*\nbehind\n$/);
  });
  it('onto a link to nothing: WRITE_FAILED, 74, the link stays', () => {
    symlinkSync('gone.csv', join(folder, 'link-to-nothing.csv'));
    const { status, err } = command(['table', 'pair.yaml', '--out', 'link-to-nothing.csv']);
    expect([status, err.split(' ').slice(0, 2)]).toEqual([74, ['link-to-nothing.csv', 'WRITE_FAILED']]);
    expect(readlinkSync(join(folder, 'link-to-nothing.csv'))).toBe('gone.csv');
  });
  it('keeps the mode of a file and a link to it', () => {
    writeFileSync(join(folder, 'real.csv'), 'old', { mode: 0o640 });
    symlinkSync('real.csv', join(folder, 'link.csv'));
    expect(command(['list', 'wires', '--out', 'link.csv', '--quiet']).status).toBe(0);
    expect(readFileSync(join(folder, 'real.csv'), 'utf8')).toMatch(/^size/);
    expect(statSync(join(folder, 'real.csv')).mode & 0o777).toBe(0o640);
    expect(
      readdirSync(folder, { withFileTypes: true })
        .find(({ name }) => name === 'link.csv')
        ?.isSymbolicLink(),
    ).toBe(true);
  });
  it('refuses to write over its input, under another name too: USAGE, 2', () => {
    const { status, err } = command(['table', 'pair.yaml', '--out', './sub/../pair.yaml']);
    expect([status, err.split(' ')[0]]).toEqual([2, 'USAGE']);
    expect(readFileSync(join(folder, 'pair.yaml'), 'utf8')).toBe(PAIR);
  });
});

describe('files', () => {
  it('over 10 MB are refused unread: TOO_LARGE, 2', () => {
    // a file of a terabyte with nothing in it: reading it whole would take minutes
    const { status, err } = shell('truncate -s 1T big.yaml && rimflow table big.yaml');
    expect(status).toBe(2);
    expect(err).toMatch(/^big\.yaml TOO_LARGE 1099511\.6 MB are more than .*; the limit is 10 MB\n$/);
  });
  it('that never end are refused: TOO_LARGE, 2', () => {
    const { status, err } = command(['table', '/dev/zero']);
    expect([status, err.split(' ')[1]]).toEqual([2, 'TOO_LARGE']);
  });
  it('of binary data: NOT_TEXT, 2', () => {
    writeFileSync(join(folder, 'garbage.yaml'), Buffer.from([0x7f, 0x45, 0x4c, 0x46, 0, 1, 2, 0xff, 0xfe]));
    const { status, err } = command(['table', 'garbage.yaml']);
    expect([status, err.split(' ')[1]]).toEqual([2, 'NOT_TEXT']);
  });
  it('that are folders: READ_FAILED, 74', () => {
    const { status, err } = command(['table', '.']);
    expect([status, err]).toEqual([74, '. READ_FAILED can not be read: this is a folder; name a file\n']);
  });
});

describe('Ctrl-C', () => {
  function interrupted(args: string[], after: number, stdin: 'pipe' | 'ignore'): Promise<Result> {
    return new Promise((resolve) => {
      const child = spawn(process.execPath, [bin, ...args], { cwd: folder, stdio: [stdin, 'pipe', 'pipe'] });
      let out = '';
      let err = '';
      child.stdout?.on('data', (part) => {
        out += part;
      });
      child.stderr?.on('data', (part) => {
        err += part;
      });
      const timer = setTimeout(() => child.kill('SIGINT'), after);
      child.on('close', (status) => {
        clearTimeout(timer);
        resolve({ status, out, err });
      });
    });
  }
  it('while standard input is awaited: 130', async () => {
    expect(await interrupted(['table', '-'], 1000, 'pipe')).toEqual({
      status: 130,
      out: '',
      err: 'INTERRUPTED stopped by Ctrl-C\n',
    });
  });
  /** Wires in close rows, one half go and the other return. */
  function rows(count: number, pitch: number): string {
    const wires = Array.from(
      { length: count },
      (_, i) => `  w${i}: { diameter: 1 mm, at: [${pitch * (i % 8)} mm, ${pitch * Math.floor(i / 8)} mm] }`,
    );
    const names = wires.map((_, i) => `w${i}`);
    const half = count >> 1;
    const loop = `{ go: [${names.slice(0, half)}], return: [${names.slice(half)}] }`;
    return `rimflow: 1\nwires:\n${wires.join('\n')}\nloops: { all: ${loop} }\nfrequencies: { from: 1 Hz, to: 1 GHz, count: 300 }\n`;
  }
  it.each([
    ['many frequencies', 61, 1.02],
    // tables and one frequency take many seconds
    ['one long frequency', 200, 1.002],
  ])('while solving %s: 130 at once, no result, nothing left of --out', async (_what, count, pitch) => {
    writeFileSync(join(folder, 'many.yaml'), rows(count, pitch));
    const start = performance.now();
    const after = 2000;
    expect(await interrupted(['table', 'many.yaml', '--out', 'many.csv'], after, 'ignore')).toEqual({
      status: 130,
      out: '',
      err: 'INTERRUPTED stopped by Ctrl-C\n',
    });
    // a second and a half of another load on the machine
    expect(performance.now() - start).toBeLessThan(after + 1500);
    expect(existsSync(join(folder, 'many.csv'))).toBe(false);
    expect(leftovers()).toEqual([]);
  });
});

describe('a large case, solved in a thread', () => {
  const wires = Array.from({ length: 14 }, (_, i) => `  w${i}: { diameter: 1 mm, at: [${2 * i} mm, 0 mm] }`);
  const text = (more: string) =>
    `rimflow: 1\nwires:\n${wires.join('\n')}\nloops: { all: { go: w0, return: w13 } }\nfrequencies: [0 Hz, 1 MHz]\n${more}`;
  it('has the numbers of the library', async () => {
    writeFileSync(join(folder, 'row.yaml'), text(''));
    const { status, out, err } = command(['table', 'row.yaml']);
    expect([status, err]).toEqual([0, '']);
    const read = await readCase(text(''), { file: 'row.yaml' });
    expect(out).toBe(tableText(await frequencyTable(read.case as Case), 'csv'));
  });
  it('says what it could not reach: 3', () => {
    // rounding at orders of many hundreds
    const hard = text('tolerance: 1e-12\n')
      .replace('2 mm, 0 mm', '1.001 mm, 0 mm')
      .replace('return: w13', 'return: w1')
      .replace('1 MHz', '1 THz');
    writeFileSync(join(folder, 'row.yaml'), hard);
    const { status, out, err } = command(['table', 'row.yaml']);
    expect([status, err.includes('\nNOT_REACHED the wanted tolerance 1e-12')]).toEqual([3, true]);
    expect(out).toMatch(
      /^frequency_Hz,all_R_ohm_per_m,all_L_H_per_m,all_R_error,all_L_error\r\n0,.*\r\n1000000000000,/,
    );
  });
});

describe('start', () => {
  /** [ms] least of a number of runs: what the machine can do when nobody disturbs it */
  function least(runs: number, args: string[]): number {
    let best = Number.POSITIVE_INFINITY;
    for (let i = 0; i < runs; i++) {
      const start = performance.now();
      const { status } = spawnSync(process.execPath, args, { cwd: folder, stdio: 'ignore' });
      best = Math.min(best, performance.now() - start);
      expect(status).toBe(0);
    }
    return best;
  }
  it('a table of a pair, 61 points: at most 8 times as long as node -e 0', () => {
    const wires = PAIR.slice(0, PAIR.indexOf('frequencies')).replace('2 mm + gap', '3 mm');
    writeFileSync(
      join(folder, 'points.yaml'),
      `${wires}frequencies: { from: 10 Hz, to: 10 MHz, per_decade: 10 }\n`,
    );
    const node = least(5, ['-e', '0']);
    const table = least(5, [bin, 'table', 'points.yaml']);
    const ratio = table / node;
    console.log(
      `table of a pair: ${table.toFixed(0)} ms, ${ratio.toFixed(1)} x node -e 0 (${node.toFixed(0)} ms)`,
    );
    expect(ratio).toBeLessThanOrEqual(8);
    // another machine, another load: twice; scripts/bench-solver.mjs records
    expect(ratio).toBeLessThanOrEqual(2 * ledger.pair.ratio);
    expect(ratio, 'better, record it').toBeGreaterThan(ledger.pair.ratio / 4);
  });
  it('loads the parser of expressions only for an expression', () => {
    const copy = join(folder, 'cli');
    mkdirSync(copy);
    for (const name of readdirSync(cli))
      if (!name.startsWith('mathjs')) copyFileSync(join(cli, name), join(copy, name));
    expect(readdirSync(cli).length - readdirSync(copy).length).toBe(1);
    // version and package type are looked up beside the real one
    writeFileSync(join(folder, 'package.json'), '{"type": "module"}');
    const without = join(copy, 'bin.js');
    expect(command(['table', '--gauge', 'AWG 12', '--spacing', '4.1 mm'], { bin: without }).status).toBe(0);
    expect(command(['table', 'pair.yaml'], { bin: without }).status).toBe(70);
  });
});
