/** What the brief will be able to say and this version cannot honour: refused by name, never passed over. */
const VALUES: readonly { readonly path: string; readonly value: RegExp }[] = [
  { path: 'chords', value: /^continuous$/u },
];

export const isValueNotYetAvailable = (path: readonly PropertyKey[], value: unknown): boolean =>
  typeof value === 'string' && VALUES.some((entry) => entry.path === path.join('.') && entry.value.test(value));
