import { parseBrief } from '../../../src/brief/parse-brief.ts';
import { cross, distance, subtract, unit, type Vec3 } from '../../../src/domain/vector.ts';
import { type Run, type RunOptions, runModel } from '../../../src/pipeline.ts';
import { stepText } from '../../importer/support/model-text.ts';
import { StepWriter } from '../../importer/support/step-writer.ts';

/** A member as a detailer draws it: a square hollow section, 5 mm thick, extruded between two points (m). */
export interface DrawnMember {
  readonly mark: string;
  readonly from: Vec3;
  readonly to: Vec3;
  /** m; 100 mm unless said. */
  readonly size?: number;
}

/** Writes small models of square tubes, and whatever else a test needs beside them. */
export class DrawnModel {
  readonly writer = new StepWriter();
  private readonly context: string;
  private readonly origin: string;

  constructor() {
    const w = this.writer;
    this.origin = w.axes([0, 0, 0], [0, 0, 1], [1, 0, 0]);
    this.context = w.add(`IFCGEOMETRICREPRESENTATIONCONTEXT($,'Model',3,1.E-5,${this.origin},$)`);
    const units = ['*,.LENGTHUNIT.,.MILLI.,.METRE.', '*,.PLANEANGLEUNIT.,$,.RADIAN.'];
    const assigned = w.add(`IFCUNITASSIGNMENT((${units.map((unit) => w.add(`IFCSIUNIT(${unit})`)).join(',')}))`);
    w.add(`IFCPROJECT('project',$,'P',$,$,$,$,(${this.context}),${assigned})`);
  }

  /** The instance's number; its GlobalId is its mark. */
  member({ mark, from, to, size = 0.1 }: DrawnMember): string {
    const profile = `IFCRECTANGLEHOLLOWPROFILEDEF(.AREA.,'SHS ${size * 1000}x5',$,${[size, size, 0.005].map((l) => this.writer.length(l))},$,$)`;
    return this.element('IFCMEMBER', mark, this.box(from, to, this.writer.add(profile)), `'${mark}',$`);
  }

  /** A plate with its middle at `at`, 10 mm thick across `normal`. */
  plate(mark: string, at: Vec3, size: number, normal: Vec3, keyword = 'IFCPLATE', more = '$,$'): string {
    const half = 0.005;
    const [from, to] = [-half, half].map((k): Vec3 => [0, 1, 2].map((i) => at[i] + k * normal[i]) as unknown as Vec3);
    const length = this.writer.length(size);
    const profile = this.writer.add(`IFCRECTANGLEPROFILEDEF(.AREA.,$,$,${length},${length})`);
    return this.element(keyword, mark, this.box(from, to, profile), more);
  }

  /** A member with the body that the writer holds, and with an Axis where there is one. */
  memberOf(mark: string, body: string, axis: string | null = null): string {
    return this.element('IFCMEMBER', mark, body, `'${mark}',$`, axis);
  }

  private element(keyword: string, mark: string, body: string, more: string, axis: string | null = null): string {
    const w = this.writer;
    const shapes = [w.add(`IFCSHAPEREPRESENTATION(${this.context},'Body','SweptSolid',(${body}))`)];
    if (axis !== null) shapes.unshift(w.add(`IFCSHAPEREPRESENTATION(${this.context},'Axis','Curve3D',(${axis}))`));
    const product = w.add(`IFCPRODUCTDEFINITIONSHAPE($,$,(${shapes.join(',')}))`);
    const placement = w.add(`IFCLOCALPLACEMENT($,${this.origin})`);
    return w.add(`${keyword}('${mark}',$,'${mark}',$,$,${placement},${product},${more})`);
  }

  private box(from: Vec3, to: Vec3, profile: string): string {
    const w = this.writer;
    const z = unit(subtract(to, from))!;
    const x = unit(cross(Math.abs(z[2]) > 0.9 ? [0, 1, 0] : [0, 0, 1], z))!;
    const up = w.direction([0, 0, 1]);
    return w.add(`IFCEXTRUDEDAREASOLID(${profile},${w.axes(from, z, x)},${up},${w.length(distance(from, to))})`);
  }

  run(brief: string, extent: RunOptions['extent'] = 'analyse'): Promise<Run> {
    const bytes = new TextEncoder().encode(stepText(this.writer.text()));
    return runModel(bytes, { extent, brief: parseBrief(`pinwright: 1\n${brief}`, 'brief') });
  }
}
