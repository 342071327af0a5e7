import { asNumber, type StepValue } from '../../step/values.ts';
import type { Reading } from '../reading.ts';
import { chs, circle, ellipse, rectangle, rhs, trapezium } from './closed-shapes.ts';
import { cShape, zShape } from './folded-shapes.ts';
import { type IFlange, iShape } from './i-shape.ts';
import type { ProfileShape } from './profile-shape.ts';
import { lShape, tShape, uShape } from './rolled-shapes.ts';

/**
 * The shape of an IfcParameterizedProfileDef, about the middle of its bounding box; null where `type` is none.
 * Attributes 0 to 2 are type, name and position in every schema. IFC2X3 has fewer radii and slopes and ends with centres
 * of gravity, which are not read: they follow from the outline.
 */
export function parametricShape(
  reading: Reading,
  type: string,
  args: readonly StepValue[],
  name: string | null,
): ProfileShape | null {
  const size = (i: number) => reading.length(args[i]);
  const radius = (i: number) => Math.max(0, reading.lengthOrZero(args[i]));
  const slope = (i: number) => (asNumber(args[i]) ? reading.angle(args[i]) : 0);
  const hasNewer = reading.family !== 'IFC2X3';
  switch (type) {
    case 'IFCISHAPEPROFILEDEF': {
      const flange: IFlange = {
        width: size(3),
        thickness: size(6),
        fillet: radius(7),
        edgeRadius: hasNewer ? radius(8) : 0,
        slope: hasNewer ? slope(9) : 0,
      };
      return iShape(name, { depth: size(4), web: size(5), top: flange, bottom: flange });
    }
    case 'IFCASYMMETRICISHAPEPROFILEDEF': {
      const bottom: IFlange = {
        width: size(3),
        thickness: size(6),
        fillet: radius(7),
        edgeRadius: hasNewer ? radius(11) : 0,
        slope: hasNewer ? slope(12) : 0,
      };
      const top: IFlange = {
        width: size(8),
        thickness: asNumber(args[9]) === null ? size(6) : size(9),
        fillet: radius(10),
        edgeRadius: hasNewer ? radius(13) : 0,
        slope: hasNewer ? slope(14) : 0,
      };
      return iShape(name, { depth: size(4), web: size(5), top, bottom });
    }
    case 'IFCUSHAPEPROFILEDEF':
      return uShape(name, {
        depth: size(3),
        width: size(4),
        web: size(5),
        flange: size(6),
        fillet: radius(7),
        edgeRadius: radius(8),
        slope: slope(9),
      });
    case 'IFCLSHAPEPROFILEDEF':
      return lShape(name, {
        depth: size(3),
        width: asNumber(args[4]) === null ? size(3) : size(4),
        thickness: size(5),
        fillet: radius(6),
        edgeRadius: radius(7),
        slope: slope(8),
      });
    case 'IFCTSHAPEPROFILEDEF':
      return tShape(name, {
        depth: size(3),
        width: size(4),
        web: size(5),
        flange: size(6),
        fillet: radius(7),
        flangeEdgeRadius: radius(8),
        webEdgeRadius: radius(9),
        webSlope: slope(10),
        flangeSlope: slope(11),
      });
    case 'IFCCSHAPEPROFILEDEF':
      return cShape(name, { depth: size(3), width: size(4), wall: size(5), girth: size(6), innerRadius: radius(7) });
    case 'IFCZSHAPEPROFILEDEF':
      return zShape(name, {
        depth: size(3),
        width: size(4),
        web: size(5),
        flange: size(6),
        fillet: radius(7),
        edgeRadius: radius(8),
      });
    default:
      return closedShape(size, radius, type, args, name);
  }
}

function closedShape(
  size: (i: number) => number,
  radius: (i: number) => number,
  type: string,
  args: readonly StepValue[],
  name: string | null,
): ProfileShape | null {
  switch (type) {
    case 'IFCRECTANGLEHOLLOWPROFILEDEF':
      return rhs(name, { width: size(3), depth: size(4), wall: size(5), inner: radius(6), outer: radius(7) });
    case 'IFCCIRCLEHOLLOWPROFILEDEF':
      return chs(name, size(3), size(4));
    case 'IFCCIRCLEPROFILEDEF':
      return circle(name, size(3));
    case 'IFCELLIPSEPROFILEDEF':
      return ellipse(name, size(3), size(4));
    case 'IFCRECTANGLEPROFILEDEF':
      return rectangle(name, size(3), size(4));
    case 'IFCROUNDEDRECTANGLEPROFILEDEF':
      return rectangle(name, size(3), size(4), radius(5));
    case 'IFCTRAPEZIUMPROFILEDEF': {
      const offset = asNumber(args[6]) === null ? 0 : size(6);
      return trapezium(name, { bottom: size(3), top: size(4), depth: size(5), topOffset: offset });
    }
    default:
      return null;
  }
}
