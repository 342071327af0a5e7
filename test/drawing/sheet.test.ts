import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { beforeAll, describe, expect, it } from 'vitest';
import { parseBrief } from '../../src/brief/parse-brief.ts';
import type { Result } from '../../src/domain/result.ts';
import { PALETTE } from '../../src/drawing/palette.ts';
import { drawSheet } from '../../src/drawing/sheet.ts';
import { elevationThrough, WHOLE_ISOMETRIC, WHOLE_PLAN } from '../../src/drawing/view.ts';
import { runModel } from '../../src/pipeline.ts';
import { someResult } from '../exporter/support.ts';
import { fixture, publicModel } from '../support/shared.ts';
import { elementsOf, textsOf, viewsOf } from './read-svg.ts';

const brief = parseBrief(readFileSync(fixture('boat-hall.yaml')), 'boat-hall.yaml');
let hall: Result;
let faults: Result;

beforeAll(async () => {
  const run = async (name: string) => (await runModel(readFileSync(fixture(name)), { fileName: name, brief })).result;
  [hall, faults] = [await run('boat-hall-a.ifc'), await run('boat-hall-faults.ifc')];
});

describe('a sheet', () => {
  it('draws every bar once in each view that holds it', () => {
    const views = viewsOf(drawSheet(hall));
    expect(views.map(({ kind }) => kind).sort()).toEqual(['elevation', 'elevation', 'isometric', 'plan']);
    for (const { kind, svg } of views) {
      const drawn = elementsOf(svg, 'data-bar').map((bar) => bar['data-bar']);
      expect(new Set(drawn).size).toBe(drawn.length);
      if (kind !== 'elevation') expect(new Set(drawn)).toEqual(new Set(hall.bars.map(({ id }) => id)));
    }
  });

  it('shows in an elevation the frame that carries most, and nothing that stands before or behind it', () => {
    const [frame] = viewsOf(drawSheet(hall)).filter(({ kind }) => kind === 'elevation');
    const at = new Map(hall.nodes.map((node) => [node.id, node.at]));
    const ends = elementsOf(frame!.svg, 'data-bar').flatMap(({ 'data-bar': id }) => {
      const bar = hall.bars.find((one) => one.id === id)!;
      return [at.get(bar.from)![1], at.get(bar.to)![1]];
    });
    expect(Math.max(...ends) - Math.min(...ends)).toBeLessThan(0.3);
    expect(textsOf(frame!.svg)).toContain('Elevation on axis 4, looking along +y');
  });

  it('tells the sign by hue and by dash, and the size by weight', () => {
    const [plan] = viewsOf(drawSheet(hall)).filter(({ kind }) => kind === 'plan');
    const force = new Map(
      hall.envelope.map(({ bar, tension, compression }) => {
        const [pull, push] = [tension?.force ?? 0, compression?.force ?? 0];
        return [bar, -push > pull ? push : pull];
      }),
    );
    const lines = elementsOf(plan!.svg, 'data-bar').filter(({ x1 }) => x1 !== undefined);
    expect(lines.length).toBeGreaterThan(300);
    for (const line of lines) {
      const carried = force.get(line['data-bar']!)!;
      if (line.stroke === PALETTE.idle) expect(Math.abs(carried)).toBeLessThan(1e3);
      else expect(line.stroke).toBe(carried > 0 ? PALETTE.tension : PALETTE.compression);
      expect(line['stroke-dasharray'] !== undefined).toBe(line.stroke === PALETTE.tension);
    }
    const sorted = [...lines].sort(
      (a, b) => Math.abs(force.get(a['data-bar']!)!) - Math.abs(force.get(b['data-bar']!)!),
    );
    const weights = sorted.map((line) => Number(line['stroke-width']));
    expect(weights).toEqual([...weights].sort((a, b) => a - b));
    expect(weights.at(-1)! / weights[0]!).toBeGreaterThan(3);
  });

  it('is drawn without forces before there are any', () => {
    const svg = drawSheet(someResult(['a', 'b', 'c'], { withCases: false }));
    const strokes = new Set(elementsOf(svg, 'data-bar').map(({ stroke }) => stroke));
    expect([...strokes]).toEqual([PALETTE.neutral]);
    expect(textsOf(svg).join(' ')).toContain('there are no forces to draw');
  });

  it('says the model, the verdict and the caution, and scales that are usual', () => {
    const svg = drawSheet(hall);
    const words = textsOf(svg).join(' ');
    expect(words).toContain('boat-hall-a.ifc');
    expect(words).toContain('It stands: no mechanism');
    expect(words).toContain('the judgement of a licensed engineer decide.');
    for (const { kind, svg: view } of viewsOf(svg)) {
      const scale = /1 : (\d+)/.exec(textsOf(view).join(' '))?.[1];
      if (kind === 'isometric') expect(scale).toBeUndefined();
      else expect([50, 75, 100, 125, 150, 200, 250, 300]).toContain(Number(scale));
    }
  });

  it('is to the scale that it names', () => {
    const [plan] = viewsOf(drawSheet(hall)).filter(({ kind }) => kind === 'plan');
    const scale = Number(/1 : (\d+)/.exec(textsOf(plan!.svg).join(' '))?.[1]);
    const at = new Map(hall.nodes.map((node) => [node.id, node.at]));
    for (const { 'data-bar': id, x1, y1, x2, y2 } of elementsOf(plan!.svg, 'data-bar')) {
      if (x1 === undefined) continue;
      const bar = hall.bars.find((one) => one.id === id)!;
      const [a, b] = [at.get(bar.from)!, at.get(bar.to)!];
      const onPaper = Math.hypot(Number(x2) - Number(x1), Number(y2) - Number(y1));
      expect(onPaper).toBeCloseTo((Math.hypot(b[0] - a[0], b[1] - a[1]) * 1000) / scale, 2);
    }
  });

  it('names the grid axes and marks supports', () => {
    const [plan] = viewsOf(drawSheet(hall)).filter(({ kind }) => kind === 'plan');
    for (const tag of ['A', 'B', 'C', 'D', 'E', '1', '7']) expect(textsOf(plan!.svg)).toContain(tag);
    expect(elementsOf(plan!.svg, 'data-support')).toHaveLength(hall.nodes.filter(({ fixed }) => fixed !== '').length);
  });

  it('marks each finding that has a spot by the number it is listed under', () => {
    const few = { ...faults, findings: faults.findings.slice(0, 10) };
    const svg = drawSheet(few);
    const listed = new Set(elementsOf(svg, 'data-listed').map((mark) => mark['data-listed']));
    const spots = few.findings.filter(({ at, severity }) => at !== null && severity !== 'note');
    expect(listed.size).toBe(spots.length);
    const [plan] = viewsOf(svg).filter(({ kind }) => kind === 'plan');
    expect(new Set(elementsOf(plan!.svg, 'data-mark').map((mark) => mark['data-mark']))).toEqual(listed);
  });

  it('lists as many findings as fit and says how many more there are', () => {
    const many = { ...faults, findings: [...faults.findings, ...faults.findings, ...faults.findings] };
    const svg = drawSheet(many);
    const listed = elementsOf(svg, 'data-listed').map((mark) => Number(mark['data-listed']));
    expect(listed).toEqual(listed.map((_, i) => i + 1));
    expect(textsOf(svg).join(' ')).toContain(`and ${many.findings.length - listed.length} more findings`);
  });

  it('draws the views that are asked for', () => {
    const frame = elevationThrough('on axis 2', [0, 6, 0], [0, 1, 0], 0.2);
    const views = viewsOf(drawSheet(hall, { views: [frame, WHOLE_ISOMETRIC] }));
    expect(views.map(({ kind }) => kind)).toEqual(['elevation']);
    expect(viewsOf(drawSheet(hall, { views: [WHOLE_PLAN, WHOLE_ISOMETRIC] }))).toHaveLength(1);
  });

  it('is the same text every time', () => {
    expect(drawSheet(hall)).toBe(drawSheet(structuredClone(hall)));
  });

  it('lets no name of a model break out of the drawing', () => {
    const nasty = '</text><script>alert(1)</script>"\'&\u0000\u202e';
    const result = someResult(['a', 'b']);
    const svg = drawSheet({
      ...result,
      model: { ...result.model, file: nasty },
      bars: result.bars.map((bar) => ({ ...bar, name: nasty })),
      findings: result.findings.map((one) => ({ ...one, message: nasty, place: nasty })),
    });
    for (const mark of ['<script', '\u0000', '\u202e']) expect(svg).not.toContain(mark);
    expect(() => elementsOf(svg, 'data-bar')).not.toThrow();
  });

  it('draws any truss, however thin, small or far away', () => {
    const size = fc.constantFrom(0, 1e-3, 1, 1e4);
    const point = fc.tuple(size, size, size);
    fc.assert(
      fc.property(fc.array(fc.tuple(point, point), { maxLength: 4 }), fc.constantFrom(0, 1e7), (ends, offset) => {
        const base = someResult(['a']);
        const nodes = ends.flatMap(([from, to], k) =>
          [from, to].map((at, j) => ({
            ...base.nodes[0]!,
            id: `n${2 * k + j}`,
            at: at.map((value) => value + offset) as [number, number, number],
          })),
        );
        const bars = ends.map((_, k) => ({ ...base.bars[0]!, id: `b${k}`, from: `n${2 * k}`, to: `n${2 * k + 1}` }));
        const svg = drawSheet({ ...base, nodes, bars, envelope: [], cases: [], combinations: [] });
        expect(svg).not.toMatch(/NaN|Infinity|undefined/);
        for (const { svg: view } of viewsOf(svg)) {
          expect(elementsOf(view, 'data-bar').length).toBeLessThanOrEqual(bars.length);
        }
      }),
      { numRuns: 60 },
    );
  });

  const gridshell = publicModel('gridshell-roof.ifc');
  it.skipIf(gridshell === null)('draws all 5,178 bars of a shell in plan and in the round', async () => {
    const { result } = await runModel(readFileSync(gridshell!), { fileName: 'gridshell-roof.ifc', extent: 'survey' });
    for (const { kind, svg } of viewsOf(drawSheet(result))) {
      if (kind !== 'elevation') expect(elementsOf(svg, 'data-bar')).toHaveLength(5178);
    }
  });
});
