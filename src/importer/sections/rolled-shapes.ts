import { inMillimetres, type ProfileShape, requirePositive, requireShape } from './profile-shape.ts';
import { corner, roundedRing } from './rounded-ring.ts';
import { MiddleLine, type Sectorial } from './thin-wall.ts';
import { torsionOfL, torsionOfT, torsionOfU } from './torsion.ts';

/** Rolled U, L and T shapes; the origin is the middle of the bounding box. Metres and radians. */

export interface UDimensions {
  readonly depth: number;
  readonly width: number;
  readonly web: number;
  readonly flange: number;
  readonly fillet: number;
  readonly edgeRadius: number;
  readonly slope: number;
}

/** Channel with its web on the left, open to the right. */
export function uShape(name: string | null, d: UDimensions): ProfileShape {
  requirePositive({ depth: d.depth, width: d.width, 'web thickness': d.web, 'flange thickness': d.flange });
  requireShape(2 * d.flange < d.depth, 'its flanges are thicker than it is deep', { flange: d.flange, depth: d.depth });
  requireShape(d.web < d.width, 'its web is thicker than its flange is wide', { web: d.web, flange: d.width });
  // A sloped flange has its nominal thickness half its width from the edge (EN 10365, UPN up to 300).
  const rise = Math.tan(d.slope);
  const tip = d.flange - (rise * d.width) / 2;
  const root = d.flange + rise * (d.width / 2 - d.web);
  requireShape(tip > 0 && 2 * root < d.depth, 'its flange slopes to nothing before its edge');
  const x = d.width / 2;
  const y = d.depth / 2;
  const ring = roundedRing([
    corner(-x, -y),
    corner(x, -y),
    corner(x, -y + tip, d.edgeRadius),
    corner(-x + d.web, -y + root, d.fillet),
    corner(-x + d.web, y - root, d.fillet),
    corner(x, y - tip, d.edgeRadius),
    corner(x, y),
    corner(-x, y),
  ]);
  return {
    name: name ?? `U ${inMillimetres(d.depth, d.width, d.web, d.flange)}`,
    shape: 'U',
    outline: { outer: ring, voids: [] },
    torsion: torsionOfU(d.depth, { width: d.width, thickness: d.flange }, d.web, d.fillet),
    thickness: Math.max(d.web, d.flange),
    ...sectorialOfU(d, root, tip),
  };
}

function sectorialOfU({ depth, width, web }: UDimensions, root: number, tip: number): Sectorial {
  const b = width - web / 2;
  const h = depth - (root + tip) / 2;
  const x = (web - width) / 2;
  const line = new MiddleLine([x, -h / 2]);
  line.wall(0, [x + b, -h / 2], root, tip);
  const head = line.wall(0, [x, h / 2], web);
  line.wall(head, [x + b, h / 2], root, tip);
  return line.sectorial();
}

export interface LDimensions {
  readonly depth: number;
  readonly width: number;
  readonly thickness: number;
  readonly fillet: number;
  readonly edgeRadius: number;
  readonly slope: number;
}

/** Angle with its corner at the lower left: the depth stands, the width lies. */
export function lShape(name: string | null, d: LDimensions): ProfileShape {
  const { depth, width, thickness: t } = d;
  requirePositive({ depth, width, thickness: t });
  requireShape(t < Math.min(depth, width), 'its legs are thicker than they are long', { thickness: t, depth, width });
  const x = width / 2;
  const y = depth / 2;
  // Sloped legs have their nominal thickness half way along.
  const rise = Math.tan(d.slope);
  const tips = [t - (rise * width) / 2, t - (rise * depth) / 2] as const;
  requireShape(Math.min(...tips) > 0, 'its legs slope to nothing before their edges');
  const ring = roundedRing([
    corner(-x, -y),
    corner(x, -y),
    corner(x, -y + tips[0], d.edgeRadius),
    corner(-x + t + rise * (depth / 2 - t), -y + t + rise * (width / 2 - t), d.fillet),
    corner(-x + tips[1], y, d.edgeRadius),
    corner(-x, y),
  ]);
  return {
    name: name ?? `L ${inMillimetres(depth, width, t)}`,
    shape: 'L',
    outline: { outer: ring, voids: [] },
    torsion: torsionOfL(depth, width, t, d.fillet),
    // Across the thickness alone: Timoshenko & Gere, Theory of elastic stability, angles (from memory).
    warping: (t ** 3 * ((depth - t / 2) ** 3 + (width - t / 2) ** 3)) / 36,
    thickness: t,
    // Where the middles of the legs meet.
    shearCentre: [(t - width) / 2, (t - depth) / 2],
  };
}

export interface TDimensions {
  readonly depth: number;
  readonly width: number;
  readonly web: number;
  readonly flange: number;
  readonly fillet: number;
  readonly flangeEdgeRadius: number;
  readonly webEdgeRadius: number;
  readonly webSlope: number;
  readonly flangeSlope: number;
}

/** Tee with its flange on top. */
export function tShape(name: string | null, d: TDimensions): ProfileShape {
  const { depth, width, web, flange } = d;
  requirePositive({ depth, width, 'web thickness': web, 'flange thickness': flange });
  requireShape(flange < depth, 'its flange is thicker than it is deep', { flange, depth });
  requireShape(web < width, 'its web is thicker than its flange is wide', { web, flange: width });
  const x = width / 2;
  const y = depth / 2;
  // Sloped parts have their nominal thickness half way along what stands out.
  const webRise = (Math.tan(d.webSlope) * (depth - flange)) / 2;
  const flangeRise = (Math.tan(d.flangeSlope) * (width - web)) / 4;
  requireShape(webRise < web / 2 && flangeRise < flange, 'its parts slope to nothing before their edges');
  const foot = web / 2 - webRise;
  const root = web / 2 + webRise;
  const ring = roundedRing([
    corner(-foot, -y, d.webEdgeRadius),
    corner(foot, -y, d.webEdgeRadius),
    corner(root, y - flange - flangeRise, d.fillet),
    corner(x, y - flange + flangeRise, d.flangeEdgeRadius),
    corner(x, y),
    corner(-x, y),
    corner(-x, y - flange + flangeRise, d.flangeEdgeRadius),
    corner(-root, y - flange - flangeRise, d.fillet),
  ]);
  return {
    name: name ?? `T ${inMillimetres(depth, width, web, flange)}`,
    shape: 'T',
    outline: { outer: ring, voids: [] },
    torsion: torsionOfT(depth, { width, thickness: flange }, web, d.fillet),
    // Across the thickness alone: Timoshenko & Gere, Theory of elastic stability, tees (from memory).
    warping: (width ** 3 * flange ** 3) / 144 + ((depth - flange / 2) ** 3 * web ** 3) / 36,
    thickness: Math.max(web, flange),
    // Where the middles of web and flange meet.
    shearCentre: [0, (depth - flange) / 2],
  };
}
