import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { parseBrief } from '../../src/brief/parse-brief.ts';
import type { Brief } from '../../src/brief/types.ts';
import type { Result } from '../../src/domain/result.ts';
import { type RunOptions, runModel } from '../../src/pipeline.ts';
import {
  barName,
  memberId,
  type Schema,
  TOWER,
  towerBrief,
  towerPhysical,
  towerView,
  worldDirection,
  worldPoint,
} from '../importer/analysis/truss-models.ts';
import { publicModel } from '../support/shared.ts';

const bytes = (text: string) => new TextEncoder().encode(text);
const brief = (text: string) => parseBrief(`pinwright: 1\n${text}`, 'brief.yaml');

async function resultOf(text: string, options: Partial<RunOptions> = {}): Promise<Result> {
  return (await runModel(bytes(text), options)).result;
}

const spring = {
  line: 0,
  at: [{ line: 0, near: worldPoint(TOWER.nodes[2]!), within: 1e-3 }],
  fix: [],
  springs: [{ direction: worldDirection([0, 1, 0]), stiffness: TOWER.spring }],
};

async function physicalResult(schema: Schema): Promise<Result> {
  const parsed: Brief = parseBrief(towerBrief(schema), 'tower.yaml');
  return resultOf(towerPhysical(schema), { brief: { ...parsed, supports: [...parsed.supports, spring] } });
}

/** Axial forces of a case or combination by the bar's name. */
function forces(result: Result, of: { axialForce: readonly (number | null)[] }): Map<string, number> {
  return new Map(
    result.bars.map((bar, i) => [result.members.find((m) => m.globalId === bar.member)!.name!, of.axialForce[i]!]),
  );
}

describe('a brief that asks for an analysis view', () => {
  it('of a model that has none is told so, once, and what to do', async () => {
    const result = await resultOf(towerPhysical('IFC4'), { brief: brief('source: analysis') });
    const errors = result.findings.filter(({ severity }) => severity === 'error');
    expect(errors.map(({ code }) => code)).toEqual(['no-members']);
    expect(errors[0]!.message).toContain('structural analysis view');
    expect(errors[0]!.message).toContain('no IfcStructuralCurveMember');
    expect(errors[0]!.advice).toContain('Leave `source: analysis` out');
  });
});

describe.each(['IFC2X3', 'IFC4', 'IFC4X3'] as const)('a tower given as an analysis view in %s', (schema) => {
  it('has the forces and reactions of the same tower given physically with a brief', async () => {
    const [view, physical] = [await resultOf(towerView(schema)), await physicalResult(schema)];
    expect(view.model.source).toBe('analysis');
    expect(physical.model.source).toBe('physical');
    expect(view.stability).toMatchObject({
      nodes: 6,
      bars: 11,
      restraints: 7,
      springs: 1,
      mechanisms: 0,
      selfStressStates: 1,
    });
    expect(view.cases.map(({ name, nature }) => [name, nature])).toEqual([
      ['dead', 'permanent'],
      ['wind', 'wind'],
    ]);
    expect(view.combinations).toMatchObject([{ name: 'most', limit: 'strength', factors: { dead: 1.35, wind: 1.5 } }]);
    for (const kind of ['cases', 'combinations'] as const) {
      view[kind].forEach((solved, k) => {
        expect(solved.refused).toBeUndefined();
        const expected = forces(physical, physical[kind][k]!);
        const largest = Math.max(...[...expected.values()].map(Math.abs));
        expect(largest).toBeGreaterThan(1000);
        for (const [bar, force] of forces(view, solved)) {
          expect(Math.abs(force - expected.get(bar)!), `${solved.name}, ${bar}`).toBeLessThan(1e-8 * largest);
        }
        for (const { node, force } of solved.reactions) {
          const at = view.nodes.find(({ id }) => id === node)!.at;
          const same = physical.nodes.find((other) => Math.hypot(...other.at.map((x, i) => x - at[i]!)) < 1e-6)!;
          const there = physical[kind][k]!.reactions.find((other) => other.node === same.id)!.force;
          force.forEach((value, i) => {
            expect(Math.abs(value - there[i]!)).toBeLessThan(1e-8 * largest);
          });
        }
      });
    }
  });

  it('says nothing of it but what is wrong with both', async () => {
    const [view, physical] = [await resultOf(towerView(schema)), await physicalResult(schema)];
    const codes = (result: Result) => result.findings.map(({ code }) => code).sort();
    expect(codes(view).filter((code) => code !== 'units-missing')).toEqual(codes(physical));
  });

  it('takes the supports and cases of a brief in place of its own', async () => {
    const at = (i: number) => `{near: [${worldPoint(TOWER.nodes[i]!).join(', ')}], within: 1 mm}`;
    const own = brief(
      `source: analysis\nsupports: [{at: {lowest: true}, fix: xyz}]\ncases: [{name: snow, nature: snow, loads: [{point: [0, 0, -1000], at: ${at(5)}}]}]`,
    );
    const result = await resultOf(towerView(schema), { brief: own });
    expect(result.stability).toMatchObject({ restraints: 9, springs: 0 });
    expect(result.cases.map(({ name, loadSum }) => [name, loadSum])).toEqual([['snow', [0, 0, -1000]]]);
    expect(result.combinations).toEqual([]);
  });

  it('keeps the class, kind and section of each member', async () => {
    const { members } = await resultOf(towerView(schema));
    const first = members.find(({ globalId }) => globalId === memberId(0))!;
    expect(first).toMatchObject({
      name: barName(0),
      class: 'IfcStructuralCurveMember',
      predefinedType: 'PIN_JOINED_MEMBER',
      axisFrom: 'analysis-view',
      material: { name: 'S355' },
    });
    expect(first.section?.area).toBeCloseTo(0.04 * 0.08, 12);
    expect(first.section?.inertiaY).toBeCloseTo((0.04 * 0.08 ** 3) / 12, 15);
  });
});

describe('which view of a model is read', () => {
  const both = (() => {
    const view = towerView('IFC4');
    const beam = `#5000=IFCMEMBER('0zzzzzzzzzzzzzzzzzzzzz',$,'purlin',$,$,#16,#5001,$,.MEMBER.);
#5001=IFCPRODUCTDEFINITIONSHAPE($,$,(#5002));
#5002=IFCSHAPEREPRESENTATION(#10,'Body','SweptSolid',(#5003));
#5003=IFCEXTRUDEDAREASOLID(#20,$,#13,3000.);`;
    return view.replace('\nENDSEC;\nEND-ISO', `\n${beam}\nENDSEC;\nEND-ISO`);
  })();

  it('is the physical one where an element is in scope', async () => {
    const result = await resultOf(both);
    expect(result.model.source).toBe('physical');
    expect(result.members).toHaveLength(1);
    expect(result.cases).toEqual([]);
  });

  it('is the analysis view where the brief asks for it', async () => {
    const result = await resultOf(both, { brief: brief('source: analysis') });
    expect(result.model.source).toBe('analysis');
    expect(result.members).toHaveLength(11);
  });

  it('is the analysis view where no physical element is in scope, and says so', async () => {
    const result = await resultOf(both.replace(',.MEMBER.)', ',.MULLION.)'));
    expect(result.model.source).toBe('analysis');
    expect(result.findings.map(({ message }) => message)).toContain(
      'The physical element of the model is not in scope; its structural analysis view is read instead.',
    );
  });

  it('is never the analysis view where the brief says physical', async () => {
    const result = await resultOf(towerView('IFC4'), { brief: brief('source: physical') });
    expect(result.model.source).toBe('physical');
    expect(result.findings.map(({ code }) => code)).toContain('no-members');
  });
});

const portal = publicModel('analysis-view-portal-ifc4-inch.ifc');
describe.skipIf(portal === null)('public model analysis-view-portal-ifc4-inch.ifc', () => {
  it('is a portal that moves when its joints are pinned, under the load that its stored reactions balance', async () => {
    const { result } = await runModel(readFileSync(portal!));
    expect(result.model.source).toBe('analysis');
    expect(result.stability).toMatchObject({ nodes: 4, bars: 3, restraints: 6 });
    expect(result.stability.mechanisms).toBe(3);
    const codes = result.findings.map(({ code }) => code);
    expect(codes).toContain('moves-freely');
    // Stated as 29, in psi.
    expect(codes).toContain('material-implausible');
    const [loaded] = result.cases;
    // Stored in the file: vertical reactions of 2278.529 and 7321.471 lbf at the feet.
    const pound = 4.4482216152605;
    expect(loaded!.loadSum[2] / ((2278.52897011915 + 7321.47102988085) * pound)).toBeCloseTo(-1, 6);
    // The load stands on the right half of the beam: a quarter goes left. (Stored: 2279 and 7321, those of a clamped frame.)
    const feet = loaded!.reactions.map(({ force }) => force[2] / pound).sort((a, b) => a - b);
    expect(feet[0]).toBeCloseTo(2400, 2);
    expect(feet[1]).toBeCloseTo(7200, 2);
  });
});

const house = publicModel('analysis-view-house.ifc');
describe.skipIf(house === null)('public model analysis-view-house.ifc', () => {
  it('gives its six ground beams and passes over its surfaces with one finding', async () => {
    const { result } = await runModel(readFileSync(house!), { extent: 'survey' });
    expect(result.members).toHaveLength(6);
    const skipped = result.findings.filter(({ code }) => code === 'surface-skipped');
    expect(skipped.map(({ message }) => message)).toEqual([
      "The model's analysis view has 20 surface members and 40 line connections, which are passed over: only members are read.",
    ]);
  });
});
