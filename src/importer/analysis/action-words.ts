import type { GivenCase, GivenCombination } from '../given.ts';

type Nature = GivenCase['nature'];
type Limit = GivenCombination['limit'];

/** IfcActionSourceTypeEnum; what is not here is imposed. */
const BY_SOURCE: Readonly<Record<string, Nature>> = {
  DEAD_LOAD_G: 'permanent',
  COMPLETION_G1: 'permanent',
  PRESTRESSING_P: 'permanent',
  SETTLEMENT_U: 'permanent',
  SHRINKAGE: 'permanent',
  CREEP: 'permanent',
  LACK_OF_FIT: 'permanent',
  SYSTEM_IMPERFECTION: 'permanent',
  SNOW_S: 'snow',
  ICE: 'snow',
  WIND_W: 'wind',
  TEMPERATURE_T: 'thermal',
  EARTHQUAKE_E: 'accidental',
  FIRE: 'accidental',
  IMPULSE: 'accidental',
  IMPACT: 'accidental',
};

/** By what causes the action; IfcActionTypeEnum decides where it says permanent or extraordinary, or the source nothing. */
export function natureOf(type: string | null, source: string | null): Nature {
  if (type === 'PERMANENT_G') return 'permanent';
  if (type === 'EXTRAORDINARY_A') return 'accidental';
  const bySource = source !== null && Object.hasOwn(BY_SOURCE, source) ? BY_SOURCE[source]! : 'imposed';
  return type === 'VARIABLE_Q' && bySource === 'permanent' ? 'imposed' : bySource;
}

const BY_WORDS: readonly (readonly [pattern: RegExp, limit: Limit])[] = [
  [/quasi/i, 'quasi-permanent'],
  [/frequent/i, 'frequent'],
  [/\bEQU\b|equilibrium|overturn/i, 'equilibrium'],
  [/\bALS\b|accident|extraordinary|seismic|earthquake|\bfire\b/i, 'accidental'],
  [/\bSLS\b|servic|characteristic|\brare\b/i, 'characteristic'],
  [/\bULS\b|\bSTR\b|ultimate|strength|\bLRFD\b/i, 'strength'],
];

/**
 * The limit state of a combination, which IFC has no attribute for: by the words of its purpose and names; else one that
 * raises no action is characteristic and any other is one of strength.
 */
export function limitOf(purpose: string, names: string, type: string | null, factors: readonly number[]): Limit {
  const saidIn = (words: string) => BY_WORDS.find(([pattern]) => pattern.test(words));
  const said = saidIn(purpose) ?? saidIn(names);
  if (said !== undefined) return said[1];
  if (type === 'EXTRAORDINARY_A') return 'accidental';
  return factors.some((factor) => Math.abs(factor) > 1) ? 'strength' : 'characteristic';
}
