import type { Section } from '../../../domain/member.ts';
import { sectionOf } from '../profile-shape.ts';
import { shapeFromDesignation } from './shape-from-designation.ts';

/** '2L 80x80x8', '2 x UPN 200', '2-L4X3X1/4'; American lists add the gap between the legs and which of them are back to back. */
const PAIR = /^\s*2\s*[xX*×-]?\s*(?=[A-Z])(.+?)(?:\s*(?:LLBB|SLBB|LBB))?\s*$/i;

/** A fourth dimension, the gap: of no matter to two that are not connected. */
const GAP = /^(L.+?[xX*/].+?[xX*].+?)[xX*][^xX*]+$/i;

const PAIRED: ReadonlySet<string> = new Set(['L', 'U']);

/**
 * The section of two angles or channels back to back; null where `text` calls none. Nothing in a name tells of the connectors
 * between them, so that they are reckoned as two single members side by side (EN 1993-1-1 6.4.4 wants connectors at
 * 15 i_min or less before they act as one): everything is twice that of the one, about its own axes.
 */
export function pairFromDesignation(text: string): Section | null {
  const written = PAIR.exec(text)?.[1];
  if (written === undefined) return null;
  const shape = shapeFromDesignation(written) ?? shapeFromDesignation(GAP.exec(written)?.[1] ?? '');
  if (shape === null || !PAIRED.has(shape.shape)) return null;
  const one = sectionOf(shape);
  return {
    ...one,
    name: `2${shape.shape === 'L' ? '' : ' '}${one.name}`,
    area: 2 * one.area,
    inertiaY: 2 * one.inertiaY,
    inertiaZ: 2 * one.inertiaZ,
    inertiaYZ: 2 * one.inertiaYZ,
    inertiaMajor: 2 * one.inertiaMajor,
    inertiaMinor: 2 * one.inertiaMinor,
    torsion: 2 * one.torsion,
    warping: 2 * one.warping,
    width: 2 * one.width,
  };
}

/** Whether `name` is what a pair is called here. */
export const isPair = (name: string): boolean => /^2 ?[A-Z]/.test(name);
