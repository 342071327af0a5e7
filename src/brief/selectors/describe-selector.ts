import type { MemberSelector, NodeSelector } from '../types.ts';

/** A selector in the words it was written in, lengths in m and angles in rad: `{class: IfcBeam, level: [4, null]}`. */
export function describeSelector(selector: MemberSelector | NodeSelector): string {
  return write(selector);
}

function write(value: unknown): string {
  if (Array.isArray(value)) return value.length === 1 ? write(value[0]) : `[${value.map(writeEnd).join(', ')}]`;
  if (typeof value !== 'object' || value === null) return writeEnd(value);
  const keys = Object.entries(value).filter(([key]) => key !== 'line');
  return `{${keys.map(([key, inner]) => `${key}: ${write(inner)}`).join(', ')}}`;
}

function writeEnd(value: unknown): string {
  if (typeof value === 'number') return String(Number(value.toPrecision(6)));
  return typeof value === 'object' && value !== null ? write(value) : String(value);
}
