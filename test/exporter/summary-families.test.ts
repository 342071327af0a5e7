import { describe, expect, it } from 'vitest';
import type { Result } from '../../src/domain/result.ts';
import { oddMembers } from '../../src/exporter/summary/families.ts';
import { SUMMARY_DEFAULTS } from '../../src/exporter/summary/options.ts';
import { someResult } from './support.ts';

type Family = NonNullable<Result['families']>[number];

const globalId = 'g1';
const regular: Family = { role: 'diagonal', section: 'SHS 60', length: 3.254, members: ['g2', 'g3'], oddBeside: null };
const odd: Family = { ...regular, length: 3.17, members: [globalId], oddBeside: { length: 3.254, count: 59 } };

describe('the summary of families', () => {
  it('names the odd length, how many it differs from and by how much', () => {
    const result = { ...someResult(['a']), families: [odd, regular] };
    const text = oddMembers(result, SUMMARY_DEFAULTS).join('\n');
    expect(text).toContain('1 length beside many alike, in 2 families');
    expect(text).toContain('SHS 60 diagonal of 3.170 m, beside 59 of 3.254 m');
  });

  it('says nothing where every length is regular', () => {
    expect(oddMembers({ ...someResult(['a']), families: [regular] }, SUMMARY_DEFAULTS)).toEqual([]);
  });
});
