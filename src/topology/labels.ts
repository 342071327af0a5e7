import type { Member } from '../domain/member.ts';

/** What a person calls a member: its mark, else its name, else its class and GlobalId. */
export const labelOf = (member: Member): string => member.tag || member.name || `${member.class} ${member.globalId}`;

/** A length in whole millimetres, or to a tenth where it is small. */
export const millimetres = (length: number): string => {
  const mm = length * 1000;
  return `${Math.abs(mm) < 10 ? Number(mm.toFixed(1)) : Math.round(mm)} mm`;
};
