import { type Grade, grade, type Steps } from './grade.ts';

/**
 * Grades of the Japanese and Chinese standards that models name: MPa by mm, from memory. Moduli are those of the European
 * rules, 2 % above the Japanese 205 GPa.
 */

const upTo = (last: number, ultimate: number): Steps => [[last, ultimate]];

const SS400 = grade(
  [
    [16, 245],
    [40, 235],
    [100, 215],
  ],
  upTo(100, 400),
);
const SM490 = grade(
  [
    [16, 325],
    [40, 315],
    [100, 295],
  ],
  upTo(100, 490),
);

export const ASIAN: readonly { readonly pattern: RegExp; readonly grade: Grade }[] = [
  // JIS G 3101, G 3106, G 3136, G 3444, G 3466.
  { pattern: /\bSS\s?400\b/i, grade: SS400 },
  { pattern: /\bSM\s?400[ABC]?\b/i, grade: SS400 },
  { pattern: /\bSM\s?490[ABC]?\b/i, grade: SM490 },
  {
    pattern: /\bSN\s?400[ABC]?\b/i,
    grade: grade(
      [
        [40, 235],
        [100, 215],
      ],
      upTo(100, 400),
    ),
  },
  {
    pattern: /\bSN\s?490[BC]?\b/i,
    grade: grade(
      [
        [40, 325],
        [100, 295],
      ],
      upTo(100, 490),
    ),
  },
  { pattern: /\bSTKR\s?400\b/i, grade: grade(upTo(40, 245), upTo(40, 400)) },
  { pattern: /\bSTKR\s?490\b/i, grade: grade(upTo(40, 325), upTo(40, 490)) },
  { pattern: /\bSTK\s?400\b/i, grade: grade(upTo(40, 235), upTo(40, 400)) },
  { pattern: /\bSTK\s?490\b/i, grade: grade(upTo(40, 315), upTo(40, 490)) },
  // GB/T 700 and GB/T 1591.
  {
    pattern: /\bQ\s?235(?!\d)/i,
    grade: grade(
      [
        [16, 235],
        [40, 225],
        [100, 215],
      ],
      upTo(100, 370),
    ),
  },
  {
    pattern: /\bQ\s?345(?!\d)/i,
    grade: grade(
      [
        [16, 345],
        [40, 335],
        [63, 325],
        [80, 315],
        [100, 305],
      ],
      upTo(100, 470),
    ),
  },
  {
    pattern: /\bQ\s?355(?!\d)/i,
    grade: grade(
      [
        [16, 355],
        [40, 345],
        [63, 335],
        [80, 325],
        [100, 315],
      ],
      upTo(100, 470),
    ),
  },
];
