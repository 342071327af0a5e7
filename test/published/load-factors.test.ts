import { describe, expect, test } from 'vitest';
import { CATEGORIES } from '../../src/brief/code-rule.ts';
import { equilibriumGammas, PSI, snowPsi, strengthGammas } from '../../src/statics/combinations/en1990-factors.ts';

/** EN 1990:2002+A1:2005, recommended values. The figures are those of the tables, typed in again from memory. */
describe('factors of EN 1990', () => {
  test('psi of imposed loads are those of Table A1.1', () => {
    const table = `
      A 0.7 0.5 0.3
      B 0.7 0.5 0.3
      C 0.7 0.7 0.6
      D 0.7 0.7 0.6
      E 1.0 0.9 0.8
      F 0.7 0.7 0.6
      G 0.7 0.5 0.3
      H 0   0   0`;
    for (const row of table.trim().split('\n')) {
      const [category, ...psi] = row.trim().split(/\s+/u);
      expect(PSI[category as (typeof CATEGORIES)[number]]).toEqual(psi.map(Number));
    }
    expect(CATEGORIES).toHaveLength(8);
  });

  test('psi of wind and temperature are those of Table A1.1', () => {
    expect(PSI.wind).toEqual([0.6, 0.2, 0]);
    expect(PSI.thermal).toEqual([0.6, 0.5, 0]);
  });

  test('psi of snow goes by altitude and country, Table A1.1; 1000 m itself is still low', () => {
    const low = [0.5, 0.2, 0];
    const high = [0.7, 0.5, 0.2];
    expect(snowPsi({ altitude: 1000, nordic: false })).toEqual(low);
    expect(snowPsi({ altitude: 1001, nordic: false })).toEqual(high);
    expect(snowPsi({ altitude: 20, nordic: true })).toEqual(high);
    expect(snowPsi({ altitude: null, nordic: false })).toEqual(high);
  });

  test('gammas are those of Tables A1.2(A) and A1.2(B)', () => {
    expect(strengthGammas({})).toEqual({ permanent: 1.35, favourable: 1, variable: 1.5, settlement: 1.2, xi: 0.85 });
    expect(equilibriumGammas({})).toEqual({ permanent: 1.1, favourable: 0.9, variable: 1.5, settlement: 1.2 });
  });
});
