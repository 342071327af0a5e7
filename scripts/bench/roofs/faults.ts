import { distance } from '../../../src/domain/vector.ts';
import { chanceOf } from './chance.ts';
import { PLANTS } from './fault-kinds.ts';
import { FAULT_KINDS, type Fault, type FaultKind } from './fault-tools.ts';
import type { Roof } from './random-roof.ts';

export interface FaultyRoof {
  readonly roof: Roof;
  readonly faults: readonly Fault[];
}

/** Faults lie at least this far apart (m), so that each finding belongs to one. */
const APART = 2;
/** Candidates drawn for one fault before its kind is given up on this roof. */
const TRIES = 60;

/** The roof with up to `count` faults, kinds in turn; fewer where it has no room for more. */
export function plantFaults(roof: Roof, seed: number, count: number): FaultyRoof {
  const chance = chanceOf(seed * 31 + 5);
  const faults: Fault[] = [];
  let drawn = roof.drawn;
  // A part that is moved off touches much of the roof: it has room only while the roof is sound.
  const first: readonly FaultKind[] = chance.happens(0.6) ? ['moved part'] : [];
  for (const kind of [...first, ...chance.shuffled(FAULT_KINDS), ...chance.shuffled(FAULT_KINDS)]) {
    if (faults.length >= count) break;
    for (let attempt = 0; attempt < TRIES; attempt++) {
      const planted = PLANTS[kind](roof, drawn, chance);
      if (!planted || faults.some((other) => areNear(other, planted.fault))) continue;
      faults.push(planted.fault);
      drawn = planted.drawn;
      break;
    }
  }
  return { roof: { ...roof, drawn }, faults };
}

function areNear(a: Fault, b: Fault): boolean {
  if (a.marks.some((mark) => b.marks.includes(mark))) return true;
  return a.places.some((p) => b.places.some((q) => distance(p, q) < APART));
}
