import type { Result } from '../../../domain/result.ts';
import { distance, type Vec3 } from '../../../domain/vector.ts';
import { type BarState, barState } from '../../../drawing/bar-style.ts';
import { PALETTE } from '../../../drawing/palette.ts';
import { type Scene, type SceneBar, type SceneMark, sceneOf } from '../../../drawing/scene.ts';
import type { StepRef } from '../../../step/values.ts';
import type { Chunks } from '../../chunks.ts';
import { label } from '../block.ts';
import { type FileFrame, NewFile, writeFrame } from '../new-file.ts';
import { Solids } from './solids.ts';

const ROLE = 'picture';

/** What is drawn, each on a layer of its own that a viewer can switch off, with its colour. */
const KINDS: Readonly<Record<BarState | 'support' | 'finding', readonly [layer: string, colour: string]>> = {
  tension: ['Pinwright: tension', PALETTE.tension],
  compression: ['Pinwright: compression', PALETTE.compression],
  idle: ['Pinwright: next to no force', PALETTE.idle],
  unknown: ['Pinwright: force not found', PALETTE.unknown],
  neutral: ['Pinwright: bars', PALETTE.neutral],
  support: ['Pinwright: supports', PALETTE.ink],
  finding: ['Pinwright: findings', '#cc0000'],
};

type Kind = keyof typeof KINDS;

/**
 * The truss as a file of coloured solids to be opened beside the model, in the same place: each bar a rod as thick as its
 * force is large, orange in compression and blue in tension; supports and findings as blocks.
 */
export function writePicture(result: Result): Chunks {
  const file = new NewFile(result);
  return file.chunks('the truss in colours, to be opened beside the model', 'notYetAssigned', lines(file, result));
}

function* lines(file: NewFile, result: Result): Generator<string> {
  const frame = writeFrame(file, result, ROLE);
  const scene = sceneOf(result);
  const picture = new Picture(file, frame, result);
  const sizes = sizesOf(scene);
  for (const [k, bar] of scene.bars.entries()) {
    picture.rod(bar, k, sizes, scene);
    yield* file.take();
  }
  for (const { node, at, fixed } of scene.supports) {
    picture.block('support', node, at, sizes.thickest * 1.6, { name: `Support ${node}`, says: `Fixed: ${fixed}` });
  }
  for (const mark of scene.marks) picture.mark(mark, sizes.thickest * 2.2);
  picture.finish();
  yield* file.take();
}

/** Diameters, m. */
interface Sizes {
  readonly thinnest: number;
  readonly thickest: number;
}

/** So thick that one sees them beside steel of usual depth, and less in small trusses. */
function sizesOf({ bars }: Scene): Sizes {
  const lengths = bars.map(({ from, to }) => distance(from, to)).sort((a, b) => a - b);
  const median = lengths[lengths.length >> 1] ?? 1;
  const thickest = Math.min(0.2, Math.max(0.01, 0.06 * median));
  return { thinnest: thickest / 6, thickest };
}

class Picture {
  private readonly file: NewFile;
  private readonly frame: FileFrame;
  private readonly envelopeOf: ReadonlyMap<string, Result['envelope'][number]>;
  private readonly solids: Solids;
  private readonly shapesOf = new Map<Kind, StepRef[]>();
  private readonly elements: StepRef[] = [];

  constructor(file: NewFile, frame: FileFrame, result: Result) {
    this.file = file;
    this.frame = frame;
    this.envelopeOf = new Map(result.envelope.map((entry) => [entry.bar, entry]));
    this.solids = new Solids(file, result.nodes[0]?.at ?? [0, 0, 0]);
  }

  rod(bar: SceneBar, number: number, { thinnest, thickest }: Sizes, { greatestForce, isLoaded }: Scene): void {
    const kind = barState(bar.force, greatestForce, isLoaded);
    const share = greatestForce > 0 ? Math.sqrt(Math.abs(bar.force ?? 0) / greatestForce) : 0;
    const diameter = thinnest + (thickest - thinnest) * share;
    const solid = this.solids.rod(bar.from, bar.to, diameter);
    if (solid !== null) this.put(kind, `${bar.name} ${number}`, solid, { name: bar.name, says: this.forcesOf(bar.id) });
  }

  mark({ number, at, finding }: SceneMark, size: number): void {
    const name = `${number}. ${finding.severity}: ${finding.code}`;
    this.block('finding', `${number} ${finding.code}`, at, size, {
      name,
      says: `${finding.message} ${finding.advice}`,
    });
  }

  block(kind: Kind, key: string, at: Vec3, size: number, words: Words): void {
    this.put(kind, key, this.solids.block(at, size), words);
  }

  private put(kind: Kind, key: string, solid: StepRef, { name, says }: Words): void {
    const { file, frame } = this;
    this.solids.colour(solid, KINDS[kind][1]);
    const shape = file.add('IFCSHAPEREPRESENTATION', frame.context, 'Body', 'SweptSolid', [solid]);
    const product = file.add('IFCPRODUCTDEFINITIONSHAPE', null, null, [shape]);
    const id = file.globalId(`${ROLE} ${kind}`, key);
    const head = [id, frame.owner, label(name), says, KINDS[kind][0], this.solids.placement, product];
    this.elements.push(file.add('IFCBUILDINGELEMENTPROXY', ...head, null, null));
    const shapes = this.shapesOf.get(kind) ?? [];
    this.shapesOf.set(kind, shapes);
    shapes.push(shape);
  }

  finish(): void {
    const { file, frame } = this;
    for (const [kind, shapes] of this.shapesOf) {
      file.add('IFCPRESENTATIONLAYERASSIGNMENT', KINDS[kind][0], null, shapes, null);
    }
    if (this.elements.length === 0) return;
    const tie = file.globalId(`${ROLE} contained`, '');
    file.add('IFCRELCONTAINEDINSPATIALSTRUCTURE', tie, frame.owner, null, null, this.elements, frame.building);
  }

  private forcesOf(bar: string): string | null {
    const entry = this.envelopeOf.get(bar);
    if (entry === undefined) return null;
    const told = (side: 'tension' | 'compression') => {
      const most = entry[side];
      return most === null ? [] : [`${side} ${(Math.abs(most.force) / 1000).toFixed(1)} kN from ${most.from}`];
    };
    const sides = [...told('tension'), ...told('compression')];
    return sides.length === 0 ? null : sides.join('; ');
  }
}

interface Words {
  readonly name: string;
  readonly says: string | null;
}
