import { describe, expect, it } from 'vitest';
import type { SectionShape } from '../../../src/domain/member.ts';
import { strengthOf } from '../../../src/importer/materials/grade.ts';
import { gradeIn } from '../../../src/importer/materials/grades.ts';

/** Yield and ultimate strength, MPa, of a part `thickness` mm thick. */
function strengths(name: string, thickness: number | null, shape: SectionShape | null = null) {
  const grade = gradeIn(name, shape);
  if (grade === null) return null;
  const found = strengthOf(grade, thickness === null ? null : thickness / 1000);
  const mpa = (value: number | null) => (value === null ? null : Math.round(value / 1e6));
  return [mpa(found.yieldStrength), mpa(found.ultimateStrength)];
}

describe('steel grades by nominal thickness', () => {
  // From memory of the product standards named.
  it.each([
    [
      'EN 10025-2',
      'S235JR',
      [
        [10, 235, 360],
        [16, 235, 360],
        [17, 225, 360],
        [50, 215, 360],
        [120, 195, 350],
      ],
    ],
    [
      'EN 10025-2',
      'S275J0',
      [
        [2, 275, 430],
        [16, 275, 410],
        [40, 265, 410],
        [63, 255, 410],
        [80, 245, 410],
      ],
    ],
    [
      'EN 10025-2',
      'S355J2+N',
      [
        [2.5, 355, 510],
        [16, 355, 470],
        [40, 345, 470],
        [63, 335, 470],
        [100, 315, 470],
      ],
    ],
    [
      'EN 10025-3',
      'S355NL',
      [
        [16, 355, 470],
        [40, 345, 470],
        [63, 335, 470],
      ],
    ],
    [
      'EN 10025-4',
      'S355ML',
      [
        [16, 355, 470],
        [40, 345, 470],
        [63, 335, 450],
        [80, 325, 440],
      ],
    ],
    [
      'EN 10025-4',
      'S460M',
      [
        [16, 460, 540],
        [40, 440, 540],
        [63, 430, 530],
      ],
    ],
    [
      'EN 10025-5',
      'S355J2W',
      [
        [16, 355, 470],
        [40, 345, 470],
      ],
    ],
    [
      'EN 10025-6',
      'S690QL',
      [
        [50, 690, 770],
        [80, 650, 760],
      ],
    ],
    [
      'EN 10210-1',
      'S355J2H',
      [
        [2.9, 355, 510],
        [10, 355, 470],
        [20, 345, 470],
      ],
    ],
    [
      'EN 10210-1',
      'S460NH',
      [
        [16, 460, 540],
        [40, 440, 540],
        [65, 430, 540],
      ],
    ],
    [
      'EN 10219-1',
      'S420MH',
      [
        [16, 420, 500],
        [30, 400, 500],
      ],
    ],
    ['EN 10149-2', 'S355MC', [[3, 355, 430]]],
    ['EN 10346', 'S350GD+Z275', [[2, 350, 420]]],
    [
      'ASTM A992',
      'A992',
      [
        [10, 345, 450],
        [100, 345, 450],
      ],
    ],
    [
      'ASTM A588',
      'ASTM A588',
      [
        [50, 345, 485],
        [120, 315, 460],
      ],
    ],
    [
      'JIS G 3136',
      'SN490B',
      [
        [20, 325, 490],
        [50, 295, 490],
      ],
    ],
    [
      'GB/T 1591',
      'Q355B',
      [
        [16, 355, 470],
        [20, 345, 470],
      ],
    ],
  ] as const)('%s: %s', (_, name, steps) => {
    expect(steps.map(([thickness]) => strengths(name, thickness))).toEqual(steps.map(([, fy, fu]) => [fy, fu]));
  });

  it('has no strength beyond what the standard covers, and the first step where the thickness is not known', () => {
    expect(strengths('S460NH', 80)).toEqual([null, null]);
    expect(strengths('S355MC', 30)).toEqual([null, null]);
    expect(strengths('S355', null)).toEqual([355, 470]);
  });

  it('counts a hair over a step as the step', () => {
    expect(strengths('S355', 16.004)).toEqual([355, 470]);
    expect(strengths('S355', 16.1)).toEqual([345, 470]);
  });

  it('never rises with the thickness', () => {
    for (const name of [
      'S235',
      'S275N',
      'S275M',
      'S355',
      'S355M',
      'S420',
      'S450',
      'S460',
      'S460Q',
      'S355H',
      'A588',
      'A514',
    ]) {
      let last = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
      for (let thickness = 4; thickness < 250; thickness += 1) {
        const [fy, fu] = strengths(name, thickness) as [number | null, number | null];
        if (fy === null || fu === null) break;
        expect(fy <= last[0]! && fu <= last[1]! && fu > fy, `${name} ${thickness}`).toBe(true);
        last = [fy, fu];
      }
    }
  });

  it('takes the standard of hollow sections for hollow sections', () => {
    expect(strengths('S275M', 10, 'RHS')).toEqual([275, 360]);
    expect(strengths('S275M', 10, 'I')).toEqual([275, 370]);
    expect(strengths('A500 Gr. B', 10, 'RHS')).toEqual([315, 400]);
    expect(strengths('A500 Gr. B', 10, 'CHS')).toEqual([290, 400]);
    expect(strengths('A500 Grade C', 10, 'RHS')).toEqual([345, 425]);
  });
});

describe('names of grades', () => {
  it.each([
    [
      'S355',
      [
        'S355',
        'S355J2+N',
        'S 355 JR',
        'S355K2',
        'S355J2G3',
        'STEEL/S355J0',
        's355jr',
        'Fe510',
        'Fe 510 D',
        'St 52-3',
        'St52-3N',
        'EN 10025-2 S355J2',
      ],
    ],
    ['S275', ['S275', 'S275JR', 'Fe430', 'St 44-2']],
    ['S235', ['S235', 'S235JRG2', 'Fe 360 B', 'RSt 37-2', 'USt37-2', 'ST37']],
    ['A992', ['A992', 'ASTM A992', 'A992 Gr.50', 'A 992', 'A992/A992M']],
    ['A572-50', ['A572 Gr. 50', 'A572 Grade 50', 'A572-50', 'A572']],
    ['A500 B', ['A500 Gr. B', 'A500 Grade B', 'A500-B', 'A500 GrB', 'A500']],
    ['A36', ['A36', 'ASTM A36', 'Steel, A36']],
  ])('%s in every spelling', (name, spellings) => {
    const meant = gradeIn(name);
    expect(meant).not.toBeNull();
    expect(spellings.map((spelling) => gradeIn(spelling))).toEqual(spellings.map(() => meant));
  });

  it.each(['', 'Steel', 'C24', 'B500B', 'S999', 'Stahl 37', 'GL28h', 'Axis S2350', 'St 52.0', 'A4-80', 'Alu 6061'])(
    'none in "%s"',
    (name) => {
      expect(gradeIn(name)).toBeNull();
    },
  );
});
