import { between } from '../../domain/vector.ts';
import { asRef } from '../../step/values.ts';
import type { Reading } from '../reading.ts';
import { readNodeCondition } from './boundary-condition.ts';
import type { CurveMember } from './curve-members.ts';
import { ECCENTRIC_END, RIGID_JOINTS, SLIDING_END } from './remarks.ts';

/** Says of the members' connections what pinned bars do not take: rigid joints, sliding ends, eccentricities. */
export function noteConnections(reading: Reading, members: ReadonlyMap<number, CurveMember>): void {
  const { file } = reading;
  const hinges = new Map<number, number>();
  for (const type of ['IFCRELCONNECTSSTRUCTURALMEMBER', 'IFCRELCONNECTSWITHECCENTRICITY']) {
    for (const id of file.idsOf(type)) {
      const args = file.args(id);
      const member = asRef(args[4]);
      const line = member === null ? undefined : members.get(member);
      if (member === null || line === undefined) continue;
      reading.about(line.member.globalId, between(line.start, line.end, 0.5));
      if (type === 'IFCRELCONNECTSWITHECCENTRICITY') reading.note(ECCENTRIC_END);
      const condition = readNodeCondition(reading, args[6]);
      const slides = condition?.translations.some(({ kind }) => kind === 'free' || kind === 'spring') ?? false;
      if (slides) reading.note(SLIDING_END);
      if (condition?.freesTurning) hinges.set(member, (hinges.get(member) ?? 0) + 1);
    }
  }
  for (const [id, { member, start, end }] of members) {
    const hasHinges = (hinges.get(id) ?? 0) >= 2;
    if (hasHinges || member.predefinedType !== 'RIGID_JOINED_MEMBER') continue;
    reading.about(member.globalId, between(start, end, 0.5));
    reading.note(RIGID_JOINTS);
  }
  reading.about(null);
}
