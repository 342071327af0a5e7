import { describe, expect, it } from 'vitest';
import { knownDesignations } from '../../src/importer/sections/designations/known-designations.ts';
import { sectionFromDesignation } from '../../src/importer/sections/designations/section-from-designation.ts';
import * as american from './tables/american.ts';
import * as british from './tables/british.ts';
import * as european from './tables/european.ts';

const METRIC = { area: 1e-4, inertia: 1e-8 };
const INCH = { area: 0.0254 ** 2, inertia: 0.0254 ** 4 };

/**
 * What a slip in a dimension would show as: one digit of any thickness moves the area by more. The bounds are a little above the
 * rounding of the published values; sloping American flanges have mill radii that no table gives.
 */
const FAMILIES = [
  ['IPE ', european.IPE, METRIC, 0.003, 0.002],
  ['IPE A ', european.IPE_A, METRIC, 0.003, 0.002],
  ['IPE AA ', european.IPE_AA, METRIC, 0.006, 0.002],
  ['IPE O ', european.IPE_O, METRIC, 0.003, 0.001],
  ['HEAA ', european.HEAA, METRIC, 0.003, 0.003],
  ['HEA ', european.HEA, METRIC, 0.002, 0.001],
  ['HEB ', european.HEB, METRIC, 0.002, 0.0015],
  ['HEM ', european.HEM, METRIC, 0.001, 0.001],
  ['INP ', european.INP, METRIC, 0.003, 0.005],
  ['UPN ', european.UPN, METRIC, 0.004, 0.004],
  ['UPE ', european.UPE, METRIC, 0.004, 0.002],
  ['T ', european.T, METRIC, 0.004, 0.015],
  ['L ', european.L, METRIC, 0.005, 0.005],
  ['UB ', british.UB, METRIC, 0.005, 0.001],
  ['UC ', british.UC, METRIC, 0.004, 0.001],
  ['PFC ', british.PFC, METRIC, 0.002, 0.002],
  ['W', american.W, INCH, 0.0065, 0.01],
  ['HP', american.HP, INCH, 0.0075, 0.009],
  ['S', american.S, INCH, 0.013, 0.011],
  ['C', american.C, INCH, 0.007, 0.007],
  ['MC', american.MC, INCH, 0.008, 0.013],
] as const;

function rowsOf(table: string): { size: string; area: number; inertia: number | null }[] {
  return table
    .trim()
    .split('\n')
    .map((line) => {
      const [size, area, inertia] = line.split(' ') as [string, string, string];
      return { size, area: Number(area), inertia: inertia === '-' ? null : Number(inertia) };
    });
}

describe('every section of a family against its published area and second moment', () => {
  it.each(FAMILIES)('holds for %s', (letters, table, unit, areaWithin, inertiaWithin) => {
    const apart: string[] = [];
    for (const { size, area, inertia } of rowsOf(table)) {
      const section = sectionFromDesignation(`${letters}${size}`);
      if (section === null) {
        apart.push(`${letters}${size} is not known`);
        continue;
      }
      const a = section.area / unit.area / area - 1;
      const i = inertia === null ? 0 : section.inertiaY / unit.inertia / inertia - 1;
      if (Math.abs(a) > areaWithin || Math.abs(i) > inertiaWithin) {
        apart.push(`${letters}${size}: A ${(100 * a).toFixed(2)} %, Iy ${(100 * i).toFixed(2)} %`);
      }
    }
    expect(apart).toEqual([]);
  });

  it('leaves no row of a table without a published value', () => {
    const checked = new Set(
      FAMILIES.flatMap(([letters, table]) => rowsOf(table).map(({ size }) => `${letters}${size}`)),
    );
    expect(knownDesignations().filter((name) => !checked.has(name))).toEqual([]);
  });
});
