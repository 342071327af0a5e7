import type { Asce7Rule } from '../../brief/code-rule.ts';

/** Kinds of load of ASCE 7: dead, live, roof live, snow, wind, self-straining, extraordinary. */
export type Load = 'D' | 'L' | 'Lr' | 'S' | 'W' | 'T' | 'A';

/** One combination of the standard: a load that is not named does not act in it. */
export interface Row {
  readonly clause: string;
  readonly limit: 'strength' | 'accidental';
  readonly factors: Readonly<Partial<Record<Load, number>>>;
}

/**
 * Basic combinations of ASCE/SEI 7-16 and 7-22 without earthquake, flood, rain and fluids (values from memory of the standards). "Lr or S" gives two
 * rows. Snow loads of 7-22 are at strength level, so that their factors differ.
 */
export function rowsOf(rule: Asce7Rule): Row[] {
  return rule.method === 'LRFD' ? strengthRows(rule) : allowableRows(rule);
}

/** 7-16: 2.3.1; 7-22: 2.3.1. */
const SNOW = {
  'ASCE7-16': { leading: 1.6, companion: 0.5, allowable: 1.0, extraordinary: 0.2 },
  'ASCE7-22': { leading: 1.0, companion: 0.3, allowable: 0.7, extraordinary: 0.15 },
} as const;

function strengthRows({ code, companionLive: L }: Asce7Rule): Row[] {
  const snow = SNOW[code];
  const companion = [{ Lr: 0.5 }, { S: snow.companion }];
  const leading = [{ Lr: 1.6 }, { S: snow.leading }];
  const row = (clause: string, factors: Row['factors']): Row => ({ clause, limit: 'strength', factors });
  // Self-straining loads: no less than 1.0 beside others (2.3.4), 1.2 where they lead (commentary C2.3.4).
  return [
    row('2.3.1(1)', { D: 1.4 }),
    ...companion.map((roof) => row('2.3.1(2)', { D: 1.2, L: 1.6, ...roof, T: 1 })),
    ...leading.flatMap((roof) => [
      row('2.3.1(3)', { D: 1.2, ...roof, L, T: 1 }),
      row('2.3.1(3)', { D: 1.2, ...roof, W: 0.5, T: 1 }),
    ]),
    ...companion.map((roof) => row('2.3.1(4)', { D: 1.2, W: 1, L, ...roof, T: 1 })),
    row('2.3.1(5)', { D: 0.9, W: 1, T: 1 }),
    row('2.3.4', { D: 1.2, T: 1.2, L: 0.5 }),
    ...[0.9, 1.2].map(
      (D): Row => ({
        clause: '2.5.2',
        limit: 'accidental',
        factors: { D, A: 1, L: 0.5, S: snow.extraordinary },
      }),
    ),
  ];
}

function allowableRows({ code }: Asce7Rule): Row[] {
  const S = SNOW[code].allowable;
  const row = (clause: string, factors: Row['factors']): Row => ({ clause, limit: 'strength', factors });
  const roofs = [
    { Lr: 1, S: 0 },
    { Lr: 0, S },
  ];
  const times = (k: number, roof: { Lr: number; S: number }) => ({ Lr: k * roof.Lr, S: k * roof.S });
  // Self-straining loads: no less than 0.75 of them beside others (2.4.4).
  return [
    row('2.4.1(1)', { D: 1, T: 1 }),
    row('2.4.1(2)', { D: 1, L: 1, T: 0.75 }),
    ...roofs.map((roof) => row('2.4.1(3)', { D: 1, ...roof, T: 0.75 })),
    ...roofs.map((roof) => row('2.4.1(4)', { D: 1, L: 0.75, ...times(0.75, roof), T: 0.75 })),
    row('2.4.1(5)', { D: 1, W: 0.6, T: 0.75 }),
    ...roofs.map((roof) => row('2.4.1(6)', { D: 1, L: 0.75, W: 0.75 * 0.6, ...times(0.75, roof), T: 0.75 })),
    row('2.4.1(7)', { D: 0.6, W: 0.6, T: 0.75 }),
  ];
}
