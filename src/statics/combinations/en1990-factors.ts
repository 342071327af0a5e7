import type { Category, Gammas, Psi, PsiKey } from '../../brief/code-rule.ts';

/**
 * Recommended factors of EN 1990:2002+A1:2005 for buildings, each with its clause (values from memory of the standard; a National
 * Annex may choose others, which the brief gives).
 */

/** Table A1.1. Snow by `snowPsi`. */
export const PSI: Readonly<Record<Category | 'wind' | 'thermal', Psi>> = {
  A: [0.7, 0.5, 0.3], // domestic, residential areas
  B: [0.7, 0.5, 0.3], // office areas
  C: [0.7, 0.7, 0.6], // congregation areas
  D: [0.7, 0.7, 0.6], // shopping areas
  E: [1.0, 0.9, 0.8], // storage areas
  F: [0.7, 0.7, 0.6], // traffic area, vehicles up to 30 kN
  G: [0.7, 0.5, 0.3], // traffic area, vehicles above 30 kN up to 160 kN
  H: [0, 0, 0], // roofs
  wind: [0.6, 0.2, 0], // EN 1991-1-4
  thermal: [0.6, 0.5, 0], // non-fire, EN 1991-1-5
};

/** Table A1.1, snow loads on buildings (EN 1991-1-3): Finland, Iceland, Norway, Sweden and above 1000 m; elsewhere. */
const SNOW_HIGH: Psi = [0.7, 0.5, 0.2];
const SNOW_LOW: Psi = [0.5, 0.2, 0];
/** m above sea level, Table A1.1. */
const HIGH = 1000;

export interface Site {
  /** m above sea level; null where the brief does not say. */
  readonly altitude: number | null;
  /** In Finland, Iceland, Norway or Sweden. */
  readonly nordic: boolean;
}

/** Where the altitude is not known the greater values hold. */
export function snowPsi({ altitude, nordic }: Site): Psi {
  return nordic || altitude === null || altitude > HIGH ? SNOW_HIGH : SNOW_LOW;
}

/** An imposed load of no stated category: E has the greatest values of the table. */
export const CATEGORY_UNSTATED: Category = 'E';

export function psiOf(key: PsiKey, site: Site, chosen: Readonly<Partial<Record<PsiKey, Psi>>>): Psi {
  return chosen[key] ?? (key === 'snow' ? snowPsi(site) : PSI[key]);
}

/** Partial factors of one set. */
export interface SetGammas {
  readonly permanent: number;
  readonly favourable: number;
  readonly variable: number;
  readonly settlement: number;
}

/** Table A1.2(B), set B: 6.10 and 6.10a/b; settlement by its Note 4: 1.20 for a linear elastic analysis, none where favourable. */
const STRENGTH: SetGammas = { permanent: 1.35, favourable: 1.0, variable: 1.5, settlement: 1.2 };
/** Table A1.2(B): the reduction of unfavourable permanent actions in 6.10b. */
const XI = 0.85;
/** Table A1.2(A), set A. */
const EQUILIBRIUM: SetGammas = { permanent: 1.1, favourable: 0.9, variable: 1.5, settlement: 1.2 };

export function strengthGammas(chosen: Gammas): SetGammas & { readonly xi: number } {
  return {
    permanent: chosen.permanent ?? STRENGTH.permanent,
    favourable: chosen.favourable ?? STRENGTH.favourable,
    variable: chosen.variable ?? STRENGTH.variable,
    settlement: chosen.settlement ?? STRENGTH.settlement,
    xi: chosen.xi ?? XI,
  };
}

export function equilibriumGammas({ equilibrium = {}, settlement }: Gammas): SetGammas {
  return {
    permanent: equilibrium.permanent ?? EQUILIBRIUM.permanent,
    favourable: equilibrium.favourable ?? EQUILIBRIUM.favourable,
    variable: equilibrium.variable ?? EQUILIBRIUM.variable,
    settlement: settlement ?? EQUILIBRIUM.settlement,
  };
}
