/** Which code combines the cases, with its method and the choices that are left to nations (CONTRACT "The brief"). */
export type CodeRule = En1990Rule | Asce7Rule;

export const LIMITS = [
  'strength',
  'equilibrium',
  'accidental',
  'characteristic',
  'frequent',
  'quasi-permanent',
] as const;

export type Limit = (typeof LIMITS)[number];

/** Use of an area, EN 1990 Table A1.1. */
export const CATEGORIES = ['A', 'B', 'C', 'D', 'E', 'F', 'G', 'H'] as const;

export type Category = (typeof CATEGORIES)[number];

/** Factors for the combination, frequent and quasi-permanent value of a variable action. */
export type Psi = readonly [psi0: number, psi1: number, psi2: number];

/** What psi is given for: a category of imposed loads, or another nature. */
export const PSI_KEYS = [...CATEGORIES, 'snow', 'wind', 'thermal'] as const;

export type PsiKey = (typeof PSI_KEYS)[number];

/** Partial factors; where one is absent the recommended value holds. */
export interface Gammas {
  readonly permanent?: number;
  readonly favourable?: number;
  readonly variable?: number;
  readonly settlement?: number;
  /** Reduces unfavourable permanent actions in 6.10b. */
  readonly xi?: number;
  readonly equilibrium?: { readonly permanent?: number; readonly favourable?: number; readonly variable?: number };
}

export interface En1990Rule {
  readonly code: 'EN1990:2002+A1';
  readonly expression: '6.10' | '6.10a/b';
  /** Of the leading variable action beside an accidental one: 6.11b leaves the choice to the nation. */
  readonly besideAccident: 'psi1' | 'psi2';
  readonly sets: readonly Limit[];
  readonly gammas: Gammas;
  readonly psi: Readonly<Partial<Record<PsiKey, Psi>>>;
}

export interface Asce7Rule {
  readonly code: 'ASCE7-16' | 'ASCE7-22';
  readonly method: 'LRFD' | 'ASD';
  /** Factor of live load beside others in 2.3.1(3) and (4): 0.5 is allowed where the load is 100 psf at most and no garage or assembly. */
  readonly companionLive: number;
}
