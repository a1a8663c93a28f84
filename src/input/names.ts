/** Names of wires, loops and materials: letters, digits, - and _; unlike even when case is ignored. */
import { MAX_NAME_LENGTH } from './limits.ts';
import { quote } from './quote.ts';
import { type Reading, reportAt } from './reading.ts';
import { isMapValue, valueAt } from './source.ts';

/** Keys of a map of named things, in file order; faults of the names are reported. */
export function readNames(reading: Reading, section: 'wires' | 'loops' | 'materials'): readonly string[] {
  const { source } = reading;
  if (!isMapValue(valueAt(source.data, [section]))) return [];
  const names = source.keys([section]);
  const seen = new Map<string, string>();
  for (const name of names) {
    const place = source.keyPlace([section, name]);
    if (!/^[A-Za-z0-9_-]+$/.test(name) || name.length > MAX_NAME_LENGTH) {
      const text = `${quote(name)} is no name; use up to ${MAX_NAME_LENGTH} letters, digits, - and _`;
      reportAt(reading, 'NAME', text, place);
    } else if (name.toLowerCase() === 'plane') {
      reportAt(
        reading,
        'NAME',
        `${quote(name)} is reserved for the conducting plane; take another name`,
        place,
      );
    }
    const twin = seen.get(name.toLowerCase());
    if (twin !== undefined) {
      const why = 'simulators ignore case; rename one';
      reportAt(
        reading,
        'DUPLICATE',
        `${quote(name)} and ${quote(twin)} differ in case only, and ${why}`,
        place,
      );
    }
    seen.set(name.toLowerCase(), name);
  }
  return names;
}
