import type { FamilyName } from './families.ts';
import type { Rows } from './rows.ts';

/** Nominal depths of ASTM A6M by those of A6, inches to mm, from memory. */
const DEPTHS: Readonly<Record<string, number>> = {
  ...{ 3: 75, 4: 100, 5: 130, 6: 150, 7: 180, 8: 200, 9: 230, 10: 250, 12: 310, 13: 330, 14: 360, 15: 380, 16: 410 },
  ...{ 18: 460, 20: 510, 21: 530, 24: 610, 27: 690, 30: 760, 33: 840, 36: 920, 40: 1000, 44: 1100 },
};

const KILOGRAMS_PER_METRE = 0.45359237 / 0.3048;

const AMERICAN: ReadonlySet<FamilyName> = new Set<FamilyName>(['W', 'HP', 'S', 'C', 'MC']);

/** '12X26' of '310X38.7' or '310X39': A6M names the same shapes by depth in mm and mass in kg/m. Null where none or several fit. */
export function softMetricSize(family: FamilyName, rows: Rows, size: string): string | null {
  if (!AMERICAN.has(family)) return null;
  const [depth, mass] = size.split('X').map(Number) as [number, number];
  const fitting = [...rows.keys()].filter((key) => {
    const [inches, pounds] = key.split('X') as [string, string];
    return DEPTHS[inches] === depth && Math.abs(Number(pounds) * KILOGRAMS_PER_METRE - mass) < 0.51;
  });
  return fitting.length === 1 ? fitting[0]! : null;
}
