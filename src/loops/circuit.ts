/**
 * The terminal conditions of a case: which wires share a volt drop, and what current each loop drives in them.
 *
 * A group is a list of bonded wires (same volt drop, currents free); a wire alone is a group of one. Loop k drives
 * incidence[g][k] ampere per ampere in group g: +1 in its go group, -1 in its return group, in a series loop
 * in every member. At 0 Hz the members share by conductance; perfect members take it all.
 */
import type { Case } from '../model/index.ts';
import { Problem } from '../problem.ts';
import { solidResistanceDc } from '../skin/index.ts';

export interface Circuit {
  /** [1] */
  readonly loops: number;
  /** members of each group, wire indices */
  readonly groups: readonly Int32Array[];
  /** [A/A] groups x loops, row major */
  readonly incidence: Float64Array;
  /** [ohm/m] of each wire at 0 Hz */
  readonly wireResistance: Float64Array;
  /** [A/A] current of each wire for one ampere in each loop at 0 Hz: loops x wires, row major */
  readonly directCurrents: Float64Array;
  /** [ohm/m] loops x loops at 0 Hz */
  readonly directResistance: Float64Array;
}

/**
 * @throws Problem GROUP_CONFLICT when groups share a wire but differ, EMPTY_LOOP for a loop without wires or with
 *   a net current, BOTH_SIDES for a wire on both sides of one loop
 */
export function circuitOf(c: Case): Circuit {
  const wireResistance = Float64Array.from(c.wires, (w) => solidResistanceDc(w));
  const builder = new GroupBuilder(c.wires.length);
  const drives: [group: number, loop: number, sign: number][] = [];
  c.loops.forEach((loop, k) => {
    checkSides(loop.name, loop.go, loop.return, loop.series);
    for (const [side, sign] of [
      [loop.go, 1],
      [loop.return, -1],
    ] as const) {
      const lists = loop.series ? side.map((w) => [w]) : [side];
      for (const list of lists) drives.push([builder.group(list), k, sign]);
    }
  });
  for (const list of c.bonded) builder.group(list);
  const groups = builder.finish();
  const incidence = new Float64Array(groups.length * c.loops.length);
  for (const [g, k, sign] of drives) incidence[g * c.loops.length + k] += sign;
  return {
    loops: c.loops.length,
    groups,
    incidence,
    wireResistance,
    ...directShares(c, groups, incidence, wireResistance),
  };
}

function checkSides(name: string, go: readonly number[], back: readonly number[], series: boolean): void {
  if (go.length === 0 || back.length === 0) {
    throw new Problem('EMPTY_LOOP', `loop "${name}" needs at least one wire in go and one in return`);
  }
  if (go.some((w) => back.includes(w))) {
    throw new Problem('BOTH_SIDES', `loop "${name}" has a wire in go and in return; take it out of one`);
  }
  if (series && go.length !== back.length) {
    throw new Problem(
      'EMPTY_LOOP',
      `series loop "${name}" carries its current ${go.length} times forth and ${back.length} times back; make them equal`,
    );
  }
}

class GroupBuilder {
  private readonly lists: number[][] = [];
  private readonly groupOf: Int32Array;

  constructor(wires: number) {
    this.groupOf = new Int32Array(wires).fill(-1);
  }

  /** Index of the group with exactly these members. */
  group(list: readonly number[]): number {
    const known = this.groupOf[list[0]];
    if (known >= 0) {
      const there = this.lists[known];
      if (there.length === list.length && list.every((w) => this.groupOf[w] === known)) return known;
    }
    if (list.some((w) => this.groupOf[w] >= 0)) {
      throw new Problem(
        'GROUP_CONFLICT',
        `groups that share a wire must be identical lists (wires ${list.join(', ')})`,
      );
    }
    const index = this.lists.length;
    for (const w of list) this.groupOf[w] = index;
    this.lists.push([...list]);
    return index;
  }

  finish(): Int32Array[] {
    for (let w = 0; w < this.groupOf.length; w++) if (this.groupOf[w] < 0) this.group([w]);
    return this.lists.map((list) => Int32Array.from(list));
  }
}

function directShares(
  c: Case,
  groups: readonly Int32Array[],
  incidence: Float64Array,
  wireResistance: Float64Array,
): Pick<Circuit, 'directCurrents' | 'directResistance'> {
  const wires = c.wires.length;
  const loops = c.loops.length;
  const directCurrents = new Float64Array(loops * wires);
  const directResistance = new Float64Array(loops * loops);
  groups.forEach((members, g) => {
    const perfect = members.filter((w) => wireResistance[w] === 0);
    const conductance = members.reduce((sum, w) => sum + 1 / wireResistance[w], 0);
    for (let k = 0; k < loops; k++) {
      const current = incidence[g * loops + k];
      if (current === 0) continue;
      for (const w of members) {
        const share =
          perfect.length > 0
            ? Number(wireResistance[w] === 0) / perfect.length
            : 1 / (wireResistance[w] * conductance);
        directCurrents[k * wires + w] += current * share;
      }
      if (perfect.length > 0) continue;
      for (let l = 0; l < loops; l++) {
        directResistance[k * loops + l] += (current * incidence[g * loops + l]) / conductance;
      }
    }
  });
  return { directCurrents, directResistance };
}
