import type { Section } from '../../domain/member.ts';
import { dot, norm, scale, type Vec3 } from '../../domain/vector.ts';
import { asString } from '../../step/values.ts';
import type { Remark } from '../findings-log.ts';
import { NotRead, noSection } from '../not-read.ts';
import type { Reading } from '../reading.ts';
import { across, firstAcross } from '../transform.ts';
import { calledOtherwise } from './called-otherwise.ts';
import { chs, circle } from './closed-shapes.ts';
import { sectionNamedIn } from './designations/section-from-designation.ts';
import { ImpossibleProfile, namedInstead } from './impossible-profile.ts';
import { knownByName } from './known-outline.ts';
import { makingRemark } from './making-remark.ts';
import { mapOutline, mapPoint, type PlaneMap, type Point2, SAME_PLANE } from './outline.ts';
import { type Profile, readProfile } from './profile.ts';
import { centroidOf, type ProfileShape, sectionOf } from './profile-shape.ts';
import { disagreement, readStatedSections, type StatedSection, sectionOfNumbers } from './stated-sections.ts';

/** A section as it stands across a member. */
export interface SeenSection {
  readonly section: Section;
  /** Unit direction of the section's z axis, across the member. */
  readonly zAxis: Vec3;
}

/** A profile that is read, with the sections that it has shown. */
export interface Known {
  readonly profile: Profile;
  /** In the plane that is swept, metres. */
  readonly centroid: Point2;
  /** What the file states otherwise than it draws. */
  readonly contradictions: readonly Remark[];
  readonly views: Map<string, Section>;
  /** The view that was asked for last, in millionths: most members show what the one before them did. */
  readonly last: { a: number; b: number; c: number; section: Section | null };
}

/** The profiles of a file and their sections, each read and integrated once. */
export class SectionBook {
  private readonly reading: Reading;
  private readonly profiles = new Map<number, Known | NotRead>();
  private readonly disks = new Map<string, number>();
  private readonly withoutOutline = new Map<number, Section | null>();
  private stated: ReadonlyMap<number, StatedSection> | null = null;

  constructor(reading: Reading) {
    this.reading = reading;
  }

  /** @throws NotRead (no-section), the same one whenever the profile is asked for. */
  profile(id: number): Profile {
    const found = this.knownOrRefusal(id);
    if (found instanceof NotRead) throw found;
    return found.profile;
  }

  /** Why the profile gives no section, not even by its name or its stated numbers where it is impossible; null where it does. */
  refusalOf(id: number): NotRead | null {
    const found = this.knownOrRefusal(id);
    if (!(found instanceof NotRead)) return null;
    return found instanceof ImpossibleProfile && this.sectionWithoutOutline(id) !== null ? null : found;
  }

  /** A profile that was read before without a word to say of it; null of any other. */
  plainlyKnown(id: number): Known | null {
    const found = this.profiles.get(id);
    return found === undefined || found instanceof NotRead || found.contradictions.length > 0 ? null : found;
  }

  private knownOrRefusal(id: number): Known | NotRead {
    return this.profiles.get(id) ?? this.keep(id, () => readProfile(this.reading, id));
  }

  private keep(id: number, read: () => Profile): Known | NotRead {
    let found: Known | NotRead;
    try {
      found = this.withWhatIsKnown(id, read());
    } catch (problem) {
      if (!(problem instanceof NotRead)) throw problem;
      found = problem;
    }
    this.profiles.set(id, found);
    return found;
  }

  /** What an outline alone does not tell, from the profile's name and from the numbers that the file states of it. */
  private withWhatIsKnown(id: number, drawn: Profile): Known {
    let shape = knownByName(drawn.shape);
    const stated = this.statedOf(id);
    const contradictions = [
      calledOtherwise(shape, shape.name),
      stated === null ? null : disagreement(sectionOf(shape), stated),
    ].filter((remark) => remark !== null);
    if (stated !== null) {
      const warping = shape.shape === 'other' && shape.warping === 0 ? (stated.warping ?? 0) : shape.warping;
      shape = { ...shape, torsion: shape.torsion ?? stated.torsion ?? null, warping };
    }
    const centroid = mapPoint(drawn.map, centroidOf(shape));
    const last = { a: Number.NaN, b: Number.NaN, c: Number.NaN, section: null };
    return { profile: { ...drawn, shape }, centroid, contradictions, views: new Map(), last };
  }

  private statedOf(id: number): StatedSection | null {
    this.stated ??= readStatedSections(this.reading);
    return this.stated.get(id) ?? null;
  }

  /** Of a profile that has no outline: by the numbers stated of it, else by the designation that is its name. */
  private sectionWithoutOutline(id: number): Section | null {
    let section = this.withoutOutline.get(id);
    if (section === undefined) {
      const name = asString(this.reading.file.args(id)[1])?.trim() ?? '';
      const called = sectionNamedIn(name);
      const stated = this.statedOf(id);
      section = (stated === null ? null : sectionOfNumbers(name === '' ? 'Unnamed profile' : name, stated)) ?? called;
      this.withoutOutline.set(id, section);
    }
    return section;
  }

  /** The centroid in the plane that is swept, metres; its origin where the profile cannot be read. */
  centroidOrOrigin(id: number): Point2 {
    const found = this.knownOrRefusal(id);
    return found instanceof NotRead ? [0, 0] : found.centroid;
  }

  /** A profile that no instance of the file defines: a round bar, or a tube where there is an inner radius. */
  disk(radius: number, inner: number | null): number {
    const key = `${radius} ${inner}`;
    let id = this.disks.get(key);
    if (id === undefined) {
      id = -1 - this.disks.size;
      this.disks.set(key, id);
      this.keep(id, () => {
        const shape = inner === null || inner === 0 ? circle(null, radius) : chs(null, radius, radius - inner);
        return { id: id as number, shape, map: SAME_PLANE };
      });
    }
    return id;
  }

  /**
   * The section of profile `id` across a member that runs along the unit vector `along`, where `x` and `y` are what the
   * swept plane's axes have become in the world: the outline is seen along the member, so that an oblique extrusion or a
   * stretched copy gives its true section.
   */
  seenAlong(id: number, along: Vec3, x: Vec3, y: Vec3): SeenSection {
    const known = this.knownOrRefusal(id);
    if (known instanceof NotRead) {
      const section = this.sectionWithoutOutline(id);
      if (section === null) throw known;
      const making = makingRemark(section);
      if (making !== null) this.reading.note(making);
      if (known instanceof ImpossibleProfile) this.reading.note(namedInstead(known, section.name));
      return { section, zAxis: firstAcross(along, across(y, along)) };
    }
    for (const remark of known.contradictions) this.reading.note(remark);
    const { map } = known.profile;
    const sideways = seenOnPlane(x, y, map.x, along);
    const upwards = seenOnPlane(x, y, map.y, along);
    const size = norm(upwards);
    if (!(size > 0 && size < Number.POSITIVE_INFINITY && norm(sideways) > 0)) {
      throw noSection('its profile lies along its length');
    }
    const zAxis = scale(upwards, 1 / size);
    // Across the member to the right, cross(zAxis, along), of what was the profile's x.
    const right =
      sideways[0] * (zAxis[1] * along[2] - zAxis[2] * along[1]) +
      sideways[1] * (zAxis[2] * along[0] - zAxis[0] * along[2]) +
      sideways[2] * (zAxis[0] * along[1] - zAxis[1] * along[0]);
    return { section: view(known, right, dot(sideways, zAxis), size), zAxis };
  }
}

/** What the direction `d` of the profile's own plane, swept along `x` and `y`, shows across the unit vector `along`. */
function seenOnPlane(x: Vec3, y: Vec3, d: Point2, along: Vec3): Vec3 {
  const a = x[0] * d[0] + y[0] * d[1];
  const b = x[1] * d[0] + y[1] * d[1];
  const c = x[2] * d[0] + y[2] * d[1];
  const lean = -(a * along[0] + b * along[1] + c * along[2]);
  return [a + lean * along[0], b + lean * along[1], c + lean * along[2]];
}

/** The section that a profile shows whose x has become (`right`, `up`) and whose y is seen `size` times as long. */
export function view({ profile, views, last }: Known, right: number, up: number, size: number): Section {
  const a = Math.round(right * 1e6);
  const b = Math.round(up * 1e6);
  const c = Math.round(size * 1e6);
  if (last.section !== null && a === last.a && b === last.b && c === last.c) return last.section;
  const key = `${a} ${b} ${c}`;
  let section = views.get(key);
  if (section === undefined) {
    section = sectionOf(viewedShape(profile.shape, { x: [right, up], y: [0, size], origin: [0, 0] }));
    views.set(key, section);
  }
  Object.assign(last, { a, b, c, section });
  return section;
}

/** Directions in files are rounded to five or six digits; a view nearer than this to a true one is taken as one. */
const TRUE_VIEW = 1e-5;

function viewedShape(shape: ProfileShape, view: PlaneMap): ProfileShape {
  const near = (a: number, b: number) => Math.abs(a - b) < TRUE_VIEW * Math.abs(b);
  const size = view.y[1];
  const isSimilar = near(Math.abs(view.x[0]), size) && Math.abs(view.x[1]) < TRUE_VIEW * size;
  if (isSimilar && near(size, 1)) {
    return view.x[0] > 0
      ? shape
      : { ...shape, outline: mapOutline(mirror, shape.outline), ...shearCentre(mirror, shape) };
  }
  const outline = mapOutline(view, shape.outline);
  if (isSimilar) {
    return {
      ...shape,
      ...shearCentre(view, shape),
      name: scaledName(shape, size, size),
      outline,
      torsion: shape.torsion === null ? null : shape.torsion * size ** 4,
      warping: shape.warping * size ** 6,
      ...(shape.thickness === undefined ? {} : { thickness: shape.thickness * size }),
    };
  }
  // A distorted I is still an I, but no closed form holds for it.
  const name = scaledName(shape, view.x[0], size);
  return { name, shape: shape.shape, outline, torsion: null, warping: 0 };
}

const shearCentre = (view: PlaneMap, { shearCentre: centre }: ProfileShape) =>
  centre === undefined ? {} : { shearCentre: mapPoint(view, centre) };

const mirror: PlaneMap = { x: [-1, 0], y: [0, 1], origin: [0, 0] };

const scaledName = (shape: ProfileShape, x: number, y: number): string =>
  `${shape.name} (seen at ${Math.abs(x).toFixed(3)} x ${y.toFixed(3)})`;
