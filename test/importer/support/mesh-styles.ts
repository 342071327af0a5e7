import { add, along, scale, type Vec3 } from '../../../src/domain/vector.ts';
import { ALL, DEPTH, extruded, local, minus, NEWER, type Style, tube, WALL, WIDTH, Z } from './drawn-parts.ts';
import { advancedTube, indexed, roundFaces, shellOf, triangles, tubeFaces } from './mesh-faces.ts';
import type { Bar, Drawn } from './space-truss.ts';
import type { StepWriter } from './step-writer.ts';

const inBarFrame = (bar: Bar, p: Vec3): Vec3 =>
  along(along(along(bar.from, bar.x, p[0]), bar.y, p[1]), bar.along, p[2]);

/** Bars drawn by their faces, or by what only a parser can turn into faces. */
export const MESH_STYLES: readonly Style[] = [
  {
    name: 'a faceted boundary representation',
    schemas: ALL,
    axisFrom: 'mesh',
    draw: (w, bar) => local(w, bar, w.add(`IFCFACETEDBREP(${shellOf(w, tubeFaces(bar.length), 'IFCCLOSEDSHELL')})`)),
  },
  {
    name: 'a shell surface model in world coordinates',
    schemas: ALL,
    axisFrom: 'mesh',
    draw: (w, bar) => {
      const faces = tubeFaces(bar.length).map((rings) => rings.map((ring) => ring.map((p) => inBarFrame(bar, p))));
      return { body: [w.add(`IFCSHELLBASEDSURFACEMODEL((${shellOf(w, faces, 'IFCOPENSHELL')}))`)] };
    },
  },
  {
    name: 'a triangulated face set',
    schemas: NEWER,
    axisFrom: 'mesh',
    draw: (w, bar) => {
      const { list, rings } = indexed(w, tubeFaces(bar.length));
      const corner = rings.flatMap(triangles).map((triangle) => `(${triangle.join(',')})`);
      return local(w, bar, w.add(`IFCTRIANGULATEDFACESET(${list},$,.T.,(${corner.join(',')}),$)`));
    },
  },
  {
    name: 'a polygonal face set',
    schemas: NEWER,
    axisFrom: 'mesh',
    draw: (w, bar) => {
      const { list, rings } = indexed(w, tubeFaces(bar.length));
      const faces = rings.map(([outer, inner]) =>
        inner === undefined
          ? w.add(`IFCINDEXEDPOLYGONALFACE((${outer!.join(',')}))`)
          : w.add(`IFCINDEXEDPOLYGONALFACEWITHVOIDS((${outer!.join(',')}),((${inner.join(',')})))`),
      );
      return local(w, bar, w.add(`IFCPOLYGONALFACESET(${list},.T.,(${faces.join(',')}),$)`));
    },
  },
  {
    name: 'a faceted round tube',
    schemas: ALL,
    axisFrom: 'mesh',
    isRound: true,
    draw: (w, bar) => local(w, bar, w.add(`IFCFACETEDBREP(${shellOf(w, roundFaces(bar.length), 'IFCCLOSEDSHELL')})`)),
  },
  {
    name: 'an advanced boundary representation with cylinders',
    schemas: NEWER,
    axisFrom: 'mesh',
    isRound: true,
    needsParser: true,
    draw: (w, bar) => local(w, bar, advancedTube(w, bar.length)),
  },
  {
    name: 'a block hollowed out along its length by a boolean cut',
    schemas: ALL,
    axisFrom: 'mesh',
    needsParser: true,
    draw: (w, bar) => {
      const solid = (width: number, depth: number, at: number, length: number) =>
        extruded(w, length, {
          at: [0, 0, at],
          profile: w.add(`IFCRECTANGLEPROFILEDEF(.AREA.,$,$,${w.length(width)},${w.length(depth)})`),
        });
      const bore = solid(WIDTH - 2 * WALL, DEPTH - 2 * WALL, -0.1, bar.length + 0.2);
      return local(w, bar, minus(w, solid(WIDTH, DEPTH, 0, bar.length), bore));
    },
  },
];

/** All bars in one element, each a solid of its own in world coordinates. */
export const manySolids = (w: StepWriter, bars: readonly Bar[]): Drawn => ({
  body: bars.map((bar) =>
    w.add(
      `IFCEXTRUDEDAREASOLID(${tube(w)},${w.axes(bar.from, bar.along, bar.x)},${w.direction(Z)},${w.length(bar.length)})`,
    ),
  ),
});

/** All bars in one mesh, which do not touch: each ends this far before its nodes. */
export const oneMesh = (w: StepWriter, bars: readonly Bar[], short: number): Drawn => {
  const faces = bars.flatMap((bar) => {
    const cut = { ...bar, from: add(bar.from, scale(bar.along, short)) };
    return tubeFaces(bar.length - 2 * short).map((rings) => rings.map((ring) => ring.map((p) => inBarFrame(cut, p))));
  });
  return { body: [w.add(`IFCFACETEDBREP(${shellOf(w, faces, 'IFCCLOSEDSHELL')})`)] };
};
