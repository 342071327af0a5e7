/** `#rrggbb` mixed with another: all of it at 0, all of the other at 1. */
export function mixed(colour: string, other: string, part: number): string {
  const channel = (text: string, k: number) => Number.parseInt(text.slice(1 + 2 * k, 3 + 2 * k), 16);
  const mix = [0, 1, 2].map((k) => Math.round(channel(colour, k) * (1 - part) + channel(other, k) * part));
  return `#${mix.map((value) => value.toString(16).padStart(2, '0')).join('')}`;
}
