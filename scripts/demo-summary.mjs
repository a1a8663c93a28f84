// Says in a few lines what scripts/demo made and what the numbers mean; every figure is read from the files it made.
import { readFileSync } from 'node:fs';

const out = (name) => readFileSync(new URL(`../out/${name}`, import.meta.url), 'utf8');
const pump = JSON.parse(out('pump.json'));
const lamps = JSON.parse(out('lamps.json'));
const netlist = out('pump.cir');

const at = (table, wanted) => table.frequency.findIndex((f) => Math.abs(f / wanted - 1) < 1e-6);
const milli = (value) => (value * 1e3).toPrecision(4);
const micro = (value) => (value * 1e6).toPrecision(4);
const { supply } = pump.loops;
const [slow, carrier, fast] = [0, at(pump, 10e3), pump.frequency.length - 1];
const worst = Math.max(...supply.resistance_error, ...supply.inductance_error);
const mutual = lamps.mutual[0];
const lampFifty = at(lamps, 50);
const sections = netlist.split('\n').filter((line) => /^R\d+ /.test(line)).length;
const stated = (what) => new RegExp(`worst error of ${what}: (\\S+ %)`).exec(netlist)[1];
const length = Number(/run of (\S+) m/.exec(netlist)[1]);

process.stdout.write(`
An inverter feeds a greenhouse pump over a flat pair; a drain wire and a rail run along, bonded to each other.
(The installation is invented; see fixtures/demo.)

out/pump.csv       R and L of the pair per metre, ${pump.frequency.length} frequencies, with the stated error of each
out/pump.json      the same with R dc, internal and external L and skin depth
out/pump-run.md    the whole run, clamps included, as a table for a report
out/pump.cir       a subcircuit for a SPICE-type simulator
out/lamps.csv .md .json   two lamp circuits that share their return wire

What the numbers mean
- At ${pump.frequency[slow]} Hz the pair has ${milli(supply.resistance[slow])} mohm/m, as at direct current. At 10 kHz, where an inverter switches, it
  has ${milli(supply.resistance[carrier])} mohm/m, ${supply.resistance_ratio[carrier].toPrecision(3)} times as much: the current flows at the rim, and the wires push it aside.
- L falls from ${micro(supply.inductance[slow])} to ${micro(supply.inductance[fast])} uH/m: the field leaves the metal, and the rail carries part of the return flux.
- No stated error is above ${worst.toExponential(1)} of R or L; ${pump.tolerance} was asked for.
- The netlist stands for ${length} m with ${sections} sections; it keeps R within ${stated('R')} and L within ${stated('L')}
  over the whole band, and can not make energy: all its values are positive.
- The lamp circuits share a wire, so one moves the other: at 50 Hz each ampere in one drops
  ${milli(mutual.resistance[lampFifty])} mV/m in the other.
`);
const cautions = [...pump.cautions, ...lamps.cautions];
for (const { code, text } of cautions) process.stdout.write(`caution ${code}: ${text}\n`);
