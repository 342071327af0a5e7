import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { hallModel, REVISION_A, REVISION_B } from '../../scripts/demo-roof/revisions.ts';
import { add, along, cross, distance, dot, scale, subtract, type Vec3 } from '../../src/domain/vector.ts';
import { readEvidence } from '../../src/importer/evidence/read-evidence.ts';
import type { Plate } from '../../src/importer/evidence/types.ts';
import { importModel } from '../../src/importer/import-model.ts';
import { IMPORT_DEFAULTS } from '../../src/importer/options.ts';
import { prepare } from '../../src/importer/prepare.ts';
import { openStep } from '../../src/step/step-file.ts';
import { makeAxes } from '../../src/topology/axes.ts';
import {
  type EvidenceAxis,
  type PairEvidence,
  pairKey,
  relatedMembers,
  touchingPlates,
} from '../../src/topology/evidence.ts';
import { member } from '../support/members.ts';
import { fixture } from '../support/shared.ts';

type Axes = Plate['axes'];

const UPRIGHT: Axes = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

const plate = (name: string, centre: Vec3, sizes: Vec3, axes: Axes = UPRIGHT, written = 'IfcPlate'): Plate => ({
  globalId: `id-${name}`,
  name,
  class: written,
  centre,
  axes,
  halfSizes: [sizes[0] / 2, sizes[1] / 2, sizes[2] / 2],
  assembly: null,
});

/** Round, so that its half extent is the same on all sides. */
const bar = (start: Vec3, finish: Vec3, half = 0.05): EvidenceAxis => ({ start, finish, halfExtent: () => half });

const pairsOf = (evidence: PairEvidence, count: number): [number, number, readonly string[]][] =>
  [...evidence]
    .map(([key, words]): [number, number, readonly string[]] => [Math.floor(key / count), key % count, words])
    .sort((p, q) => p[0] - q[0] || p[1] - q[1]);

const chord = bar([-3, 0, 0], [3, 0, 0]);
const gusset = plate('GP-1', [0, 0, -0.15], [0.4, 0.01, 0.2]);

describe('a plate', () => {
  it('is named for every two of the members whose bodies touch it, at an end or at a side', () => {
    const axes = [chord, bar([-0.1, 0, -0.12], [-1.5, 0, -1.5]), bar([0.1, 0, -0.12], [1.5, 0, -1.5])];
    expect(pairsOf(touchingPlates([gusset], axes), 3)).toEqual([
      [0, 1, ['plate GP-1']],
      [0, 2, ['plate GP-1']],
      [1, 2, ['plate GP-1']],
    ]);
  });

  it('is no evidence for a member that ends farther from it than the margin', () => {
    const stopsShort = (gap: number) => bar([0, 0, -0.25 - gap], [0, 0, -2], 0);
    expect(touchingPlates([gusset], [chord, stopsShort(0.004)]).size).toBe(1);
    expect(touchingPlates([gusset], [chord, stopsShort(0.006)]).size).toBe(0);
    expect(touchingPlates([gusset], [chord, stopsShort(0.006)], 0.01).size).toBe(1);
  });

  it('counts the body of a member and not its line alone', () => {
    const beside = (half: number) => bar([-1, 0.08, -0.1], [1, 0.08, -0.1], half);
    expect(touchingPlates([gusset], [chord, beside(0.072)]).size).toBe(1);
    expect(touchingPlates([gusset], [chord, beside(0.068)]).size).toBe(0);
  });

  it('does not reach a member that only passes its corner', () => {
    const pastCorner = (away: number): EvidenceAxis => {
      const corner: Vec3 = [0.2 + away * Math.SQRT1_2, 0, -0.25 - away * Math.SQRT1_2];
      const line: Vec3 = [Math.SQRT1_2, 0, Math.SQRT1_2];
      return bar(along(corner, line, -1), along(corner, line, 1));
    };
    expect(touchingPlates([gusset], [chord, pastCorner(0.054)]).size).toBe(1);
    expect(touchingPlates([gusset], [chord, pastCorner(0.056)]).size).toBe(0);
  });

  it('that lies along a member for most of it is sheeting or glass, and joins nothing', () => {
    const pane = plate('glass', [0.5, 0.5, 0], [1, 1, 0.01]);
    const edges = [bar([0, 0, 0], [1, 0, 0]), bar([1, 0, 0], [1, 1, 0]), bar([1, 0, 0], [2, 0, 0])];
    expect(touchingPlates([pane], edges).size).toBe(0);
  });

  it('that two members touch far apart joins them not', () => {
    const deck = plate('deck', [0, 0, 0], [1, 12, 0.001]);
    const purlins = [-4, -2, 0, 2, 4].map((y) => bar([-3, y, -0.05], [3, y, -0.05]));
    expect(touchingPlates([deck], purlins).size).toBe(0);
  });

  it('joins two members by where they are nearest on it, and not by where their lines would meet', () => {
    const floor = plate('floor', [1.5, 1.5, 0], [3, 3, 0.01]);
    const edge = bar([-5, 0, -0.05], [5, 0, -0.05]);
    const strut = (y: number) => bar([1.5, y, -0.05], [8.5, y + 4.5, -0.05]);
    expect(touchingPlates([floor], [edge, strut(0.9)]).size).toBe(1);
    expect(touchingPlates([floor], [edge, strut(1.1)]).size).toBe(0);
  });

  it('that touches another face to face joins the members on either, where no one plate does', () => {
    const tongue = plate('TP-1', [0, 0.01, -0.35], [0.1, 0.01, 0.3]);
    const brace = bar([0, 0.01, -0.45], [0, 0.01, -2]);
    expect(pairsOf(touchingPlates([gusset, tongue], [chord, brace]), 2)).toEqual([
      [0, 1, ['plate GP-1 on plate TP-1']],
    ]);
    const apart = { ...tongue, centre: [0, 0.03, -0.35] as const };
    expect(touchingPlates([gusset, apart], [chord, brace]).size).toBe(0);
  });

  it('is named by its class, and by its GlobalId where it has no name', () => {
    const web = bar([0, 0, -0.15], [0, 0, -2]);
    const plates = [
      { ...gusset, name: ' ' },
      plate('M20', [0, 0, -0.06], [0.05, 0.05, 0.1], UPRIGHT, 'IfcMechanicalFastener'),
      plate('cleat', [0, 0, -0.1], [0.1, 0.1, 0.1], UPRIGHT, 'IfcDiscreteAccessory'),
      plate('cleat', [0, 0, -0.1], [0.1, 0.1, 0.2], UPRIGHT, 'IfcDiscreteAccessory'),
    ];
    expect([...touchingPlates(plates, [chord, web]).values()]).toEqual([
      ['accessory cleat', 'fastener M20', 'plate id-GP-1'],
    ]);
  });
});

const coordinate = (span: number) => fc.double({ min: -span, max: span, noNaN: true, noDefaultInfinity: true });
const point = (span: number) => fc.tuple(coordinate(span), coordinate(span), coordinate(span)) as fc.Arbitrary<Vec3>;

/** Three turns one after another, in whole degrees: unit, at right angles, right-handed. */
const turn: fc.Arbitrary<Axes> = fc.tuple(...[0, 1, 2].map(() => fc.integer({ min: 0, max: 359 }))).map((degrees) => {
  const [a, b, c] = degrees.map((angle) => (angle * Math.PI) / 180) as [number, number, number];
  const x: Vec3 = [Math.cos(a) * Math.cos(b), Math.sin(a) * Math.cos(b), Math.sin(b)];
  const flat: Vec3 = [-Math.sin(a), Math.cos(a), 0];
  const y = add(scale(flat, Math.cos(c)), scale(cross(x, flat), Math.sin(c)));
  return [x, y, cross(x, y)] as const;
});
const somePlate = fc
  .tuple(point(2), turn, fc.tuple(...[0, 1, 2].map(() => fc.double({ min: 0.01, max: 0.4, noNaN: true }))))
  .map(([centre, axes, sizes]) => plate('P', centre, sizes as unknown as Vec3, axes));
const someBar = fc
  .tuple(point(3), point(3), fc.double({ min: 0.01, max: 0.1, noNaN: true }))
  // Long enough that none lies along a plate for half its length, which would make the plate sheeting.
  .filter(([a, b]) => distance(a, b) > 2.5)
  .map(([a, b, half]) => bar(a, b, half));

/** Distance from a bar's line to a plate's box, by looking ever closer at a convex function. */
function gapBetween({ centre, axes, halfSizes }: Plate, { start, finish }: EvidenceAxis): number {
  const gapAt = (t: number): number => {
    const away = subtract(along(start, subtract(finish, start), t), centre);
    return Math.hypot(...axes.map((axis, k) => Math.max(0, Math.abs(dot(away, axis)) - halfSizes[k])));
  };
  let [low, high] = [0, 1];
  for (let i = 0; i < 100; i++) {
    const [a, b] = [low + (high - low) / 3, high - (high - low) / 3];
    if (gapAt(a) <= gapAt(b)) high = b;
    else low = a;
  }
  return gapAt((low + high) / 2);
}

describe('the search for plates', () => {
  it('finds every member within the margin of a plate, and none twice as far off as a box corner may reach', () => {
    let touching = 0;
    fc.assert(
      fc.property(somePlate, fc.array(someBar, { maxLength: 12 }), (found, bars) => {
        // The probe stands in the middle of the plate, so that each member that touches makes a pair with it.
        const up = found.axes[2];
        const probe = bar(along(found.centre, up, -3), along(found.centre, up, 3), 0.001);
        const axes = [probe, ...bars];
        const named = new Set(pairsOf(touchingPlates([found], axes), axes.length).map(([a, b]) => (a === 0 ? b : -1)));
        bars.forEach((own, i) => {
          const allowed = own.halfExtent(up) + 0.005;
          const gap = gapBetween(found, own);
          if (gap < allowed - 1e-6) {
            expect(named).toContain(i + 1);
            touching++;
          }
          if (gap > Math.sqrt(3) * allowed) expect(named).not.toContain(i + 1);
        });
      }),
      { numRuns: 150 },
    );
    expect(touching).toBeGreaterThan(50);
  });

  it('finds the same in a model that is moved, turned and shuffled', () => {
    let found = 0;
    fc.assert(
      fc.property(
        fc.array(somePlate, { maxLength: 10 }),
        fc.array(someBar, { minLength: 2, maxLength: 20 }),
        turn,
        point(100),
        (plates, bars, [x, y, z], shift) => {
          const rotate = (p: Vec3): Vec3 => add(scale(x, p[0]), add(scale(y, p[1]), scale(z, p[2])));
          const move = (p: Vec3): Vec3 => add(rotate(p), shift);
          const named = plates.map((p, i) => ({ ...p, name: `P${i}` }));
          const movedPlates = named
            .map((p) => ({ ...p, centre: move(p.centre), axes: p.axes.map(rotate) as unknown as Axes }))
            .reverse();
          const movedBars = bars.map((b) => ({ ...b, start: move(b.start), finish: move(b.finish) })).reverse();
          const last = bars.length - 1;
          const renamed = pairsOf(touchingPlates(movedPlates, movedBars), bars.length)
            .map(([a, b, words]): [number, number, readonly string[]] => [last - b, last - a, words])
            .sort((p, q) => p[0] - q[0] || p[1] - q[1]);
          expect(renamed).toEqual(pairsOf(touchingPlates(named, bars), bars.length));
          found += renamed.length;
        },
      ),
    );
    expect(found).toBeGreaterThan(50);
  });

  it('passes over members without a line, and a model without plates', () => {
    expect(touchingPlates([], [chord, chord]).size).toBe(0);
    expect(touchingPlates([gusset], [null, chord]).size).toBe(0);
  });
});

describe('the gusset plates of the demo roof', () => {
  for (const [name, revision] of [
    ['boat-hall-a.ifc', REVISION_A],
    ['boat-hall-b.ifc', REVISION_B],
  ] as const) {
    it(`of ${name} are each touched by all members of the truss that meet at its panel point, and by none that does not`, async () => {
      const hall = hallModel(revision);
      const file = openStep(readFileSync(fixture(name)));
      const { members } = await importModel(file);
      const evidence = readEvidence(prepare(file, IMPORT_DEFAULTS).sources);
      expect(evidence.unreadPlates).toEqual([]);
      expect(evidence.plates.length).toBe(hall.plates.length);
      const pairs = touchingPlates(evidence.plates, makeAxes(members));
      const touched = new Map<string, Set<string | null>>();
      for (const [a, b, words] of pairsOf(pairs, members.length)) {
        for (const word of words) {
          const names = touched.get(word) ?? new Set();
          touched.set(word, names.add(members[a].name).add(members[b].name));
        }
      }
      for (const gussetPlate of hall.plates) {
        const [truss, , point] = gussetPlate.name.split('-') as [string, string, string];
        const workPoint = `${truss.slice(1)}/${point}`;
        const meeting = hall.parts.filter((part) => part.through.some((passed) => passed.name === workPoint));
        const names = touched.get(`plate ${gussetPlate.name}`) ?? new Set();
        const inTruss = meeting.filter((part) => part.truss !== null).map((part) => part.name);
        expect(inTruss.length).toBeGreaterThan(1);
        expect([...names]).toEqual(expect.arrayContaining(inTruss));
        expect(meeting.map((part) => part.name)).toEqual(expect.arrayContaining([...names]));
      }
    });
  }
});

describe('the relationships of a model', () => {
  const globalIds = ['a', 'b', 'c', 'd'];
  const named = (...related: Parameters<typeof relatedMembers>[0][number][]) =>
    pairsOf(relatedMembers(related, globalIds), globalIds.length);

  it('join the two members they name', () => {
    expect(named({ a: 'c', b: 'a', by: 'IfcRelConnectsPathElements', realising: [] })).toEqual([
      [0, 2, ['IfcRelConnectsPathElements']],
    ]);
  });

  it('join two members that are both connected to one plate, but not all that stand on one slab', () => {
    const to = (member: string, other: string) =>
      ({ a: other, b: member, by: 'IfcRelConnectsElements', realising: [] }) as const;
    expect(named(to('a', 'plate'), to('d', 'plate'), to('b', 'other'))).toEqual([[0, 3, ['IfcRelConnectsElements']]]);
    const many = Array.from({ length: 20 }, (_, i) => `m${i}`);
    expect(
      relatedMembers(
        many.map((m) => to(m, 'slab')),
        many,
      ).size,
    ).toBe(0);
  });

  it('join the members that one plate realises connections of, and members that realise them', () => {
    const by = 'IfcRelConnectsWithRealizingElements';
    expect(
      named({ a: 'a', b: 'b', by, realising: ['c', 'plate'] }, { a: 'd', b: 'x', by, realising: ['plate'] }),
    ).toEqual([
      [0, 1, [by]],
      [0, 2, [by]],
      [0, 3, [by]],
      [1, 2, [by]],
      [1, 3, [by]],
      [2, 3, [by]],
    ]);
  });

  it('do not join the several members of one element to one another', () => {
    const related = [{ a: 'a', b: 'b', by: 'IfcRelConnectsElements', realising: [] }] as const;
    expect(pairsOf(relatedMembers(related, ['a', 'a', 'b']), 3).map(([a, b]) => [a, b])).toEqual([
      [0, 2],
      [1, 2],
    ]);
  });

  it('have one key for either order of the two', () => {
    expect(pairKey(3, 1, 10)).toBe(13);
    expect(pairKey(1, 3, 10)).toBe(13);
  });
});

describe('members with real sections', () => {
  it('are seen as wide as they are deep on each side', () => {
    const axes = makeAxes([member('A', [-3, 0, 0], [3, 0, 0]), member('B', [0, 0, -0.2], [0, 0, -3])]);
    expect(touchingPlates([gusset], axes).size).toBe(1);
    expect(touchingPlates([{ ...gusset, centre: [0, 0, -0.16] }], axes).size).toBe(0);
  });
});
