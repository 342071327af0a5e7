import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, it } from 'vitest';
import { parseBrief } from '../../../src/brief/parse-brief.ts';
import type { Result } from '../../../src/domain/result.ts';
import { add, norm, ORIGIN, scale, subtract, type Vec3 } from '../../../src/domain/vector.ts';
import { bearings } from '../../../src/exporter/schedules/bearings.ts';
import { bearingsTable } from '../../../src/exporter/schedules/bearings-table.ts';
import { joints } from '../../../src/exporter/schedules/joints.ts';
import { jointsTable } from '../../../src/exporter/schedules/joints-table.ts';
import { runModel } from '../../../src/pipeline.ts';
import { fixture } from '../../support/shared.ts';

let result: Result;
beforeAll(async () => {
  const brief = parseBrief(readFileSync(fixture('boat-hall.yaml')), 'boat-hall.yaml');
  const run = await runModel(readFileSync(fixture('boat-hall-a.ifc')), { brief });
  result = run.result;
});

const ultimate = () =>
  result.combinations.filter(({ limit }) => ['strength', 'equilibrium', 'accidental'].includes(limit));
const reactionOf = (name: string, node: string) =>
  result.combinations.find((run) => run.name === name)?.reactions.find((reaction) => reaction.node === node)?.force;

describe('the bearing table', () => {
  it('has for every support the greatest down, uplift and horizontal of all ultimate combinations', () => {
    const supported = result.nodes.filter(({ fixed }) => fixed !== '').map(({ id }) => id);
    const table = new Map(bearings(result).map((bearing) => [bearing.node, bearing]));
    expect([...table.keys()]).toEqual(supported);
    for (const node of supported) {
      const forces = ultimate().map(({ name }) => reactionOf(name, node) ?? [0, 0, 0]);
      expect(table.get(node)?.down?.force ?? 0).toBe(Math.max(0, ...forces.map((force) => force[2])));
      expect(table.get(node)?.uplift?.force ?? 0).toBe(Math.max(0, ...forces.map((force) => -force[2])));
    }
  });

  it('gives with each the whole reaction of the combination it comes from', () => {
    for (const { node, ...kinds } of bearings(result)) {
      for (const most of Object.values(kinds)) {
        if (most !== null) expect(most.reaction).toEqual(reactionOf(most.from, node));
      }
    }
  });

  it('has a row for each greatest that there is', () => {
    const rows = [...bearingsTable(result).rows];
    const count = bearings(result).flatMap(({ down, uplift, horizontal }) =>
      [down, uplift, horizontal].filter(Boolean),
    );
    expect(rows).toHaveLength(count.length);
    for (const row of rows) expect(row).toHaveLength(bearingsTable(result).heads.length);
  });
});

describe('the joint schedule', () => {
  it('shows each bar at both of its ends, in the combinations where it has its greatest forces', () => {
    const seen = new Map<string, Set<string>[]>();
    for (const { bars, states } of joints(result)) {
      for (const { bar } of bars) {
        const governed = new Set(states.filter(({ governs }) => governs.includes(bar.id)).map(({ from }) => from));
        seen.set(bar.id, [...(seen.get(bar.id) ?? []), governed]);
      }
    }
    const carried = new Set(result.nodes.filter(({ carriedBy }) => carriedBy !== null).map(({ id }) => id));
    for (const { bar: id, tension, compression } of result.envelope) {
      const bar = result.bars.find((each) => each.id === id)!;
      const ends = [bar.from, bar.to].filter((node) => !carried.has(node)).length;
      const from = new Set([tension, compression].flatMap((extreme) => (extreme === null ? [] : [extreme.from])));
      expect(seen.get(id) ?? []).toEqual(Array(ends).fill(from));
    }
  });

  it('closes at every joint with the loads that the combination puts there', () => {
    const applied = (combination: string, node: string): Vec3 => {
      const { factors } = result.combinations.find(({ name }) => name === combination)!;
      return Object.entries(factors).reduce<Vec3>((sum, [name, factor]) => {
        const loads = result.cases.find((loadCase) => loadCase.name === name)!.loads;
        return loads.filter((load) => load.node === node).reduce((s, { force }) => add(s, scale(force, factor)), sum);
      }, ORIGIN);
    };
    const carrying = new Set(result.nodes.flatMap(({ carriedBy }) => (carriedBy === null ? [] : [carriedBy.bar])));
    let compared = 0;
    for (const { node, bars, states } of joints(result)) {
      if (bars.some(({ bar }) => carrying.has(bar.id))) continue;
      for (const { from, loads } of states) {
        expect(norm(subtract(loads!, applied(from, node.id)))).toBeLessThan(1e-4);
        compared++;
      }
    }
    expect(compared).toBeGreaterThan(200);
  });

  it('points every direction away from the joint, at length 1', () => {
    const at = new Map(result.nodes.map((node) => [node.id, node.at]));
    for (const { node, bars } of joints(result)) {
      for (const { bar, direction } of bars) {
        const far = at.get(bar.from === node.id ? bar.to : bar.from)!;
        expect(norm(subtract(scale(direction, bar.length), subtract(far, node.at)))).toBeLessThan(1e-9);
      }
    }
  });

  it('is a table whose groups add up to no force', () => {
    const { heads, rows } = jointsTable(result);
    const first = heads.indexOf('Fx on joint (N)');
    const sums = new Map<string, Vec3>();
    for (const row of rows) {
      expect(row).toHaveLength(heads.length);
      const key = `${row[0]} ${row[5]}`;
      const force = row.slice(first, first + 3) as [number, number, number];
      sums.set(key, add(sums.get(key) ?? ORIGIN, force));
    }
    expect(sums.size).toBeGreaterThan(200);
    for (const sum of sums.values()) expect(norm(sum)).toBeLessThan(1e-6);
  });

  it('stands in the result by the ids of nodes and bars', () => {
    const bars = new Set(result.bars.map(({ id }) => id));
    expect(result.joints!.length).toBe([...joints(result)].length);
    for (const joint of result.joints!) {
      expect(joint.bars.every((id) => bars.has(id))).toBe(true);
      for (const { forces } of joint.states) expect(forces).toHaveLength(joint.bars.length);
    }
  });
});

describe('before anything is solved', () => {
  it('there are no schedules', async () => {
    const { result: survey } = await runModel(readFileSync(fixture('boat-hall-a.ifc')), { extent: 'survey' });
    expect(survey.joints).toBeUndefined();
    expect(survey.bearings).toBeUndefined();
    expect([...joints(survey)].flatMap(({ states }) => states)).toEqual([]);
  });
});
