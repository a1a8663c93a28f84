/** Keys of later versions of the format: refused with other words than a slip of the pen. */
import type { Path } from './source.ts';

const TOP = new Set('bundles plane sets medium twisted copies sweep draw loads limits budget'.split(' '));
const WIRE = new Set(
  'bore wall layers strands strand ring row spacing lay transposed twisted copies perfect'.split(' '),
);
const LOOP = new Set(['transposed', 'sets', 'load', 'loads']);

/** True when the key of this map belongs to a later version. */
export function isLaterKey(parent: Path, key: string): boolean {
  if (parent.length === 0) return TOP.has(key);
  if (parent[0] === 'wires' && parent.length === 2) return WIRE.has(key);
  return parent[0] === 'loops' && parent.length === 2 && LOOP.has(key);
}
