/** A length (m) in millimetres: whole from 10 mm on, with one decimal below where there is one. */
export function millimetres(length: number): string {
  const mm = length * 1000;
  const text = Math.abs(mm) < 10 ? String(Number(mm.toFixed(1))) : mm.toFixed(0);
  return `${text === '-0' ? '0' : text} mm`;
}
