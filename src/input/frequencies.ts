/** Frequencies of a file: a list, or a range on a log or linear scale with both ends kept. */
import { MAX_FREQUENCIES, MAX_PROBLEMS } from './limits.ts';
import { type Range, type Reading, readCount, readQuantity, readText, report } from './reading.ts';
import { isGiven, isMapValue, type Path, valueAt } from './source.ts';

/** Up to where the internal impedance is tested. */
const FREQUENCY: Range = { min: 0, max: 1e12, text: '0 Hz to 1 THz' };
const COUNT: Range = {
  min: 1,
  max: MAX_FREQUENCIES,
  text: `1 to ${MAX_FREQUENCIES} frequencies`,
};

/** Points a decade of a log range that says nothing. */
const DEFAULT_PER_DECADE = 10;

/** [1] a step of the range and its end are one point within this */
const SAME_POINT = 1e-9;

/** [Hz] ascending, none twice; empty where nothing could be read */
export function readFrequencies(reading: Reading): number[] {
  const path: Path = ['frequencies'];
  const written = valueAt(reading.source.data, path);
  if (Array.isArray(written)) return readList(reading, path, written);
  return isMapValue(written) ? readRange(reading, path, written) : [];
}

function readList(reading: Reading, path: Path, written: readonly unknown[]): number[] {
  if (written.length === 0) {
    report(
      reading,
      'NO_FREQUENCIES',
      'an empty list of frequencies; give at least one, such as [50 Hz]',
      path,
    );
  }
  if (written.length > MAX_FREQUENCIES) {
    report(reading, 'TOO_LARGE', `${written.length} frequencies; the most is ${MAX_FREQUENCIES}`, path);
    return [];
  }
  const values = new Set<number>();
  for (let k = 0; k < written.length; k++) {
    const value = readQuantity(reading, [...path, k], 'frequency', FREQUENCY);
    if (value !== undefined) values.add(value);
    // a list of one and the same mistake
    else if (reading.problems.length > 2 * MAX_PROBLEMS) break;
  }
  return Array.from(values).sort((a, b) => a - b);
}

function readRange(reading: Reading, path: Path, written: Record<string, unknown>): number[] {
  const key = (k: string): Path => [...path, k];
  const from = readQuantity(reading, key('from'), 'frequency', FREQUENCY);
  const to = readQuantity(reading, key('to'), 'frequency', FREQUENCY);
  const perDecade = readCount(reading, key('per_decade'), COUNT);
  const count = readCount(reading, key('count'), COUNT);
  const scale = readText(reading, key('scale')) ?? 'log';
  if (isGiven(written, 'per_decade') && isGiven(written, 'count')) {
    report(reading, 'WRONG_TYPE', 'per_decade and count exclude each other; give one', key('count'));
    return [];
  }
  if (scale !== 'log' && scale !== 'linear') {
    report(reading, 'WRONG_TYPE', `scale is ${scale}; it must be log or linear`, key('scale'));
    return [];
  }
  if (scale === 'linear' && !isGiven(written, 'count')) {
    report(reading, 'MISSING', 'a linear scale needs count: the number of points', path);
    return [];
  }
  if (from === undefined || to === undefined) return [];
  if (from > to) {
    report(reading, 'RANGE', 'from is above to; swap them', key('from'));
    return [];
  }
  if (scale === 'log' && from === 0) {
    const text =
      'a log scale can not begin at 0 Hz; begin above, use scale: linear, or a list with 0 Hz in it';
    report(reading, 'RANGE', text, key('from'));
    return [];
  }
  if (isGiven(written, 'count')) {
    if (count === undefined) return [];
    if (count === 1 && from !== to) {
      report(reading, 'RANGE', 'count: 1 can not keep both ends; give at least 2', key('count'));
      return [];
    }
    return scale === 'linear' ? linearByCount(from, to, count) : logByCount(from, to, count);
  }
  if (isGiven(written, 'per_decade') && perDecade === undefined) return [];
  const points = logByDecade(from, to, perDecade ?? DEFAULT_PER_DECADE);
  if (points !== undefined) return points;
  report(reading, 'TOO_LARGE', `over ${MAX_FREQUENCIES} frequencies; lower per_decade`, key('per_decade'));
  return [];
}

/** [Hz] `from` 10^(k/perDecade) below `to`, then `to`. Decades repeat digit by digit. */
export function logByDecade(from: number, to: number, perDecade: number): number[] | undefined {
  const steps = perDecade * Math.log10(to / from);
  if (!(steps < MAX_FREQUENCIES)) return undefined;
  const points: number[] = [];
  for (let k = 0; k < steps - SAME_POINT * Math.max(1, steps); k++) {
    const decade = Math.floor(k / perDecade);
    points.push(from * 10 ** ((k - decade * perDecade) / perDecade) * 10 ** decade);
  }
  return distinct([...points, to]);
}

function logByCount(from: number, to: number, count: number): number[] {
  // a power, not exp and log: whole decades and halves of them come out exact
  const points = Array.from({ length: count }, (_, k) => from * (to / from) ** (k / Math.max(1, count - 1)));
  points[count - 1] = to;
  return distinct(points);
}

function linearByCount(from: number, to: number, count: number): number[] {
  const points = Array.from({ length: count }, (_, k) => from + ((to - from) * k) / Math.max(1, count - 1));
  points[count - 1] = to;
  return distinct(points);
}

/** Ascending and none twice, whatever the rounding of close ends did. */
function distinct(points: readonly number[]): number[] {
  return Array.from(new Set(points)).sort((a, b) => a - b);
}
