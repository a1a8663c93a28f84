/**
 * Runs ngspice (Debian package ngspice, a general-purpose circuit simulator) on a deck that includes a
 * written netlist.
 */
import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

export const ngspicePresent = spawnSync('ngspice', ['--version'], { stdio: 'ignore' }).status === 0;

/**
 * In continuous integration a missing ngspice fails; elsewhere the tests are skipped and say how to get it.
 */
export const skipWithoutNgspice = !ngspicePresent && !process.env.CI;
if (skipWithoutNgspice)
  console.warn('ngspice is not on the PATH: netlist simulations skipped (apt-get install ngspice)');

/**
 * @param netlist text of the subcircuit file, included as `net.cir`
 * @param circuit lines after the title: elements and one analysis
 * @param vector what to write, as ngspice names it
 * @returns rows of numbers: scale, then the vector (real, or real and imaginary part)
 */
export function simulate(netlist: string, circuit: readonly string[], vector: string): number[][] {
  const folder = mkdtempSync(join(tmpdir(), 'netlist-'));
  try {
    writeFileSync(join(folder, 'net.cir'), netlist);
    const control = [
      '.control',
      'set numdgt=15',
      'run',
      `wrdata out.txt ${vector}`,
      'quit 0',
      '.endc',
      '.end',
      '',
    ];
    writeFileSync(
      join(folder, 'deck.cir'),
      ['* test deck', '.include net.cir', ...circuit, ...control].join('\n'),
    );
    execFileSync('ngspice', ['-b', 'deck.cir'], { cwd: folder, stdio: 'pipe', timeout: 60_000 });
    const rows = readFileSync(join(folder, 'out.txt'), 'utf8').trim().split('\n');
    return rows.map((row) => row.trim().split(/\s+/).map(Number));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** The error that the header states, as a part of 1. */
export function statedError(netlist: string, quantity: 'R' | 'L'): number {
  return Number(new RegExp(`worst error of ${quantity}: ([\\d.e-]+) %`).exec(netlist)![1]) / 100;
}
