import { inMillimetres, type ProfileShape, requirePositive, requireShape } from './profile-shape.ts';
import { type Corner, corner, roundedRing } from './rounded-ring.ts';
import { MiddleLine, type Sectorial } from './thin-wall.ts';
import { torsionOfI } from './torsion.ts';

/** One flange of an I, metres and radians. */
export interface IFlange {
  readonly width: number;
  readonly thickness: number;
  readonly fillet: number;
  readonly edgeRadius: number;
  /** Slope of the inner face, radians. */
  readonly slope: number;
}

export interface IDimensions {
  readonly depth: number;
  readonly web: number;
  readonly top: IFlange;
  readonly bottom: IFlange;
}

/** I of equal or unequal flanges, symmetric about the vertical; the origin is the middle of its bounding box. */
export function iShape(name: string | null, d: IDimensions): ProfileShape {
  const { depth, web, top, bottom } = d;
  requirePositive({
    depth,
    'web thickness': web,
    'flange width': Math.min(top.width, bottom.width),
    'flange thickness': Math.min(top.thickness, bottom.thickness),
  });
  requireShape(top.thickness + bottom.thickness < depth, 'its flanges are thicker than it is deep', {
    flange: Math.max(top.thickness, bottom.thickness),
    depth,
  });
  const narrower = Math.min(top.width, bottom.width);
  requireShape(web < narrower, 'its web is thicker than its flange is wide', { web, flange: narrower });
  const right = [...flangeCorners(bottom, web, -depth / 2, 1), ...flangeCorners(top, web, depth / 2, -1).reverse()];
  const left = right.map(({ at, radius }) => corner(-at[0], at[1], radius)).reverse();
  return {
    name: name ?? `I ${inMillimetres(depth, top.width, web, top.thickness)}`,
    shape: 'I',
    outline: { outer: roundedRing([...right, ...left]), voids: [] },
    torsion: torsionOfI(depth, top, bottom, web, (top.fillet + bottom.fillet) / 2),
    thickness: Math.max(web, top.thickness, bottom.thickness),
    ...sectorialOfI(d),
  };
}

/** The right half of a flange whose outer face lies at `face`, from its outer edge to the web. */
function flangeCorners(flange: IFlange, web: number, face: number, inward: 1 | -1): Corner[] {
  const half = flange.width / 2;
  const [tip, root] = taper(flange, web);
  return [
    corner(half, face),
    corner(half, face + inward * tip, flange.edgeRadius),
    corner(web / 2, face + inward * root, flange.fillet),
  ];
}

/** Thickness at tip and root: a sloped flange has its nominal thickness a quarter of its width from the edge (EN 10365). */
function taper(flange: IFlange, web: number): readonly [tip: number, root: number] {
  const rise = Math.tan(flange.slope);
  const tip = flange.thickness - (rise * flange.width) / 4;
  requireShape(tip > 0, 'its flange slopes to nothing before its edge');
  return [tip, flange.thickness + rise * (flange.width / 4 - web / 2)];
}

function sectorialOfI({ depth, web, top, bottom }: IDimensions): Sectorial {
  const line = new MiddleLine([0, -(depth - bottom.thickness) / 2]);
  const head = line.wall(0, [0, (depth - top.thickness) / 2], web);
  for (const [node, flange] of [[0, bottom] as const, [head, top] as const]) {
    const z = line.nodes[node]![1];
    const rise = (Math.tan(flange.slope) * flange.width) / 4;
    const [root, tip] = [flange.thickness + rise, flange.thickness - rise];
    line.wall(node, [-flange.width / 2, z], root, tip);
    line.wall(node, [flange.width / 2, z], root, tip);
  }
  return line.sectorial();
}
