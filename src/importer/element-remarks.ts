import { type Remark, whose } from './findings-log.ts';
import { FARTHEST_BESIDE, type MemberAxis } from './member-axis.ts';
import type { NotRead } from './not-read.ts';

/** What is said of elements and of the lines they are read as. */

export function remarksOn(axis: MemberAxis): Remark[] {
  const remarks: Remark[] = [];
  // Where its course is known, joining says how far its bars stray from it.
  if (axis.isBent && axis.bow === null) remarks.push(BENT);
  if (axis.isRun) remarks.push(RUNS);
  if (axis.isTapered && axis.section !== null) remarks.push(TAPERED);
  if (axis.confidence !== null) remarks.push(axis.confidence < DOUBTFUL ? UNEVEN : MEASURED);
  if (axis.strays !== null) remarks.push(axis.strays > NOTICED ? approximate(axis.strays) : SHORT);
  else if (axis.hasRaggedEnd && !axis.isBent) remarks.push(RAGGED);
  if (axis.isBeside) remarks.push(BESIDE);
  return remarks;
}

const REFUSED: Readonly<Record<string, readonly [have: string, has: string]>> = {
  'no-axis': ['have no line of force', 'has no line of force'],
  'no-section': ['have no section', 'has no section'],
  'zero-length': ['have no length', 'has no length'],
};

/** Why an element, or its section, is not read; `tried` is the text in which a designation was looked for in vain. */
export function refusal(problem: NotRead, tried: string | null = null): Remark {
  const [have, has] = REFUSED[problem.code] ?? ['cannot be read', 'cannot be read'];
  const reason = problem.message;
  return {
    code: problem.code,
    key: reason,
    say: (count, first, { texts }) =>
      `${whose(count, first, have, has)}: ${count === 1 ? reason : plural(reason)}${inVain(texts)}.`,
    advice: problem.advice,
    ...(tried === null ? {} : { text: tried }),
  };
}

const MOST_TEXTS = 3;

/** ", and 'HEA2000' is no designation that is known" */
function inVain(texts: readonly string[]): string {
  if (texts.length === 0) return '';
  const shown = texts.slice(0, MOST_TEXTS).map((text) => `'${text}'`);
  if (texts.length > MOST_TEXTS) shown.push(`${texts.length - MOST_TEXTS} more texts`);
  const last = shown.pop();
  return texts.length === 1
    ? `, and ${last} is no designation that is known`
    : `, and ${shown.join(', ')} and ${last} are no designations that are known`;
}

/** The first of an element's texts that may have been meant as a designation, cut to a readable length. */
export function triedText(texts: readonly (string | null)[]): string | null {
  const tried = texts.find((text) => text !== null && /\d/.test(text) && /\p{L}/u.test(text));
  return tried == null ? null : tried.length > LONGEST_TEXT ? `${tried.slice(0, LONGEST_TEXT - 1)}…` : tried;
}

const LONGEST_TEXT = 40;

/** Reasons are told of one element. */
const plural = (reason: string): string => reason.replace(/^its /, 'their ').replace(/^it has /, 'they have ');

export const NO_GLOBAL_ID: Remark = {
  code: 'unreadable-element',
  key: 'GlobalId',
  severity: 'warning',
  say: (count, first) => `${whose(count, first, 'have', 'has')} no GlobalId, so results cannot be written to it.`,
  advice: 'Export the model again from a program that gives every element a GlobalId.',
};

export const BENT: Remark = {
  code: 'bent-axis',
  key: '',
  say: (count, first) =>
    `${whose(count, first, 'are', 'is')} bent; the straight line between the ends is taken, and bending by the bow is not seen.`,
  advice: 'Divide a bent member at its panel points, or judge its bow by hand.',
};

const RUNS: Remark = {
  code: 'bent-axis',
  key: 'runs',
  say: (count, first) =>
    `${whose(count, first, 'are drawn as one line with bends', 'is drawn as one line with bends')}; each straight run is read as a member of its own, pinned at the bends.`,
  advice: 'Where a bend is stiff and no other member meets it there, judge its bending by hand.',
};

/** m. A body that leaves its axis by less is straight for whoever reads it. */
const NOTICED = 1e-3;

const approximate = (strays: number): Remark => ({
  code: 'bent-axis',
  key: 'approximate',
  gap: strays,
  say: (count, first, { gap }) =>
    `${whose(count, first, 'are short bars', 'is a short bar')} of the section that ${count === 1 ? 'its name says' : 'their names say'}, split, joggled or notched over part of the length; ${count === 1 ? 'its axis is' : 'their axes are'} approximate: the body sticks out of the section carried along it by up to ${Math.round(gap * 1000)} mm.`,
  advice:
    'Leave anchors and brackets out of the scope in the brief; draw a bar that carries force as a straight profile.',
});

const SHORT: Remark = {
  code: 'guessed-section',
  key: 'mesh short',
  severity: 'note',
  say: (count, first) =>
    `${whose(count, first, 'are drawn as meshes', 'is drawn as a mesh')} too short to show which way ${count === 1 ? 'it runs' : 'they run'}; the axis is taken across the section that ${count === 1 ? 'its name says or others of its type have' : 'their names say or others of their types have'}.`,
  advice: 'Leave such a piece out of the scope in the brief if it is a plate or a leftover.',
};

const BESIDE: Remark = {
  code: 'axis-moved',
  key: 'centroid',
  say: (count, first) =>
    `${whose(count, first, 'have a drawn axis', 'has a drawn axis')} more than ${FARTHEST_BESIDE * 1000} mm beside, or askew to, the centroid line of the body; the drawn one is taken.`,
  advice: "Write `axes: centroid` in the brief to take the bodies' centroid lines instead.",
};

const TAPERED: Remark = {
  code: 'guessed-section',
  key: 'tapered',
  say: (count, first) =>
    `${whose(count, first, 'taper', 'tapers')}; the section of the lesser end is taken throughout.`,
  advice: 'Name the section in the brief where the lesser end is too safe.',
};

/** Where fewer of the cuts agree, the section found is not that of most of the length. */
const DOUBTFUL = 0.6;

const MEASURED: Remark = {
  code: 'guessed-section',
  key: 'mesh',
  say: (count, first) =>
    `${whose(count, first, 'are drawn as meshes', 'is drawn as a mesh')}; axis and section are measured from cuts through it, of which at least ${DOUBTFUL * 100} % agree.`,
  advice: 'Export the member as a profile extruded along its length, or name its section in the brief.',
};

const RAGGED: Remark = {
  code: 'guessed-section',
  key: 'mesh ends',
  severity: 'note',
  say: (count, first) =>
    `${whose(count, first, 'are drawn as meshes', 'is drawn as a mesh')} that ${count === 1 ? 'ends' : 'end'} in steps or copes; the axis runs to the farthest corner.`,
  advice: 'Allow for it in the reach of joints.',
};

const UNEVEN: Remark = {
  code: 'guessed-section',
  key: 'mesh uneven',
  say: (count, first) =>
    `${whose(count, first, 'are drawn as meshes', 'is drawn as a mesh')} whose section changes along the length; less than ${DOUBTFUL * 100} % of the cuts show the section that is taken.`,
  advice: 'Look at the drawn shape, and name the section in the brief.',
};

export const FITTINGS: Remark = {
  code: 'many-in-one',
  key: 'fittings',
  severity: 'note',
  say: (count, first) =>
    `${whose(count, first, 'hold', 'holds')} several solids, some less than a quarter as long as the longest; these are taken as fittings and left out.`,
  advice: 'Where one of them is a member, export it as an element of its own.',
};
