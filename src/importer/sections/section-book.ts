import type { Section } from '../../domain/member.ts';
import { cross, dot, norm, unit, type Vec3 } from '../../domain/vector.ts';
import { NotRead, noSection } from '../not-read.ts';
import type { Reading } from '../reading.ts';
import { across } from '../transform.ts';
import { chs, circle } from './closed-shapes.ts';
import { mapOutline, mapPoint, type PlaneMap, type Point2, SAME_PLANE } from './outline.ts';
import { type Profile, readProfile } from './profile.ts';
import { centroidOf, type ProfileShape, sectionOf } from './profile-shape.ts';

/** A section as it stands across a member. */
export interface SeenSection {
  readonly section: Section;
  /** Unit direction of the section's z axis, across the member. */
  readonly zAxis: Vec3;
}

/** The profiles of a file and their sections, each read and integrated once. */
export class SectionBook {
  private readonly reading: Reading;
  private readonly profiles = new Map<number, Profile | NotRead>();
  private readonly centroids = new Map<number, Point2>();
  private readonly sections = new Map<string, Section>();
  private readonly disks = new Map<string, number>();

  constructor(reading: Reading) {
    this.reading = reading;
  }

  /** @throws NotRead (no-section), the same one whenever the profile is asked for. */
  profile(id: number): Profile {
    const found = this.profiles.get(id) ?? this.keep(id, () => readProfile(this.reading, id));
    if (found instanceof NotRead) throw found;
    return found;
  }

  private keep(id: number, read: () => Profile): Profile | NotRead {
    let found: Profile | NotRead;
    try {
      found = read();
      this.centroids.set(id, mapPoint(found.map, centroidOf(found.shape)));
    } catch (problem) {
      if (!(problem instanceof NotRead)) throw problem;
      found = problem;
    }
    this.profiles.set(id, found);
    return found;
  }

  /** The centroid in the plane that is swept, metres; its origin where the profile cannot be read. */
  centroidOrOrigin(id: number): Point2 {
    try {
      this.profile(id);
    } catch (problem) {
      if (!(problem instanceof NotRead)) throw problem;
    }
    return this.centroids.get(id) ?? [0, 0];
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
    const { shape, map } = this.profile(id);
    const own = (d: Point2): Vec3 => [x[0] * d[0] + y[0] * d[1], x[1] * d[0] + y[1] * d[1], x[2] * d[0] + y[2] * d[1]];
    const sideways = across(own(map.x), along);
    const upwards = across(own(map.y), along);
    const zAxis = unit(upwards);
    if (zAxis === null || !(norm(sideways) > 0)) throw noSection('its profile lies along its length');
    const yAxis = cross(zAxis, along);
    const view: PlaneMap = {
      x: [dot(sideways, yAxis), dot(sideways, zAxis)],
      y: [0, norm(upwards)],
      origin: [0, 0],
    };
    return { section: this.view(id, shape, view), zAxis };
  }

  private view(id: number, shape: ProfileShape, view: PlaneMap): Section {
    const key = [id, ...view.x, ...view.y].map((n) => Math.round(n * 1e6)).join(' ');
    let section = this.sections.get(key);
    if (section === undefined) {
      section = sectionOf(viewedShape(shape, view));
      this.sections.set(key, section);
    }
    return section;
  }
}

/** Directions in files are rounded to five or six digits; a view nearer than this to a true one is taken as one. */
const TRUE_VIEW = 1e-5;

function viewedShape(shape: ProfileShape, view: PlaneMap): ProfileShape {
  const near = (a: number, b: number) => Math.abs(a - b) < TRUE_VIEW * Math.abs(b);
  const size = view.y[1];
  const isSimilar = near(Math.abs(view.x[0]), size) && Math.abs(view.x[1]) < TRUE_VIEW * size;
  if (isSimilar && near(size, 1)) {
    return view.x[0] > 0 ? shape : { ...shape, outline: mapOutline(mirror, shape.outline) };
  }
  const outline = mapOutline(view, shape.outline);
  if (isSimilar) {
    const torsion = shape.torsion === null ? null : shape.torsion * size ** 4;
    return { ...shape, name: scaledName(shape, size, size), outline, torsion, warping: shape.warping * size ** 6 };
  }
  // A distorted I is still an I, but no closed form holds for it.
  return { ...shape, name: scaledName(shape, view.x[0], size), outline, torsion: null, warping: 0 };
}

const mirror: PlaneMap = { x: [-1, 0], y: [0, 1], origin: [0, 0] };

const scaledName = (shape: ProfileShape, x: number, y: number): string =>
  `${shape.name} (seen at ${Math.abs(x).toFixed(3)} x ${y.toFixed(3)})`;
