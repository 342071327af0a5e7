import { anyNormal, distance, scale, subtract, type Vec3 } from '../../../domain/vector.ts';
import type { StepRef } from '../../../step/values.ts';
import { enumeration } from '../../../step/write.ts';
import type { NewFile } from '../new-file.ts';

/** Writes coloured solids about a point of the model, so that viewers which reckon in few digits draw them in place. */
export class Solids {
  readonly placement: StepRef;
  private readonly file: NewFile;
  private readonly origin: Vec3;
  private readonly up: StepRef;
  private readonly flat: StepRef;
  private readonly styles = new Map<string, StepRef>();
  private readonly profiles = new Map<string, StepRef>();

  constructor(file: NewFile, about: Vec3) {
    this.file = file;
    this.origin = about;
    const place = file.add('IFCAXIS2PLACEMENT3D', file.add('IFCCARTESIANPOINT', [...about]), null, null);
    this.placement = file.add('IFCLOCALPLACEMENT', null, place);
    this.up = file.add('IFCDIRECTION', [0, 0, 1]);
    this.flat = file.add('IFCAXIS2PLACEMENT2D', file.add('IFCCARTESIANPOINT', [0, 0]), null);
  }

  /** A round rod from end to end; null where it has no length. */
  rod(from: Vec3, to: Vec3, diameter: number): StepRef | null {
    const length = distance(from, to);
    if (!(length > 1e-6)) return null;
    const radius = Number((diameter / 2).toPrecision(2));
    const profile = this.profile(`rod ${radius}`, () => this.file.add('IFCCIRCLEPROFILEDEF', ...this.head(), radius));
    return this.extruded(profile, from, scale(subtract(to, from), 1 / length), length);
  }

  /** A cube about a point. */
  block(at: Vec3, size: number): StepRef {
    const profile = this.profile(`block ${size}`, () =>
      this.file.add('IFCRECTANGLEPROFILEDEF', ...this.head(), size, size),
    );
    return this.extruded(profile, [at[0], at[1], at[2] - size / 2], [0, 0, 1], size);
  }

  colour(solid: StepRef, hex: string): void {
    const { file } = this;
    let style = this.styles.get(hex);
    if (style === undefined) {
      const parts = [1, 3, 5].map((k) => Number.parseInt(hex.slice(k, k + 2), 16) / 255);
      const colour = file.add('IFCCOLOURRGB', null, ...parts);
      const none = Array<null>(6).fill(null);
      const rendering = file.add('IFCSURFACESTYLERENDERING', colour, 0, ...none, enumeration('NOTDEFINED'));
      const surface = file.add('IFCSURFACESTYLE', hex, enumeration('BOTH'), [rendering]);
      style = file.isIfc2x3 ? file.add('IFCPRESENTATIONSTYLEASSIGNMENT', [surface]) : surface;
      this.styles.set(hex, style);
    }
    file.add('IFCSTYLEDITEM', solid, [style], null);
  }

  private head() {
    return [enumeration('AREA'), null, this.flat] as const;
  }

  private profile(key: string, write: () => StepRef): StepRef {
    const found = this.profiles.get(key) ?? write();
    this.profiles.set(key, found);
    return found;
  }

  private extruded(profile: StepRef, from: Vec3, direction: Vec3, length: number): StepRef {
    const { file } = this;
    const point = file.add('IFCCARTESIANPOINT', [...subtract(from, this.origin)]);
    const axis = file.add('IFCDIRECTION', [...direction]);
    const across = file.add('IFCDIRECTION', [...anyNormal(direction)]);
    const place = file.add('IFCAXIS2PLACEMENT3D', point, axis, across);
    return file.add('IFCEXTRUDEDAREASOLID', profile, place, this.up, length);
  }
}
