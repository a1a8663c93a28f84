/** Lists of wires that share their fate: the sides of loops and the bonded groups; what they may have in common. */
import { quote, quoteList } from './quote.ts';
import { type Reading, report } from './reading.ts';
import type { Path } from './source.ts';

export interface Group {
  /** what the group is, for messages: `go of loop "supply"` */
  readonly label: string;
  readonly path: Path;
  /** indices of wires */
  readonly members: readonly number[];
  readonly series: boolean;
}

/**
 * Groups that share a wire must be identical lists: a wire has one volt drop, which it shares with those it is bonded
 * to. Conflicts are reported, once a group. @returns the groups, identical ones with one order of members
 */
export function reconcileGroups(
  reading: Reading,
  groups: readonly Group[],
  names: readonly string[],
): Group[] {
  const owner = new Map<number, Group>();
  return groups.map((group) => {
    let twin: Group | undefined;
    for (const wire of group.members) {
      const other = owner.get(wire);
      if (other === undefined || other === twin) continue;
      const fault = conflict(group, other);
      if (fault !== undefined) {
        const list = (g: Group) => `${g.label} [${quoteList(g.members.map((k) => names[k]!))}]`;
        const text = `wire ${quote(names[wire])} is in ${list(group)} and in ${list(other)}; ${fault}`;
        report(reading, 'GROUP_CONFLICT', text, group.path);
        return group;
      }
      twin = other;
    }
    for (const wire of group.members) if (!owner.has(wire)) owner.set(wire, group);
    return twin === undefined ? group : { ...group, members: twin.members };
  });
}

function conflict(a: Group, b: Group): string | undefined {
  const members = new Set(b.members);
  const same = a.members.length === members.size && a.members.every((wire) => members.has(wire));
  if (!same) return 'groups that share a wire must be the same list';
  if (a.members.length > 1 && a.series !== b.series) return 'a list is either in series or bonded, not both';
  return undefined;
}
