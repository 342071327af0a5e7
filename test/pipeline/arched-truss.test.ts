import { describe, expect, it } from 'vitest';
import { distance, type Vec3 } from '../../src/domain/vector.ts';
import { real, type StepWriter } from '../importer/support/step-writer.ts';
import { DrawnModel } from './support/drawn-model.ts';

/** An arch of 12 m span and 2 m rise: 10 m about (6, -8), which it sees from 0.6 to the left to 0.6 to the right. */
const CENTRE: Vec3 = [6, 0, -8];
const RADIUS = 10;
const onArch = (x: number): Vec3 => [x, 0, Math.sqrt(RADIUS ** 2 - (x - 6) ** 2) - 8];
const SWEEP = 2 * Math.asin(0.6);
const PANELS = [2, 4, 6, 8, 10];

const polygon = (pieces: number): Vec3[] =>
  Array.from({ length: pieces + 1 }, (_, i) => {
    const t = SWEEP * (i / pieces - 0.5);
    return [6 + RADIUS * Math.sin(t), 0, RADIUS * Math.cos(t) - 8];
  });

/** The tube of the chord turned about the centre, from its foot on the left. */
function revolved(w: StepWriter): string {
  const sizes = [0.1, 0.1, 0.005].map((l) => w.length(l));
  const profile = w.add(`IFCRECTANGLEHOLLOWPROFILEDEF(.AREA.,'SHS 100x5',$,${sizes},$,$)`);
  const plane = w.axes([0, 0, 0], [0.8, 0, 0.6], [-0.6, 0, 0.8]);
  const pivot = w.add(`IFCAXIS1PLACEMENT(${w.point([-RADIUS, 0, 0])},${w.direction([0, -1, 0])})`);
  return w.add(`IFCREVOLVEDAREASOLID(${profile},${plane},${pivot},${real(SWEEP)})`);
}

function trimmedCircle(w: StepWriter): string {
  const circle = w.add(`IFCCIRCLE(${w.axes(CENTRE, [0, -1, 0], [1, 0, 0])},${w.length(RADIUS)})`);
  const [from, to] = [w.point([0, 0, 0]), w.point([12, 0, 0])];
  return w.add(`IFCTRIMMEDCURVE(${circle},(${from}),(${to}),.F.,.CARTESIAN.)`);
}

function indexedArc(w: StepWriter): string {
  const points = [onArch(0), onArch(6), onArch(12)].map((p) => w.lengths(p)).join(',');
  const list = w.add(`IFCCARTESIANPOINTLIST3D((${points}))`);
  return w.add(`IFCINDEXEDPOLYCURVE(${list},(IFCARCINDEX((1,2,3))),.F.)`);
}

const tubeAlong = (w: StepWriter, curve: string) =>
  w.add(`IFCSWEPTDISKSOLID(${curve},${w.length(0.05)},${w.length(0.045)},$,$)`);

const WAYS: readonly (readonly [string, (model: DrawnModel) => void])[] = [
  ['a revolved body', (m) => m.memberOf('top', revolved(m.writer))],
  ['an Axis on a trimmed circle', (m) => m.memberOf('top', revolved(m.writer), trimmedCircle(m.writer))],
  ['a tube along an indexed arc', (m) => m.memberOf('top', tubeAlong(m.writer, indexedArc(m.writer)))],
  [
    'a tube along a polyline of 48 pieces',
    (m) => m.memberOf('top', tubeAlong(m.writer, m.writer.polyline(polygon(48)))),
  ],
];

/** Arched chord, straight chord, and webs that stop 80 mm short of both. */
async function analysed(chord: (model: DrawnModel) => void) {
  const model = new DrawnModel();
  const web = (mark: string, from: Vec3, to: Vec3) => {
    const [a, b] = [0.08, -0.08].map((gap) => gap / distance(from, to));
    const at = (p: Vec3, t: number) => p.map((x, k) => x + t * (to[k] - from[k])) as unknown as Vec3;
    model.member({ mark, from: at(from, a), to: at(to, b), size: 0.08 });
  };
  chord(model);
  model.member({ mark: 'low', from: [0, 0, 0], to: [12, 0, 0] });
  for (const x of PANELS) web(`post ${x}`, [x, 0, 0], onArch(x));
  for (const x of [2, 4]) web(`left ${x}`, onArch(x), [x + 2, 0, 0]);
  for (const x of [10, 8]) web(`right ${x}`, onArch(x), [x - 2, 0, 0]);
  const near = (p: Vec3) => `{near: [${p.map((v) => v.toFixed(3)).join(', ')}], within: 0.05}`;
  const loads = PANELS.map((x) => `{point: [0, 0, -10 kN], at: ${near(onArch(x))}}`);
  const { result } = await model.run(`supports:
  - {at: ${near([0, 0, 0])}, fix: xyz}
  - {at: ${near([12, 0, 0])}, fix: yz}
  - {at: {level: [-1, 3]}, fix: y}
cases:
  - {name: roof, nature: permanent, loads: [${loads.join(', ')}]}
`);
  const places = new Map(result.nodes.map(({ id, at }) => [id, at.map((x) => Math.abs(x).toFixed(1)).join(' ')]));
  const forces = new Map(
    result.bars.map(({ from, to }, bar) => [
      [places.get(from), places.get(to)].sort().join(' - '),
      result.cases[0]!.axialForce[bar]!,
    ]),
  );
  return { result, forces };
}

describe('a truss with an arched chord in one piece', async () => {
  const runs = await Promise.all(WAYS.map(async ([way, chord]) => [way, await analysed(chord)] as const));
  /** The same truss with a straight tube between each two joints. */
  const pieces = [0, ...PANELS].map((x) => ({ mark: `top ${x}`, from: onArch(x), to: onArch(x + 2) }));
  const explicit = await analysed((model) => {
    for (const piece of pieces) model.member(piece);
  });

  it.each(runs)('drawn as %s has its nodes on the curve', (_, { result }) => {
    expect(result.nodes).toHaveLength(12);
    const top = result.members.find(({ globalId }) => globalId === 'top')!;
    expect(top.shift).toBeLessThan(0.001);
    for (const { at, members } of result.nodes) {
      if (members.includes('top')) expect(Math.abs(distance(at as Vec3, CENTRE) - RADIUS)).toBeLessThan(0.002);
    }
  });

  it.each(runs)('drawn as %s has the forces of the truss drawn in straight pieces', (_, { forces }) => {
    expect([...forces.keys()].sort()).toEqual([...explicit.forces.keys()].sort());
    for (const [bar, force] of explicit.forces) expect(Math.abs(forces.get(bar)! - force), bar).toBeLessThan(60);
  });

  it.each(runs)('drawn as %s says by how much a bar strays from the curve', (_, { result }) => {
    const bent = result.findings.filter(({ code }) => code === 'bent-axis');
    expect(bent).toHaveLength(1);
    const sagitta = RADIUS - Math.sqrt(RADIUS ** 2 - (distance(onArch(0), onArch(2)) / 2) ** 2);
    expect(Math.abs(bent[0]!.gap! - sagitta)).toBeLessThan(0.002);
  });
});
