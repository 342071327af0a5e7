import type { Result, ResultFinding } from '../domain/result.ts';
import type { Vec3 } from '../domain/vector.ts';

/** A bar with what a drawing tells of it. */
export interface SceneBar {
  readonly id: string;
  readonly name: string;
  readonly from: Vec3;
  readonly to: Vec3;
  /** N, tension positive: the larger of the bar's extremes; null where there is none. */
  readonly force: number | null;
}

export interface SceneSupport {
  readonly node: string;
  readonly at: Vec3;
  /** Letters of the directions that are held. */
  readonly fixed: string;
}

/** A finding with a spot; `number` is how the drawing refers to it. */
export interface SceneMark {
  readonly number: number;
  readonly at: Vec3;
  readonly finding: ResultFinding;
}

/** The truss of a result, as the drawings see it. */
export interface Scene {
  readonly bars: readonly SceneBar[];
  readonly nodes: readonly { readonly id: string; readonly at: Vec3 }[];
  readonly supports: readonly SceneSupport[];
  readonly marks: readonly SceneMark[];
  readonly grid: NonNullable<Result['grid']>;
  /** N; 0 where no force is known. */
  readonly greatestForce: number;
  /** Whether there are forces to draw: without them a bar without a force is not one that lacks it. */
  readonly isLoaded: boolean;
}

const SEVERITIES = ['error', 'warning', 'note'] as const;

export function sceneOf(result: Result): Scene {
  const at = new Map(result.nodes.map((node) => [node.id, node.at]));
  const extremes = new Map(result.envelope.map((entry) => [entry.bar, entry]));
  const isLoaded = result.envelope.some(({ tension, compression }) => tension !== null || compression !== null);
  const bars = result.bars.flatMap((bar): SceneBar[] => {
    const from = at.get(bar.from);
    const to = at.get(bar.to);
    if (from === undefined || to === undefined) return [];
    const { tension, compression } = extremes.get(bar.id) ?? { tension: null, compression: null };
    return [{ id: bar.id, name: bar.name, from, to, force: isLoaded ? governing(tension, compression) : null }];
  });
  return {
    bars: withoutForce(result, bars),
    nodes: result.nodes,
    supports: result.nodes
      .filter(({ fixed }) => fixed !== '')
      .map(({ id, at: here, fixed }) => ({ node: id, at: here, fixed })),
    marks: marksOf(result),
    grid: result.grid ?? [],
    greatestForce: bars.reduce((most, { force }) => Math.max(most, Math.abs(force ?? 0)), 0),
    isLoaded,
  };
}

type Extreme = Result['envelope'][number]['tension'];

/** The larger in size; a bar that is in neither carries nothing. */
function governing(tension: Extreme, compression: Extreme): number {
  const [pull, push] = [tension?.force ?? 0, compression?.force ?? 0];
  return Math.abs(push) > pull ? push : pull;
}

/** Bars of which no case has a force: set aside, or without a section. */
function withoutForce(result: Result, bars: readonly SceneBar[]): SceneBar[] {
  const carried = result.cases.filter(({ refused }) => refused === undefined);
  const order = new Map(result.bars.map(({ id }, index) => [id, index]));
  return bars.map((bar) => {
    const index = order.get(bar.id) ?? -1;
    const isKnown = carried.some(({ axialForce }) => typeof axialForce[index] === 'number');
    return isKnown ? bar : { ...bar, force: null };
  });
}

/** The findings that have a spot, the gravest first. */
function marksOf({ findings }: Result): SceneMark[] {
  const graves = SEVERITIES.flatMap((severity) => findings.filter((finding) => finding.severity === severity));
  let number = 0;
  return graves.flatMap((finding) =>
    finding.at === null || finding.severity === 'note' ? [] : [{ number: ++number, at: finding.at, finding }],
  );
}
