import { type Remark, whose } from '../findings-log.ts';
import { NotRead } from '../not-read.ts';

/** A profile whose dimensions cannot be those of its shape: a wall thicker than the radius, no depth. */
export class ImpossibleProfile extends NotRead {
  constructor(name: string | null, { code, message, advice }: NotRead) {
    super(code, `its profile${name === null ? '' : ` '${name}'`} is impossible: ${message}`, advice);
  }
}

/** @throws ImpossibleProfile where `read` throws NotRead. */
export function orImpossible<T>(name: string | null, read: () => T): T {
  try {
    return read();
  } catch (problem) {
    if (problem instanceof NotRead) throw new ImpossibleProfile(name, problem);
    throw problem;
  }
}

const ADVICE = 'Correct the profile in the model, or name the section in the brief.';

/** The section of the drawn body is taken where the profile cannot be. */
export const measuredInstead = ({ message }: NotRead): Remark => ({
  code: 'section-disagrees',
  key: `measured ${message}`,
  say: (count, first) =>
    `${whose(count, first, 'are measured on their drawn bodies', 'is measured on its drawn body')}, because ${message}.`,
  advice: ADVICE,
});

/** What the profile is called, or what is stated of it, is taken where its dimensions cannot be. */
export const namedInstead = ({ message }: NotRead, name: string): Remark => ({
  code: 'section-disagrees',
  key: `named ${message}`,
  say: (count, first) =>
    `${whose(count, first, 'are read', 'is read')} as ${name} by the name or the stated numbers of the profile, because ${message}.`,
  advice: ADVICE,
});
