// A hall of any number of members for measuring growth: flat trusses with spliced chords that run through, webs cut back to
// their gussets, purlins on the panel points, crossed rods and sag rods.

const STEEL = { name: 'S355', elasticModulus: 2.1e11, density: 7850, expansion: 1.2e-5, yieldStrength: 3.55e8 };
const MATERIAL = { ...STEEL, ultimateStrength: 4.7e8, from: 'name' };
const SECTIONS = {
  chord: section(0.14, 'RHS'),
  web: section(0.08, 'RHS'),
  purlin: section(0.12, 'I'),
  rod: section(0.02, 'circle'),
};

function section(depth, shape) {
  const [area, inertia] = [0.02 * depth, 1e-6];
  const inertias = { inertiaY: inertia, inertiaZ: inertia, inertiaMajor: inertia, inertiaMinor: inertia };
  const rest = { inertiaYZ: 0, torsion: inertia, warping: 0, from: 'profile', depth, width: depth, thickness: 0.005 };
  return { name: `${shape} ${depth}`, shape, area, ...inertias, ...rest };
}

/** Exactly `count` members of a hall about as long as it is wide. */
export function growthHall(count) {
  const members = [];
  const panels = Math.max(4, 4 * Math.round(Math.sqrt(count / 5.5) / 4));
  for (let frame = 0; members.length < count; frame++) drawBay(members, frame, panels);
  members.length = count;
  return members;
}

const PANEL = 2;
const HEIGHT = 2;
const BAY = 6;
/** Of the purlins' axis above the chord's. */
const SEAT = 0.13;

function drawBay(members, frame, panels) {
  const [y, next] = [BAY * frame, BAY * (frame + 1)];
  const x = (i) => PANEL * i;
  const draw = (mark, from, to, gap, part) => members.push(member(`${mark}-${frame}`, from, to, gap, SECTIONS[part]));
  for (let i = 0; i < panels; i += 4) {
    for (const z of [0, HEIGHT]) draw(`C${z}.${i}`, [x(i), y, z], [x(i + 4), y, z], 0.005, 'chord');
    draw(`RB${i}a`, [x(i), y, HEIGHT], [x(i + 1), next, HEIGHT], 0.1, 'rod');
    draw(`RB${i}b`, [x(i + 1), y, HEIGHT], [x(i), next, HEIGHT], 0.1, 'rod');
    const [middle, level] = [y + BAY / 2, HEIGHT + SEAT];
    draw(`SR${i}`, [x(i + 1), middle, level], [x(i + 2), middle, level], 0.05, 'rod');
  }
  for (let i = 0; i <= panels; i++) {
    draw(`V${i}`, [x(i), y, 0], [x(i), y, HEIGHT], 0.1, 'web');
    draw(`P${i}`, [x(i), y, HEIGHT + SEAT], [x(i), next, HEIGHT + SEAT], 0.005, 'purlin');
    if (i < panels) draw(`D${i}`, [x(i), y, 0], [x(i + 1), y, HEIGHT], 0.15, 'web');
  }
}

function member(mark, from, to, gap, ofSection) {
  const line = to.map((c, k) => c - from[k]);
  const length = Math.hypot(...line);
  const u = line.map((c) => c / length);
  const at = (p, by) => p.map((c, k) => c + by * u[k]);
  const flat = Math.hypot(u[0], u[1]);
  const zAxis = flat < 1e-9 ? [1, 0, 0] : [(-u[2] * u[0]) / flat, (-u[2] * u[1]) / flat, flat];
  return {
    ...{ globalId: mark, part: 0, name: mark, tag: mark, class: 'IfcMember', predefinedType: null, type: null },
    ...{ assembly: null, partOf: null, storey: null, layer: null, place: null, axisFrom: 'extrusion' },
    ...{ axis: [at(from, gap), at(to, -gap)], zAxis, section: ofSection, material: MATERIAL },
  };
}
