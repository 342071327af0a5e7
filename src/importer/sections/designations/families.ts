import { type IFlange, iShape } from '../i-shape.ts';
import type { ProfileShape } from '../profile-shape.ts';
import { tShape, uShape } from '../rolled-shapes.ts';
import { C, HP, MC, S } from './american-other-sizes.ts';
import { W } from './american-w-sizes.ts';
import { UB, UC } from './british-i-sizes.ts';
import { PFC, TEE, UPE, UPN } from './european-channel-sizes.ts';
import { HEA, HEAA, HEB, HEM, INP, IPE, IPE_A, IPE_AA, IPE_O } from './european-i-sizes.ts';
import type { Rows } from './rows.ts';

/** Rolled sections that differ in size only, each known by its table. */
export interface Family {
  readonly rows: Rows;
  /** 'HEA 200' of '200'. */
  readonly nameOf: (size: string) => string;
  readonly shapeOf: (name: string, row: readonly number[]) => ProfileShape;
  /** The tee cut from it at half its depth; null where none is cut. */
  readonly halfOf: ((name: string, row: readonly number[]) => ProfileShape) | null;
}

type Row = readonly number[];

interface IRow {
  readonly depth: number;
  readonly width: number;
  readonly web: number;
  readonly flange: number;
  readonly fillet: number;
}

const european = ([depth, width, web, flange, fillet]: Row): IRow => ({ depth, width, web, flange, fillet }) as IRow;

/** ASTM tables give the distance to the foot of the fillet. */
const american = ([depth, web, width, flange, foot]: Row): IRow =>
  ({ depth, width, web, flange, fillet: foot! - flange! }) as IRow;

const parallelI =
  (read: (row: Row) => IRow) =>
  (name: string, row: Row): ProfileShape => {
    const { depth, width, web, flange, fillet } = read(row);
    const each: IFlange = { width, thickness: flange, fillet, edgeRadius: 0, slope: 0 };
    return iShape(name, { depth, web, top: each, bottom: each });
  };

const parallelT =
  (read: (row: Row) => IRow) =>
  (name: string, row: Row): ProfileShape => {
    const { depth, width, web, flange, fillet } = read(row);
    const straight = { flangeEdgeRadius: 0, webEdgeRadius: 0, webSlope: 0, flangeSlope: 0 };
    return tShape(name, { depth: depth / 2, width, web, flange, fillet, ...straight });
  };

function parallelU(name: string, [depth, width, web, flange, fillet]: Row): ProfileShape {
  return uShape(name, { depth, width, web, flange, fillet, edgeRadius: 0, slope: 0 } as Parameters<typeof uShape>[1]);
}

function slopingI(name: string, row: Row): ProfileShape {
  const [depth, width, web, thickness, fillet, edgeRadius] = row as [number, number, number, number, number, number];
  const each: IFlange = { width, thickness, fillet, edgeRadius, slope: Math.atan(0.14) };
  return iShape(name, { depth, web, top: each, bottom: each });
}

/** Above this depth UPN flanges slope by 5 % instead of 8 %. */
const UPN_STEEP_TO = 0.3;

function slopingU(name: string, row: Row): ProfileShape {
  const [depth, width, web, nominal, fillet, edgeRadius] = row as [number, number, number, number, number, number];
  const isSteep = depth <= UPN_STEEP_TO + 1e-9;
  const rise = isSteep ? 0.08 : 0.05;
  const flange = isSteep ? nominal : atMiddleOfWidth(nominal, rise, web);
  return uShape(name, { depth, width, web, flange, fillet, edgeRadius, slope: Math.atan(rise) });
}

/** The thickness half way along the width, of one that is given half way along what stands out of the web. */
const atMiddleOfWidth = (thickness: number, rise: number, web: number): number => thickness + (rise * web) / 2;

/** S, C and MC flanges: 1 : 6 (ASTM A6). */
const AMERICAN_RISE = 1 / 6;

function americanS(name: string, row: Row): ProfileShape {
  const [depth, web, width, mean] = row as [number, number, number, number];
  const each: IFlange = {
    width,
    // An I has its nominal thickness a quarter of its width from the edge.
    thickness: mean + (AMERICAN_RISE * web) / 4,
    // The tables leave the radii to the mills; those of DIN 1025-1 fit the published areas.
    fillet: web,
    edgeRadius: 0.6 * web,
    slope: Math.atan(AMERICAN_RISE),
  };
  return iShape(name, { depth, web, top: each, bottom: each });
}

function halfAmericanS(name: string, row: Row): ProfileShape {
  const [depth, web, width, mean] = row as [number, number, number, number];
  return tShape(name, {
    depth: depth / 2,
    width,
    web,
    flange: mean,
    fillet: web,
    flangeEdgeRadius: 0.6 * web,
    webEdgeRadius: 0,
    webSlope: 0,
    flangeSlope: Math.atan(AMERICAN_RISE),
  });
}

function americanC(name: string, row: Row): ProfileShape {
  const [depth, web, width, mean] = row as [number, number, number, number];
  return uShape(name, {
    depth,
    width,
    web,
    flange: atMiddleOfWidth(mean, AMERICAN_RISE, web),
    // The tables leave the radii to the mills; those of DIN 1026-1 fit the published areas.
    fillet: mean,
    edgeRadius: mean / 2,
    slope: Math.atan(AMERICAN_RISE),
  });
}

/**
 * EN 10055: fillet as thick as the tee, flange edges half, web's foot a quarter; both parts slope by 2 % and have their
 * nominal thickness half way along the depth and a quarter of the width from the edge.
 */
function europeanT(name: string, row: Row): ProfileShape {
  const [depth, t] = row as [number, number];
  const rise = 0.02;
  const slope = Math.atan(rise);
  return tShape(name, {
    depth,
    width: depth,
    // What tShape wants are the thicknesses half way along the parts that stand out.
    web: t - rise * t,
    flange: t - (rise * t) / 4,
    fillet: t,
    flangeEdgeRadius: t / 2,
    webEdgeRadius: t / 4,
    webSlope: slope,
    flangeSlope: slope,
  });
}

const spaced = (letters: string) => (size: string) => `${letters} ${size}`;
const joined = (letters: string) => (size: string) => `${letters}${size}`;

const europeanI = (letters: string, rows: Rows): Family => ({
  rows,
  nameOf: spaced(letters),
  shapeOf: parallelI(european),
  halfOf: parallelT(european),
});

const americanI = (letters: string, rows: Rows): Family => ({
  rows,
  nameOf: joined(letters),
  shapeOf: parallelI(american),
  halfOf: parallelT(american),
});

const channel = (letters: string, rows: Rows, shapeOf: Family['shapeOf'], nameOf = spaced(letters)): Family => ({
  rows,
  nameOf,
  shapeOf,
  halfOf: null,
});

export const FAMILIES = {
  IPE: europeanI('IPE', IPE),
  'IPE A': europeanI('IPE A', IPE_A),
  'IPE AA': europeanI('IPE AA', IPE_AA),
  'IPE O': europeanI('IPE O', IPE_O),
  HEAA: europeanI('HEAA', HEAA),
  HEA: europeanI('HEA', HEA),
  HEB: europeanI('HEB', HEB),
  HEM: europeanI('HEM', HEM),
  INP: { rows: INP, nameOf: spaced('INP'), shapeOf: slopingI, halfOf: null },
  UB: europeanI('UB', UB),
  UC: europeanI('UC', UC),
  UPN: channel('UPN', UPN, slopingU),
  UPE: channel('UPE', UPE, parallelU),
  PFC: channel('PFC', PFC, parallelU),
  T: { rows: TEE, nameOf: spaced('T'), shapeOf: europeanT, halfOf: null },
  W: americanI('W', W),
  HP: { ...americanI('HP', HP), halfOf: null },
  S: { rows: S, nameOf: joined('S'), shapeOf: americanS, halfOf: halfAmericanS },
  C: channel('C', C, americanC, joined('C')),
  MC: channel('MC', MC, americanC, joined('MC')),
} as const satisfies Record<string, Family>;

export type FamilyName = keyof typeof FAMILIES;
