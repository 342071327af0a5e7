import type { Making } from '../../../domain/member.ts';
import { NotRead } from '../../not-read.ts';
import type { ProfileShape } from '../profile-shape.ts';
import {
  ASSUMED_MAKING,
  americanRectangle,
  americanTube,
  flatBar,
  hollowRectangle,
  inchAngle,
  metricAngle,
  roundBar,
  tube,
} from './dimensions.ts';
import { FAMILIES, type Family, type FamilyName } from './families.ts';
import { PIPE } from './pipe-sizes.ts';
import { softMetricSize } from './soft-metric.ts';
import { inchDimensions, metricDimensions, plainSpelling } from './spelling.ts';

const MILLIMETRE = 1e-3;
const INCH = 0.0254;

/**
 * The shape that `text` as a whole calls by its designation: European, British and American rolled sections by their tables,
 * hollow sections, angles and bars by their dimensions, tees by the section they are cut from. Null where it is none that is
 * known, or where its dimensions make no section.
 * @example shapeFromDesignation('150*100*6.3 RHS')
 */
export function shapeFromDesignation(text: string): ProfileShape | null {
  // Longer texts are descriptions, not designations; and nobody reads patterns through a page of text.
  if (text.length > 60) return null;
  const { plain, making } = withoutStandard(text.replace(GRADE_BEHIND, ''));
  const spelt = plainSpelling(plain);
  if (!/\d/.test(spelt)) return null;
  try {
    return halfShape(spelt) ?? familyShape(spelt) ?? dimensionedShape(spelt, making, /["”″]|''/.test(text));
  } catch (problem) {
    if (problem instanceof NotRead) return null;
    throw problem;
  }
}

/** 'RHS 100x50x4 EN 10210' says how it was made, and so does our own 'RHS 100x50x4 hot'. */
function withoutStandard(text: string): { plain: string; making: Making | null } {
  const standard = /[\s,(-]*(?:EN\s?-?(10210|10219)[-0-9:\s)]*|\s(HOT|COLD)$)/i.exec(text);
  if (standard === null) return { plain: text, making: null };
  const isHot = standard[1] === '10210' || standard[2]?.toUpperCase() === 'HOT';
  return { plain: text.replace(standard[0], ' ').trim(), making: stated(isHot ? 'hot' : 'cold') };
}

/** 'HEA200-S355', 'IPE 300 / S235JR', 'W12X26 A992': the grade of the steel behind the section, in EN and ASTM spellings. */
const GRADE_BEHIND =
  /(?<=\d[A-Z]?)[\s,;/(_-]+(?:S\s?(?:235|275|355|420|450|460|500|550|690)[A-Z0-9+]{0,8}|A(?:36|53|500|572|913|992|1085)(?:\s?GR\.?\s?\w{1,2})?)\)?\s*$/i;

interface Sized {
  readonly family: FamilyName;
  readonly size: string;
}

/** How designations of the families are written once they are spelt plainly; $1 or `size` is the row. */
const FAMILY_SPELLINGS: readonly (readonly [pattern: RegExp, read: (match: RegExpExecArray) => Sized])[] = [
  [/^IPE(AA|A|O)?(\d+)$/, (m) => ({ family: ipe(m[1]), size: m[2]! })],
  [/^IPE(\d+)(AA|A|O)$/, (m) => ({ family: ipe(m[2]), size: m[1]! })],
  [/^HE(AA|A|B|M)(\d+)$/, (m) => ({ family: `HE${m[1]}` as FamilyName, size: m[2]! })],
  [/^HE(\d+)(AA|A|B|M)$/, (m) => ({ family: `HE${m[2]}` as FamilyName, size: m[1]! })],
  [/^IPB(L|V)?(\d+)$/, (m) => ({ family: m[1] === 'L' ? 'HEA' : m[1] === 'V' ? 'HEM' : 'HEB', size: m[2]! })],
  [/^(?:INP|IPN|I)(\d+)$/, (m) => ({ family: 'INP', size: m[1]! })],
  [/^(?:UNP|UPN|U)(\d+)$/, (m) => ({ family: 'UPN', size: m[1]! })],
  [/^UPE(\d+)$/, (m) => ({ family: 'UPE', size: m[1]! })],
  [/^T(\d+)$/, (m) => ({ family: 'T', size: m[1]! })],
  [/^(UKB|UKC|UB|UC)(\d{3}X\d{2,3}X\d+)$/, (m) => ({ family: m[1]!.at(-1) === 'B' ? 'UB' : 'UC', size: m[2]! })],
  [
    /^(\d{3}X\d{2,3})(UKB|UKC|UB|UC)(\d+)$/,
    (m) => ({ family: m[2]!.at(-1) === 'B' ? 'UB' : 'UC', size: `${m[1]}X${m[3]}` }),
  ],
  [/^(?:UK)?PFC(\d{3}X\d{2,3}(?:X\d+)?)$/, (m) => ({ family: 'PFC', size: m[1]! })],
  [/^(W|HP|S|C|MC)(\d+X\d*\.?\d+)$/, (m) => ({ family: m[1] as FamilyName, size: m[2]! })],
];

const ipe = (kind: string | undefined): FamilyName => (kind === undefined ? 'IPE' : (`IPE ${kind}` as FamilyName));

function sizeIn(spelt: string): Sized | null {
  for (const [pattern, read] of FAMILY_SPELLINGS) {
    const match = pattern.exec(spelt);
    if (match === null) continue;
    const { family, size } = read(match);
    const found = knownSize(family, size);
    if (found !== null) return { family, size: found };
  }
  return null;
}

function knownSize(name: FamilyName, size: string): string | null {
  const { rows }: Family = FAMILIES[name];
  for (const written of [size, size.replaceAll('X', 'x')]) if (rows.has(written)) return written;
  // '230X75' of channels is known without its mass.
  if (name === 'PFC') return [...rows.keys()].find((key) => key.startsWith(`${size.replaceAll('X', 'x')}x`)) ?? null;
  return softMetricSize(name, rows, size);
}

function familyShape(spelt: string): ProfileShape | null {
  const found = sizeIn(spelt);
  if (found === null) return null;
  const { rows, nameOf, shapeOf }: Family = FAMILIES[found.family];
  return shapeOf(nameOf(found.size), rows.get(found.size)!);
}

/** '1/2 IPE 300' and 'WT6X13', which is half of W12X26. */
function halfShape(spelt: string): ProfileShape | null {
  const half = /^(?:1\/2|0?\.5|HALF)[X-]?([A-Z].*)$/.exec(spelt);
  const whole = half === null ? wholeOfTee(spelt) : sizeIn(half[1]!);
  if (whole === null) return null;
  const { rows, nameOf, halfOf }: Family = FAMILIES[whole.family];
  if (halfOf === null) return null;
  return halfOf(half === null ? spelt : `1/2 ${nameOf(whole.size)}`, rows.get(whole.size)!);
}

function wholeOfTee(spelt: string): Sized | null {
  const tee = /^(W|S)T(\d+\.?\d*)X(\d*\.?\d+)$/.exec(spelt);
  if (tee === null) return null;
  const family = tee[1] as FamilyName;
  const size = `${2 * Number(tee[2])}X${2 * Number(tee[3])}`;
  return FAMILIES[family].rows.has(size) ? { family, size } : null;
}

const HOLLOW = /^(HF|CF)?(RHS|SHS|RRO|QRO|VKR|KKR|KOKER|K|HUP)(HF|CF)?([\d.X/]+)$/;
const TUBE = /^(HF|CF)?(?:CHS|ROHR|ROR|RO|TUBE|PIPE|D|Ø)([\d.X/]+)$/;
const ROUND = /^(?:ROUND|RUND|RND|ROD|RD|Ø)([\d.]+)$/;
const SQUARE = /^(?:SQ|VKT|4KT)([\d.]+)$/;
const FLAT = /^(?:FLAT|FLT|FLA|FL|FB|PLATE|PLT|PL|BL)([\d.X/-]+)$/;
const ANGLE = /^(?:UKA|RSA|LNP|L)([\d.X/-]+)$/;

function dimensionedShape(spelt: string, making: Making | null, inInches: boolean): ProfileShape | null {
  return (
    americanShape(spelt) ??
    matched(HOLLOW, spelt, (match) => hollowShape(match, making)) ??
    matched(TUBE, spelt, (match) => tubeShape(match, making)) ??
    matched(ROUND, spelt, (match) => sized(match[1]!, 1, (d) => roundBar(d!))) ??
    matched(SQUARE, spelt, (match) => sized(match[1]!, 1, (a) => flatBar(a!, a!))) ??
    matched(FLAT, spelt, (match) => flatShape(match[1]!, inInches)) ??
    matched(ANGLE, spelt, (match) => angleShape(spelt, match[1]!))
  );
}

function matched(pattern: RegExp, spelt: string, read: (match: RegExpExecArray) => ProfileShape | null) {
  const match = pattern.exec(spelt);
  return match === null ? null : read(match);
}

/** `make` of exactly `count` dimensions, metres. */
function sized(written: string, count: number, make: (...lengths: number[]) => ProfileShape): ProfileShape | null {
  const lengths = metricDimensions(written);
  return lengths?.length === count ? make(...lengths.map((length) => length * MILLIMETRE)) : null;
}

const stated = (finish: Making['finish']): Making => ({ finish, isAssumed: false });

function tubeShape([, finish, written]: RegExpExecArray, byStandard: Making | null): ProfileShape | null {
  const byWord = finish === undefined ? null : stated(finish === 'HF' ? 'hot' : 'cold');
  return sized(written!, 2, (d, t) => tube(d!, t!, byStandard ?? byWord ?? ASSUMED_MAKING));
}

function hollowShape(match: RegExpExecArray, byStandard: Making | null): ProfileShape | null {
  const [, before, word, behind, written] = match;
  const finish = before ?? behind;
  // Swedish trade names: varm- and kallformat.
  const isHot = finish === 'HF' || word === 'VKR';
  const byWord = isHot || finish === 'CF' || word === 'KKR' ? stated(isHot ? 'hot' : 'cold') : null;
  const making = byStandard ?? byWord ?? ASSUMED_MAKING;
  return (
    sized(written!, 3, (a, b, t) => hollowRectangle(a!, b!, t!, making)) ??
    sized(written!, 2, (a, t) => hollowRectangle(a!, a!, t!, making))
  );
}

function flatShape(written: string, inInches: boolean): ProfileShape | null {
  if (!inInches) return sized(written, 2, (a, b) => flatBar(a!, b!));
  const lengths = inchDimensions(written);
  return lengths?.length === 2 ? flatBar(lengths[0]! * INCH, lengths[1]! * INCH) : null;
}

/** Longest leg of an angle in inches, shortest in millimetres: they do not overlap. */
const LONGEST_INCH_LEG = 12;

function angleShape(spelt: string, written: string): ProfileShape | null {
  const inches = inchDimensions(written);
  if (inches !== null && inches.length === 3 && Math.max(...inches) <= LONGEST_INCH_LEG) {
    const [a, b, t] = inches as [number, number, number];
    return inchAngle(spelt, a * INCH, b * INCH, t * INCH);
  }
  return (
    sized(written, 3, (...lengths) => {
      const [t, short, long] = lengths.toSorted((x, y) => x - y);
      return metricAngle(long!, short!, t!);
    }) ?? sized(written, 2, (a, t) => metricAngle(a!, a!, t!))
  );
}

/** Of ASTM A500 and A53, in inches. Metric HSS are reckoned by other rules and are left out. */
function americanShape(spelt: string): ProfileShape | null {
  const pipe = /^PIPE(\d+(?:-\d+\/\d+)?|\d+\/\d+)(STD|XS|XXS|SCH40|SCH80)$/.exec(spelt);
  if (pipe !== null) return pipeShape(spelt, pipe[1]!, pipe[2]!);
  const match = /^HSS(.+)$/.exec(spelt);
  const sizes = match === null ? null : inchDimensions(match[1]!);
  if (sizes === null || Math.max(...sizes) > 40) return null;
  const lengths = sizes.map((size) => size * INCH);
  if (lengths.length === 2) return americanTube(spelt, lengths[0]!, lengths[1]!);
  return lengths.length === 3 ? americanRectangle(spelt, lengths[0]!, lengths[1]!, lengths[2]!) : null;
}

const SCHEDULES: Readonly<Record<string, readonly [column: number, largest: number]>> = {
  STD: [1, 12],
  XS: [2, 12],
  XXS: [3, 12],
  // Schedules 40 and 80 are STD and XS up to 10 and 8 inches (ASME B36.10M).
  SCH40: [1, 10],
  SCH80: [2, 8],
};

function pipeShape(spelt: string, size: string, schedule: string): ProfileShape | null {
  const row = PIPE.get(size);
  const [column, largest] = SCHEDULES[schedule]!;
  const wall = row?.[column] ?? 0;
  return row === undefined || wall === 0 || Number.parseInt(size, 10) > largest
    ? null
    : americanTube(spelt.replace(/(\d)([SX])/, '$1 $2').replace('PIPE', 'Pipe '), row[0]!, wall);
}
