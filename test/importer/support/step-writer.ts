import type { Vec3 } from '../../../src/domain/vector.ts';

/** Writes instances one after another and hands out their numbers. */
export class StepWriter {
  private readonly lines: string[] = [];
  private readonly known = new Map<string, string>();
  /** Units of the file in one metre. */
  readonly perMetre: number;

  constructor(perMetre = 1000) {
    this.perMetre = perMetre;
  }

  /** `text` is the keyword with its parameters; an instance that is there already is used again. */
  add(text: string): string {
    const known = this.known.get(text);
    if (known !== undefined) return known;
    const id = `#${this.lines.length + 1}`;
    this.lines.push(`${id}=${text};`);
    this.known.set(text, id);
    return id;
  }

  /** Lengths are given in metres throughout. */
  length(metres: number): string {
    return real(metres * this.perMetre);
  }

  lengths(metres: readonly number[]): string {
    return `(${metres.map((m) => this.length(m)).join(',')})`;
  }

  point(p: readonly number[]): string {
    return this.add(`IFCCARTESIANPOINT(${this.lengths(p)})`);
  }

  direction(d: readonly number[]): string {
    return this.add(`IFCDIRECTION((${d.map(real).join(',')}))`);
  }

  axes(origin: Vec3, z: Vec3, x: Vec3): string {
    return this.add(`IFCAXIS2PLACEMENT3D(${this.point(origin)},${this.direction(z)},${this.direction(x)})`);
  }

  polyline(points: readonly (readonly number[])[]): string {
    return this.add(`IFCPOLYLINE((${points.map((p) => this.point(p)).join(',')}))`);
  }

  text(): string {
    return this.lines.join('\n');
  }
}

/** A real as STEP writes it: with a point, and a capital E. */
export function real(n: number): string {
  const text = String(Math.abs(n) < 1e-300 ? 0 : n);
  if (!/[.e]/.test(text)) return `${text}.`;
  const [mantissa, exponent] = text.split('e') as [string, string?];
  const pointed = mantissa.includes('.') ? mantissa : `${mantissa}.`;
  return exponent === undefined ? pointed : `${pointed}E${exponent}`;
}
