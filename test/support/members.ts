import type { Member, Section } from '../../src/domain/member.ts';
import { anyNormal, cross, subtract, unit, type Vec3 } from '../../src/domain/vector.ts';

export interface MemberWish extends Partial<Omit<Member, 'section'>> {
  readonly section?: Section | null;
}

/** A rectangular hollow section of these outer sizes, 5 mm thick; its properties are the closed forms. */
export function hollow(depth: number, width = depth): Section {
  const t = 0.005;
  const area = depth * width - (depth - 2 * t) * (width - 2 * t);
  const inertia = (h: number, b: number) => (b * h ** 3 - (b - 2 * t) * (h - 2 * t) ** 3) / 12;
  const [inertiaY, inertiaZ] = [inertia(depth, width), inertia(width, depth)];
  return {
    name: `RHS ${depth * 1000}x${width * 1000}x5`,
    shape: 'RHS',
    area,
    inertiaY,
    inertiaZ,
    inertiaYZ: 0,
    inertiaMajor: Math.max(inertiaY, inertiaZ),
    inertiaMinor: Math.min(inertiaY, inertiaZ),
    torsion: inertiaY,
    warping: 0,
    from: 'profile',
    depth,
    width,
    thickness: t,
  };
}

/** A round bar. */
export function round(diameter: number): Section {
  const area = (Math.PI * diameter ** 2) / 4;
  const inertia = (Math.PI * diameter ** 4) / 64;
  return {
    ...hollow(diameter),
    name: `R ${diameter * 1000}`,
    shape: 'circle',
    area,
    inertiaY: inertia,
    inertiaZ: inertia,
    inertiaMajor: inertia,
    inertiaMinor: inertia,
    torsion: 2 * inertia,
    thickness: diameter,
  };
}

/** A steel member named and identified by `mark`, 100 mm square unless said otherwise. */
export function member(mark: string, from: Vec3, to: Vec3, wish: MemberWish = {}): Member {
  const direction = unit(subtract(to, from)) ?? [1, 0, 0];
  return {
    globalId: mark,
    part: 0,
    name: mark,
    tag: mark,
    class: 'IfcMember',
    predefinedType: null,
    type: null,
    assembly: null,
    partOf: null,
    storey: null,
    layer: null,
    axisFrom: 'extrusion',
    axis: [from, to],
    zAxis: cross(direction, anyNormal(direction)),
    section: hollow(0.1),
    material: {
      name: 'S355',
      elasticModulus: 2.1e11,
      density: 7850,
      expansion: 1.2e-5,
      yieldStrength: 3.55e8,
      ultimateStrength: 4.9e8,
      from: 'name',
    },
    ...wish,
  };
}

/** A member whose ends stop short of the points it aims at. */
export function cutBack(mark: string, from: Vec3, to: Vec3, gap: number, wish: MemberWish = {}): Member {
  const direction = unit(subtract(to, from)) as Vec3;
  const move = (p: Vec3, k: number): Vec3 => [
    p[0] + k * direction[0],
    p[1] + k * direction[1],
    p[2] + k * direction[2],
  ];
  return member(mark, move(from, gap), move(to, -gap), wish);
}
