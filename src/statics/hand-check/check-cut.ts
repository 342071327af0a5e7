import {
  add,
  along,
  between,
  cross,
  distance,
  dot,
  meanOf,
  norm,
  ORIGIN,
  scale,
  subtract,
  type Vec3,
} from '../../domain/vector.ts';
import { directionOf, type Frame, frameOf, type Solved, sumOf } from './joints.ts';
import type { State } from './state.ts';

/** A plane: the points p with p . normal = at. */
export interface Plane {
  readonly normal: Vec3;
  /** m, along the unit normal. */
  readonly at: number;
}

/** A bar that the plane cuts. */
export interface CutBar {
  readonly bar: string;
  readonly name: string;
  /** Where the plane meets it. */
  readonly point: Vec3;
  /** Along the bar, out of the kept part. */
  readonly unit: Vec3;
  /** N, tension positive. */
  readonly axialForce: number;
  /** N, on the kept part. */
  readonly force: Vec3;
  /** Nm, about `about`. */
  readonly moment: Vec3;
}

/** The part before the plane, held in balance by the bars that the plane cuts (Ritter's method of sections). */
export interface CutCheck {
  readonly plane: Plane;
  /** Joints of the part that is kept: those with p . normal at most `at`. */
  readonly kept: number;
  readonly bars: readonly CutBar[];
  /** N, on the kept part. */
  readonly load: Vec3;
  readonly reaction: Vec3;
  /** Of bars that end between joints, on a bar which the plane cuts: what of their force is handed to this side. */
  readonly handed: Vec3;
  readonly sum: Vec3;
  /** The middle of the places where bars are cut; moments are about it. */
  readonly about: Vec3;
  /** Nm. */
  readonly loadMoment: Vec3;
  readonly reactionMoment: Vec3;
  readonly handedMoment: Vec3;
  readonly moment: Vec3;
  /** What is left, of forces over the largest force of the state, of moments over that times the greatest lever: the larger. */
  readonly outOfBalance: number;
}

/** m; joints this near to the plane count as before it. */
const ON_PLANE = 1e-6;

interface Turned {
  readonly force: Vec3;
  readonly moment: Vec3;
}

/**
 * The method of sections: whatever acts on the joints on one side of a plane is in balance with the bars that it cuts. Loads on carried nodes act on the joints
 * at the ends of their bars.
 */
export function checkCut(
  result: Solved,
  plane: Plane,
  { axialForce, loads, reactions, largest }: State,
  frame: Frame = frameOf(result),
): CutCheck {
  const { at, shares } = frame;
  const height = (node: string) => dot(at.get(node) ?? ORIGIN, plane.normal) - plane.at;
  const isKept = (node: string) => height(node) <= ON_PLANE;
  const cut = result.bars.flatMap((bar, b) => {
    const axial = axialForce[b];
    if (axial === null || isKept(bar.from) === isKept(bar.to) || !isJoint(bar.from) || !isJoint(bar.to)) return [];
    const [p, q] = isKept(bar.from) ? [bar.from, bar.to] : [bar.to, bar.from];
    const away = scale(directionOf(frame, bar), p === bar.from ? 1 : -1);
    const t = Math.max(0, -height(p) / (height(q) - height(p)));
    return [{ bar, axial, away, point: between(at.get(p) ?? ORIGIN, at.get(q) ?? ORIGIN, t) }];
  });
  const about = cut.length === 0 ? ORIGIN : meanOf(cut.map(({ point }) => point));
  const bars = cut.map(({ bar, axial, away, point }): CutBar => {
    const turned = turnedAt(point, scale(away, axial));
    return { bar: bar.id, name: bar.name, point, unit: away, axialForce: axial, ...turned };
  });
  const handedTerms = result.bars.flatMap((bar, b): Turned[] => {
    const axial = axialForce[b];
    if (axial === null || (isJoint(bar.from) && isJoint(bar.to))) return [];
    const pull = scale(directionOf(frame, bar), axial);
    return [...onKept(bar.from, pull), ...onKept(bar.to, scale(pull, -1))];
  });
  const [load, reaction] = [loads, reactions].map((forces) =>
    total([...forces].flatMap(([node, force]) => onKept(node, force))),
  );
  const handed = total(handedTerms);
  const terms = [load, reaction, handed, ...bars];
  const sum = sumOf(terms.map(({ force }) => force));
  const moment = sumOf(terms.map((term) => term.moment));
  const lever = Math.max(0, ...result.nodes.map((node) => distance(node.at, about)));
  const share = (left: number, size: number) => (size > 0 ? left / size : 0);
  return {
    plane,
    kept: result.nodes.filter(({ id, carriedBy }) => carriedBy === null && isKept(id)).length,
    bars,
    load: load.force,
    reaction: reaction.force,
    handed: handed.force,
    sum,
    about,
    loadMoment: load.moment,
    reactionMoment: reaction.moment,
    handedMoment: handed.moment,
    moment,
    outOfBalance: Math.max(share(norm(sum), largest), share(norm(moment), lever * largest)),
  };

  function isJoint(node: string): boolean {
    const own = shares.get(node) ?? [];
    return own.length === 1 && own[0][0] === node;
  }

  /** A force at a node as it acts on the joints of the kept part. */
  function onKept(node: string, force: Vec3): Turned[] {
    return (shares.get(node) ?? []).flatMap(([joint, part]): Turned[] => {
      if (!isKept(joint)) return [];
      const own = scale(force, part);
      return [turnedAt(at.get(joint) ?? ORIGIN, own)];
    });
  }

  function turnedAt(point: Vec3, force: Vec3): Turned {
    return { force, moment: cross(subtract(point, about), force) };
  }
}

function total(terms: readonly Turned[]): Turned {
  let [force, moment] = [ORIGIN, ORIGIN];
  for (const term of terms) [force, moment] = [add(force, term.force), add(moment, term.moment)];
  return { force, moment };
}

/** The plane at right angles to a direction through a point along it. */
export const planeAcross = (normal: Vec3, at: number): Plane => ({
  normal: along(ORIGIN, normal, 1 / norm(normal)),
  at,
});

export const planeThrough = (point: Vec3, normal: Vec3): Plane =>
  planeAcross(normal, dot(point, normal) / norm(normal));

/** The state with the largest force in a bar that the plane cuts. */
export function worstStateAcross(result: Solved, plane: Plane, states: readonly State[]): State {
  const frame = frameOf(result);
  const most = (state: State) =>
    Math.max(0, ...checkCut(result, plane, state, frame).bars.map(({ axialForce }) => Math.abs(axialForce)));
  let [worst, size] = [states[0], -1];
  for (const state of states) {
    const own = most(state);
    if (own > size) [worst, size] = [state, own];
  }
  return worst;
}
