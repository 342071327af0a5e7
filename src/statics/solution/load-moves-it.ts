import { type Finding, finding } from '../../domain/finding.ts';
import type { Truss } from '../../domain/truss.ts';
import type { Judgement } from '../stability/assess-stability.ts';
import { tidyDirection } from '../stability/reduce.ts';
import { directionInWords, nodeInWords } from '../stability/words.ts';
import type { LoadCase, Mode } from '../types.ts';

/** Says which mode a case's load does most work on, and at which node; the modes left out are known by their pivots only. */
export function loadMovesIt(
  truss: Truss,
  stability: Judgement,
  one: LoadCase,
  loads: Float64Array,
  pivotForces: Float64Array,
): { readonly sentence: string; readonly finding: Finding } {
  const moved = mostMoved(truss, stability.modes, loads);
  const pivot = stability.pivots[indexOfLargest(pivotForces)];
  const node = moved?.node ?? pivot.node;
  const direction = moved?.direction ?? pivot.direction;
  const work = ((moved?.work ?? Math.abs(pivotForces[indexOfLargest(pivotForces)])) / 1000).toPrecision(3);
  const done = `${work} kNm for each metre that it moves`;
  const where = `at ${nodeInWords(truss, node)} ${directionInWords(direction)}`;
  const sentence = moved
    ? `the load does work on a mechanism (${done}), most ${where}: ${moved.mode.words}`
    : `the load does work on one of ${stability.mechanisms} mechanisms (${done}): nothing holds it ${where}`;
  return {
    sentence,
    finding: finding(
      'load-moves-it',
      `Load case ${one.name} moves the truss: ${sentence}.`,
      `Hold the node ${where}, or add bars that do, or mend the load.`,
      {
        nodes: [node],
        at: truss.nodes[node].at,
        place: truss.nodes[node].place,
      },
    ),
  };
}

function mostMoved(truss: Truss, modes: readonly Mode[], loads: Float64Array) {
  let best = 0;
  let moved: Mode | null = null;
  const workAt = (mode: Mode, i: number) => {
    const node = mode.nodes[i];
    const v = mode.movement[i];
    return v[0] * loads[3 * node] + v[1] * loads[3 * node + 1] + v[2] * loads[3 * node + 2];
  };
  const real = onRealNodes(truss, loads);
  for (const mode of modes) {
    let work = 0;
    mode.nodes.forEach((node, i) => {
      const v = mode.movement[i];
      work += v[0] * real[3 * node] + v[1] * real[3 * node + 1] + v[2] * real[3 * node + 2];
    });
    if (Math.abs(work) > best * (1 + 1e-9)) {
      best = Math.abs(work);
      moved = mode;
    }
  }
  if (moved === null || best < 1e-9 * largestOf(loads)) return null;
  const mode: Mode = moved;
  const at = indexOfLargest(Float64Array.from(mode.nodes, (_, i) => workAt(mode, i)));
  const fallback = indexOfLargest(Float64Array.from(mode.movement, (v) => Math.hypot(...v)));
  const chosen = workAt(mode, at) !== 0 ? at : fallback;
  return { mode, work: best, node: mode.nodes[chosen], direction: tidyDirection(mode.movement[chosen]) };
}

/** Loads on carried nodes go to the ends of their bars; one step after another, whatever carries what. */
export function onRealNodes(truss: Truss, loads: Float64Array): Float64Array {
  const out = new Float64Array(loads.length);
  const put = (node: number, axis: number, force: number): void => {
    const carriage = truss.nodes[node].carriedBy;
    if (carriage === null || force === 0) {
      out[3 * node + axis] = out[3 * node + axis] + force;
      return;
    }
    const bar = truss.bars[carriage.bar];
    put(bar.from, axis, (1 - carriage.t) * force);
    put(bar.to, axis, carriage.t * force);
  };
  loads.forEach((force, i) => {
    put(Math.floor(i / 3), i % 3, force);
  });
  return out;
}

function indexOfLargest(values: Float64Array): number {
  let best = 0;
  values.forEach((v, i) => {
    if (Math.abs(v) > Math.abs(values[best]) * (1 + 1e-9)) best = i;
  });
  return best;
}

const largestOf = (values: Float64Array): number => values.reduce((most, v) => Math.max(most, Math.abs(v)), 0);
