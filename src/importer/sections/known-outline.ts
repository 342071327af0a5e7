import { NotRead } from '../not-read.ts';
import { shapeFromDesignation } from './designations/shape-from-designation.ts';
import { type ProfileShape, sectionOf } from './profile-shape.ts';

/**
 * How far an outline may be from the section its name calls, so that both are the same: rounds drawn as chords, left out, or
 * larger than tabled. The next size of a family is farther away in one or the other.
 */
const SAME_AREA = 0.05;
const SAME_INERTIA = 0.1;

/**
 * An outline without a shape of its own, named 'L3-1/2X3X3/8' and as large as that: the outline stands, and what no outline
 * tells (what kind of shape it is, torsion, warping, thickness) is taken from the designation.
 */
export function knownByName(shape: ProfileShape): ProfileShape {
  if (shape.shape !== 'other') return shape;
  const called = shapeFromDesignation(shape.name);
  if (called === null) return shape;
  try {
    const [drawn, named] = [sectionOf(shape), sectionOf(called)];
    const near = (key: 'area' | 'inertiaMajor' | 'inertiaMinor', within: number) =>
      Math.abs(drawn[key] / named[key] - 1) < within;
    const isSame = near('area', SAME_AREA) && near('inertiaMajor', SAME_INERTIA) && near('inertiaMinor', SAME_INERTIA);
    if (!isSame) return shape;
    return {
      ...shape,
      shape: called.shape,
      torsion: named.torsion,
      warping: named.warping,
      thickness: named.thickness,
    };
  } catch (problem) {
    if (problem instanceof NotRead) return shape;
    throw problem;
  }
}
