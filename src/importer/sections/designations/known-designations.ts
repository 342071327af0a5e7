import { FAMILIES, type Family } from './families.ts';

/** Every rolled section that is known by its name alone, as it is called; those named by their dimensions have no list. */
export const knownDesignations = (): string[] =>
  Object.values(FAMILIES).flatMap(({ rows, nameOf }: Family) => [...rows.keys()].map(nameOf));
