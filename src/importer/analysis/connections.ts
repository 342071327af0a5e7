import type { Vec3 } from '../../domain/vector.ts';
import { asRef, asString } from '../../step/values.ts';
import type { GivenSupport } from '../given.ts';
import { isSound } from '../member-axis.ts';
import { NotRead } from '../not-read.ts';
import { readAxes } from '../placement-axes.ts';
import type { Sources } from '../read-element.ts';
import { compose, type Transform } from '../transform.ts';
import { readNodeCondition } from './boundary-condition.ts';
import { axesOf, type Frames } from './frames.ts';
import { HELD_AGAINST_TURNING } from './remarks.ts';
import { readVertex } from './topology.ts';

/** A point connection of the analysis model. */
export interface Connection {
  readonly at: Vec3;
  /** Its own coordinate system, in which its condition is given. */
  readonly own: Transform;
  readonly frame: Transform;
}

/** The point connections by instance, and the supports among them. */
export function readConnections(
  sources: Sources,
  frames: Frames,
): { connections: Map<number, Connection>; supports: GivenSupport[] } {
  const { reading } = sources;
  const connections = new Map<number, Connection>();
  const supports: GivenSupport[] = [];
  for (const id of reading.file.idsOf('IFCSTRUCTURALPOINTCONNECTION')) {
    const args = reading.args(id);
    const globalId = asString(args[0]) ?? `#${id}`;
    reading.about(globalId);
    try {
      const frame = frames.of(id);
      const at = readVertex(reading, asRef(args[6]), frame) ?? frame.origin;
      if (!isSound(at))
        throw new NotRead('unreadable-element', 'its point is no point of a building', 'Export it again.');
      reading.about(globalId, at);
      const own = compose(frame, readAxes(reading, args[8]));
      connections.set(id, { at, own, frame });
      const support = supportAt(sources, id, globalId, at, own);
      if (support !== null) supports.push(support);
    } catch (problem) {
      if (!(problem instanceof NotRead)) throw problem;
      reading.note(unreadable(problem));
    } finally {
      reading.about(null);
    }
  }
  return { connections, supports };
}

function supportAt({ reading }: Sources, id: number, globalId: string, at: Vec3, own: Transform): GivenSupport | null {
  const args = reading.args(id);
  const condition = readNodeCondition(reading, args[7]);
  if (condition === null) return null;
  const axes = axesOf(own);
  const fix: Vec3[] = [];
  const springs: { direction: Vec3; stiffness: number }[] = [];
  condition.translations.forEach((hold, i) => {
    const direction = axes[i as 0 | 1 | 2];
    if (hold.kind === 'rigid') fix.push(direction);
    if (hold.kind === 'spring') springs.push({ direction, stiffness: hold.stiffness });
  });
  if (fix.length + springs.length === 0) return null;
  if (condition.holdsTurning) reading.note(HELD_AGAINST_TURNING);
  return { globalId, name: asString(args[2]) ?? globalId, at, fix, springs };
}

const unreadable = (problem: NotRead) => ({
  code: problem.code,
  key: `connection ${problem.message}`,
  say: (count: number, first: string) =>
    `${count === 1 ? `Connection ${first}` : `${count} connections`} of the analysis view cannot be read: ${problem.message}.`,
  advice: problem.advice,
});
