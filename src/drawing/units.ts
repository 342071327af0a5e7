/** A force (N) in kN for a label: a sign, and as many digits as are read at a glance. */
export function forceLabel(force: number): string {
  const kilonewtons = Math.abs(force) / 1000;
  const text = kilonewtons >= 9.95 ? kilonewtons.toFixed(0) : kilonewtons.toFixed(1);
  if (Number(text) === 0) return '0';
  return `${force < 0 ? '\u2212' : '+'}${text}`;
}

/** Round numbers 1, 2, 5, 10, ... that lie at or below `most`, from the largest. */
export function roundNumbers(most: number, count: number): number[] {
  const found: number[] = [];
  if (!(most > 0)) return found;
  for (let power = 10 ** Math.floor(Math.log10(most)); found.length < count; power /= 10) {
    for (const step of [5, 2, 1]) {
      if (step * power <= most * (1 + 1e-9) && found.length < count) found.push(step * power);
    }
  }
  return found;
}

/** Scales that drawings are made in, largest first: 1 : n. */
const SCALES = [10, 20, 25, 50, 75, 100, 125, 150, 200, 250, 300, 400, 500, 750, 1000, 1500, 2000, 2500, 5000, 10000];

/** The usual scale 1 : n at which `metres` fit into `millimetres` of paper. */
export function usualScale(millimetresPerMetre: number): number {
  const least = 1000 / millimetresPerMetre;
  const usual = SCALES.find((scale) => scale >= least * (1 - 1e-9));
  return usual ?? 10 ** Math.ceil(Math.log10(least));
}
