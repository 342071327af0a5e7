import { CAUTION } from '../../src/domain/caution.ts';
import { type Result, type ResultMember, resultSchema } from '../../src/domain/result.ts';

/** A member along x at height `z`; what is not given is as plain as can be. */
export function someMember(globalId: string, given: Partial<ResultMember> = {}): ResultMember {
  return {
    id: `m-${globalId}`,
    globalId,
    part: 0,
    name: 'Chord',
    tag: null,
    class: 'IfcBeam',
    predefinedType: null,
    type: null,
    assembly: null,
    storey: null,
    place: null,
    axisFrom: 'extrusion',
    axis: [
      [0, 0, 0],
      [6, 0, 0],
    ],
    zAxis: [0, 0, 1],
    shift: 0.012,
    turn: 0.001,
    section: {
      name: 'CHS 88.9x4',
      shape: 'CHS',
      area: 0.001067,
      inertiaY: 9.63e-7,
      inertiaZ: 9.63e-7,
      inertiaYZ: 0,
      inertiaMajor: 9.63e-7,
      inertiaMinor: 9.63e-7,
      torsion: 1.93e-6,
      warping: 0,
      from: 'profile',
    },
    material: {
      name: 'S355',
      elasticModulus: 2.1e11,
      density: 7850,
      expansion: 1.2e-5,
      yieldStrength: 3.55e8,
      ultimateStrength: 4.9e8,
      from: 'name',
    },
    ...given,
  };
}

/**
 * A result for the elements with these GlobalIds, one member each: every second one is split into two bars, so that
 * lists are needed; forces, a refused case, findings and combinations are made up. `withCombinations: false` leaves the
 * envelope to the cases.
 */
export function someResult(globalIds: readonly string[], { withCombinations = true, withCases = true } = {}): Result {
  const nodes: Result['nodes'] = [];
  const bars: Result['bars'] = [];
  const members = globalIds.map((globalId, k) => {
    const pieces = k % 2 === 0 ? 2 : 1;
    const first = nodes.length;
    for (let piece = 0; piece <= pieces; piece++) {
      nodes.push({
        id: `n${nodes.length + 1}`,
        at: [(6 * piece) / pieces, k, 0],
        members: [globalId],
        fixed: piece === 0 ? 'xyz' : '',
        place: 'C/4, +6.20',
        carriedBy: null,
      });
    }
    for (let piece = 0; piece < pieces; piece++) {
      bars.push({
        id: `b${bars.length + 1}`,
        name: `C${k + 1}.${piece + 1}`,
        member: globalId,
        from: `n${first + piece + 1}`,
        to: `n${first + piece + 2}`,
        length: 6 / pieces,
      });
    }
    return someMember(globalId, {
      id: `m${k + 1}`,
      axis: [
        [0, k, 0],
        [6, k, 0],
      ],
    });
  });
  const force = (k: number, factor: number) => Math.round(1e5 * Math.sin(1 + 2 * k) * factor) / 10;
  const run = (name: string, factor: number) => ({
    name,
    axialForce: bars.map((_, k) => force(k, factor)),
    displacement: nodes.map((_, k): [number, number, number] => [0, 0, 0 - 0.001 * k]),
    reactions: nodes
      .filter((node) => node.fixed !== '')
      .map((node): Result['cases'][number]['reactions'][number] => ({ node: node.id, force: [100, 0, 1000 * factor] })),
  });
  const cases: Result['cases'] = withCases
    ? [
        { ...run('dead', 1), nature: 'permanent', loads: [], loadSum: [0, 0, -1000], residual: 1e-13 },
        { ...run('wind ünder', -1.5), nature: 'wind', loads: [], loadSum: [10, 0, 1500], residual: 2e-14 },
      ]
    : [];
  const combinations: Result['combinations'] =
    withCombinations && withCases
      ? [
          { ...run('1.35 dead', 1.35), limit: 'strength', factors: { dead: 1.35 } },
          { ...run('dead + wind', -0.5), limit: 'strength', factors: { dead: 1, 'wind ünder': 1 } },
        ]
      : [];
  const runs = combinations.length > 0 ? combinations : cases;
  const envelope: Result['envelope'] = bars.map((bar, k) => {
    const extremes = runs.map(({ name, axialForce }) => ({ force: axialForce[k] ?? 0, from: name }));
    const most = extremes.filter((one) => one.force > 0).sort((a, b) => b.force - a.force)[0] ?? null;
    const least = extremes.filter((one) => one.force < 0).sort((a, b) => a.force - b.force)[0] ?? null;
    return { bar: bar.id, tension: most, compression: least };
  });
  const named = globalIds.slice(0, 3);
  return resultSchema.parse({
    format: 'pinwright-result',
    version: 1,
    generator: { name: 'pinwright', version: '0.1.0' },
    caution: CAUTION,
    units: { length: 'm', force: 'N', stress: 'Pa' },
    model: { file: 'roof.ifc', sha256: '0'.repeat(64), schema: 'IFC4', lengthUnit: 'mm', source: 'physical' },
    members,
    nodes,
    bars,
    families: [],
    findings: [
      ...named.map((globalId, k) => ({
        code: 'near-miss',
        severity: 'error',
        message: `The end of "Chord ${k}" stops ${32 + k} mm short of “Post” — it should meet it.`,
        members: [globalId],
        nodes: [],
        at: [1, 2, 3],
        place: 'C/4, +6.20',
        gap: 0.032 + k / 1000,
        advice: `Carry the end on.\nThen export again; ${'a long sentence '.repeat(30)}`,
      })),
      ...named.slice(0, 1).map((globalId) => ({
        code: 'no-material',
        severity: 'warning',
        message: 'No material is given; steel is assumed.',
        members: [globalId],
        nodes: [],
        at: null,
        place: null,
        gap: null,
        advice: 'Give the element a material.',
      })),
    ],
    stability: {
      nodes: nodes.length,
      bars: bars.length,
      restraints: 3 * members.length,
      springs: 0,
      rank: bars.length,
      mechanisms: 0,
      selfStressStates: 0,
      freeBody: false,
      gap: 1e9,
      setAside: [],
      modes: [],
    },
    cases,
    combinations,
    envelope,
    checks: [],
    joining: { reach: { set: [], bySections: [0.13, 0.48] }, offset: { set: [], bySections: [0.02, 0.12] } },
    eccentricities: [],
    bending: [],
  });
}
