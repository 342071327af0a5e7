import type { Vec3 } from '../../src/domain/vector.ts';
import { distance, scale } from '../../src/domain/vector.ts';
import type { WorkPoint } from './hall.ts';
import type { HallModel, Kind, Part } from './parts.ts';
import { area, STEEL_DENSITY } from './sections.ts';

/** The truss that the hall is drawn from, known before any member was cut back: independent of every stage of the program. */
export interface ExpectedTruss {
  readonly nodes: readonly ExpectedNode[];
  readonly bars: readonly ExpectedBar[];
}

export interface ExpectedNode {
  readonly name: string;
  /** m */
  readonly at: Vec3;
  /** A foot, held in x, y and z. */
  readonly supported: boolean;
}

export interface ExpectedBar {
  /** Name of the part it is a piece of. */
  readonly part: string;
  readonly kind: Kind;
  /** Names of its nodes. */
  readonly from: string;
  readonly to: string;
  /** m, between the nodes. */
  readonly length: number;
  /** kg/m */
  readonly massPerLength: number;
}

const METRE = 1e-3;

export function expectedTruss(model: HallModel): ExpectedTruss {
  const points = new Map<string, WorkPoint>();
  for (const part of model.parts) for (const point of part.through) points.set(point.name, point);
  return {
    nodes: [...points.values()].map(({ name, at }) => ({ name, at: scale(at, METRE), supported: at[2] === 0 })),
    bars: model.parts.flatMap(barsOf),
  };
}

function barsOf(part: Part): ExpectedBar[] {
  return part.through.slice(1).map((to, k) => {
    const from = part.through[k];
    return {
      part: part.name,
      kind: part.kind,
      from: from.name,
      to: to.name,
      length: distance(from.at, to.at) * METRE,
      massPerLength: massPerLength(part),
    };
  });
}

/** kg, between work points. */
export function expectedMass(truss: ExpectedTruss): number {
  return truss.bars.reduce((sum, bar) => sum + bar.length * bar.massPerLength, 0);
}

/** kg, of the members as they are drawn. */
export function drawnMass(model: HallModel): number {
  return model.parts.reduce((sum, part) => sum + distance(...part.axis) * METRE * massPerLength(part), 0);
}

function massPerLength(part: Part): number {
  return area(part.section) * METRE ** 2 * STEEL_DENSITY;
}
