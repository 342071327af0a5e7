import type { Vec3 } from '../../domain/vector.ts';
import { asRef, asRefs } from '../../step/values.ts';
import type { GivenLoad } from '../given.ts';
import type { NotRead } from '../not-read.ts';
import type { Sources } from '../read-element.ts';
import { readNodeCondition } from './boundary-condition.ts';
import { type Frames, inAxes, turned } from './frames.ts';
import type { Items } from './items.ts';
import { displacementOf, forceOf, isLocal, notTaken } from './load-values.ts';
import { readVertex } from './topology.ts';

/**
 * A force on a point connection, how far a support settles, or on a point of a curve member that the action itself draws.
 * @throws NotRead where there is no such point
 */
export function pointLoads(sources: Sources, frames: Frames, items: Items, id: number, item: number): GivenLoad[] {
  const { reading } = sources;
  const args = reading.args(id);
  const connection = items.connections.get(item);
  const member = items.members.get(item);
  if (connection === undefined && member === undefined) throw actsElsewhere();
  const frame = connection?.frame ?? frames.of(item);
  const at = readVertex(reading, asRef(args[6]), frame) ?? connection?.at ?? null;
  if (at === null) throw notTaken('they act on a member at a point that is not given');
  const load = singleLoad(sources, asRef(args[7]));
  if (load === null) return [];
  const inWorld = (given: Vec3): Vec3 => {
    if (!isLocal(args[8])) return turned(frame, given);
    return connection === undefined ? inAxes(member!.axes, given) : turned(connection.own, given);
  };
  const moved = connection !== undefined && isHeld(sources, item) ? displacementOf(reading, load) : null;
  if (moved !== null) return [{ kind: 'settlement', at, movement: inWorld(moved) }];
  const given = forceOf(reading, load, 'force');
  return given === null ? [] : [{ kind: 'point', at, force: inWorld(given) }];
}

/** A movement that is imposed where nothing holds the node is no settlement. */
function isHeld({ reading }: Sources, connection: number): boolean {
  const condition = readNodeCondition(reading, reading.args(connection)[7]);
  return condition?.translations.some(({ kind }) => kind === 'rigid') ?? false;
}

/** Of a configuration of one value that value. */
function singleLoad({ reading }: Sources, load: number | null): number | null {
  if (load === null || reading.typeOf(load) !== 'IFCSTRUCTURALLOADCONFIGURATION') return load;
  return asRefs(reading.args(load)[1])[0] ?? null;
}

/** Of the model's elements themselves, surfaces and line supports. */
export const actsElsewhere = (): NotRead =>
  notTaken('they act on something that is neither a member nor a point connection');
