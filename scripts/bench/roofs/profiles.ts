import type { Section, SectionShape } from '../../../src/domain/member.ts';

/**
 * A section as detailers name it. Nominal sizes in metres (EN 10365, EN 10056-1, EN 10210-2, from memory), x to the
 * right, z up: `heel` is how far the centroid lies above the lowest fibre, `back` from the leftmost one.
 */
export interface Profile {
  readonly name: string;
  readonly shape: SectionShape;
  readonly depth: number;
  readonly width: number;
  readonly web: number;
  readonly flange: number;
  readonly heel: number;
  readonly back: number;
}

const mm = (value: number): number => value / 1000;

function symmetric(shape: SectionShape, name: string, h: number, b: number, web: number, flange = web): Profile {
  return {
    name,
    shape,
    depth: mm(h),
    width: mm(b),
    web: mm(web),
    flange: mm(flange),
    heel: mm(h / 2),
    back: mm(b / 2),
  };
}

const i = (name: string, h: number, b: number, web: number, flange: number) => symmetric('I', name, h, b, web, flange);
const tube = (h: number, b: number, t: number) => symmetric('RHS', `RHS ${h}x${b}x${t}`, h, b, t);
const pipe = (d: number, t: number) => symmetric('CHS', `CHS ${d}x${t}`, d, d, t);
const rod = (d: number) => symmetric('circle', `RD ${d}`, d, d, d / 2);
const angle = (leg: number, t: number, e: number): Profile => ({
  ...symmetric('L', `L ${leg}x${leg}x${t}`, leg, leg, t),
  heel: mm(e),
  back: mm(e),
});
const channel = (h: number, b: number, web: number, flange: number, e: number): Profile => ({
  ...symmetric('U', `UPN ${h}`, h, b, web, flange),
  back: mm(e),
});
const zed = (h: number, b: number, t: number) => symmetric('Z', `Z ${h}x${t}`, h, b, t);

export const HEA = [
  i('HEA 100', 96, 100, 5, 8),
  i('HEA 120', 114, 120, 5, 8),
  i('HEA 140', 133, 140, 5.5, 8.5),
  i('HEA 160', 152, 160, 6, 9),
  i('HEA 180', 171, 180, 6, 9.5),
  i('HEA 200', 190, 200, 6.5, 10),
  i('HEA 220', 210, 220, 7, 11),
  i('HEA 240', 230, 240, 7.5, 12),
];
export const HEB = [
  i('HEB 100', 100, 100, 6, 10),
  i('HEB 120', 120, 120, 6.5, 11),
  i('HEB 140', 140, 140, 7, 12),
  i('HEB 160', 160, 160, 8, 13),
  i('HEB 200', 200, 200, 9, 15),
  i('HEB 240', 240, 240, 10, 17),
  i('HEB 260', 260, 260, 10, 17.5),
];
export const IPE = [
  i('IPE 100', 100, 55, 4.1, 5.7),
  i('IPE 120', 120, 64, 4.4, 6.3),
  i('IPE 140', 140, 73, 4.7, 6.9),
  i('IPE 160', 160, 82, 5, 7.4),
  i('IPE 180', 180, 91, 5.3, 8),
  i('IPE 200', 200, 100, 5.6, 8.5),
  i('IPE 220', 220, 110, 5.9, 9.2),
];
export const RHS = [
  tube(50, 50, 4),
  tube(60, 60, 4),
  tube(70, 70, 4),
  tube(80, 80, 5),
  tube(90, 90, 5),
  tube(100, 60, 5),
  tube(100, 100, 5),
  tube(120, 80, 5),
  tube(120, 120, 6),
  tube(140, 140, 6),
  tube(150, 100, 6),
  tube(160, 160, 8),
  tube(200, 120, 8),
  tube(200, 200, 8),
];
export const CHS = [
  pipe(42.4, 3.2),
  pipe(48.3, 3.2),
  pipe(60.3, 3.2),
  pipe(76.1, 3.2),
  pipe(88.9, 4),
  pipe(101.6, 4),
  pipe(114.3, 5),
  pipe(139.7, 5),
  pipe(168.3, 6.3),
  pipe(193.7, 6.3),
];
export const ANGLES = [
  angle(50, 5, 14),
  angle(60, 6, 16.9),
  angle(70, 7, 19.7),
  angle(80, 8, 22.6),
  angle(90, 9, 25.4),
  angle(100, 10, 28.2),
  angle(120, 12, 34),
  angle(150, 15, 42.5),
];
export const CHANNELS = [
  channel(80, 45, 6, 8, 14.5),
  channel(100, 50, 6, 8.5, 15.5),
  channel(120, 55, 7, 9, 16),
  channel(140, 60, 7, 10, 17.5),
  channel(160, 65, 7.5, 10.5, 18.4),
  channel(180, 70, 8, 11, 19.2),
  channel(200, 75, 8.5, 11.5, 20.1),
  channel(220, 80, 9, 12.5, 21.4),
];
export const ZEDS = [zed(150, 120, 1.5), zed(175, 120, 2), zed(200, 140, 2)];
export const RODS = [rod(16), rod(20), rod(24), rod(27), rod(30)];
export const SAG_RODS = [rod(12), rod(16)];

/** The profile of the list whose depth comes nearest. */
export function nearest(list: readonly Profile[], depth: number): Profile {
  return list.reduce((best, one) => (Math.abs(one.depth - depth) < Math.abs(best.depth - depth) ? one : best));
}

/** Area from the plates; inertias of the bounding proportions, good enough for what joining reads. */
export function sectionOf(profile: Profile): Section {
  const { depth: h, width: b } = profile;
  const area = areaOf(profile);
  const [inertiaY, inertiaZ] = [area * (0.38 * h) ** 2, area * (0.3 * b) ** 2];
  return {
    name: profile.name,
    shape: profile.shape,
    area,
    inertiaY,
    inertiaZ,
    inertiaYZ: 0,
    inertiaMajor: Math.max(inertiaY, inertiaZ),
    inertiaMinor: Math.min(inertiaY, inertiaZ),
    torsion: inertiaZ / 10,
    warping: 0,
    from: 'profile',
    depth: h,
    width: b,
    thickness: Math.min(profile.web, profile.flange),
  };
}

function areaOf({ shape, depth: h, width: b, web, flange }: Profile): number {
  switch (shape) {
    case 'I':
    case 'U':
      return 2 * b * flange + (h - 2 * flange) * web;
    case 'L':
      return (h + b - web) * web;
    case 'Z':
      return (h + b) * web;
    case 'RHS':
      return h * b - (h - 2 * web) * (b - 2 * web);
    case 'CHS':
      return (Math.PI / 4) * (h ** 2 - (h - 2 * web) ** 2);
    default:
      return (Math.PI / 4) * h ** 2;
  }
}
