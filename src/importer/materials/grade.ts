/** Strengths by nominal thickness: each holds up to its thickness, the first that is thick enough counts. */
export type Steps = readonly (readonly [upTo: number, strength: number])[];

/** A steel grade. Thicknesses in mm, strengths in MPa, as the standards print them. */
export interface Grade {
  readonly yields: Steps;
  readonly ultimates: Steps;
  /** Pa. */
  readonly elasticModulus: number;
}

/** One number's grades by what follows it: '' N M Q W, with H for hollow sections. */
export type GradeTable = Readonly<Record<string, Grade>>;

/** EN 1993-1-1:2005 3.2.6(1) and AISC 360 (29 000 ksi, rounded): Pa. */
const E_EUROPEAN = 210e9;
const E_AMERICAN = 200e9;

export const grade = (yields: Steps, ultimates: Steps): Grade => ({ yields, ultimates, elasticModulus: E_EUROPEAN });

export const americanGrade = (yields: Steps, ultimates: Steps): Grade => ({
  yields,
  ultimates,
  elasticModulus: E_AMERICAN,
});

export interface Strength {
  readonly yieldStrength: number | null;
  readonly ultimateStrength: number | null;
}

/**
 * Yield and tensile strength (Pa) of a grade in parts as thick as `thickness` (m); of the first step where it is not known.
 * Null where the product standard does not cover the thickness.
 */
export function strengthOf(grade: Grade, thickness: number | null): Strength {
  return { yieldStrength: at(grade.yields, thickness), ultimateStrength: at(grade.ultimates, thickness) };
}

const MPA = 1e6;

function at(steps: Steps, thickness: number | null): number | null {
  // A hair over a step is still the step: 16 mm of a file in inches.
  const found = steps.find(([upTo]) => (thickness ?? 0.01) * 1000 <= upTo + 0.01);
  return found === undefined ? null : found[1] * MPA;
}
