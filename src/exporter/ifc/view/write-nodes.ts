import type { Result } from '../../../domain/result.ts';
import type { Vec3 } from '../../../domain/vector.ts';
import type { StepRef } from '../../../step/values.ts';
import { type TypedToWrite, typed } from '../../../step/write.ts';
import { label } from '../block.ts';
import type { NewFile } from '../new-file.ts';
import { type NodeCondition, nodeCondition } from './node-conditions.ts';
import { Once, ROLE, type View } from './view-parts.ts';

export interface WrittenNode {
  readonly vertex: StepRef;
  readonly connection: StepRef;
}

/** A point connection for each node, with what holds it. */
export function* writeNodes(view: View, into: WrittenNode[]): Generator<string> {
  const { file, frame, result, nodeKeys } = view;
  const conditions = conditionsOf(result);
  const once = new Once();
  const words = new NodeWords(result);
  for (const [k, node] of result.nodes.entries()) {
    const vertex = file.add('IFCVERTEXPOINT', file.add('IFCCARTESIANPOINT', [...node.at]));
    const shape = file.add('IFCTOPOLOGYREPRESENTATION', frame.context, 'Reference', 'Vertex', [vertex]);
    const product = file.add('IFCPRODUCTDEFINITIONSHAPE', null, null, [shape]);
    const condition = conditions.get(node.id) ?? null;
    const applied = condition && once.of(JSON.stringify(condition.along), () => writeCondition(file, condition));
    const system = condition?.frame ? once.of(JSON.stringify(condition.frame), () => writeAxes(file, condition)) : null;
    const connection = file.add(
      'IFCSTRUCTURALPOINTCONNECTION',
      file.globalId(`${ROLE} node`, nodeKeys[k]!),
      frame.owner,
      node.place === null ? node.id : label(`${node.id} ${node.place}`),
      words.of(node),
      null,
      frame.origin,
      product,
      applied,
      ...(file.isIfc2x3 ? [] : [system]),
    );
    into.push({ vertex, connection });
    yield* file.take();
  }
}

/** By node: supports and holds together, which hold alike. */
export function conditionsOf({ supports = [], holds = [] }: Result): Map<string, NodeCondition> {
  const nodes = new Set([...supports, ...holds].map(({ node }) => node));
  return new Map(
    [...nodes].map((node) => {
      const own = supports.filter((support) => support.node === node);
      const rigid: Vec3[] = [
        ...own.flatMap(({ fixed }) => fixed),
        ...holds.filter((hold) => hold.node === node).map(({ direction }) => direction),
      ];
      return [node, nodeCondition({ rigid, springs: own.flatMap(({ springs }) => springs) })];
    }),
  );
}

/** IFC2X3 says rigid with -1 and free with 0; later schemas say either as a boolean. */
export function stiffnessValue(file: NewFile, along: 'rigid' | number, measure: string): number | TypedToWrite {
  if (file.isIfc2x3) return along === 'rigid' ? -1 : along;
  return typeof along === 'number' && along !== 0 ? typed(measure, along) : typed('IFCBOOLEAN', along === 'rigid');
}

function writeCondition(file: NewFile, { along }: NodeCondition): StepRef {
  const moves = along.map((way) => stiffnessValue(file, way, 'IFCLINEARSTIFFNESSMEASURE'));
  const turns = [0, 0, 0].map((way) => stiffnessValue(file, way, 'IFCROTATIONALSTIFFNESSMEASURE'));
  const name = along.every((way) => way === 'rigid') ? 'pinned' : along.some(isSpring) ? 'spring' : 'guided';
  return file.add('IFCBOUNDARYNODECONDITION', name, ...moves, ...turns);
}

const isSpring = (way: 'rigid' | number): boolean => typeof way === 'number' && way !== 0;

function writeAxes(file: NewFile, { frame }: NodeCondition): StepRef {
  const point = file.add('IFCCARTESIANPOINT', [0, 0, 0]);
  const [x, , z] = frame!;
  return file.add('IFCAXIS2PLACEMENT3D', point, file.add('IFCDIRECTION', [...z]), file.add('IFCDIRECTION', [...x]));
}

/** What a reader of the node has to know that its attributes do not say. */
class NodeWords {
  private readonly barNames: ReadonlyMap<string, string>;
  private readonly held = new Map<string, string>();
  private readonly missed = new Map<string, number>();

  constructor({ bars, holds = [], eccentricities = [] }: Result) {
    this.barNames = new Map(bars.map(({ id, name }) => [id, name]));
    for (const { node, because } of holds) this.held.set(node, because);
    for (const { node, e } of eccentricities) {
      this.missed.set(node, Math.max(this.missed.get(node) ?? 0, Math.abs(e)));
    }
  }

  of({ id, carriedBy }: Result['nodes'][number]): string | null {
    const held = this.held.get(id);
    const missed = this.missed.get(id);
    const sentences = [
      carriedBy === null
        ? null
        : `Carried by ${this.barNames.get(carriedBy.bar) ?? carriedBy.bar} between its ends: that bar runs through, and bends under what comes here.`,
      held === undefined ? null : `Held by ${held}, which is not in the model.`,
      missed === undefined
        ? null
        : `As drawn, axes miss each other here by ${Math.round(missed * 1000)} mm; they are joined in one point.`,
    ].filter((sentence) => sentence !== null);
    return sentences.length === 0 ? null : sentences.join(' ');
  }
}
