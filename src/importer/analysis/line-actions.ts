import { along, distance, dot, subtract, unit, type Vec3 } from '../../domain/vector.ts';
import { asEnum, asList, asNumber, asRef, asRefs } from '../../step/values.ts';
import type { GivenLoad } from '../given.ts';

import type { Sources } from '../read-element.ts';
import type { CurveMember } from './curve-members.ts';
import { axesOf, type Frames, inAxes } from './frames.ts';
import type { Items } from './items.ts';
import { forceOf, isLocal, notTaken, temperatureOf } from './load-values.ts';
import { actsElsewhere } from './point-actions.ts';
import { readEdgeLine, readPoint } from './topology.ts';

/** A load at a distance (m) from the start of the line that the action acts on. */
interface Station {
  readonly s: number;
  readonly load: number;
}

/** The straight stretch that an action acts on. */
interface Stretch {
  readonly start: Vec3;
  readonly direction: Vec3;
  readonly length: number;
}

/**
 * A change of temperature, or forces per length on a curve member: constant, or linear between stations; forces at stations where the action is
 * discrete. IFC4: IfcStructuralLoadConfiguration; IFC2X3: IfcStructuralLinearActionVarying.
 * @throws NotRead where the distribution is another
 */
export function lineLoads(sources: Sources, frames: Frames, items: Items, id: number, item: number): GivenLoad[] {
  const { reading } = sources;
  const args = reading.args(id);
  const member = items.members.get(item);
  if (member === undefined) throw actsElsewhere();
  const applied = asRef(args[7]);
  const change = applied === null ? null : temperatureOf(reading, applied);
  if (change !== null) return [{ kind: 'temperature', globalId: member.member.globalId, change }];
  const drawn = readEdgeLine(reading, asRef(args[6]), frames.of(item));
  const stretch = stretchOf(drawn?.from ?? member.start, drawn?.to ?? member.end);
  const shape = reading.family === 'IFC2X3' ? null : asEnum(args[11]);
  const projected = asEnum(args[reading.family === 'IFC2X3' ? 11 : 10]) === 'PROJECTED_LENGTH';
  const axes = isLocal(args[8]) ? member.axes : axesOf(frames.of(item));
  const stations = stationsOf(sources, frames, id, item, stretch, shape);
  if (shape === 'DISCRETE') return stations.flatMap((station) => discreteLoad(sources, station, stretch, axes));
  const forces = stations.map(({ load }) => {
    const given = forceOf(reading, load, 'linearForce');
    return given === null ? null : perTrueLength(given, axes, stretch.direction, projected);
  });
  return stations.slice(1).flatMap((to, i): GivenLoad[] => {
    const from = stations[i]!;
    const [forceFrom, forceTo] = [forces[i], forces[i + 1]];
    if (!forceFrom || !forceTo || !(to.s > from.s)) return [];
    return [
      {
        kind: 'line',
        globalId: member.member.globalId,
        from: pointOn(stretch, from.s),
        to: pointOn(stretch, to.s),
        forceFrom,
        forceTo,
      },
    ];
  });
}

function stretchOf(start: Vec3, end: Vec3): Stretch {
  const direction = unit(subtract(end, start));
  if (direction === null) throw notTaken('they act on a line without length');
  return { start, direction, length: distance(start, end) };
}

const pointOn = ({ start, direction }: Stretch, s: number): Vec3 => along(start, direction, s);

function discreteLoad(
  { reading }: Sources,
  { s, load }: Station,
  stretch: Stretch,
  axes: CurveMember['axes'],
): GivenLoad[] {
  const given = forceOf(reading, load, 'force');
  return given === null ? [] : [{ kind: 'point', at: pointOn(stretch, s), force: inAxes(axes, given) }];
}

/**
 * A load per projected length acts, for each of its components, on the length seen along that component
 * (IfcProjectedOrTrueLengthEnum).
 */
function perTrueLength(given: Vec3, axes: CurveMember['axes'], direction: Vec3, projected: boolean): Vec3 {
  const seen = (i: 0 | 1 | 2): number => (projected ? Math.sqrt(Math.max(0, 1 - dot(axes[i], direction) ** 2)) : 1);
  return inAxes(axes, [given[0] * seen(0), given[1] * seen(1), given[2] * seen(2)]);
}

const LINEAR_BETWEEN: ReadonlySet<string | null> = new Set([null, 'LINEAR', 'POLYGONAL', 'EQUIDISTANT', 'DISCRETE']);

function stationsOf(
  sources: Sources,
  frames: Frames,
  id: number,
  item: number,
  stretch: Stretch,
  shape: string | null,
): Station[] {
  const { reading } = sources;
  const args = reading.args(id);
  const applied = asRef(args[7]);
  if (applied === null) throw notTaken('the model does not say their size');
  const ends = (load: number): Station[] => [
    { s: 0, load },
    { s: stretch.length, load },
  ];
  if (reading.typeOf(id) === 'IFCSTRUCTURALLINEARACTIONVARYING') {
    return varyingStations(sources, frames, item, stretch, [applied, ...asRefs(args[13])], asRef(args[12]));
  }
  if (reading.typeOf(applied) !== 'IFCSTRUCTURALLOADCONFIGURATION') return ends(applied);
  const [, values, locations] = reading.args(applied);
  const loads = asRefs(values);
  const places = asList(locations).map((place) => (asNumber(asList(place)[0]) ?? Number.NaN) * reading.units.length);
  const [first] = loads;
  if (first !== undefined && (shape === 'CONST' || (loads.length === 1 && places.length === 0))) return ends(first);
  if (!LINEAR_BETWEEN.has(shape)) {
    throw notTaken(`they vary along the member in a way that is not read (${shape?.toLowerCase()})`);
  }
  if (places.length === 0 && (shape === 'EQUIDISTANT' || loads.length === 2)) {
    return loads.map((load, i) => ({ s: (stretch.length * i) / (loads.length - 1), load }));
  }
  if (places.length !== loads.length || !places.every(Number.isFinite)) {
    throw notTaken('the model does not say where along the member they act');
  }
  return loads.map((load, i) => ({ s: places[i] as number, load }));
}

/** The first load at the start; each further one at the point of the shape aspect that is drawn for it. */
function varyingStations(
  { reading }: Sources,
  frames: Frames,
  item: number,
  stretch: Stretch,
  loads: readonly number[],
  aspect: number | null,
): Station[] {
  const frame = frames.of(item);
  const shapes = aspect === null ? [] : asRefs(reading.args(aspect)[0]);
  const points = shapes.flatMap((representation) =>
    asRefs(reading.args(representation)[3]).flatMap((vertex) => {
      const point = readPoint(reading, vertex, frame);
      return point === null ? [] : [point];
    }),
  );
  const places = points.map((point) => dot(subtract(point, stretch.start), stretch.direction));
  if (places.length === loads.length)
    return loads.map((load, i) => ({ s: places[i] as number, load })).sort((a, b) => a.s - b.s);
  const further = places.length === loads.length - 1 ? places : loads.length === 2 ? [stretch.length] : null;
  if (further === null) throw notTaken('the model does not say where along the member they act');
  return [0, ...further].map((s, i) => ({ s, load: loads[i] as number })).sort((a, b) => a.s - b.s);
}
