/** Cross sections of the demo roof, mm. Nominal sizes: EN 10365 (I), EN 10210-2 (hollow), EN 10056-1 (angles); from memory. */
export type Profile =
  | {
      readonly shape: 'I';
      readonly h: number;
      readonly b: number;
      readonly web: number;
      readonly flange: number;
      readonly root: number;
    }
  | { readonly shape: 'square tube'; readonly side: number; readonly wall: number }
  | { readonly shape: 'round tube'; readonly diameter: number; readonly wall: number }
  | {
      readonly shape: 'angle';
      readonly leg: number;
      readonly thickness: number;
      readonly root: number;
      readonly toe: number;
    }
  | { readonly shape: 'flat'; readonly h: number; readonly b: number }
  | { readonly shape: 'rod'; readonly diameter: number };

export const PROFILES = {
  'HEA 140': { shape: 'I', h: 133, b: 140, web: 5.5, flange: 8.5, root: 12 },
  'HEA 160': { shape: 'I', h: 152, b: 160, web: 6, flange: 9, root: 15 },
  'HEA 180': { shape: 'I', h: 171, b: 180, web: 6, flange: 9.5, root: 15 },
  'HEA 240': { shape: 'I', h: 230, b: 240, web: 7.5, flange: 12, root: 21 },
  'IPE 160': { shape: 'I', h: 160, b: 82, web: 5, flange: 7.4, root: 9 },
  'SHS 60x60x4': { shape: 'square tube', side: 60, wall: 4 },
  'SHS 80x80x5': { shape: 'square tube', side: 80, wall: 5 },
  'SHS 90x90x5': { shape: 'square tube', side: 90, wall: 5 },
  'SHS 100x100x5': { shape: 'square tube', side: 100, wall: 5 },
  'SHS 100x100x6.3': { shape: 'square tube', side: 100, wall: 6.3 },
  'CHS 76.1x3.2': { shape: 'round tube', diameter: 76.1, wall: 3.2 },
  'L 80x80x8': { shape: 'angle', leg: 80, thickness: 8, root: 10, toe: 5 },
  'FL 80x10': { shape: 'flat', h: 80, b: 10 },
  'RD 20': { shape: 'rod', diameter: 20 },
  'RD 24': { shape: 'rod', diameter: 24 },
} as const satisfies Record<string, Profile>;

export type SectionName = keyof typeof PROFILES;
export type Grade = 'S235' | 'S355';

export const STEEL_DENSITY = 7850;

/** Half the outline along the section's z axis and along its y axis, mm. */
export function halfExtents(section: SectionName): { readonly depth: number; readonly width: number } {
  const profile: Profile = PROFILES[section];
  switch (profile.shape) {
    case 'I':
    case 'flat':
      return { depth: profile.h / 2, width: profile.b / 2 };
    case 'square tube':
      return { depth: profile.side / 2, width: profile.side / 2 };
    case 'angle':
      return { depth: profile.leg / 2, width: profile.leg / 2 };
    case 'round tube':
    case 'rod':
      return { depth: profile.diameter / 2, width: profile.diameter / 2 };
  }
}

/** Corner radii of hot finished hollow sections as EN 10210-2 counts their properties: 1.5 t outside, 1.0 t inside. */
export const tubeCorners = (wall: number) => ({ outer: 1.5 * wall, inner: wall });

/** mm2, fillets and corners counted. */
export function area(section: SectionName): number {
  const profile: Profile = PROFILES[section];
  const corner = 1 - Math.PI / 4;
  switch (profile.shape) {
    case 'I':
      return (
        2 * profile.b * profile.flange + (profile.h - 2 * profile.flange) * profile.web + 4 * corner * profile.root ** 2
      );
    case 'square tube': {
      const { outer, inner } = tubeCorners(profile.wall);
      return profile.side ** 2 - (profile.side - 2 * profile.wall) ** 2 - 4 * corner * (outer ** 2 - inner ** 2);
    }
    case 'round tube':
      return Math.PI * profile.wall * (profile.diameter - profile.wall);
    case 'angle':
      return (
        profile.thickness * (2 * profile.leg - profile.thickness) + corner * (profile.root ** 2 - 2 * profile.toe ** 2)
      );
    case 'flat':
      return profile.h * profile.b;
    case 'rod':
      return (Math.PI / 4) * profile.diameter ** 2;
  }
}

/** From the heel of an equal angle to its centroid, mm: 22.6 for L 80x80x8 (EN 10056-1, from memory). */
export const ANGLE_CENTROID: Partial<Record<SectionName, number>> = { 'L 80x80x8': 22.6 };
