import type { Vec3 } from './vector.ts';

export type Severity = 'error' | 'warning' | 'note';

/** Every finding code, with the severity it usually has. The stages may lower or raise it where the contract says so. */
export const FINDING_SEVERITY = {
  'unreadable-element': 'error',
  'no-axis': 'error',
  'no-section': 'error',
  'no-members': 'error',
  'many-in-one': 'error',
  'cyclic-placement': 'error',
  'near-miss': 'error',
  'lone-member': 'error',
  'separate-part': 'error',
  'twin-members': 'error',
  overlap: 'error',
  'load-moves-it': 'error',
  'unstable-balance': 'error',
  'works-in-bending': 'error',
  overstressed: 'error',
  'no-support': 'error',
  'moves-freely': 'error',
  'nearly-moves': 'warning',
  'loose-end': 'warning',
  'zero-length': 'warning',
  'bent-axis': 'warning',
  'crossing-apart': 'warning',
  'offset-joint': 'warning',
  'axis-moved': 'warning',
  'crowded-joint': 'warning',
  'bends-between-nodes': 'warning',
  'no-material': 'warning',
  'guessed-section': 'warning',
  'section-disagrees': 'warning',
  'material-implausible': 'warning',
  'no-load': 'warning',
  slender: 'warning',
  'support-lifts': 'warning',
  'second-order-matters': 'warning',
  'selector-empty': 'warning',
  'dangling-reference': 'warning',
  'doubled-id': 'warning',
  'doubled-globalid': 'warning',
  'units-missing': 'warning',
  'schema-guessed': 'warning',
  'encoding-broken': 'warning',
  'signature-void': 'warning',
  'slack-bar': 'note',
  'pair-joined': 'note',
  'carried-node': 'note',
  'surface-skipped': 'note',
  'out-of-scope': 'note',
  'mass-differs': 'note',
} as const satisfies Record<string, Severity>;

export type FindingCode = keyof typeof FINDING_SEVERITY;

/**
 * One thing the reader of the model should know. `members` are GlobalIds, `nodes` are indices into the truss's nodes
 * (none before there is a truss), `at` is in world metres, `gap` in metres.
 */
export interface Finding {
  readonly code: FindingCode;
  readonly severity: Severity;
  readonly message: string;
  readonly members: readonly string[];
  readonly nodes: readonly number[];
  readonly at: Vec3 | null;
  readonly place: string | null;
  readonly gap: number | null;
  readonly advice: string;
}

/** A finding with the usual severity of its code and nothing said that is not given. */
export function finding(
  code: FindingCode,
  message: string,
  advice: string,
  rest: Partial<Omit<Finding, 'code' | 'message' | 'advice'>> = {},
): Finding {
  return {
    code,
    severity: FINDING_SEVERITY[code],
    message,
    members: [],
    nodes: [],
    at: null,
    place: null,
    gap: null,
    advice,
    ...rest,
  };
}
