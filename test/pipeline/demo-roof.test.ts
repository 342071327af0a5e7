import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { expectedMass, expectedTruss } from '../../scripts/demo-roof/expected.ts';
import { plantedFaults } from '../../scripts/demo-roof/faults.ts';
import { hallModel, REVISION_A, REVISION_B } from '../../scripts/demo-roof/revisions.ts';
import { parseBrief } from '../../src/brief/parse-brief.ts';
import { distance, type Vec3 } from '../../src/domain/vector.ts';
import { type Run, runModel } from '../../src/pipeline.ts';
import { fixture } from '../support/shared.ts';
import { spellPoint } from '../support/spell-point.ts';

const brief = parseBrief(readFileSync(fixture('boat-hall.yaml')), 'boat-hall.yaml');
const analysed = (name: string): Promise<Run> => runModel(readFileSync(fixture(name)), { fileName: name, brief });

const runs = {
  'boat-hall-a.ifc': { revision: REVISION_A, run: await analysed('boat-hall-a.ifc') },
  'boat-hall-b.ifc': { revision: REVISION_B, run: await analysed('boat-hall-b.ifc') },
};
const faulty = await analysed('boat-hall-faults.ifc');

describe.each(Object.entries(runs))('%s', (_, { revision, run }) => {
  const { result } = run;
  const expected = expectedTruss(hallModel(revision));

  it('is joined into the nodes it was drawn from, within a tenth of a millimetre', () => {
    expect(result.nodes).toHaveLength(expected.nodes.length);
    for (const { name: point, at } of expected.nodes) {
      const nearest = Math.min(...result.nodes.map((node) => distance(node.at, at)));
      expect(nearest, point).toBeLessThan(1e-4);
    }
  });

  it('is cut into the bars it was drawn from', () => {
    const at = new Map(result.nodes.map((node) => [node.id, node.at]));
    const spelled = (part: string, from: Vec3, to: Vec3) =>
      `${part}: ${[from, to]
        .map((p) => spellPoint(p))
        .sort()
        .join(' - ')}`;
    const marks = new Map(result.members.map((member) => [member.globalId, member.tag]));
    const found = result.bars.map((bar) => spelled(marks.get(bar.member)!, at.get(bar.from)!, at.get(bar.to)!));
    const places = new Map(expected.nodes.map((node) => [node.name, node.at]));
    const wanted = expected.bars.map((bar) => spelled(bar.part, places.get(bar.from)!, places.get(bar.to)!));
    expect(found.sort()).toEqual(wanted.sort());
  });

  it('carries the mass of its bars', () => {
    expect(run.mass / expectedMass(expected)).toBeCloseTo(1, 4);
  });

  it('stands, every case and combination is carried, and the wind lifts its supports', () => {
    expect(result.stability).toMatchObject({ mechanisms: 0, freeBody: false, setAside: [] });
    expect(result.stability.restraints).toBe(3 * expected.nodes.filter(({ supported }) => supported).length);
    for (const { refused, residual } of result.cases) {
      expect(refused).toBeUndefined();
      expect(residual).toBeLessThan(1e-9);
    }
    expect(result.combinations.every(({ refused }) => refused === undefined)).toBe(true);
    for (const one of result.cases) {
      const reaction = [0, 1, 2].map((axis) => one.reactions.reduce((sum, { force }) => sum + force[axis], 0));
      const size = Math.max(...one.reactions.map(({ force }) => Math.hypot(...force)));
      for (const axis of [0, 1, 2]) expect(Math.abs(reaction[axis] + one.loadSum[axis])).toBeLessThan(1e-9 * size);
    }
    for (const { asked, applied } of result.asked!)
      for (const axis of [0, 1, 2]) expect(Math.abs(asked![axis] - applied[axis])).toBeLessThan(1e-6);
    for (const { slack, axialForce } of result.combinations)
      for (const bar of slack!) expect(axialForce[result.bars.findIndex(({ id }) => id === bar)]).toBeLessThan(1e-3);
    expect(result.combining?.rule).toBe('EN 1990:2002+A1, expression 6.10');
    expect(result.findings.map(({ code }) => code)).toEqual(['support-lifts', 'slack-bar']);
  });
});

describe('the planted faults', () => {
  const { result } = faulty;

  it.each(plantedFaults().map((fault) => [fault.code, fault] as const))('%s is found', (code, fault) => {
    const found = result.findings.filter((finding) => finding.code === code);
    const match = found.find(({ members }) => fault.members.every((member) => members.includes(member)));
    expect(match).toBeDefined();
    if (fault.gap !== null) expect(match!.gap).toBeCloseTo(fault.gap, 3);
    if (fault.code === 'near-miss') expect(distance(match!.at!, fault.at)).toBeLessThan(1e-3);
  });

  it('are all that joining has to say', () => {
    const joining = ['near-miss', 'loose-end', 'lone-member', 'separate-part', 'twin-members', 'zero-length'];
    const planted = plantedFaults().filter(({ code }) => joining.includes(code));
    expect(result.findings.filter(({ code }) => joining.includes(code))).toHaveLength(planted.length);
  });
});
