import { markOf } from '../domain/mark.ts';
import type { Member } from '../domain/member.ts';

/** What a person calls a member: its mark, else its name, else its class and GlobalId. */
export const labelOf = (member: Member): string => markOf(member) ?? `${member.class} ${member.globalId}`;
