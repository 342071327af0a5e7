import type { Chance } from './chance.ts';

export const TRUSS_KINDS = [
  'Pratt',
  'Howe',
  'Warren',
  'Warren with posts',
  'Fink',
  'compound Fink',
  'K-web',
  'lattice',
  'bowstring',
] as const;
export type TrussKind = (typeof TRUSS_KINDS)[number];

/** `under top`, `under bottom`: the truss stands on a column's cap by that chord; `beside`: it frames into its side. */
export type Bearing = 'under top' | 'under bottom' | 'beside' | 'heel';

export type PlanePoint = readonly [x: number, z: number];

/** A straight run of one or more members through work points in order. */
export interface Run {
  readonly key: string;
  readonly role: 'top chord' | 'bottom chord' | 'web';
  readonly nodes: readonly string[];
}

/** A truss in its own plane, by work points: x along the span from the left bearing, z up from the bottom chord. */
export interface TrussShape {
  readonly kind: TrussKind;
  readonly bearing: Bearing;
  readonly span: number;
  readonly panels: number;
  readonly nodes: ReadonlyMap<string, PlanePoint>;
  /** Chords first, then webs and posts. */
  readonly runs: readonly Run[];
  /** Nodes of the top chord that webs come to, from eaves to eaves. */
  readonly topNodes: readonly string[];
  readonly bottomNodes: readonly string[];
  readonly bearings: readonly [string, string];
}

/** Heights of the two chords over x; `ridge` where the top chord breaks at midspan. */
interface Outline {
  readonly top: (x: number) => number;
  readonly bottom: (x: number) => number;
  readonly ridge: boolean;
  readonly pointed: boolean;
}

const radians = (degrees: number): number => (degrees * Math.PI) / 180;
const even = (value: number, least: number, most: number): number =>
  Math.min(Math.max(2 * Math.round(value / 2), least), most);
const range = (from: number, to: number): number[] => Array.from({ length: to - from + 1 }, (_, i) => from + i);

export function trussShape(chance: Chance, kind: TrussKind): TrussShape {
  if (kind === 'Fink' || kind === 'compound Fink') return finkShape(chance, kind);
  const span = kind === 'K-web' ? chance.between(22, 40) : chance.between(8, kind === 'Howe' ? 26 : 40);
  const outline = outlineFor(chance, kind, span);
  const bearing = bearingFor(chance, kind, outline);
  const middle = outline.top(span / 2) - outline.bottom(span / 2);
  const slimness = { Warren: [0.7, 1.1], 'Warren with posts': [0.7, 1.1], 'K-web': [0.6, 0.8] } as Record<
    string,
    number[]
  >;
  const [low, high] = slimness[kind] ?? [0.8, 1.3];
  const depth = outline.pointed ? middle * 0.75 : (middle + outline.top(0) - outline.bottom(0)) / 2;
  const wanted = span / (depth * chance.between(low!, high!));
  const isZigzagToRidge = outline.ridge && kind === 'Warren';
  const panels = isZigzagToRidge
    ? 4 * Math.max(1, Math.round(wanted / 4))
    : even(wanted, 4, kind === 'K-web' ? 16 : 20);
  return gridShape(chance, kind, { span, panels, bearing, outline });
}

function outlineFor(chance: Chance, kind: TrussKind, span: number): Outline {
  const flat = { bottom: () => 0, ridge: false, pointed: false };
  if (kind === 'bowstring') {
    const rise = span / chance.between(5.5, 8);
    return { ...flat, top: (x) => (4 * rise * x * (span - x)) / span ** 2, pointed: true };
  }
  if (kind === 'lattice') {
    const depth = Math.max(0.8, span / chance.between(11, 17));
    const tilt = Math.tan(radians(chance.pick([0, 0, 3, 5, 8])));
    return { ...flat, top: (x) => depth + tilt * x, bottom: (x) => tilt * x };
  }
  if ((kind === 'Pratt' || kind === 'Howe') && span < 24 && chance.happens(0.5)) {
    const slope = Math.tan(radians(chance.between(15, 27)));
    return { ...flat, top: (x) => slope * Math.min(x, span - x), ridge: true, pointed: true };
  }
  const heel =
    kind === 'K-web' ? Math.max(2, span / chance.between(11, 13)) : Math.max(0.8, span / chance.between(13, 20));
  const slope = kind === 'Warren' && chance.happens(0.5) ? 0 : Math.tan(radians(chance.between(3.5, 9)));
  return { ...flat, top: (x) => heel + slope * Math.min(x, span - x), ridge: slope > 0 };
}

function bearingFor(chance: Chance, kind: TrussKind, outline: Outline): Bearing {
  if (outline.pointed) return 'heel';
  if (kind === 'Howe' || kind === 'K-web') return chance.pick(['under bottom', 'beside'] as const);
  return chance.pick(['under top', 'under bottom', 'beside'] as const);
}

interface Grid {
  readonly span: number;
  readonly panels: number;
  readonly bearing: Bearing;
  readonly outline: Outline;
}

function gridShape(chance: Chance, kind: TrussKind, grid: Grid): TrussShape {
  const { span, panels, bearing, outline } = grid;
  const pattern = kind === 'lattice' ? chance.pick(['Pratt', 'Warren', 'Warren with posts'] as const) : kind;
  const lattice = webPattern(pattern, panels, outline.pointed, bearing === 'under bottom');
  const nodes = new Map<string, PlanePoint>();
  const segment = kind === 'bowstring' && panels % 4 === 0 && chance.happens(0.5) ? 2 : 1;
  const heightAbove = (i: number): number => {
    if (segment === 1 || i % 2 === 0) return outline.top((span * i) / panels);
    return (outline.top((span * (i - 1)) / panels) + outline.top((span * (i + 1)) / panels)) / 2;
  };
  const place = (name: string): void => {
    const i = Number(name.slice(1));
    const x = (span * i) / panels;
    const [top, bottom] = [heightAbove(i), outline.bottom(x)];
    nodes.set(name, [x, name[0] === 't' ? top : name[0] === 'b' ? bottom : (top + bottom) / 2]);
  };
  const first = outline.pointed ? 'b0' : 't0';
  const last = outline.pointed ? `b${panels}` : `t${panels}`;
  const used = new Set(lattice.flatMap((run) => run.nodes));
  const interior = range(1, panels - 1);
  const topNodes = [first, ...interior.map((i) => `t${i}`).filter((n) => used.has(n)), last];
  const inner = interior.map((i) => `b${i}`).filter((n) => used.has(n));
  const bottomNodes = bearing === 'under top' ? inner : ['b0', ...inner, `b${panels}`];
  for (const name of new Set([...topNodes, ...bottomNodes, ...used])) place(name);
  const topRuns = splitTop(topNodes, kind === 'bowstring' ? segment : 0, outline.ridge ? panels / 2 : null);
  const runs: Run[] = [
    ...topRuns.map((run, i) => ({ key: `TC${i + 1}`, role: 'top chord' as const, nodes: run })),
    { key: 'BC', role: 'bottom chord', nodes: bottomNodes },
    ...lattice,
  ];
  const level = bearing === 'under top' ? 't' : 'b';
  return {
    kind,
    bearing,
    span,
    panels,
    nodes,
    runs,
    topNodes,
    bottomNodes,
    bearings: [`${level}0`, `${level}${panels}`],
  };
}

/** The top chord in straight runs: broken at the ridge, or every `segment` panels, or not at all. */
function splitTop(nodes: readonly string[], segment: number, ridge: number | null): string[][] {
  const at = (name: string) => Number(name.slice(1));
  const breaks = nodes.filter((n, i) => {
    if (i === 0 || i === nodes.length - 1) return false;
    return segment > 0 ? at(n) % segment === 0 : at(n) === ridge;
  });
  const bounds = [nodes[0], ...breaks, nodes.at(-1)!];
  return bounds.slice(1).map((end, i) => nodes.slice(nodes.indexOf(bounds[i]), nodes.indexOf(end) + 1));
}

type Pattern =
  | 'Pratt'
  | 'Howe'
  | 'Warren'
  | 'Warren with posts'
  | 'K-web'
  | 'bowstring'
  | 'lattice'
  | 'Fink'
  | 'compound Fink';

/** Webs by the names of their nodes: `t3`, `b3` and, half way up a post, `m3`. */
function webPattern(pattern: Pattern, panels: number, pointed: boolean, endPosts: boolean): Run[] {
  const half = panels / 2;
  const web = (from: string, to: string): Run => ({ key: `${from}${to}`, role: 'web', nodes: [from, to] });
  const posts = range(1, panels - 1).map((i) => web(`t${i}`, `b${i}`));
  const ends = endPosts && !pointed ? [web('t0', 'b0'), web(`t${panels}`, `b${panels}`)] : [];
  const inward = range(pointed ? 1 : 0, half - 1);
  const mirrored = (i: number): number => panels - i;
  switch (pattern) {
    case 'Howe':
      return [
        ...posts,
        ...ends,
        ...inward.flatMap((i) => [web(`b${i}`, `t${i + 1}`), web(`b${mirrored(i)}`, `t${mirrored(i + 1)}`)]),
      ];
    case 'Warren':
    case 'Warren with posts': {
      const zigzag = range(0, panels - 1).map((i) =>
        i % 2 === 0 ? web(`t${i}`, `b${i + 1}`) : web(`b${i}`, `t${i + 1}`),
      );
      return [...(pattern === 'Warren' ? [] : posts), ...ends, ...zigzag];
    }
    case 'K-web':
      return [
        ...range(1, panels - 1).map((i) => ({
          key: `post${i}`,
          role: 'web' as const,
          nodes: [`t${i}`, `m${i}`, `b${i}`],
        })),
        ...ends,
        ...range(1, half).flatMap((i) => [web(`t${i - 1}`, `m${i}`), web(`b${i - 1}`, `m${i}`)]),
        ...range(half, panels - 1).flatMap((i) => [web(`t${i + 1}`, `m${i}`), web(`b${i + 1}`, `m${i}`)]),
      ];
    default:
      return [
        ...posts,
        ...ends,
        ...inward.flatMap((i) => [web(`t${i}`, `b${i + 1}`), web(`t${mirrored(i)}`, `b${mirrored(i + 1)}`)]),
      ];
  }
}

function finkShape(chance: Chance, kind: 'Fink' | 'compound Fink'): TrussShape {
  const isCompound = kind === 'compound Fink';
  const span = isCompound ? chance.between(14, 26) : chance.between(8, 14);
  const slope = Math.tan(radians(chance.between(isCompound ? 20 : 17, 30)));
  const nodes = new Map<string, PlanePoint>();
  const rafter = (name: string, x: number) => nodes.set(name, [x, slope * Math.min(x, span - x)]);
  const floor = (name: string, x: number) => nodes.set(name, [x, 0]);
  const web = (...run: string[]): Run => ({ key: run.join(''), role: 'web', nodes: run });
  const quarters = isCompound ? 8 : 4;
  for (const i of range(1, quarters - 1)) rafter(`t${i}`, (span * i) / quarters);
  const ridge = `t${quarters / 2}`;
  floor('b0', 0);
  floor(`b${quarters}`, span);
  const webs: Run[] = [];
  if (isCompound) {
    // The main strut stands square on the rafter's middle, the small struts on its quarters.
    const foot = (span / 4) * (1 + slope ** 2);
    for (const [side, rafters] of [
      ['L', ['t1', 't2', 't3']],
      ['R', ['t7', 't6', 't5']],
    ] as const) {
      const x = (value: number) => (side === 'L' ? value : span - value);
      floor(`f${side}`, x(foot));
      floor(`g${side}`, x(foot / 2));
      nodes.set(`k${side}`, [x((foot + span / 2) / 2), (slope * span) / 4]);
      const [low, middle, high] = rafters;
      webs.push(web(middle, `f${side}`), web(`f${side}`, `k${side}`, ridge), web(low, `g${side}`));
      webs.push(web(`g${side}`, middle), web(high, `k${side}`), web(`k${side}`, middle));
    }
  } else {
    floor('b1', span / 3);
    floor('b2', (2 * span) / 3);
    webs.push(web('t1', 'b1'), web('b1', ridge), web(ridge, 'b2'), web('b2', 't3'));
  }
  const topNodes = ['b0', ...range(1, quarters - 1).map((i) => `t${i}`), `b${quarters}`];
  const bottomNodes = isCompound ? ['b0', 'gL', 'fL', 'fR', 'gR', 'b8'] : ['b0', 'b1', 'b2', 'b4'];
  const [left, right] = splitTop(topNodes, 0, quarters / 2);
  const runs: Run[] = [
    { key: 'TC1', role: 'top chord', nodes: left! },
    { key: 'TC2', role: 'top chord', nodes: right! },
    { key: 'BC', role: 'bottom chord', nodes: bottomNodes },
    ...webs,
  ];
  const bearings = ['b0', `b${quarters}`] as const;
  return { kind, bearing: 'heel', span, panels: quarters, nodes, runs, topNodes, bottomNodes, bearings };
}
