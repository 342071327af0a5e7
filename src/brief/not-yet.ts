/** What the brief will be able to say and this version cannot honour: refused by name, never passed over. */
const KEYS: ReadonlySet<string> = new Set([
  'holds',
  'settle',
  'temperature',
  'misfit',
  'outline',
  'openings',
  'edge',
  'category',
  'alternative',
  'altitude',
  'imperfections',
]);

const VALUES: readonly { readonly path: string; readonly value: RegExp }[] = [
  { path: 'chords', value: /^continuous$/u },
  { path: 'combinations', value: /^(EN1990|ASCE7)(\b.*)?$/u },
  { path: 'checks', value: /^(EN1993-1-1|AISC360)(\b.*)?$/u },
  { path: 'checks.rule', value: /^(EN1993-1-1|AISC360)(\b.*)?$/u },
];

export const isKeyNotYetAvailable = (key: string): boolean => KEYS.has(key);

export const isValueNotYetAvailable = (path: readonly PropertyKey[], value: unknown): boolean =>
  typeof value === 'string' && VALUES.some((entry) => entry.path === path.join('.') && entry.value.test(value));
