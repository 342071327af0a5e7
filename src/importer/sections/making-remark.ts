import type { Section } from '../../domain/member.ts';
import { type Remark, whose } from '../findings-log.ts';

/** Where a hollow section is known by its name alone and that does not say how it was made; null elsewhere. */
export const makingRemark = (section: Section): Remark | null => (section.making?.isAssumed === true ? ASSUMED : null);

const ASSUMED: Remark = {
  code: 'guessed-section',
  key: 'making',
  severity: 'note',
  say: (count, first) =>
    `${whose(count, first, 'have hollow sections known by their names alone, which do', 'has a hollow section known by its name alone, which does')} not say how ${count === 1 ? 'it was' : 'they were'} made; cold formed (EN 10219) is taken, the safe side.`,
  advice:
    "Where they are hot finished, write the standard behind the designation ('RHS 150x100x6.3 EN 10210'), in the model or under `sections:` in the brief.",
};
