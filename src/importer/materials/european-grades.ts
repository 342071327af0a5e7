import { type GradeTable, grade, type Steps } from './grade.ts';

/**
 * Structural steels of the European product standards: least yield and tensile strengths by nominal thickness, from memory
 * of the standards named. Thicknesses in mm, strengths in MPa. Where a thickness lies beyond the last step the standard
 * does not cover it.
 */

const LONG = [16, 40, 63, 80, 100, 150, 200, 250] as const;

/** Yield strengths over the thickness steps of EN 10025. */
const over = (...strengths: readonly number[]): Steps => strengths.map((strength, i) => [LONG[i]!, strength] as const);

/** EN 10025-4 has 120 for 150. */
const upTo120 = (...strengths: readonly number[]): Steps =>
  strengths.map((strength, i) => [i === 5 ? 120 : LONG[i]!, strength] as const);

/** EN 10210-1: unalloyed grades up to 120 mm, fine grain ones in three steps up to 65 mm. */
const fineHollow = (...strengths: readonly number[]): Steps =>
  strengths.map((strength, i) => [[16, 40, 65][i]!, strength] as const);

const S235_HOLLOW = grade(upTo120(235, 225, 215, 215, 215, 195), [
  [100, 360],
  [120, 350],
]);
const S275_HOLLOW = grade(upTo120(275, 265, 255, 245, 235, 225), [
  [3, 430],
  [100, 410],
  [120, 400],
]);
const S355_HOLLOW = grade(upTo120(355, 345, 335, 325, 315, 295), [
  [3, 510],
  [100, 470],
  [120, 450],
]);

export const EUROPEAN: Readonly<Record<string, GradeTable>> = {
  S185: {
    '': grade(over(185, 175, 175, 175, 175, 165, 155, 145), [
      [3, 310],
      [100, 290],
      [150, 280],
      [250, 270],
    ]),
  },
  // EN 10025-2, -5 (W); hollow: EN 10210-1, of which EN 10219-1 is the part up to 40 mm.
  S235: {
    '': grade(over(235, 225, 215, 215, 215, 195, 185, 175), [
      [100, 360],
      [150, 350],
      [250, 340],
    ]),
    W: grade(over(235, 225, 215, 215, 215, 195), [
      [100, 360],
      [150, 350],
    ]),
    H: S235_HOLLOW,
  },
  S275: {
    '': grade(over(275, 265, 255, 245, 235, 225, 215, 205), [
      [3, 430],
      [100, 410],
      [150, 400],
      [250, 380],
    ]),
    N: grade(over(275, 265, 255, 245, 235, 225, 215, 205), [
      [100, 370],
      [250, 350],
    ]),
    M: grade(upTo120(275, 265, 255, 245, 245, 240), [
      [40, 370],
      [63, 360],
      [120, 350],
    ]),
    H: S275_HOLLOW,
    NH: grade(fineHollow(275, 265, 255), [[65, 370]]),
    MH: grade(
      [
        [16, 275],
        [40, 265],
      ],
      [[40, 360]],
    ),
  },
  S355: {
    '': grade(over(355, 345, 335, 325, 315, 295, 285, 275), [
      [3, 510],
      [100, 470],
      [250, 450],
    ]),
    N: grade(over(355, 345, 335, 325, 315, 295, 285, 275), [
      [100, 470],
      [250, 450],
    ]),
    M: grade(upTo120(355, 345, 335, 325, 325, 320), [
      [40, 470],
      [63, 450],
      [100, 440],
      [120, 430],
    ]),
    W: grade(over(355, 345, 335, 325, 315, 295), [
      [3, 510],
      [100, 470],
      [150, 450],
    ]),
    H: S355_HOLLOW,
    NH: grade(fineHollow(355, 345, 335), [[65, 470]]),
    MH: grade(
      [
        [16, 355],
        [40, 345],
      ],
      [[40, 470]],
    ),
  },
  S420: {
    // Without its delivery the lesser of N and M.
    '': grade(upTo120(420, 400, 390, 370, 360, 340), [
      [40, 520],
      [63, 500],
      [80, 480],
      [100, 470],
      [120, 460],
    ]),
    N: grade(over(420, 400, 390, 370, 360, 340, 330, 320), [
      [100, 520],
      [250, 500],
    ]),
    M: grade(upTo120(420, 400, 390, 380, 370, 365), [
      [40, 520],
      [63, 500],
      [80, 480],
      [100, 470],
      [120, 460],
    ]),
    NH: grade(fineHollow(420, 400, 390), [[65, 520]]),
    MH: grade(
      [
        [16, 420],
        [40, 400],
      ],
      [[40, 500]],
    ),
  },
  S450: {
    '': grade(over(450, 430, 410, 390, 380, 380), [
      [100, 550],
      [150, 530],
    ]),
  },
  S460: {
    '': grade(upTo120(460, 440, 420, 400, 390, 380), [
      [40, 540],
      [63, 530],
      [80, 510],
      [100, 500],
      [120, 490],
    ]),
    N: grade(over(460, 440, 430, 410, 400, 380, 370), [
      [100, 540],
      [200, 530],
    ]),
    M: grade(upTo120(460, 440, 430, 410, 400, 385), [
      [40, 540],
      [63, 530],
      [80, 510],
      [100, 500],
      [120, 490],
    ]),
    NH: grade(fineHollow(460, 440, 430), [[65, 540]]),
    MH: grade(
      [
        [16, 460],
        [40, 440],
      ],
      [[40, 530]],
    ),
    // EN 10025-6.
    Q: grade(
      [
        [50, 460],
        [100, 440],
        [150, 400],
      ],
      [
        [100, 550],
        [150, 500],
      ],
    ),
  },
  S690: {
    '': grade(
      [
        [50, 690],
        [100, 650],
        [150, 630],
      ],
      [
        [50, 770],
        [100, 760],
        [150, 710],
      ],
    ),
  },
  // Cold forming steels, EN 10149-2 (MC) and -3 (NC); galvanised ones, EN 10346 (GD).
  S220: { GD: grade([[6, 220]], [[6, 300]]) },
  S250: { GD: grade([[6, 250]], [[6, 330]]) },
  S280: { GD: grade([[6, 280]], [[6, 360]]) },
  S320: { GD: grade([[6, 320]], [[6, 390]]) },
  S350: { GD: grade([[6, 350]], [[6, 420]]) },
  S315: { MC: grade([[20, 315]], [[20, 390]]), NC: grade([[20, 315]], [[20, 430]]) },
  S500: { MC: grade([[16, 500]], [[16, 550]]) },
  S550: { MC: grade([[16, 550]], [[16, 600]]) },
  S700: { MC: grade([[8, 700]], [[8, 750]]) },
};

/** EN 10149 grades that share their number with others. */
export const COLD_FORMING: Readonly<Record<string, GradeTable>> = {
  S355: { MC: grade([[20, 355]], [[20, 430]]), NC: grade([[20, 355]], [[20, 470]]) },
  S420: { MC: grade([[20, 420]], [[20, 480]]), NC: grade([[20, 420]], [[20, 530]]) },
  S460: { MC: grade([[16, 460]], [[16, 520]]) },
};

/** Names that the standards before EN 10025:1993 gave to grades that go on under another. */
export const FORMER: readonly (readonly [pattern: RegExp, now: string])[] = [
  // EN 10025:1990.
  [/\bFe\s?360(?!\d)/i, 'S235'],
  [/\bFe\s?430(?!\d)/i, 'S275'],
  [/\bFe\s?510(?!\d)/i, 'S355'],
  // DIN 17100.
  [/\b[RUQ]{0,2}St\s?37(?![\d.])/i, 'S235'],
  [/\b[RUQ]{0,2}St\s?44(?![\d.])/i, 'S275'],
  [/\b[RUQ]{0,2}St\s?52(?![\d.])/i, 'S355'],
];
