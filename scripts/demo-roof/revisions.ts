import { chordBraces, crossBraces, gableBraces, roofBraces, wallBraces } from './bracing.ts';
import { columns, eavesStruts, gablePostPoints, gablePosts, POINTS_WITH_COLUMNS, purlins, ties } from './frame.ts';
import { base, HALL, TRUSSES } from './hall.ts';
import type { HallModel } from './parts.ts';
import { type TrussDesign, trussParts, trussPlates } from './truss.ts';

/** What one revision of the hall decides; everything else stands from revision to revision. */
export interface Revision {
  readonly title: string;
  readonly trussDesign: (truss: number) => TrussDesign;
  /** The rear gable loses its middle post for a second door. */
  readonly rearDoorWidened: boolean;
  /** Bays with an upright cross below the ridge. */
  readonly ridgeCrossBays: readonly number[];
}

const FIRST_DESIGN: TrussDesign = { bottomChord: 'HEA 140', endDiagonal: 'SHS 90x90x5', flipped: false };

export const REVISION_A: Revision = {
  title: 'Revision A',
  trussDesign: () => FIRST_DESIGN,
  rearDoorWidened: false,
  ridgeCrossBays: [],
};

/**
 * An engine hoist hangs from truss 4: heavier bottom chords for it and its neighbours, end diagonals heavier everywhere,
 * diagonals by the ridge of truss 4 turned to tension, a new upright cross beside it; the rear gable's middle post goes.
 */
export const REVISION_B: Revision = {
  title: 'Revision B',
  trussDesign: (truss) => ({
    bottomChord: [3, 4, 5].includes(truss) ? 'HEA 160' : 'HEA 140',
    endDiagonal: 'SHS 100x100x6.3',
    flipped: truss === 4,
  }),
  rearDoorWidened: true,
  ridgeCrossBays: [4],
};

export function hallModel(revision: Revision): HallModel {
  const { trussDesign, rearDoorWidened } = revision;
  const gables = [1, HALL.trusses].map((truss) => ({ truss, points: gablePostPoints(truss, rearDoorWidened) }));
  return {
    title: revision.title,
    parts: [
      ...TRUSSES.flatMap((truss) => trussParts(truss, trussDesign(truss))),
      ...columns(),
      ...gables.flatMap(({ truss, points }) => gablePosts(truss, points, trussDesign(truss))),
      ...purlins(),
      ...eavesStruts(),
      ...ties(trussDesign),
      ...roofBraces(),
      ...chordBraces(trussDesign),
      ...crossBraces(),
      ...crossBraces(revision.ridgeCrossBays, [HALL.ridge]),
      ...wallBraces(),
      ...gableBraces(),
    ],
    plates: TRUSSES.flatMap((truss) => trussPlates(truss, trussDesign(truss))),
    footings: [
      ...TRUSSES.flatMap((truss) => POINTS_WITH_COLUMNS.map((i) => base(truss, i))),
      ...gables.flatMap(({ truss, points }) => points.map((i) => base(truss, i))),
    ],
  };
}
