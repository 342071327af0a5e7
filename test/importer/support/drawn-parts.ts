import type { Vec3 } from '../../../src/domain/vector.ts';
import type { Bar, Drawn, Schema } from './space-truss.ts';
import type { StepWriter } from './step-writer.ts';

/** One way of writing a bar. */
export interface Style {
  readonly name: string;
  readonly schemas: readonly Schema[];
  readonly axisFrom: 'axis' | 'extrusion' | 'swept' | 'mesh';
  readonly draw: (writer: StepWriter, bar: Bar) => Drawn;
  /** Round tube instead of a rectangular one. */
  readonly isRound?: boolean;
  /** Only web-ifc can tell of its body. */
  readonly needsParser?: boolean;
}

export const ALL: readonly Schema[] = ['IFC2X3', 'IFC4', 'IFC4X3'];
export const NEWER: readonly Schema[] = ['IFC4', 'IFC4X3'];

/** A rectangular tube of 80 x 40 x 4 mm with square corners. */
export const DEPTH = 0.08;
export const WIDTH = 0.04;
export const WALL = 0.004;
export const RHS_AREA = DEPTH * WIDTH - (DEPTH - 2 * WALL) * (WIDTH - 2 * WALL);

/** A round tube of 60.3 x 5 mm. */
export const RADIUS = 0.03015;
export const BORE = 0.02515;
export const CHS_AREA = Math.PI * (RADIUS ** 2 - BORE ** 2);

export const O: Vec3 = [0, 0, 0];
export const X: Vec3 = [1, 0, 0];
export const Y: Vec3 = [0, 1, 0];
export const Z: Vec3 = [0, 0, 1];

export const tube = (w: StepWriter, position = '$'): string =>
  w.add(`IFCRECTANGLEHOLLOWPROFILEDEF(.AREA.,'RHS',${position},${[WIDTH, DEPTH, WALL].map((l) => w.length(l))},$,$)`);

export const extruded = (
  w: StepWriter,
  depth: number,
  options: { at?: Vec3; profile?: string; down?: boolean } = {},
): string =>
  w.add(
    `IFCEXTRUDEDAREASOLID(${options.profile ?? tube(w)},${w.axes(options.at ?? O, Z, X)},` +
      `${w.direction(options.down === true ? [0, 0, -1] : Z)},${w.length(depth)})`,
  );

/** A placement whose z runs along the bar from its start. */
export const upright = (w: StepWriter, bar: Bar, from = bar.from): string =>
  w.add(`IFCLOCALPLACEMENT($,${w.axes(from, bar.along, bar.x)})`);

/** A placement whose x runs along the bar. */
export const lying = (w: StepWriter, bar: Bar): string =>
  w.add(`IFCLOCALPLACEMENT($,${w.axes(bar.from, bar.y, bar.along)})`);

export const local = (w: StepWriter, bar: Bar, ...body: string[]): Drawn => ({ body, placement: upright(w, bar) });

export const withAxis = (w: StepWriter, bar: Bar, ...axis: string[]): Drawn => ({
  ...local(w, bar, extruded(w, bar.length)),
  axis,
});

export const corners = (width: number, depth: number): [number, number][] => [
  [-width / 2, -depth / 2],
  [width / 2, -depth / 2],
  [width / 2, depth / 2],
  [-width / 2, depth / 2],
];

export const plane = (w: StepWriter, at: Vec3, normal: Vec3): string =>
  w.add(`IFCPLANE(${w.axes(at, normal, Math.abs(normal[0]) > 0.9 ? Y : X)})`);

export const minus = (w: StepWriter, first: string, second: string): string =>
  w.add(`IFCBOOLEANRESULT(.DIFFERENCE.,${first},${second})`);

/** Longer by this at both ends than the bar, so that something is there to cut off. */
const SPARE = 0.25;

export const overlong = (w: StepWriter, bar: Bar): string =>
  extruded(w, bar.length + 2 * SPARE, { at: [0, 0, -SPARE] });

export const square = (w: StepWriter, size: number): string =>
  w.add(`IFCRECTANGLEPROFILEDEF(.AREA.,$,$,${w.length(size)},${w.length(size)})`);

export const mappedItem = (w: StepWriter, item: string, operator: string): string => {
  const context = w.add("IFCGEOMETRICREPRESENTATIONCONTEXT($,'Model',3,1.E-5,$,$)");
  const shape = w.add(`IFCSHAPEREPRESENTATION(${context},'Body','',(${item}))`);
  const map = w.add(`IFCREPRESENTATIONMAP(${w.axes(O, Z, X)},${shape})`);
  return w.add(`IFCMAPPEDITEM(${map},${operator})`);
};
