import { type Finding, finding } from '../../domain/finding.ts';
import { type Remark, whose } from '../findings-log.ts';

/** What a structural analysis view says and a pin-jointed truss does not take. Each kind is one finding. */

const take = (key: string, have: string, has: string, advice: string, severity: 'note' | 'warning'): Remark => ({
  code: 'out-of-scope',
  key,
  severity,
  say: (count, first) => `${whose(count, first, have, has)}`,
  advice,
});

export const RIGID_JOINTS = take(
  'rigid joints',
  "are rigidly joined in the model's analysis view; bars of a truss are pinned, so bending is not seen.",
  "is rigidly joined in the model's analysis view; bars of a truss are pinned, so bending is not seen.",
  'Compare with the forces of a frame where bending matters.',
  'note',
);

export const SLIDING_END = take(
  'sliding ends',
  'have an end that the model lets slide or holds by a spring; it is taken as pinned.',
  'has an end that the model lets slide or holds by a spring; it is taken as pinned.',
  'Leave such a member out in the brief if it carries no force.',
  'warning',
);

export const ECCENTRIC_END: Remark = {
  code: 'offset-joint',
  key: 'connection with eccentricity',
  say: (count, first) =>
    `${whose(count, first, 'are', 'is')} connected with an eccentricity that is not read; the drawn ends are taken.`,
  advice: 'Look whether the ends of these members coincide with their joints.',
};

export const ONE_WAY = take(
  'one way',
  'act in tension or in compression only in the model, and are taken so where the brief names no such bars itself.',
  'acts in tension or in compression only in the model, and is taken so where the brief names no such bars itself.',
  'Name the bars that only pull or only push in the brief if it is others.',
  'note',
);

export const TAPERED: Remark = {
  code: 'guessed-section',
  key: 'varying member',
  say: (count, first) =>
    `${whose(count, first, 'vary', 'varies')} along the length; the first section is taken throughout.`,
  advice: 'Name the section in the brief where the first one is too safe.',
};

export const HELD_AGAINST_TURNING: Remark = {
  code: 'out-of-scope',
  key: 'held against turning',
  say: (count) =>
    `${count === 1 ? 'A support of the model is' : `${count} supports of the model are`} held against turning, which pinned bars make no use of.`,
  advice: 'Compare with the forces of a frame where clamped feet matter.',
};

/** What a load is made of that is not put on the truss; `key` completes "... of the model's loads". */
export const loadNotTaken = (key: string, reason: string): Remark => ({
  code: 'no-load',
  key,
  say: (count, first) =>
    `${count === 1 ? `Load ${first} of the model is` : `${count} loads of the model are`} not taken: ${reason}.`,
  advice: 'Give what it stands for in the brief, as loads on nodes or lines.',
});

export const SURFACE_REMARK = (counts: string): Remark => ({
  code: 'surface-skipped',
  key: 'analysis view',
  say: () => `The model's analysis view has ${counts}, which are passed over: only members are read.`,
  advice: 'What they carry or hold is to be given in the brief, as loads, supports or holds.',
});

/** The brief asks for a view that the file does not have. */
export const NO_VIEW: Finding = finding(
  'no-members',
  'The brief asks for the structural analysis view (source: analysis), and the file has none: no IfcStructuralCurveMember is in it.',
  'Leave `source: analysis` out of the brief to read beams, columns and members, or export the model with its analysis view.',
);

export const LOADS_WITHOUT_CASE = (count: number): Remark => ({
  code: 'out-of-scope',
  key: 'loads without a case',
  severity: 'warning',
  say: () =>
    `${count === 1 ? '1 load of the model stands' : `${count} loads of the model stand`} in no load case; together they are taken as one, 'Loads without a case'.`,
  advice: 'Assign every load to a load case, so that its nature is known.',
});
