/** Steel grades by name. Strengths in Pa for the first thickness step; the checks reduce them for thicker parts. */

export interface Grade {
  readonly yieldStrength: number;
  readonly ultimateStrength: number;
  readonly elasticModulus: number;
}

const MPA = 1e6;
/** EN 1993-1-1:2005 3.2.6(1) and AISC 360 symbols (29 000 ksi, rounded): Pa. */
const E_EUROPEAN = 210e9;
const E_AMERICAN = 200e9;

type Strengths = readonly [yieldStrength: number, ultimateStrength: number];

/**
 * EN 1993-1-1:2005+A1 Table 3.1, t <= 40 mm, MPa, from memory. Where EN 10210 and EN 10219 differ for one designation
 * the lower stands here.
 */
const EUROPEAN: Readonly<Record<string, Readonly<Record<string, Strengths>>>> = {
  S235: { '': [235, 360], W: [235, 360], H: [235, 360] },
  S275: { '': [275, 430], N: [275, 390], M: [275, 370], H: [275, 430], NH: [275, 370], MH: [275, 360] },
  S355: { '': [355, 490], N: [355, 490], M: [355, 470], W: [355, 490], H: [355, 490], NH: [355, 470], MH: [355, 470] },
  S420: { '': [420, 520], N: [420, 520], M: [420, 520], NH: [420, 520], MH: [420, 500] },
  S450: { '': [440, 550] },
  S460: { '': [460, 540], Q: [460, 570], N: [460, 540], M: [460, 540], NH: [460, 550], MH: [460, 530] },
};

/**
 * ASTM, ksi rounded to MPa as the standards' SI editions do, from memory. A500 has lower values for round tubes than
 * for rectangular ones; the lower stands here, since a name does not tell the shape.
 */
const AMERICAN: readonly (readonly [pattern: RegExp, strengths: Strengths])[] = [
  [/\bA\s?992\b/i, [345, 450]],
  [/\bA\s?572.*\b(?:GR\.?|GRADE|-)?\s?65\b/i, [450, 550]],
  [/\bA\s?572.*\b(?:GR\.?|GRADE|-)?\s?60\b/i, [415, 520]],
  [/\bA\s?572.*\b(?:GR\.?|GRADE|-)?\s?55\b/i, [380, 485]],
  [/\bA\s?572.*\b(?:GR\.?|GRADE|-)?\s?42\b/i, [290, 415]],
  [/\bA\s?572\b/i, [345, 450]],
  [/\bA\s?588\b/i, [345, 485]],
  [/\bA\s?500.*\b(?:GR\.?|GRADE|-)?\s?C\b/i, [315, 425]],
  [/\bA\s?500\b/i, [290, 400]],
  [/\bA\s?53\b/i, [240, 415]],
  [/\bA\s?36\b/i, [250, 400]],
];

/** The grade that `name` contains, whatever stands around it ("STEEL/S235JR", "Stål - S355"); null where there is none. */
export function gradeIn(name: string): Grade | null {
  const european = /(?<![A-Za-z0-9])S\s?(235|275|355|420|450|460)(?!\d)\s*([A-Za-z0-9+]*)/.exec(name);
  if (european !== null) {
    const table = EUROPEAN[`S${european[1]}`]!;
    const [fy, fu] = table[deliveryOf(european[2] ?? '')] ?? table['']!;
    return { yieldStrength: fy * MPA, ultimateStrength: fu * MPA, elasticModulus: E_EUROPEAN };
  }
  const american = AMERICAN.find(([pattern]) => pattern.test(name));
  if (american === undefined) return null;
  const [fy, fu] = american[1];
  return { yieldStrength: fy * MPA, ultimateStrength: fu * MPA, elasticModulus: E_AMERICAN };
}

/** 'NH' of 'NLH', 'M' of 'ML', '' of 'J2' and 'J0+N', 'H' of 'J2H', 'Q' of 'QL1'. */
function deliveryOf(suffix: string): string {
  const letters = suffix.toUpperCase().replace(/\+.*$/, '');
  const isHollow = /H$/.test(letters);
  const treatment = /^([NMQ])/.exec(letters)?.[1] ?? (/W/.test(letters) ? 'W' : '');
  return `${treatment === 'W' && isHollow ? '' : treatment}${isHollow ? 'H' : ''}`;
}

/** 345 MPa of "Metal - Steel - 345 MPa", Pa; null where the name states no strength. */
export function statedYield(name: string): number | null {
  const match = /(?<!\d)(\d{3})\s?(?:MPa|N\/mm2|N\/mm²)/i.exec(name);
  return match === null ? null : Number(match[1]) * MPA;
}
