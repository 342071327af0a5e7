import type { Chance } from '../roofs/chance.ts';

/** A frame in its own plane: x along the span, z up from the bearings; everything by the names of its nodes. */
export interface Plane {
  readonly kind: PlaneKind;
  readonly nodes: ReadonlyMap<string, readonly [x: number, z: number]>;
  readonly chords: readonly Chord[];
  readonly webs: readonly (readonly [string, string])[];
  readonly bearings: readonly string[];
  /** Nodes of the upper chord that purlins may sit on, eaves to eaves. */
  readonly ridgeLine: readonly string[];
}

/** A straight chord through these nodes in order. */
export interface Chord {
  readonly key: string;
  readonly role: 'top chord' | 'bottom chord';
  readonly nodes: readonly string[];
}

export const PLANE_KINDS = ['trapezoid', 'fan', 'north light', 'arch', 'scissors', 'portal'] as const;
export type PlaneKind = (typeof PLANE_KINDS)[number];

export function planeOf(chance: Chance, kind: PlaneKind): Plane {
  switch (kind) {
    case 'trapezoid':
      return trapezoid(chance);
    case 'fan':
      return fan(chance);
    case 'north light':
      return northLight(chance);
    case 'arch':
      return arch(chance);
    case 'scissors':
      return scissors(chance);
    case 'portal':
      return portal(chance);
  }
}

type Nodes = Map<string, readonly [number, number]>;
const names = (letter: string, count: number): string[] => Array.from({ length: count }, (_, i) => `${letter}${i}`);

/** Warren with a longer bottom chord hung from the top one at both ends. */
function trapezoid(chance: Chance): Plane {
  const panels = chance.whole(4, 9);
  const panel = chance.between(1.8, 3.2);
  const height = panel * chance.between(0.6, 0.9);
  const nodes: Nodes = new Map();
  const [top, low] = [names('t', panels + 1), names('b', panels)];
  for (const [i, name] of top.entries()) nodes.set(name, [i * panel, height]);
  for (const [i, name] of low.entries()) nodes.set(name, [(i + 0.5) * panel, 0]);
  const webs = low.flatMap((name, i) => [[top[i]!, name] as const, [name, top[i + 1]!] as const]);
  const chords = [chord('TC', 'top chord', top), chord('BC', 'bottom chord', low)];
  return { kind: 'trapezoid', nodes, chords, webs, bearings: [top[0]!, top.at(-1)!], ridgeLine: top };
}

/** A duopitch whose rafters are propped from a few points of the tie, three webs to each. */
function fan(chance: Chance): Plane {
  const span = chance.between(12, 20);
  const rise = span * chance.between(0.18, 0.28);
  const nodes: Nodes = new Map();
  const left = names('l', 5);
  const right = names('r', 5);
  for (let i = 0; i < 5; i++) {
    nodes.set(left[i]!, [(i * span) / 8, (i * rise) / 4]);
    if (i < 4) nodes.set(right[i]!, [span - (i * span) / 8, (i * rise) / 4]);
  }
  right[4] = left[4]!;
  nodes.set('u', [span * 0.27, 0]);
  nodes.set('v', [span * 0.73, 0]);
  const webs = [
    ...[1, 2, 3, 4].map((i) => ['u', left[i]!] as const),
    ...[1, 2, 3, 4].map((i) => ['v', right[i]!] as const),
  ];
  const chords = [
    chord('TL', 'top chord', left),
    chord('TR', 'top chord', right),
    chord('BC', 'bottom chord', ['l0', 'u', 'v', 'r0']),
  ];
  const ridgeLine = [...left, ...right.slice(0, 4).reverse()];
  return { kind: 'fan', nodes, chords, webs, bearings: ['l0', 'r0'], ridgeLine };
}

/** A steep glazed side to the north, a long flat side to the south. */
function northLight(chance: Chance): Plane {
  const span = chance.between(8, 14);
  const foot = span * 0.22;
  const rise = foot * chance.between(1.5, 2);
  const count = 4;
  const nodes: Nodes = new Map([
    ['n', [0, 0]],
    ['a', [foot, rise]],
  ]);
  const top = ['a', ...names('t', count)];
  for (let i = 1; i <= count; i++) {
    nodes.set(top[i]!, [foot + ((span - foot) * i) / count, rise * (1 - i / count)]);
  }
  const low = ['n', ...names('b', count - 1), top.at(-1)!];
  const webs: [string, string][] = [];
  for (let i = 0; i < count - 1; i++) {
    nodes.set(low[i + 1]!, [foot + ((span - foot) * i) / count + 0.2, 0]);
    webs.push([top[i]!, low[i + 1]!], [low[i + 1]!, top[i + 1]!]);
  }
  const chords = [
    chord('NC', 'top chord', ['n', 'a']),
    chord('SC', 'top chord', top),
    chord('BC', 'bottom chord', low),
  ];
  return { kind: 'north light', nodes, chords, webs, bearings: ['n', low.at(-1)!], ridgeLine: top };
}

/** Two concentric polygons, a chord from node to node, posts towards the centre and one diagonal a panel. */
function arch(chance: Chance): Plane {
  const panels = 2 * chance.whole(4, 7);
  const radius = chance.between(12, 22);
  const half = chance.between(0.6, 0.95);
  const depth = chance.between(1, 1.6);
  const nodes: Nodes = new Map();
  const [top, low] = [names('t', panels + 1), names('b', panels + 1)];
  for (let i = 0; i <= panels; i++) {
    const at = half * ((2 * i) / panels - 1);
    const on = (r: number) => [r * Math.sin(at), r * Math.cos(at) - radius * Math.cos(half)] as const;
    nodes.set(top[i]!, on(radius + depth));
    nodes.set(low[i]!, on(radius));
  }
  const chords = [top, low].flatMap((row, k) =>
    row.slice(1).map((_, i) => chord(`${k ? 'BC' : 'TC'}${i}`, k ? 'bottom chord' : 'top chord', row.slice(i, i + 2))),
  );
  const posts = top.map((name, i) => [low[i]!, name] as const);
  const diagonals = top
    .slice(1)
    .map((_, i) => (i < panels / 2 ? ([low[i]!, top[i + 1]!] as const) : ([top[i]!, low[i + 1]!] as const)));
  return { kind: 'arch', nodes, chords, webs: [...posts, ...diagonals], bearings: ['b0', low.at(-1)!], ridgeLine: top };
}

/** Two lower chords that run up through each other under the ridge, where a king post ends. */
function scissors(chance: Chance): Plane {
  const span = chance.between(9, 15);
  const rise = span * chance.between(0.3, 0.4);
  const nodes: Nodes = new Map([
    ['l', [0, 0]],
    ['r', [span, 0]],
    ['a', [span / 2, rise]],
    ['lm', [span * 0.3, rise * 0.6]],
    ['rm', [span * 0.7, rise * 0.6]],
  ]);
  // The lower chord from l to the right rafter's middle crosses midspan here.
  nodes.set('x', [span / 2, (rise * 0.6 * 0.5) / 0.7]);
  const chords = [
    chord('TL', 'top chord', ['l', 'lm', 'a']),
    chord('TR', 'top chord', ['r', 'rm', 'a']),
    chord('SL', 'bottom chord', ['l', 'x', 'rm']),
    chord('SR', 'bottom chord', ['r', 'x', 'lm']),
  ];
  const ridgeLine = ['l', 'lm', 'a', 'rm', 'r'];
  return { kind: 'scissors', nodes, chords, webs: [['x', 'a']], bearings: ['l', 'r'], ridgeLine };
}

/** Rafters of rolled sections and nothing between them: what sits on them is carried. */
function portal(chance: Chance): Plane {
  const span = chance.between(12, 24);
  const rise = (span / 2) * Math.tan((chance.between(6, 12) * Math.PI) / 180);
  const nodes: Nodes = new Map([
    ['l', [0, 0]],
    ['a', [span / 2, rise]],
    ['r', [span, 0]],
  ]);
  const chords = [chord('RL', 'top chord', ['l', 'a']), chord('RR', 'top chord', ['a', 'r'])];
  return { kind: 'portal', nodes, chords, webs: [], bearings: ['l', 'r'], ridgeLine: ['l', 'a', 'r'] };
}

const chord = (key: string, role: Chord['role'], nodes: readonly string[]): Chord => ({ key, role, nodes });
