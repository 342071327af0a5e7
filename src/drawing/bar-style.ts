import { PALETTE } from './palette.ts';

/** How the force of a bar is told: the hue and the dash say the sign, the weight the size. */
export interface BarStyle {
  readonly colour: string;
  /** mm on paper. */
  readonly weight: number;
  /** Length of a dash and of the gap after it, mm; null for a whole line. Tension is dashed, which grey print keeps. */
  readonly dash: readonly [number, number] | null;
}

const THINNEST = 0.22;
const THICKEST = 1.3;
const WITHOUT_FORCE = 0.3;

/** Of the greatest force: below it a bar is drawn as idle. */
const NEXT_TO_NOTHING = 0.002;

export type BarState = 'tension' | 'compression' | 'idle' | 'unknown' | 'neutral';

/** What a bar's force makes of it; neutral where there are no forces at all. */
export function barState(force: number | null, greatest: number, isLoaded: boolean): BarState {
  if (force === null) return isLoaded ? 'unknown' : 'neutral';
  const share = greatest > 0 ? Math.abs(force) / greatest : 0;
  if (share < NEXT_TO_NOTHING) return 'idle';
  return force < 0 ? 'compression' : 'tension';
}

/** The weight grows with the root of the force: small forces stay visible beside large ones. */
export function barStyle(force: number | null, greatest: number, isLoaded: boolean, thinness = 1): BarStyle {
  if (force === null) {
    const colour = isLoaded ? PALETTE.unknown : PALETTE.neutral;
    return { colour, weight: WITHOUT_FORCE * Math.max(thinness, 0.4), dash: isLoaded ? [0.4, 0.6] : null };
  }
  const share = greatest > 0 ? Math.abs(force) / greatest : 0;
  if (share < NEXT_TO_NOTHING) return { colour: PALETTE.idle, weight: THINNEST * thinness, dash: null };
  const weight = stepped((THINNEST + (THICKEST - THINNEST) * Math.sqrt(share)) * thinness);
  if (force < 0) return { colour: PALETTE.compression, weight, dash: null };
  return { colour: PALETTE.tension, weight, dash: [1.2 + 1.8 * weight, 0.5 + 0.5 * weight] };
}

/** Few different weights make few groups in the file. */
const stepped = (weight: number): number => Math.max(0.05, Math.round(weight * 20) / 20);
