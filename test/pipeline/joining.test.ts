import { describe, expect, it } from 'vitest';
import { summarise } from '../../src/exporter/summary.ts';
import { type DrawnMember, DrawnModel } from './support/drawn-model.ts';

/** A flat frame of three panels: a chord, two posts and a tie; the second post stops 290 mm short of the chord. */
const FRAME: readonly DrawnMember[] = [
  { mark: 'chord', from: [0, 0, 3], to: [6, 0, 3] },
  { mark: 'tie', from: [0, 0, 0], to: [6, 0, 0] },
  { mark: 'post', from: [0, 0, 0], to: [0, 0, 3] },
  { mark: 'short', from: [3, 0, 0], to: [3, 0, 2.71] },
  { mark: 'brace', from: [0, 0, 0], to: [3, 0, 3] },
];

function drawn(more: (model: DrawnModel, ids: Record<string, string>) => void = () => {}): DrawnModel {
  const model = new DrawnModel();
  more(model, Object.fromEntries(FRAME.map((one) => [one.mark, model.member(one)])));
  return model;
}

/** Reasons of the joint where the short post belongs, and what is said of its end. */
async function shortPost(model: DrawnModel) {
  const { result } = await model.run('', 'survey');
  const node = result.nodes.find(({ at, members }) => at[2] > 2 && members.includes('short'));
  return {
    joined: node?.members.includes('chord') ? node.joinedBy : null,
    misses: result.findings.filter(({ code }) => code === 'near-miss').map(({ members }) => members[0]),
    summary: summarise(result),
  };
}

describe('an end that stops too far off for nearness alone', () => {
  it('is a near miss', async () => {
    expect(await shortPost(drawn())).toMatchObject({ joined: null, misses: ['short'] });
  });

  it.each([
    ['IfcRelConnectsElements', ''],
    ['IfcRelConnectsPathElements', ',(),(),.ATPATH.,.ATEND.'],
  ])('is joined by %s, which is named as the reason', async (relationship, more) => {
    const model = drawn(({ writer }, { chord, short }) => {
      writer.add(`${relationship.toUpperCase()}('rel',$,$,$,$,${chord},${short}${more})`);
    });
    const found = await shortPost(model);
    expect(found).toMatchObject({ joined: [relationship], misses: [] });
    expect(found.summary).toContain('1 only by a relationship in the file');
  });

  it('is joined by IfcRelConnectsWithRealizingElements, the bolts in it being no members', async () => {
    const model = drawn((m, { chord, short }) => {
      const bolt = m.plate('bolt', [3, 0.4, 2.9], 0.02, [0, 1, 0], 'IFCMECHANICALFASTENER', '$,$,$,$');
      m.writer.add(`IFCRELCONNECTSWITHREALIZINGELEMENTS('rel',$,$,$,$,${chord},${short},(${bolt}),'bolted')`);
    });
    expect(await shortPost(model)).toMatchObject({ joined: ['IfcRelConnectsWithRealizingElements'], misses: [] });
  });

  it.each([
    ['plate', 'IFCPLATE', '$,$'],
    ['fastener', 'IFCMECHANICALFASTENER', '$,$,$,$'],
  ])('is joined by a %s that both bodies touch, which is named', async (kind, keyword, more) => {
    const model = drawn((m) => {
      m.plate('GP-1', [3, 0, 2.85], 0.4, [0, 1, 0], keyword, more);
    });
    const found = await shortPost(model);
    // The gusset reaches the brace as well; all three hang on it.
    expect(found).toMatchObject({ joined: [`${kind} GP-1`], misses: [] });
    expect(found.summary).toContain(`1 only by a ${kind}`);
  });

  it('is joined by a cleat that is drawn as a member, too short to be a bar', async () => {
    const model = drawn((m) => {
      m.member({ mark: 'cleat', from: [3, 0.05, 2.69], to: [3, 0.05, 2.95], size: 0.22 });
    });
    expect(await shortPost(model)).toMatchObject({ joined: ['part cleat'], misses: [] });
  });

  it('is joined within one assembly a little farther than without, and not with the assembly beside it', async () => {
    const assembled = (of: readonly string[]) =>
      drawn(({ writer }, ids) => {
        const truss = (mark: string) => writer.add(`IFCELEMENTASSEMBLY('${mark}',$,'Truss',$,$,$,$,$,$,$)`);
        const [inside, outside] = [of, Object.keys(ids).filter((mark) => !of.includes(mark))];
        for (const [mark, parts] of [['t1', inside] as const, ['t2', outside] as const]) {
          const list = parts.map((part) => ids[part]).join(',');
          if (list !== '') writer.add(`IFCRELAGGREGATES('r${mark}',$,$,$,${truss(mark)},(${list}))`);
        }
      });
    const all = FRAME.map(({ mark }) => mark);
    expect(await shortPost(assembled(all))).toMatchObject({ joined: ['assembly Truss'], misses: [] });
    const others = all.filter((mark) => mark !== 'short');
    expect(await shortPost(assembled(others))).toMatchObject({ joined: null, misses: ['short'] });
  });

  it('is joined by nearness where the brief gives that member a longer reach; what was used is printed', async () => {
    const { result } = await drawn().run('joints: {reach: [{on: {name: "sh*"}, use: 400 mm}]}', 'survey');
    expect(result.findings.some(({ code }) => code === 'near-miss')).toBe(false);
    expect(result.joining?.reach.set).toEqual([{ value: 0.4, members: 1 }]);
    const summary = summarise(result).replace(/\s+/g, ' ');
    expect(summary).toMatch(
      /reach \d+ to \d+ mm, offset 50 mm, by the sections that meet; reach 400 mm for 1 member, by the brief/,
    );
  });
});

describe('a chord in two pieces', () => {
  /** A king-post frame whose tie is spliced between its joints. */
  const spliced: readonly DrawnMember[] = [
    { mark: 'tie 1', from: [0, 0, 0], to: [2, 0, 0] },
    { mark: 'tie 2', from: [2, 0, 0], to: [8, 0, 0] },
    { mark: 'rafter 1', from: [0, 0, 0], to: [4, 0, 3] },
    { mark: 'rafter 2', from: [8, 0, 0], to: [4, 0, 3] },
    { mark: 'post', from: [4, 0, 0], to: [4, 0, 3] },
  ];
  const model = () => {
    const made = new DrawnModel();
    for (const one of spliced) made.member(one);
    return made;
  };
  const supports = (more: string) => `supports:
  - {at: {near: [0, 0, 0], within: 50 mm}, fix: xyz}
  - {at: {near: [8, 0, 0], within: 50 mm}, fix: yz}
  - {at: {near: [4, 0, 3], within: 50 mm}, fix: y}
  - {at: {near: [4, 0, 0], within: 50 mm}, fix: y}
${more}`;
  const LOAD = `cases:
  - {name: hoist, nature: imposed, loads: [{point: [0, 0, -9000], at: {near: [2, 0, 0], within: 50 mm}}]}
`;

  it('has no node at the splice, unless something is put there', async () => {
    const { result } = await model().run(supports(''), 'survey');
    expect(result.nodes).toHaveLength(4);
  });

  it('carries a point load on the splice to the ends of the bar and says its bending, M = F a b / L', async () => {
    const { result } = await model().run(supports(LOAD));
    const node = result.nodes.find(({ at }) => Math.abs(at[0] - 2) < 1e-6)!;
    expect(node.members).toEqual(['tie 1', 'tie 2']);
    expect(node.carriedBy?.t).toBeCloseTo(0.5, 9);
    const [hoist] = result.cases;
    expect(hoist.refused).toBeUndefined();
    const down = result.cases[0].reactions.reduce((sum, { force }) => sum + force[2], 0);
    expect(down).toBeCloseTo(9000, 6);
    // 9 kN in the middle of 4 m: 9 x 2 x 2 / 4 = 9 kNm.
    expect(result.bending).toHaveLength(1);
    expect(result.bending![0]).toMatchObject({ node: node.id, from: 'hoist' });
    expect(result.bending![0].moment).toBeCloseTo(9000, 3);
    const [bent] = result.findings.filter(({ code }) => code === 'bends-between-nodes');
    expect(bent).toMatchObject({ severity: 'warning', nodes: [node.id], members: ['tie 1', 'tie 2'] });
    expect(bent.message).toContain('M = 9.00 kNm at 2.00 m along its 4.00 m, in hoist');
    expect(bent.advice).not.toBe('');
  });

  it('stands on a support at the splice, which is a node of its own', async () => {
    const { result } = await model().run(supports(`  - {at: {near: [2, 0, 0], within: 50 mm}, fix: yz}\n${LOAD}`));
    const node = result.nodes.find(({ at }) => Math.abs(at[0] - 2) < 1e-6)!;
    expect(node.fixed).toBe('yz');
    expect(node.carriedBy).toBeNull();
    const at = result.cases[0].reactions.find((reaction) => reaction.node === node.id)!;
    expect(at.force[2]).toBeCloseTo(9000, 6);
    expect(result.findings.filter(({ code }) => code === 'selector-empty')).toEqual([]);
  });

  it('is a pin at the loaded splice where chords are strict', async () => {
    const { result } = await model().run(`chords: strict\n${supports(LOAD)}`);
    expect(result.nodes.find(({ at }) => Math.abs(at[0] - 2) < 1e-6)!.carriedBy).toBeNull();
    expect(result.findings.some(({ code }) => code === 'load-moves-it')).toBe(true);
  });
});

describe('a joint whose braces meet off the axis of the chord', () => {
  /** A girder of two panels whose braces cross about 30 mm above the middle of the top chord, the chord being 100 mm deep. */
  const girder = (beyond: number): DrawnModel => {
    const made = new DrawnModel();
    const foot = (x: number) => [x, 0, 0] as const;
    for (const one of [
      { mark: 'bottom', from: foot(0), to: foot(8) },
      { mark: 'top', from: [0, 0, 2], to: [8, 0, 2] },
      { mark: 'end 1', from: foot(0), to: [0, 0, 2] },
      { mark: 'end 2', from: foot(8), to: [8, 0, 2] },
      { mark: 'brace 1', from: foot(2), to: [4 - 0.1, 0, 1.9 + beyond] },
      { mark: 'brace 2', from: foot(6), to: [4 + 0.1, 0, 1.9 + beyond] },
      { mark: 'brace 0', from: [0, 0, 2], to: foot(2) },
      { mark: 'brace 3', from: [8, 0, 2], to: foot(6) },
    ] satisfies DrawnMember[])
      made.member(one);
    return made;
  };
  const BRIEF = `supports:
  - {at: {near: [0, 0, 0], within: 50 mm}, fix: xyz}
  - {at: {near: [8, 0, 0], within: 50 mm}, fix: yz}
  - {at: {level: [-1, 3]}, fix: y}
cases:
  - name: crane
    nature: imposed
    loads: [{point: [0, 0, -50 kN], at: {near: [2, 0, 0], within: 50 mm}}]
  - name: wind
    nature: wind
    loads: [{point: [2 kN, 0, 0], at: {near: [4, 0, 2], within: 100 mm}}]
`;

  it('is said with the moment M = dN e of the worst case', async () => {
    const { result } = await girder(0.03).run(BRIEF);
    const [found] = result.findings.filter(({ code }) => code === 'offset-joint');
    expect(found.members).toEqual(['top', 'brace 1', 'brace 2']);
    expect(found.gap).toBeCloseTo((2 * 1.93) / 1.9 - 2, 6);
    const [drawn] = result.eccentricities!.filter(({ of, node }) => of === 'braces' && node === found.nodes[0]);
    expect(Math.abs(drawn.e)).toBeCloseTo(found.gap!, 9);
    const [left, right] = result.bars.flatMap(({ member }, i) => (member === 'top' ? [i] : []));
    const moments = result.cases.map(({ axialForce }) => Math.abs((axialForce[left]! - axialForce[right]!) * drawn.e));
    expect(drawn.moment).toBeCloseTo(Math.max(...moments), 6);
    expect(drawn.moment).toBeGreaterThan(500);
    expect(drawn.from).toBe(result.cases[moments.indexOf(Math.max(...moments))].name);
    expect(found.message).toContain(`= ${(drawn.moment! / 1000).toFixed(2)} kNm, in crane`);
  });

  it('is said without a moment where there are no forces yet, and not at all within the bounds of the standard', async () => {
    const { result } = await girder(0.03).run(BRIEF, 'survey');
    const [found] = result.findings.filter(({ code }) => code === 'offset-joint');
    expect(found.message).not.toContain('kNm');
    expect(result.eccentricities!.every(({ moment }) => moment === null)).toBe(true);
    const within = await girder(0.015).run(BRIEF);
    expect(within.result.findings.filter(({ code }) => code === 'offset-joint')).toEqual([]);
  });
});

describe('a purlin that runs on over chords that run on', () => {
  const hall = (): DrawnModel => {
    const made = new DrawnModel();
    for (const y of [0, 5, 10]) {
      made.member({ mark: `rafter ${y}a`, from: [0, y, 0], to: [4, y, 2] });
      made.member({ mark: `rafter ${y}b`, from: [8, y, 0], to: [4, y, 2] });
      made.member({ mark: `tie ${y}`, from: [0, y, 0], to: [8, y, 0] });
      made.member({ mark: `post ${y}`, from: [2, y, 1], to: [2, y, 0] });
    }
    // 50 mm of rafter, 40 mm of purlin, square to the slope of 1 in 2.
    const up = 0.09 / Math.hypot(1, 0.5);
    const over = [2 - 0.5 * up, 1 + up] as const;
    made.member({ mark: 'purlin', from: [over[0], -0.3, over[1]], to: [over[0], 10.3, over[1]], size: 0.08 });
    return made;
  };
  const BRIEF = `supports:
  - {at: {level: [-0.1, 0.1]}, fix: xyz}
  - {at: {near: [4, 0, 2], within: 50 mm}, fix: y}
  - {at: {near: [4, 5, 2], within: 50 mm}, fix: y}
  - {at: {near: [4, 10, 2], within: 50 mm}, fix: y}
cases: [{name: wind, nature: wind, loads: [{point: [0, 3 kN, 0], at: {near: [2, 0, 1], within: 100 mm}}]}]
`;

  it('sits on them at their nodes, and its eccentricity is told with the moment of what it hands over', async () => {
    const { result } = await hall().run(BRIEF);
    const seats = result.eccentricities!.filter(({ of }) => of === 'seat');
    expect(seats.map(({ member }) => member)).toEqual(['purlin', 'purlin', 'purlin']);
    for (const { e, node } of seats) {
      expect(e).toBeCloseTo(0.09, 3);
      expect(result.nodes.find(({ id }) => id === node)!.joinedBy).toEqual(['nearness', 'seat']);
    }
    const purlin = result.bars.flatMap(({ member }, i) => (member === 'purlin' ? [i] : []));
    expect(purlin).toHaveLength(2);
    const [first, last] = purlin.map((bar) => result.cases[0].axialForce[bar]!);
    const byPlace = [...seats].sort(
      (p, q) =>
        result.nodes.find(({ id }) => id === p.node)!.at[1] - result.nodes.find(({ id }) => id === q.node)!.at[1],
    );
    [first, first - last, last].forEach((force, i) => {
      expect(byPlace[i].moment).toBeCloseTo(Math.abs(force) * byPlace[i].e, 6);
    });
    expect(summarise(result).replace(/\s+/g, ' ')).toContain('3 seats, axes 90 mm apart');
  });

  it('passes them by where the brief says that seats are apart', async () => {
    const { result } = await hall().run(`joints: {seated: apart}\n${BRIEF}`, 'survey');
    expect(result.eccentricities!.filter(({ of }) => of === 'seat')).toEqual([]);
    expect(result.nodes.filter(({ members }) => members.includes('purlin') && members.length > 1)).toEqual([]);
  });
});

describe('what is one bar or no bar', () => {
  /** A frame of a tie, two rafters and a post of two tubes side by side; the left rafter runs 900 mm past its foot. */
  const frame = (): DrawnModel => {
    const made = new DrawnModel();
    made.member({ mark: 'tie', from: [0, 0, 0], to: [8, 0, 0] });
    made.member({ mark: 'rafter 1', from: [-0.72, 0, -0.54], to: [4, 0, 3] });
    made.member({ mark: 'rafter 2', from: [8, 0, 0], to: [4, 0, 3] });
    for (const [mark, y] of [
      ['post a', -0.035],
      ['post b', 0.035],
    ] as const)
      made.member({ mark, from: [4, y, 0.06], to: [4, y, 2.9], size: 0.06 });
    return made;
  };
  const BRIEF = `supports:
  - {at: {near: [0, 0, 0], within: 50 mm}, fix: xyz}
  - {at: {near: [8, 0, 0], within: 50 mm}, fix: yz}
  - {at: {joins: {name: "post*"}}, fix: y}
cases: [{name: dead, nature: permanent, loads: [{selfWeight: 1}]}]
`;
  const area = (size: number) => size ** 2 - (size - 0.01) ** 2;
  const weight = (size: number, length: number) => area(size) * length * 7850 * 9.80665;

  it('a pair is one bar with both members in it, with both weights and both areas', async () => {
    const { result } = await frame().run(BRIEF);
    const bar = result.bars.find(({ members }) => members?.includes('post a'))!;
    expect(bar.members).toEqual(['post a', 'post b']);
    for (const end of [bar.from, bar.to]) {
      expect(result.nodes.find(({ id }) => id === end)!.members).toEqual(expect.arrayContaining(['post a', 'post b']));
    }
    const note = result.findings.find(({ code }) => code === 'pair-joined')!;
    expect(note.members).toEqual(['post a', 'post b']);
    // The supports bear the weight of the tie, the rafters with the tail, and the two posts between their nodes.
    const expected = weight(0.1, 8) + weight(0.1, 5) + weight(0.1, 5.9) + 2 * weight(0.06, 3);
    const down = result.cases[0].reactions.reduce((sum, { force }) => sum + force[2], 0);
    expect(down).toBeCloseTo(expected, 3);
  });

  it('a tail past the last joint is cut off and said, and its weight hangs on that joint', async () => {
    const { result } = await frame().run(BRIEF);
    expect(result.nodes.some(({ at }) => at[2] < -0.1)).toBe(false);
    const [tail] = result.findings.filter(({ code }) => code === 'loose-end');
    expect(tail).toMatchObject({ members: ['rafter 1'], gap: expect.closeTo(0.9, 6) });
    const foot = result.nodes.find(({ at }) => Math.hypot(at[0], at[2]) < 1e-6)!;
    const load = result.cases[0].loads.find(({ node }) => node === foot.id)!;
    expect(load.force[2]).toBeCloseTo(-(weight(0.1, 2) + weight(0.1, 2.5) + weight(0.1, 0.9)), 3);
  });

  it('a tail whose end stands on a support is kept', async () => {
    const { result } = await frame().run(
      `${BRIEF.split('cases')[0]}  - {at: {near: [-0.72, 0, -0.54], within: 50 mm}, fix: xyz}\n`,
      'survey',
    );
    expect(result.nodes.find(({ at }) => at[2] < -0.5)!.fixed).toBe('xyz');
    expect(result.findings.some(({ code }) => code === 'loose-end')).toBe(false);
  });
});
