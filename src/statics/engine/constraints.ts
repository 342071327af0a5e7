export interface Term {
  readonly unknown: number;
  readonly factor: number;
}

/** Freedoms that follow others: `q[follower] = sum of factor * q[unknown]`, over freedoms that follow none themselves. */
export type Followers = ReadonlyMap<number, readonly Term[]>;

type Put = (unknown: number, value: number) => void;

/** Coefficients at or below this cannot be followed through: the condition is taken to repeat the ones before it. */
const DEPENDENT = 1e-6;

/**
 * Takes a linear condition `sum of factor * q[unknown] = 0` in: the freedom with the largest coefficient left follows the others from now on and is active no
 * more (elimination with pivoting, so that one condition may meet freedoms of another). Coefficients should be about 1. Returns the follower, or -1
 * where the condition says nothing new.
 */
export function addCondition(
  followers: Map<number, readonly Term[]>,
  active: Uint8Array,
  condition: readonly Term[],
): number {
  const open = new Map<number, number>();
  for (const { unknown, factor } of condition)
    throughFollowers(followers, unknown, factor, (u, v) => open.set(u, (open.get(u) ?? 0) + v));
  let follower = -1;
  let largest = DEPENDENT;
  for (const [unknown, value] of open)
    if (Math.abs(value) > largest) {
      follower = unknown;
      largest = Math.abs(value);
    }
  if (follower < 0) return -1;
  const pivot = open.get(follower)!;
  open.delete(follower);
  const follows: Term[] = [...open].map(([unknown, value]) => ({ unknown, factor: -value / pivot }));
  for (const [unknown, old] of followers)
    if (old.some((term) => term.unknown === follower)) followers.set(unknown, substitute(old, follower, follows));
  followers.set(follower, follows);
  active[follower] = 0;
  return follower;
}

/** Puts `value` times a freedom as what it stands for: itself, or the freedoms it follows. */
export function throughFollowers(followers: Followers, unknown: number, value: number, put: Put): void {
  const following = followers.get(unknown);
  if (following) for (const term of following) put(term.unknown, value * term.factor);
  else put(unknown, value);
}

/** `q` with the freedoms that follow filled in. */
export function fillFollowers(followers: Followers, q: Float64Array): Float64Array {
  const full = q.slice();
  for (const [unknown, terms] of followers) {
    let value = 0;
    for (const term of terms) value += term.factor * q[term.unknown];
    full[unknown] = value;
  }
  return full;
}

function substitute(terms: readonly Term[], replaced: number, by: readonly Term[]): Term[] {
  const sum = new Map<number, number>();
  for (const { unknown, factor } of terms)
    if (unknown === replaced) for (const t of by) sum.set(t.unknown, (sum.get(t.unknown) ?? 0) + factor * t.factor);
    else sum.set(unknown, (sum.get(unknown) ?? 0) + factor);
  return [...sum].map(([unknown, factor]) => ({ unknown, factor }));
}
