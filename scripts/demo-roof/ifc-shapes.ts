import { cross, distance, subtract, type Vec3 } from '../../src/domain/vector.ts';
import type { StepRef } from '../../src/step/values.ts';
import { enumeration } from '../../src/step/write.ts';
import type { Part } from './parts.ts';
import { ANGLE_CENTROID, PROFILES, type Profile, type SectionName, tubeCorners } from './sections.ts';
import type { StepText } from './step-text.ts';

const ORIGIN: Vec3 = [0, 0, 0];

/** Local z and x directions of a placement. */
export interface Turn {
  readonly z: Vec3;
  readonly x: Vec3;
}

/** Profile x and y become the section's y and z when the extrusion runs along the member. */
export const turnOf = (direction: Vec3, zAxis: Vec3): Turn => ({ z: direction, x: cross(zAxis, direction) });

export function axisPlacement(step: StepText, at: Vec3, turn: Turn | null = null): StepRef {
  const point = step.add('IfcCartesianPoint', at);
  const axis = turn && step.add('IfcDirection', turn.z);
  const reference = turn && step.add('IfcDirection', turn.x);
  return step.add('IfcAxis2Placement3D', point, axis, reference);
}

export function localPlacement(step: StepText, parent: StepRef | null, at: Vec3, turn: Turn | null = null): StepRef {
  return step.add('IfcLocalPlacement', parent, axisPlacement(step, at, turn));
}

export function polyline(step: StepText, points: readonly (readonly number[])[]): StepRef {
  return step.add(
    'IfcPolyline',
    points.map((point) => step.add('IfcCartesianPoint', point)),
  );
}

/** Section profiles are written once and shared. */
export class Profiles {
  readonly #step: StepText;
  readonly #written = new Map<SectionName, StepRef>();

  constructor(step: StepText) {
    this.#step = step;
  }

  of(section: SectionName): StepRef {
    const known = this.#written.get(section);
    if (known) return known;
    const profile = writeProfile(this.#step, section);
    this.#written.set(section, profile);
    return profile;
  }
}

function writeProfile(step: StepText, section: SectionName): StepRef {
  const profile: Profile = PROFILES[section];
  const area = enumeration('AREA');
  switch (profile.shape) {
    case 'I': {
      const { b, h, web, flange, root } = profile;
      return step.add('IfcIShapeProfileDef', area, section, null, b, h, web, flange, root, null, null);
    }
    case 'square tube': {
      const { side, wall } = profile;
      const { inner, outer } = tubeCorners(wall);
      return step.add('IfcRectangleHollowProfileDef', area, section, null, side, side, wall, inner, outer);
    }
    case 'round tube':
      return step.add('IfcCircleHollowProfileDef', area, section, null, profile.diameter / 2, profile.wall);
    case 'angle': {
      const { leg, thickness, root, toe } = profile;
      const position = step.add(
        'IfcAxis2Placement2D',
        step.add('IfcCartesianPoint', angleOutlineCentre(section, leg)),
        null,
      );
      return step.add('IfcLShapeProfileDef', area, section, position, leg, leg, thickness, root, toe, null);
    }
    case 'flat':
      return step.add('IfcRectangleProfileDef', area, section, null, profile.b, profile.h);
    case 'rod':
      return step.add('IfcCircleProfileDef', area, section, null, profile.diameter / 2);
  }
}

/** An angle profile's own origin is the middle of its outline: moved so that the centroid lies on the member's axis. */
function angleOutlineCentre(section: SectionName, leg: number): [number, number] {
  const centroid = ANGLE_CENTROID[section];
  if (centroid === undefined) throw new Error(`no centroid is given for ${section}`);
  return [leg / 2 - centroid, leg / 2 - centroid];
}

export interface ShapeContexts {
  readonly body: StepRef;
  readonly axis: StepRef;
  readonly footPrint: StepRef;
}

/** The solid's own position, where the element's placement does not turn already. */
export function extrusion(
  step: StepText,
  contexts: ShapeContexts,
  profile: StepRef,
  length: number,
  turn: Turn | null = null,
): StepRef {
  const position = turn && axisPlacement(step, ORIGIN, turn);
  const solid = step.add('IfcExtrudedAreaSolid', profile, position, step.add('IfcDirection', [0, 0, 1]), length);
  return step.add('IfcShapeRepresentation', contexts.body, 'Body', 'SweptSolid', [solid]);
}

/** `isTurned`: the element's local z runs along the member; else its axes are the building's. */
export function partShape(
  step: StepText,
  contexts: ShapeContexts,
  profiles: Profiles,
  part: Part,
  turn: Turn,
  isTurned: boolean,
  drawsAxis: boolean,
): StepRef {
  const [from, to] = part.axis;
  const length = distance(from, to);
  const body = extrusion(step, contexts, profiles.of(part.section), length, isTurned ? null : turn);
  if (!drawsAxis) return step.add('IfcProductDefinitionShape', null, null, [body]);
  const line = polyline(step, [ORIGIN, isTurned ? [0, 0, length] : subtract(to, from)]);
  const axis = step.add('IfcShapeRepresentation', contexts.axis, 'Axis', 'Curve3D', [line]);
  return step.add('IfcProductDefinitionShape', null, null, [axis, body]);
}
