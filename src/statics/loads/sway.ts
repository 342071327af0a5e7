import type { Imperfections } from '../../brief/types.ts';
import { RequestError } from '../../domain/errors.ts';
import type { Truss } from '../../domain/truss.ts';
import type { LoadCase, NodalForce, Supports } from '../types.ts';

export interface Sway {
  /** Those given, then the sway of each along each way. */
  readonly cases: readonly LoadCase[];
  /** By what rule and how large, for every output; null where none is asked for. */
  readonly words: string | null;
}

/** EN 1993-1-1 5.3.2(3), from memory: basic value, and the bounds of alpha_h. */
const BASIC = 1 / 200;
const LEAST_HEIGHT_FACTOR = 2 / 3;

/** AISC 360-22 C2.2b(a), from memory: notional loads as a share of the gravity loads (alpha = 1; of ASD after its division by 1.6). */
const NOTIONAL = 0.002;

/** N; a case with less downward load in all has nothing that sways. */
const NO_LOAD = 1;

/**
 * Initial sway as equivalent horizontal forces (EN 1993-1-1 5.3.2(7), AISC 360-22 C2.2b): a share of every downward load, at its node, as cases of their own
 * that follow their parents. The forces that close the circle at the columns' feet are left to the supports' reactions.
 * @throws RequestError where a case has the name of another's sway
 */
export function addSway(
  truss: Truss,
  supports: Supports,
  cases: readonly LoadCase[],
  asked: Imperfections | null,
): Sway {
  if (asked === null) return { cases, words: null };
  const { rule, along } = asked;
  const height = heightOf(truss, supports, cases);
  const share = rule === 'AISC360' ? NOTIONAL : BASIC * heightFactor(height);
  const [x, y] = along;
  const ways = [
    [x, y],
    [-y, x],
  ] as const;
  const swaying = cases.flatMap((parent) =>
    downwardOf(parent.loads) < NO_LOAD
      ? []
      : ways.map((direction, way): LoadCase => {
          const { name, nature, incomplete, category } = parent;
          return {
            name: `${name}: sway ${wayName(direction)}`,
            nature,
            ...(category && { category }),
            ...(incomplete && { incomplete }),
            swayOf: name,
            swayWay: way === 0 ? 0 : 1,
            loads: parent.loads.flatMap(({ node, force }): NodalForce[] =>
              force[2] < 0
                ? [{ node, force: [-share * force[2] * direction[0], -share * force[2] * direction[1], 0] }]
                : [],
            ),
          };
        }),
  );
  const names = new Set(cases.map(({ name }) => name));
  const taken = swaying.find(({ name }) => names.has(name));
  if (taken !== undefined)
    throw new RequestError(`the brief: the case name ${taken.name} is taken by the imperfections of another case`);
  const by =
    rule === 'AISC360'
      ? 'notional loads of AISC 360-22 C2.2b, 0.002 of every downward load'
      : `sway by EN 1993-1-1 5.3.2, 1/${(1 / share).toFixed(0)} of every downward load (${height.toFixed(1)} m high, one column in a row)`;
  return {
    cases: [...cases, ...swaying],
    words: `${by}, along ${ways.map(wayName).join(' and ')}, either way, in every strength combination; the bow of what bracing restrains (${rule === 'AISC360' ? 'Appendix 6' : '5.3.3'}) is not loaded`,
  };
}

/** alpha_h of EN 1993-1-1 (5.5). */
export function heightFactor(height: number): number {
  return height > 0 ? Math.min(1, Math.max(LEAST_HEIGHT_FACTOR, 2 / Math.sqrt(height))) : 1;
}

const downwardOf = (loads: readonly NodalForce[]): number =>
  loads.reduce((sum, { force }) => sum + Math.max(0, -force[2]), 0);

/** From the lowest support to the mean level of the downward loads: below the roof's top, so that the sway is rather too large. */
function heightOf(truss: Truss, { restraints, springs }: Supports, cases: readonly LoadCase[]): number {
  const feet = [...restraints, ...springs].map(({ node }) => truss.nodes[node].at[2]);
  let [sum, levels] = [0, 0];
  for (const { loads } of cases)
    for (const { node, force } of loads) {
      const down = Math.max(0, -force[2]);
      sum += down;
      levels += down * truss.nodes[node].at[2];
    }
  return sum > 0 && feet.length > 0 ? levels / sum - feet.reduce((low, level) => Math.min(low, level)) : 0;
}

function wayName([x, y]: readonly [number, number]): string {
  if (Math.abs(y) < 1e-9) return 'x';
  if (Math.abs(x) < 1e-9) return 'y';
  return `(${x.toFixed(2)}, ${y.toFixed(2)})`;
}
