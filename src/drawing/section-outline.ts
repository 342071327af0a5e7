import type { ResultMember } from '../domain/result.ts';

/** Corners of a section's outline in its own y and z, m: a likeness made of area and inertias, for pictures only. */
export type Outline = readonly (readonly [y: number, z: number])[];

/** m; what a member without a section is drawn as. */
const UNKNOWN = 0.06;

/** Depth and width over the radii of gyration, by shape: closed forms, for open shapes those of usual proportions. */
const EXTENTS: Readonly<Record<string, readonly [depth: number, width: number]>> = {
  I: [2.4, 4],
  U: [2.6, 3.3],
  C: [2.6, 3],
  L: [3.2, 3.2],
  T: [3.3, 4.1],
  Z: [2.6, 2.6],
  RHS: [2.55, 2.55],
  CHS: [2.83, 2.83],
  rectangle: [3.464, 3.464],
  circle: [4, 4],
};

export function sectionOutline({ section }: ResultMember): Outline {
  if (section === null || !(section.area > 0)) return rectangle(UNKNOWN, UNKNOWN);
  const [forDepth, forWidth] = EXTENTS[section.shape] ?? [2.7, 2.7];
  const depth = forDepth * Math.sqrt(Math.max(section.inertiaY, 0) / section.area) || UNKNOWN;
  const width = forWidth * Math.sqrt(Math.max(section.inertiaZ, 0) / section.area) || UNKNOWN;
  switch (section.shape) {
    case 'I':
      return iShape(depth, width);
    case 'L':
      return angle(depth, width);
    case 'U':
    case 'C':
      return channel(depth, width);
    case 'T':
      return tee(depth, width);
    case 'CHS':
    case 'circle':
      return round(depth);
    default:
      return rectangle(depth, width);
  }
}

/** m; the larger extent of the outline. */
export function outlineSize(outline: Outline): number {
  const span = (k: 0 | 1) => Math.max(...outline.map((p) => p[k])) - Math.min(...outline.map((p) => p[k]));
  return Math.max(span(0), span(1));
}

/** Parts that are thin enough to look like steel and thick enough to be seen. */
const FLANGE = 0.08;
const WEB = 0.06;

function rectangle(h: number, b: number): Outline {
  return [
    [-b / 2, -h / 2],
    [b / 2, -h / 2],
    [b / 2, h / 2],
    [-b / 2, h / 2],
  ];
}

function round(d: number): Outline {
  return Array.from({ length: 12 }, (_, k) => {
    const angleOf = (Math.PI * (2 * k + 1)) / 12;
    return [(d / 2) * Math.cos(angleOf), (d / 2) * Math.sin(angleOf)] as const;
  });
}

function iShape(h: number, b: number): Outline {
  const [t, w] = [FLANGE * h, (WEB * h) / 2];
  return [
    [-b / 2, -h / 2],
    [b / 2, -h / 2],
    [b / 2, -h / 2 + t],
    [w, -h / 2 + t],
    [w, h / 2 - t],
    [b / 2, h / 2 - t],
    [b / 2, h / 2],
    [-b / 2, h / 2],
    [-b / 2, h / 2 - t],
    [-w, h / 2 - t],
    [-w, -h / 2 + t],
    [-b / 2, -h / 2 + t],
  ];
}

function angle(h: number, b: number): Outline {
  const t = 0.12 * Math.min(h, b);
  const [y, z] = [-0.3 * b, -0.3 * h];
  return [
    [y, z],
    [y + b, z],
    [y + b, z + t],
    [y + t, z + t],
    [y + t, z + h],
    [y, z + h],
  ];
}

function channel(h: number, b: number): Outline {
  const [t, w, y] = [FLANGE * h, WEB * h, -0.3 * b];
  return [
    [y, -h / 2],
    [y + b, -h / 2],
    [y + b, -h / 2 + t],
    [y + w, -h / 2 + t],
    [y + w, h / 2 - t],
    [y + b, h / 2 - t],
    [y + b, h / 2],
    [y, h / 2],
  ];
}

function tee(h: number, b: number): Outline {
  const [t, w, top] = [FLANGE * h * 1.5, WEB * h, 0.28 * h];
  return [
    [-w / 2, top - h],
    [w / 2, top - h],
    [w / 2, top - t],
    [b / 2, top - t],
    [b / 2, top],
    [-b / 2, top],
    [-b / 2, top - t],
    [-w / 2, top - t],
  ];
}
