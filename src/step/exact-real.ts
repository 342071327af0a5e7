/** Whole numbers below this, divided by or multiplied with one power of ten up to 22, round correctly (Clinger 1990). */
const EXACT_BELOW = 2 ** 53;
const POWERS_OF_TEN = Array.from({ length: 23 }, (_, exponent) => Number(`1e${exponent}`));

/** `mantissa` (a whole number, not negative) times ten to `exponent`, rightly rounded; NaN where that takes more than one operation. */
export function exactReal(mantissa: number, exponent: number): number {
  if (!(mantissa < EXACT_BELOW && exponent >= -22 && exponent <= 22)) return Number.NaN;
  return exponent < 0 ? mantissa / POWERS_OF_TEN[-exponent] : mantissa * POWERS_OF_TEN[exponent];
}
