/** Plain data of a case with the place of every value: what the readers of keys see, whatever the text was. */
import type { Place } from '../problem.ts';

/** Keys and list positions from the top of the file. */
export type Path = readonly (string | number)[];

export interface Source {
  /** maps, lists, texts, numbers and booleans */
  readonly data: unknown;
  /** Place of a value; of the nearest map or list around it where it is missing. */
  place(path: Path): Place;
  /** Place of the key of a value. */
  keyPlace(path: Path): Place;
  /** Keys of a map in the order of the file (an object of JavaScript moves integer-like keys to the front). */
  keys(path: Path): readonly string[];
}

/** Value at a path, undefined where there is none. */
export function valueAt(data: unknown, path: Path): unknown {
  let value = data;
  for (const key of path) {
    if (value === null || typeof value !== 'object' || !Object.hasOwn(value, key)) return undefined;
    // a list has places, no names: its own length is no key of the file
    if (Array.isArray(value) && typeof key === 'string') return undefined;
    value = (value as Record<string | number, unknown>)[key];
  }
  return value;
}

/** True for a map (an object that is no list). */
export function isMapValue(value: unknown): value is Record<string, unknown> {
  return value !== null && typeof value === 'object' && !Array.isArray(value);
}

/** True when the key is there; in data built in code, undefined counts as not there. */
export function isGiven(map: Record<string, unknown>, key: string): boolean {
  return Object.hasOwn(map, key) && map[key] !== undefined;
}

/** A case built in code: places are the path itself, or what `names` calls it (an option of a command). */
export function plainSource(data: unknown, names: ReadonlyMap<string, string> = new Map()): Source {
  const place = (path: Path): Place => {
    for (let length = path.length; length > 0; length--) {
      const name = names.get(path.slice(0, length).join('.'));
      if (name !== undefined) return { file: name };
    }
    return { file: path.length === 0 ? 'case' : path.join('.') };
  };
  const keys = (path: Path): string[] => {
    const value = valueAt(data, path);
    return isMapValue(value) ? Object.keys(value) : [];
  };
  return { data, place, keyPlace: place, keys };
}
