/** Colours of the drawings: told apart with any colour vision (hues after Okabe and Ito, 2008, from memory), printed on white. */
export const PALETTE = {
  tension: '#0072b2',
  compression: '#d55e00',
  /** A bar whose force is next to nothing, and a bar before there are forces. */
  idle: '#9aa1a8',
  neutral: '#3f4a54',
  /** A bar whose force could not be found. */
  unknown: '#8a6fa8',
  ink: '#1d2328',
  quiet: '#6b747c',
  faint: '#c9ced2',
  paper: '#ffffff',
  /** Members that a finding speaks of, and those that it names beside them. */
  concerned: '#d55e00',
  beside: '#0072b2',
  context: '#b8bfc5',
  mark: '#1d2328',
} as const;
