import { americanGrade, type Grade } from './grade.ts';

/**
 * ASTM grades, MPa as the standards' SI editions round them, from memory. Only A588 and A514 fall with the thickness in
 * the range of structural parts. Where a name leaves the grade open the least stands; of round and shaped A500 tubes
 * each has its own.
 */

const ANY = Number.POSITIVE_INFINITY;
const plain = (yieldStrength: number, ultimate: number): Grade =>
  americanGrade([[ANY, yieldStrength]], [[ANY, ultimate]]);

const A588 = americanGrade(
  [
    [100, 345],
    [125, 315],
    [200, 290],
  ],
  [
    [100, 485],
    [125, 460],
    [200, 435],
  ],
);
const A242 = americanGrade(
  [
    [20, 345],
    [40, 315],
    [100, 290],
  ],
  [
    [20, 480],
    [40, 460],
    [100, 435],
  ],
);
const A514 = americanGrade(
  [
    [65, 690],
    [150, 620],
  ],
  [
    [65, 760],
    [150, 690],
  ],
);

interface Listed {
  readonly pattern: RegExp;
  readonly grade: Grade;
  /** Of rectangular tubes, where it differs. */
  readonly shaped?: Grade;
}

const GRADE = String.raw`[\s,-]*(?:GR\.?|GRADE|-)?\s?`;
const of = (standard: string, suffix: string): RegExp =>
  new RegExp(`\\bA\\s?${standard}M?\\b.*?${GRADE}${suffix}\\b`, 'i');
const bare = (standard: string): RegExp => new RegExp(`\\bA\\s?${standard}M?\\b`, 'i');

export const AMERICAN: readonly Listed[] = [
  { pattern: bare('992'), grade: plain(345, 450) },
  { pattern: of('572', '65'), grade: plain(450, 550) },
  { pattern: of('572', '60'), grade: plain(415, 520) },
  { pattern: of('572', '55'), grade: plain(380, 485) },
  { pattern: of('572', '42'), grade: plain(290, 415) },
  { pattern: bare('572'), grade: plain(345, 450) },
  { pattern: of('913', '70'), grade: plain(485, 620) },
  { pattern: of('913', '65'), grade: plain(450, 550) },
  { pattern: of('913', '60'), grade: plain(415, 520) },
  { pattern: bare('913'), grade: plain(345, 450) },
  { pattern: of('529', '55'), grade: plain(380, 485) },
  { pattern: bare('529'), grade: plain(345, 450) },
  { pattern: of('709', '50W'), grade: plain(345, 485) },
  { pattern: of('709', '50'), grade: plain(345, 450) },
  { pattern: bare('709'), grade: plain(250, 400) },
  { pattern: bare('588'), grade: A588 },
  { pattern: bare('242'), grade: A242 },
  { pattern: bare('514'), grade: A514 },
  { pattern: of('500', 'C'), grade: plain(315, 425), shaped: plain(345, 425) },
  { pattern: of('500', 'A'), grade: plain(230, 310), shaped: plain(270, 310) },
  { pattern: bare('500'), grade: plain(290, 400), shaped: plain(315, 400) },
  { pattern: of('501', 'B'), grade: plain(345, 483) },
  { pattern: bare('501'), grade: plain(250, 400) },
  { pattern: bare('1085'), grade: plain(345, 450) },
  { pattern: bare('847'), grade: plain(345, 485) },
  { pattern: bare('53'), grade: plain(240, 415) },
  { pattern: bare('36'), grade: plain(250, 400) },
];
