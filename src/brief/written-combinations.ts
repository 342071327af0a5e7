import { z } from 'zod';
import { CATEGORIES, type CodeRule, type Gammas, LIMITS, PSI_KEYS, type Psi, type PsiKey } from './code-rule.ts';
import { text } from './written-selectors.ts';

/** `combinations:` as a brief writes it: none, a list, the name of a code, or a code with its choices. */

const EN1990 = ['EN1990', 'EN1990:2002', 'EN1990:2002+A1'] as const;
const ASCE7 = ['ASCE7', 'ASCE7-16', 'ASCE7-22'] as const;

const combination = z.strictObject({
  name: text,
  limit: z.enum(LIMITS),
  factors: z.record(z.string(), z.number()).describe('factor of each case, by its name'),
});

const factor = z
  .number()
  .refine((value) => value >= 0 && value <= 10, 'a factor of a code lies between 0 and 10')
  .optional();

const gammas = z
  .strictObject({
    permanent: factor.describe('unfavourable; 1.35'),
    favourable: factor.describe('permanent, favourable; 1.0'),
    variable: factor.describe('1.5'),
    settlement: factor.describe('1.2'),
    xi: factor.describe('reduction of permanent actions in 6.10b; 0.85'),
    equilibrium: z.strictObject({ permanent: factor, favourable: factor, variable: factor }).optional(),
  })
  .describe('partial factors of a National Annex');

const share = z.number().refine((value) => value >= 0 && value <= 1, 'psi lies between 0 and 1');
const psi = z
  .partialRecord(z.enum(PSI_KEYS), z.tuple([share, share, share]))
  .describe('[psi0, psi1, psi2] by category (A to H), snow, wind or thermal');

const en1990 = z.strictObject({
  rule: z.enum(EN1990),
  // YAML reads a bare 6.10 as the number 6.1.
  expression: z.union([z.enum(['6.10', '6.10a/b']), z.literal(6.1)], { error: '6.10 or 6.10a/b is due' }).optional(),
  besideAccident: z.enum(['psi1', 'psi2']).optional().describe('leading variable action in 6.11b'),
  sets: z.array(z.enum(LIMITS)).min(1).optional().describe('which sets are made; default all'),
  gammas: gammas.optional(),
  psi: psi.optional(),
});

const asce7 = z.strictObject({
  rule: z.enum(ASCE7),
  method: z.enum(['LRFD', 'ASD']).optional(),
  companionLive: z
    .union([z.literal(0.5), z.literal(1)], { error: '0.5 or 1.0 is due' })
    .optional()
    .describe('live load in 2.3.1(3) and (4); 0.5 where it is 100 psf at most and no garage or public assembly'),
});

export const combinations = z.union(
  [z.literal('none'), z.enum([...EN1990, ...ASCE7]), z.array(combination), en1990, asce7],
  { error: `none, ${[...EN1990, ...ASCE7].join(', ')}, {rule: ...}, or a list of combinations is due` },
);

export type WrittenCombinations = z.output<typeof combinations>;
type WrittenRule = z.output<typeof en1990> | z.output<typeof asce7>;

export const category = z
  .enum(CATEGORIES)
  .describe('use of the area, EN 1990 Table A1.1; H is a roof not walked on but for upkeep');

/** The code that the brief names, its defaults filled in; null where there is none. */
export function toCodeRule(written: WrittenCombinations | undefined): CodeRule | null {
  if (written === undefined || written === 'none' || Array.isArray(written)) return null;
  if (typeof written !== 'string') return fromRule(written);
  return written.startsWith('EN')
    ? fromRule({ rule: 'EN1990' })
    : fromRule({ rule: written as (typeof ASCE7)[number] });
}

function fromRule(written: WrittenRule): CodeRule {
  if (isEn1990(written)) {
    return {
      code: 'EN1990:2002+A1',
      expression: written.expression === '6.10a/b' ? '6.10a/b' : '6.10',
      besideAccident: written.besideAccident ?? 'psi1',
      sets: written.sets ?? LIMITS,
      gammas: (written.gammas ?? {}) as Gammas,
      psi: (written.psi ?? {}) as Readonly<Partial<Record<PsiKey, Psi>>>,
    };
  }
  return {
    code: written.rule === 'ASCE7-16' ? 'ASCE7-16' : 'ASCE7-22',
    method: written.method ?? 'LRFD',
    companionLive: written.companionLive ?? 1,
  };
}

const isEn1990 = (written: WrittenRule): written is z.output<typeof en1990> => written.rule.startsWith('EN1990');
