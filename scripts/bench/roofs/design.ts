import { cross, dot, norm, scale, subtract, type Vec3 } from '../../../src/domain/vector.ts';
import type { Chance } from './chance.ts';
import { ANGLES, CHANNELS, CHS, HEA, HEB, IPE, nearest, type Profile, RHS } from './profiles.ts';
import type { TrussKind } from './truss-shapes.ts';

export const FAMILIES = [
  'tubes',
  'pipes',
  'H and tubes',
  'H and H',
  'H and angles',
  'double angles',
  'double channels',
] as const;
export type Family = (typeof FAMILIES)[number];
/** Light trusses with webs at sharp angles are made of angles and tubes. */
const FINK_FAMILIES: readonly Family[] = ['double angles', 'H and angles', 'double channels', 'tubes', 'pipes'];

/** How a web member's end is drawn: to the chord's axis, profiled to its face, or cut square on a gusset. */
export type Fit = 'to axis' | 'profiled' | 'gusset';

/** A section as used for one kind of part: single or in pairs with a gusset between the backs. */
export interface Part {
  readonly profile: Profile;
  /** Thickness of the plate between the two of a pair; null for a single member. */
  readonly pairGap: number | null;
  /** Turned about its axis by a right angle: the profile's depth lies across the truss. */
  readonly turned: boolean;
  /** A single angle bolted to one side of the gusset lies this far off the truss plane. */
  readonly sideways: number;
}

/** What all trusses of a roof share. */
export interface Design {
  readonly family: Family;
  readonly fit: Fit;
  readonly topChord: Part;
  readonly bottomChord: Part;
  readonly diagonal: Part;
  readonly post: Part;
  readonly column: Profile;
  /** Where the webs meet, as a share of the chord's depth outwards (+) or inwards (-) of its axis. */
  readonly eccentricity: number;
  /** Clear distance between neighbouring parts on a gusset. */
  readonly clearance: number;
}

const single = (profile: Profile, turned = false): Part => ({ profile, pairGap: null, turned, sideways: 0 });
const paired = (profile: Profile, gap: number): Part => ({ ...single(profile), pairGap: gap });

export function randomDesign(chance: Chance, kind: TrussKind, span: number): Design {
  const family = chance.pick(kind.endsWith('Fink') ? FINK_FAMILIES : FAMILIES);
  const chordDepth = (0.06 + 0.0045 * span) * chance.between(0.85, 1.15);
  const webDepth = chordDepth * chance.between(0.45, 0.75);
  const gusset = chance.pick([0.008, 0.01, 0.012, 0.015]);
  const parts = partsOf(chance, family, chordDepth, webDepth, gusset);
  const isHollow = family === 'tubes' || family === 'pipes';
  return {
    family,
    fit: isHollow
      ? chance.pick(['to axis', 'profiled', 'gusset'] as const)
      : chance.pick(['profiled', 'gusset', 'gusset'] as const),
    ...parts,
    column: nearest(chance.pick([HEA, HEB, IPE.slice(3)]), Math.max(0.14, chordDepth * chance.between(1, 1.4))),
    eccentricity: chance.happens(0.5) ? 0 : chance.between(-0.4, 0.25),
    clearance: chance.between(0.01, 0.03),
  };
}

function partsOf(chance: Chance, family: Family, chordDepth: number, webDepth: number, gusset: number) {
  const slimmer = webDepth * chance.between(0.75, 1);
  const angle = (depth: number) => nearest(ANGLES, depth);
  const onOneSide = (profile: Profile): Part => ({ ...single(profile), sideways: gusset / 2 + profile.back });
  switch (family) {
    case 'tubes':
      return all(single(nearest(RHS, chordDepth)), single(nearest(RHS, webDepth)), single(nearest(RHS, slimmer)));
    case 'pipes':
      return all(single(nearest(CHS, chordDepth)), single(nearest(CHS, webDepth)), single(nearest(CHS, slimmer)));
    case 'H and tubes': {
      const web = chance.pick([RHS, CHS]);
      return all(single(nearest(HEA, chordDepth)), single(nearest(web, webDepth)), single(nearest(web, slimmer)));
    }
    case 'H and H': {
      // Chords laid flat, webs between their flanges: the gussets stand on both sides.
      const web = nearest(chance.pick([HEA, IPE]), webDepth);
      return all(single(nearest(chance.pick([HEA, HEB]), chordDepth), true), single(web, true), single(web, true));
    }
    case 'H and angles': {
      const chord = single(nearest(HEA, chordDepth));
      return chance.happens(0.5)
        ? all(chord, paired(angle(webDepth), gusset), paired(angle(slimmer), gusset))
        : all(chord, onOneSide(angle(webDepth)), onOneSide(angle(slimmer)));
    }
    case 'double angles': {
      const chord = paired(angle(chordDepth), gusset);
      return chance.happens(0.5)
        ? all(chord, paired(angle(webDepth), gusset), paired(angle(slimmer), gusset))
        : all(chord, onOneSide(angle(webDepth)), onOneSide(angle(slimmer)));
    }
    case 'double channels':
      return all(
        paired(nearest(CHANNELS, chordDepth), gusset),
        paired(angle(webDepth), gusset),
        paired(angle(slimmer), gusset),
      );
  }
}

const all = (chord: Part, diagonal: Part, post: Part) => ({ topChord: chord, bottomChord: chord, diagonal, post });

/** Distance from the axis to the outline in direction `towards` (a unit vector square to the axis). */
export function faceTowards(profile: Profile, zAxis: Vec3, towards: Vec3): number {
  const along = dot(towards, zAxis);
  const depth = along > 0 ? profile.depth - profile.heel : profile.heel;
  const across = Math.sqrt(Math.max(0, 1 - along ** 2));
  if (profile.shape === 'CHS' || profile.shape === 'circle') return profile.depth / 2;
  return Math.abs(along) * depth + across * Math.max(profile.back, profile.width - profile.back);
}

/** A straight steel line that passes or ends at a joint, seen from a member that comes to it. */
export interface Host {
  readonly direction: Vec3;
  readonly profile: Profile;
  readonly zAxis: Vec3;
}

/** How far from the work point a member in direction `u` leaves the body of `host`. */
export function faceDistance(host: Host, u: Vec3): number {
  const square = subtract(u, scale(host.direction, dot(u, host.direction)));
  const sine = Math.max(norm(square), 0.2);
  if (norm(square) < 1e-6) return 0;
  return faceTowards(host.profile, host.zAxis, scale(square, 1 / norm(square))) / sine;
}

/** The gap beyond the host's face that a gusset still bridges without looking odd, in proportion to the part. */
export function believableGap(profile: Profile): number {
  return Math.min(0.15, Math.max(0.06, 1.25 * Math.max(profile.depth, profile.width)));
}

/** Setback of a square-cut member on a gusset: clear of the hosts' faces and of its neighbours at the joint. */
export function gussetSetback(
  own: { readonly u: Vec3; readonly halfWidth: number; readonly profile: Profile },
  hosts: readonly Host[],
  neighbours: readonly { readonly u: Vec3; readonly halfWidth: number }[],
  clearance: number,
): number {
  const face = Math.max(0, ...hosts.map((host) => faceDistance(host, own.u)));
  const corner = hosts.map((host) => {
    const sine = Math.max(norm(cross(own.u, host.direction)), 0.2);
    return faceDistance(host, own.u) + (clearance + own.halfWidth * Math.sqrt(1 - Math.min(1, sine ** 2))) / sine;
  });
  const beside = neighbours.map(({ u, halfWidth }) => {
    const cosine = dot(own.u, u);
    const sine = Math.max(norm(cross(own.u, u)), 0.2);
    return cosine <= 0 ? 0 : (halfWidth + clearance + own.halfWidth * cosine) / sine;
  });
  const wanted = Math.max(face + clearance, ...corner, ...beside);
  return Math.min(wanted, face + believableGap(own.profile));
}
