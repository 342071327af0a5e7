import type { FindingCode } from '../../src/domain/finding.ts';
import { along, distance, scale, type Vec3 } from '../../src/domain/vector.ts';
import { partId } from './global-ids.ts';
import { bottom, HALL, mirrored, top, type WorkPoint } from './hall.ts';
import { directionOf, type HallModel, middle, type Part, setback, span } from './parts.ts';
import { hallModel, REVISION_A } from './revisions.ts';
import { halfExtents, type SectionName } from './sections.ts';

/** One fault that was put into the model on purpose, and what should be said of it. */
export interface PlantedFault {
  readonly code: FindingCode;
  readonly words: string;
  /** GlobalIds of the members at fault; none where a member is missing. */
  readonly members: readonly string[];
  /** m */
  readonly at: Vec3;
  /** The nearest crossing of grid axes. */
  readonly near: string;
  /** m, straight from the stray end to the axis it should meet; null where the fault is of another kind. */
  readonly gap: number | null;
}

const METRE = 1e-3;
const inMetres = (at: Vec3): Vec3 => scale(at, METRE);

const SHORT_WEB = { name: 'T2-D3L', stopsShortBy: 480 };
const FORGOTTEN = { name: 'T5-D4R', from: top(5, mirrored(4)), to: bottom(5, mirrored(3)) };
const DOUBLED = 'P8-67';
const COPY = `${DOUBLED}-copy`;
const LONE = 'S-1';

export function faultyModel(): HallModel {
  const sound = hallModel(REVISION_A);
  const parts = sound.parts
    .filter((part) => part.name !== FORGOTTEN.name)
    .map((part) => (part.name === SHORT_WEB.name ? shortened(part) : part));
  return {
    ...sound,
    title: 'Revision A with planted faults',
    parts: [...parts, { ...partNamed(sound, DOUBLED), name: COPY }, loneMember(), ...canopy()],
  };
}

export function plantedFaults(): PlantedFault[] {
  const model = faultyModel();
  const strayEnd = partNamed(model, SHORT_WEB.name).axis[1];
  const canopyParts = canopy();
  return [
    {
      code: 'near-miss',
      words: 'a diagonal ends too far from its panel point on the bottom chord',
      members: [partId(SHORT_WEB.name)],
      at: inMetres(strayEnd),
      near: 'B/2',
      gap: (strayEnd[2] - HALL.bottomLevel) * METRE,
    },
    {
      code: 'moves-freely',
      words: 'a diagonal was forgotten: the truss shears in its own plane',
      members: [],
      at: inMetres(middle(FORGOTTEN.from.at, FORGOTTEN.to.at)),
      near: 'D/5',
      gap: null,
    },
    {
      code: 'twin-members',
      words: 'a purlin was drawn twice in one place',
      members: [partId(DOUBLED), partId(COPY)],
      at: inMetres(middle(...partNamed(model, DOUBLED).axis)),
      near: 'D/6',
      gap: null,
    },
    {
      code: 'lone-member',
      words: 'a tube lies beside the hall',
      members: [partId(LONE)],
      at: inMetres(loneMember().axis[0]),
      near: 'E/3',
      gap: null,
    },
    {
      code: 'separate-part',
      words: 'a canopy hangs beside the wall, tied to nothing',
      members: canopyParts.map((part) => partId(part.name)),
      at: inMetres(canopyPoint(CANOPY_FRAMES[0], 'upper').at),
      near: 'A/3',
      gap: null,
    },
  ];
}

function partNamed(model: HallModel, name: string): Part {
  const part = model.parts.find((candidate) => candidate.name === name);
  if (part === undefined) throw new Error(`no part is named ${name}`);
  return part;
}

/** The lower end drawn back; what is left no longer passes through its lower work point. */
function shortened(part: Part): Part {
  const foot = part.through[1];
  const [upper] = part.axis;
  const reached = distance(upper, foot.at) - SHORT_WEB.stopsShortBy;
  const end = along(upper, directionOf(upper, foot.at), reached);
  return { ...part, axis: [upper, end], through: [part.through[0], { name: `${part.name} stray end`, at: end }] };
}

function loneMember(): Part {
  const ends: [WorkPoint, WorkPoint] = [
    { name: 'lone south', at: [27000, 14000, 400] },
    { name: 'lone north', at: [27000, 16500, 400] },
  ];
  return span({ name: LONE, mark: 'S1', kind: 'tie', section: 'CHS 76.1x3.2' }, ...ends, [0, 0]);
}

/** Levels and distances from axis A of the canopy's triangles; the wall side stays well clear of the columns. */
const CANOPY_CORNERS = { lower: [-700, 3400], upper: [-700, 4400], tip: [-2300, 4400] } as const;
const CANOPY_FRAMES = [13000, 17000] as const;
const CANOPY_SECTION: SectionName = 'SHS 60x60x4';
const CANOPY_GAP = 20;

type CanopyCorner = keyof typeof CANOPY_CORNERS;

function canopyPoint(y: number, corner: CanopyCorner): WorkPoint {
  const [x, z] = CANOPY_CORNERS[corner];
  return { name: `canopy ${y} ${corner}`, at: [x, y, z] };
}

function canopy(): Part[] {
  const half = halfExtents(CANOPY_SECTION).width;
  const piece = (name: string, from: WorkPoint, to: WorkPoint, cut: readonly [number, number]) =>
    span({ name: `CAN-${name}`, mark: name[0], kind: 'canopy frame', section: CANOPY_SECTION }, from, to, cut);
  const frames = CANOPY_FRAMES.flatMap((y, k) => {
    const [lower, upper, tip] = [canopyPoint(y, 'lower'), canopyPoint(y, 'upper'), canopyPoint(y, 'tip')];
    const strut = directionOf(lower.at, tip.at);
    const strutCut = [
      setback(strut, [0, 0, 1], half, CANOPY_GAP),
      setback(strut, [1, 0, 0], half, CANOPY_GAP),
    ] as const;
    return [
      piece(`W${k + 1}`, lower, upper, [0, 0]),
      piece(`T${k + 1}`, upper, tip, [half + CANOPY_GAP, 0]),
      piece(`K${k + 1}`, lower, tip, strutCut),
    ];
  });
  const rails = (['lower', 'upper', 'tip'] as const).map((corner) =>
    piece(`R-${corner}`, canopyPoint(CANOPY_FRAMES[0], corner), canopyPoint(CANOPY_FRAMES[1], corner), [
      half + CANOPY_GAP,
      half + CANOPY_GAP,
    ]),
  );
  return [...frames, ...rails];
}
