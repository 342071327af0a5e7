import type { Cursor } from '../../step/cursor.ts';
import { NO_ID } from '../../step/cursor.ts';
import type { Placements } from '../placements.ts';
import { Frame } from './frame.ts';
import { Triple } from './triple.ts';

/**
 * Reads the placement and the shape of an element, if they are what most exporters write: a local placement on one that is
 * known, an Axis of two points or none, and a Body of one extrusion with a plain profile. Every method says false of anything
 * else, and of whatever the general way would have to remark on.
 */
export class PlainShape {
  readonly world = new Frame();
  hasLine = false;
  /** The drawn line's ends, in the element's own coordinates. */
  readonly from = new Triple();
  readonly to = new Triple();
  hasBody = false;
  /** The body's profile, an instance id. */
  profile = NO_ID;
  /** From the swept plane to the element's coordinates. */
  readonly position = new Frame();
  readonly direction = new Triple();
  /** As written, in the file's unit. */
  depth = 0;

  private readonly cursor: Cursor;
  private readonly placements: Placements;
  private readonly length: number;
  private readonly codes: {
    readonly placement: number;
    readonly axes: number;
    readonly polyline: number;
    readonly extrusion: number;
  };
  private readonly local = new Frame();
  private readonly base = new Frame();
  /** The placement that `base` is of. */
  private baseId = NO_ID;
  private readonly origin = new Triple();
  private readonly axis = new Triple();
  private readonly reference = new Triple();

  /** @param length metres in one length unit */
  constructor(cursor: Cursor, placements: Placements, length: number) {
    this.cursor = cursor;
    this.placements = placements;
    this.length = length;
    this.codes = {
      placement: cursor.codeOf('IFCLOCALPLACEMENT'),
      axes: cursor.codeOf('IFCAXIS2PLACEMENT3D'),
      polyline: cursor.codeOf('IFCPOLYLINE'),
      extrusion: cursor.codeOf('IFCEXTRUDEDAREASOLID'),
    };
  }

  /** The placement into `world`. */
  readPlacement(id: number): boolean {
    const { cursor } = this;
    cursor.enter(id, this.codes.placement);
    const parent = cursor.ref();
    const axes = cursor.ref();
    if (!cursor.leave() || parent === NO_ID || axes === NO_ID) return false;
    if (parent !== this.baseId && !this.takeBase(parent)) return false;
    if (!this.readAxes(axes, this.local)) return false;
    this.world.setComposed(this.base, this.local);
    return true;
  }

  private takeBase(id: number): boolean {
    const world = this.placements.known(id);
    if (world === null) return false;
    this.base.setTransform(world);
    this.baseId = id;
    return true;
  }

  private readAxes(id: number, into: Frame): boolean {
    const { cursor, origin, axis, reference } = this;
    cursor.enter(id, this.codes.axes);
    const location = cursor.ref();
    const z = cursor.ref();
    const x = cursor.ref();
    if (!cursor.leave() || !origin.read(cursor, location, this.length)) return false;
    if (z !== NO_ID && !axis.read(cursor, z, 1)) return false;
    if (x !== NO_ID && !reference.read(cursor, x, 1)) return false;
    into.setAxes(origin, z === NO_ID ? null : axis, x === NO_ID ? null : reference);
    return true;
  }

  /** The representations of the shape `id`. */
  readShape(id: number): boolean {
    const { cursor } = this;
    cursor.enter(id);
    cursor.text();
    cursor.text();
    cursor.openList();
    const first = cursor.ref();
    const second = cursor.isAtEnd ? NO_ID : cursor.ref();
    cursor.closeList();
    this.hasLine = false;
    this.hasBody = false;
    if (!cursor.leave() || first === NO_ID) return false;
    return this.readRepresentation(first) && (second === NO_ID || this.readRepresentation(second)) && this.hasBody;
  }

  private readRepresentation(id: number): boolean {
    const { cursor } = this;
    cursor.enter(id);
    cursor.ref();
    const isAxis = cursor.isText('Axis');
    if (!isAxis && !cursor.isText('Body')) return false;
    cursor.text();
    cursor.openList();
    const item = cursor.ref();
    cursor.closeList();
    if (!cursor.leave() || item === NO_ID) return false;
    return isAxis ? !this.hasLine && this.readLine(item) : !this.hasBody && this.readExtrusion(item);
  }

  private readLine(id: number): boolean {
    const { cursor } = this;
    cursor.enter(id, this.codes.polyline);
    cursor.openList();
    const from = cursor.ref();
    const to = cursor.ref();
    cursor.closeList();
    this.hasLine = cursor.leave() && this.from.read(cursor, from, this.length) && this.to.read(cursor, to, this.length);
    return this.hasLine;
  }

  private readExtrusion(id: number): boolean {
    const { cursor } = this;
    cursor.enter(id, this.codes.extrusion);
    this.profile = cursor.ref();
    const position = cursor.ref();
    const direction = cursor.ref();
    this.depth = cursor.number();
    if (!cursor.leave() || this.profile === NO_ID) return false;
    if (position === NO_ID) this.position.setIdentity();
    else if (!this.readAxes(position, this.position)) return false;
    this.hasBody = this.direction.read(cursor, direction, 1);
    return this.hasBody;
  }
}
