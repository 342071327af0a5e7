import type { Vec3 } from '../../src/domain/vector.ts';

/** An invented boat-building hall. All lengths of the demo roof are in millimetres; x across, y along, z up. */
export const HALL = {
  project: 'Vessany Slip Boatyard',
  site: 'North quay, Port Vessàny',
  building: 'Boat-building hall 2',
  trusses: 7,
  bay: 6000,
  /** Panels of the top chord over the whole span, and their length in plan. */
  panels: 10,
  panel: 2400,
  ridge: 5,
  /** Level of the top chord's axis over the columns, and its rise from panel point to panel point. */
  eaveLevel: 7600,
  panelRise: 300,
  bottomLevel: 6400,
} as const;

export const TRUSSES = range(1, HALL.trusses);
export const BAYS = range(1, HALL.trusses - 1);
/** Panel points (counted from the left eave) that the bottom chord has a node below. */
export const BOTTOM_POINTS = [1, 3, 5, 7, 9];
/** The end bays carry the wind bracing of roof and walls. */
export const BRACED_BAYS = [1, HALL.trusses - 1];
/** The boats leave by the gable on axis 1, so that one has no middle post. */
export const GABLE_POSTS: Readonly<Record<number, readonly number[]>> = { 1: [3, 7], 7: [3, 5, 7] };

/** Letters of the grid, by panel point. */
export const GRID_LETTERS: readonly (readonly [letter: string, panelPoint: number])[] = [
  ['A', 0],
  ['B', 3],
  ['C', 5],
  ['D', 7],
  ['E', 10],
];

/** Where axes are meant to meet: the truth that the drawn members only approach. */
export interface WorkPoint {
  readonly name: string;
  readonly at: Vec3;
}

/** Of panel point `i` of the given truss: on the top chord, on the bottom chord, on the ground. */
export const top = (truss: number, i: number): WorkPoint => workPoint(truss, 'top', i, topLevel(i));
export const bottom = (truss: number, i: number): WorkPoint => workPoint(truss, 'bottom', i, HALL.bottomLevel);
export const base = (truss: number, i: number): WorkPoint => workPoint(truss, 'base', i, 0);

export function range(from: number, to: number): number[] {
  return Array.from({ length: to - from + 1 }, (_, k) => from + k);
}

/** Which half of the roof a panel point lies on; the ridge belongs to both. */
export const sideOf = (i: number): 'L' | 'R' => (i <= HALL.ridge ? 'L' : 'R');
/** The panel point at the same place of the other half. */
export const mirrored = (i: number): number => HALL.panels - i;
export const onSide = (side: 'L' | 'R', i: number): number => (side === 'L' ? i : mirrored(i));

function topLevel(i: number): number {
  return HALL.eaveLevel + HALL.panelRise * Math.min(i, mirrored(i));
}

function workPoint(truss: number, row: string, i: number, level: number): WorkPoint {
  return { name: `${truss}/${row}${i}`, at: [i * HALL.panel, (truss - 1) * HALL.bay, level] };
}
