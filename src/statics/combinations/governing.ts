import type { BarEnvelope, SolvedCombination } from '../types.ts';

/** Limits whose forces design bars and supports; the others are for movements. */
const OF_FORCES: ReadonlySet<string> = new Set(['strength', 'equilibrium', 'accidental']);

/** Share of the greatest value of its kind below which a difference is rounding: of equals the first one governs. */
const SAME = 1e-9;

/**
 * The combinations that give a bar its greatest tension or compression, a support its greatest or least force along an axis or sideways, or a
 * node its greatest movement, by limit; and those that are refused. Without the others no design changes.
 */
export function governing(
  combinations: readonly SolvedCombination[],
  envelope: readonly BarEnvelope[],
): ReadonlySet<SolvedCombination> {
  const chosen = new Set(combinations.filter(({ refused }) => refused !== null));
  const byName = new Map(combinations.map((one) => [one.name, one]));
  for (const { tension, compression } of envelope)
    for (const extreme of [tension, compression]) {
      const one = extreme === null ? undefined : byName.get(extreme.from);
      if (one !== undefined) chosen.add(one);
    }
  for (const limit of new Set(combinations.map((one) => one.limit))) {
    const ofLimit = combinations.filter((one) => one.limit === limit && one.refused === null);
    const valuesOf = OF_FORCES.has(limit) ? supportValues : movementValues;
    for (const i of extremesOf(ofLimit.map(valuesOf))) chosen.add(ofLimit[i]);
  }
  return chosen;
}

/** Three components and the horizontal force of each support. */
const supportValues = ({ reactions }: SolvedCombination): Float64Array =>
  Float64Array.from(reactions.flatMap(({ force }) => [...force, Math.hypot(force[0], force[1])]));

const movementValues = ({ displacement }: SolvedCombination): Float64Array => {
  const values = new Float64Array(3 * displacement.length);
  displacement.forEach((moved, node) => {
    if (moved !== null) values.set(moved, 3 * node);
  });
  return values;
};

/** Rows that hold the least or the greatest of some column. */
function extremesOf(rows: readonly Float64Array[]): Set<number> {
  const scale = rows.reduce((most, row) => row.reduce((m, v) => Math.max(m, Math.abs(v)), most), 0);
  const tolerance = SAME * scale;
  const found = new Set<number>();
  for (let k = 0; k < (rows[0]?.length ?? 0); k++) {
    let [least, most] = [0, 0];
    for (let i = 1; i < rows.length; i++) {
      if (rows[i][k] < rows[least][k] - tolerance) least = i;
      if (rows[i][k] > rows[most][k] + tolerance) most = i;
    }
    if (rows[most][k] - rows[least][k] > tolerance) found.add(least).add(most);
  }
  return found;
}
