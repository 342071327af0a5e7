import type { Vec3 } from '../../../src/domain/vector.ts';
import {
  ALL,
  BORE,
  corners,
  DEPTH,
  extruded,
  local,
  lying,
  mappedItem,
  minus,
  NEWER,
  O,
  overlong,
  plane,
  RADIUS,
  type Style,
  square,
  tube,
  WALL,
  WIDTH,
  withAxis,
  X,
  Y,
  Z,
} from './drawn-parts.ts';
import { real } from './step-writer.ts';

/** Bars drawn by lines and by swept profiles, whole or cut. */
export const SWEPT_STYLES: readonly Style[] = [
  {
    name: 'an extrusion in its own placement',
    schemas: ALL,
    axisFrom: 'extrusion',
    draw: (w, bar) => local(w, bar, extruded(w, bar.length)),
  },
  {
    name: 'an extrusion placed by its own position, drawn from the far end down',
    schemas: ALL,
    axisFrom: 'extrusion',
    draw: (w, bar) => ({
      body: [
        w.add(
          `IFCEXTRUDEDAREASOLID(${tube(w)},${w.axes(bar.to, bar.along, bar.x)},${w.direction([0, 0, -1])},${w.length(bar.length)})`,
        ),
      ],
    }),
  },
  {
    name: 'an extrusion of a profile with a position of its own, moved back',
    schemas: ALL,
    axisFrom: 'extrusion',
    draw: (w, bar) => {
      const position = w.add(`IFCAXIS2PLACEMENT2D(${w.point([0.03, -0.07])},${w.direction([0, 1])})`);
      return local(w, bar, extruded(w, bar.length, { at: [-0.03, 0.07, 0], profile: tube(w, position) }));
    },
  },
  {
    name: 'an extrusion of an outline with a void',
    schemas: ALL,
    axisFrom: 'extrusion',
    draw: (w, bar) => {
      const ring = (width: number, depth: number) => w.polyline([...corners(width, depth), corners(width, depth)[0]!]);
      const profile = w.add(
        `IFCARBITRARYPROFILEDEFWITHVOIDS(.AREA.,$,${ring(WIDTH, DEPTH)},(${ring(WIDTH - 2 * WALL, DEPTH - 2 * WALL)}))`,
      );
      return local(w, bar, extruded(w, bar.length, { profile }));
    },
  },
  {
    name: 'a drawn Axis: a polyline',
    schemas: ALL,
    axisFrom: 'axis',
    draw: (w, bar) => withAxis(w, bar, w.polyline([O, [0, 0, bar.length]])),
  },
  {
    name: 'a drawn Axis: a trimmed line',
    schemas: ALL,
    axisFrom: 'axis',
    draw: (w, bar) => {
      const line = w.add(`IFCLINE(${w.point(O)},${w.add(`IFCVECTOR(${w.direction(Z)},${w.length(0.5)})`)})`);
      const trim = `(IFCPARAMETERVALUE(0.)),(IFCPARAMETERVALUE(${real(bar.length / 0.5)}))`;
      return withAxis(w, bar, w.add(`IFCTRIMMEDCURVE(${line},${trim},.T.,.PARAMETER.)`));
    },
  },
  {
    name: 'a drawn Axis: a composite curve, one segment against its sense',
    schemas: ALL,
    axisFrom: 'axis',
    draw: (w, bar) => {
      const middle: Vec3 = [0, 0, bar.length / 3];
      const segment = (sense: string, curve: string) =>
        w.add(`IFCCOMPOSITECURVESEGMENT(.CONTINUOUS.,${sense},${curve})`);
      const parts = [segment('.T.', w.polyline([O, middle])), segment('.F.', w.polyline([[0, 0, bar.length], middle]))];
      return withAxis(w, bar, w.add(`IFCCOMPOSITECURVE((${parts.join(',')}),.F.)`));
    },
  },
  {
    name: 'a drawn Axis in two dimensions, within a mapped item',
    schemas: ALL,
    axisFrom: 'axis',
    draw: (w, bar) => {
      const operator = w.add(`IFCCARTESIANTRANSFORMATIONOPERATOR3D($,$,${w.point(O)},1.,$)`);
      const line = mappedItem(
        w,
        w.polyline([
          [0, 0],
          [bar.length, 0],
        ]),
        operator,
      );
      const across = w.add(
        `IFCEXTRUDEDAREASOLID(${tube(w)},${w.axes(O, X, Y)},${w.direction(Z)},${w.length(bar.length)})`,
      );
      return { axis: [line], body: [across], placement: lying(w, bar) };
    },
  },
  {
    name: 'a drawn Axis: an indexed curve',
    schemas: NEWER,
    axisFrom: 'axis',
    draw: (w, bar) => {
      const list = w.add(`IFCCARTESIANPOINTLIST3D((${w.lengths(O)},${w.lengths([0, 0, bar.length])}))`);
      const tail = w.add(`IFCINDEXEDPOLYCURVE(${list},(IFCLINEINDEX((1,2))),.F.)`);
      return withAxis(w, bar, tail);
    },
  },
  {
    name: 'a swept disk',
    schemas: ALL,
    axisFrom: 'swept',
    isRound: true,
    draw: (w, bar) => ({
      body: [w.add(`IFCSWEPTDISKSOLID(${w.polyline([bar.from, bar.to])},${w.length(RADIUS)},${w.length(BORE)},0.,1.)`)],
    }),
  },
  {
    name: 'a mapped item that stretches one metre to the length',
    schemas: ALL,
    axisFrom: 'extrusion',
    draw: (w, bar) => {
      const operator = w.add(
        `IFCCARTESIANTRANSFORMATIONOPERATOR3DNONUNIFORM(${w.direction(X)},${w.direction(Y)},${w.point(O)},1.,${w.direction(Z)},1.,${real(bar.length)})`,
      );
      return local(w, bar, mappedItem(w, extruded(w, 1), operator));
    },
  },
  {
    name: 'a mapped item within a mapped item, the outer one a mirror image',
    schemas: ALL,
    axisFrom: 'extrusion',
    draw: (w, bar) => {
      const half = w.add(
        `IFCCARTESIANTRANSFORMATIONOPERATOR3D(${w.direction(X)},${w.direction(Y)},${w.point([0.1, 0, 0])},1.,${w.direction(Z)})`,
      );
      const mirror = w.add(
        `IFCCARTESIANTRANSFORMATIONOPERATOR3D(${w.direction([-1, 0, 0])},${w.direction(Y)},${w.point(O)},1.,${w.direction(Z)})`,
      );
      return local(w, bar, mappedItem(w, mappedItem(w, extruded(w, bar.length, { at: [-0.1, 0, 0] }), half), mirror));
    },
  },
  {
    name: 'an extrusion clipped by half-spaces',
    schemas: ALL,
    axisFrom: 'extrusion',
    draw: (w, bar) => {
      const half = (at: number, agreement: string) =>
        w.add(`IFCHALFSPACESOLID(${plane(w, [0, 0, at], [0, 0.6, 0.8])},${agreement})`);
      const clip = (first: string, second: string) =>
        w.add(`IFCBOOLEANCLIPPINGRESULT(.DIFFERENCE.,${first},${second})`);
      return local(w, bar, clip(clip(overlong(w, bar), half(0, '.T.')), half(bar.length, '.F.')));
    },
  },
  {
    name: 'an extrusion clipped by a bounded half-space and by a block',
    schemas: ALL,
    axisFrom: 'extrusion',
    draw: (w, bar) => {
      const boundary = w.polyline([...corners(1, 1), corners(1, 1)[0]!]);
      const bounded = w.add(`IFCPOLYGONALBOUNDEDHALFSPACE(${plane(w, O, Z)},.T.,${w.axes(O, Z, X)},${boundary})`);
      const block = w.add(
        `IFCBLOCK(${w.axes([-0.5, -0.5, bar.length], Z, X)},${[1, 1, 1].map((l) => w.length(l)).join(',')})`,
      );
      return local(w, bar, minus(w, minus(w, overlong(w, bar), bounded), block));
    },
  },
  {
    name: 'the intersection of an extrusion and a box, in a CSG solid',
    schemas: ALL,
    axisFrom: 'extrusion',
    draw: (w, bar) => {
      const box = extruded(w, bar.length, { profile: square(w, 0.5) });
      const both = w.add(`IFCBOOLEANRESULT(.INTERSECTION.,${overlong(w, bar)},${box})`);
      return local(w, bar, w.add(`IFCCSGSOLID(${both})`));
    },
  },
  {
    name: 'the union of two halves',
    schemas: ALL,
    axisFrom: 'extrusion',
    draw: (w, bar) => {
      const half = extruded(w, bar.length / 2);
      const other = extruded(w, bar.length / 2, { at: [0, 0, bar.length / 2] });
      return local(w, bar, w.add(`IFCBOOLEANRESULT(.UNION.,${half},${other})`));
    },
  },
  {
    name: 'a profile swept along a curve on a plane',
    schemas: ALL,
    axisFrom: 'swept',
    draw: (w, bar) => {
      const curve = w.polyline([bar.from, bar.to]);
      const surface = w.add(`IFCPLANE(${w.axes(bar.from, bar.x, bar.along)})`);
      return {
        body: [w.add(`IFCSURFACECURVESWEPTAREASOLID(${tube(w)},${w.axes(O, Z, X)},${curve},0.,1.,${surface})`)],
      };
    },
  },
  {
    name: 'a profile swept with a fixed reference',
    schemas: NEWER,
    axisFrom: 'swept',
    draw: (w, bar) => {
      const curve = w.polyline([bar.from, bar.to]);
      return { body: [w.add(`IFCFIXEDREFERENCESWEPTAREASOLID(${tube(w)},$,${curve},$,$,${w.direction(bar.x)})`)] };
    },
  },
  {
    name: 'a sectioned solid',
    schemas: ['IFC4X3'],
    axisFrom: 'swept',
    draw: (w, bar) => {
      const curve = w.polyline([bar.from, bar.to]);
      const at = (d: number) => {
        const point = w.add(`IFCPOINTBYDISTANCEEXPRESSION(IFCLENGTHMEASURE(${w.length(d)}),$,$,$,${curve})`);
        return w.add(`IFCAXIS2PLACEMENTLINEAR(${point},$,$)`);
      };
      const profile = tube(w);
      return {
        body: [w.add(`IFCSECTIONEDSOLIDHORIZONTAL(${curve},(${profile},${profile}),(${at(0)},${at(bar.length)}))`)],
      };
    },
  },
];
