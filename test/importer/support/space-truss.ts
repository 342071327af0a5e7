import { anyNormal, cross, distance, scale, subtract, type Vec3 } from '../../../src/domain/vector.ts';
import type { StepWriter } from './step-writer.ts';

export interface Bar {
  readonly from: Vec3;
  readonly to: Vec3;
  /** Unit vectors: along the bar, and across it. */
  readonly along: Vec3;
  readonly x: Vec3;
  readonly y: Vec3;
  readonly length: number;
}

/** Two bays of a double-layer grid on one post, metres: level, upright, and inclined bars in many directions. */
export function spaceTruss(origin: Vec3 = [0, 0, 0]): Bar[] {
  const lower: Vec3[] = [0, 1, 2].flatMap((i): Vec3[] => [
    [3.2 * i, 0, 4.1],
    [3.2 * i, 2.9, 4.1],
  ]);
  const upper: Vec3[] = [0, 1].map((i) => [1.6 + 3.2 * i, 1.45, 5.6]);
  const foot: Vec3 = [3.2, 0, 0.3];
  const pairs: [Vec3, Vec3][] = [[foot, lower[2]!]];
  for (const i of [0, 1, 2]) pairs.push([lower[2 * i]!, lower[2 * i + 1]!]);
  for (const i of [0, 1, 2, 3]) pairs.push([lower[i]!, lower[i + 2]!]);
  for (const bay of [0, 1]) for (const k of [0, 1, 2, 3]) pairs.push([lower[2 * bay + k]!, upper[bay]!]);
  pairs.push([upper[0]!, upper[1]!]);
  const moved = (p: Vec3): Vec3 => [p[0] + origin[0], p[1] + origin[1], p[2] + origin[2]];
  return pairs.map(([a, b]) => barBetween(moved(a), moved(b)));
}

function barBetween(from: Vec3, to: Vec3): Bar {
  const length = distance(from, to);
  const along = scale(subtract(to, from), 1 / length);
  const x = anyNormal(along);
  return { from, to, along, x, y: cross(along, x), length };
}

export type Schema = 'IFC2X3' | 'IFC4' | 'IFC4X3';

/** What stands for one bar: representation items by the name of their representation, and where they are placed. */
export interface Drawn {
  readonly body?: readonly string[];
  readonly axis?: readonly string[];
  /** IfcObjectPlacement; the world where it is left out. */
  readonly placement?: string;
}

/** The whole model; `draw` writes what stands for one bar, or for all of them at once. */
export function trussModel(
  writer: StepWriter,
  schema: Schema,
  elements: readonly ((writer: StepWriter) => Drawn)[],
  unit: 'mm' | 'in' = 'mm',
): string {
  const millimetre = writer.add('IFCSIUNIT(*,.LENGTHUNIT.,.MILLI.,.METRE.)');
  const radian = writer.add('IFCSIUNIT(*,.PLANEANGLEUNIT.,$,.RADIAN.)');
  const length = unit === 'mm' ? millimetre : inch(writer, millimetre);
  const units = writer.add(`IFCUNITASSIGNMENT((${length},${radian}))`);
  const origin = writer.axes([0, 0, 0], [0, 0, 1], [1, 0, 0]);
  const context = writer.add(`IFCGEOMETRICREPRESENTATIONCONTEXT($,'Model',3,1.E-5,${origin},$)`);
  const world = writer.add(`IFCLOCALPLACEMENT($,${origin})`);
  writer.add(`IFCPROJECT('0aaaaaaaaaaaaaaaaaaaaa',$,'P',$,$,$,$,(${context}),${units})`);
  const material = writer.add(schema === 'IFC2X3' ? "IFCMATERIAL('S355')" : "IFCMATERIAL('S355',$,$)");
  const members = elements.map((draw, i) => {
    const { body, axis, placement } = draw(writer);
    const shown = [represented(writer, context, 'Axis', axis), represented(writer, context, 'Body', body)].flat();
    const shape = writer.add(`IFCPRODUCTDEFINITIONSHAPE($,$,(${shown.join(',')}))`);
    const globalId = `0${String(i).padStart(21, '0')}`;
    const tail = schema === 'IFC2X3' ? '' : ',.MEMBER.';
    return writer.add(`IFCMEMBER('${globalId}',$,'M${i}',$,$,${placement ?? world},${shape},'T${i}'${tail})`);
  });
  writer.add(`IFCRELASSOCIATESMATERIAL('0ccccccccccccccccccccc',$,$,$,(${members.join(',')}),${material})`);
  return writer.text();
}

function inch(writer: StepWriter, millimetre: string): string {
  const dimensions = writer.add('IFCDIMENSIONALEXPONENTS(1,0,0,0,0,0,0)');
  const measure = writer.add(`IFCMEASUREWITHUNIT(IFCLENGTHMEASURE(25.4),${millimetre})`);
  return writer.add(`IFCCONVERSIONBASEDUNIT(${dimensions},.LENGTHUNIT.,'INCH',${measure})`);
}

function represented(writer: StepWriter, context: string, name: string, items: readonly string[] = []): string[] {
  if (items.length === 0) return [];
  return [writer.add(`IFCSHAPEREPRESENTATION(${context},'${name}','',(${items.join(',')}))`)];
}
