import { createHash } from 'node:crypto';

const DIGITS = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz_$';

/** The same name always gets the same GlobalId, so that it stays from revision to revision. */
export function globalId(name: string): string {
  let value = BigInt(`0x${createHash('sha256').update(`demo boat hall: ${name}`).digest('hex').slice(0, 32)}`);
  let digits = '';
  for (let k = 0; k < 22; k++) {
    digits = DIGITS[Number(value % 64n)] + digits;
    value /= 64n;
  }
  return digits;
}

/** Of the element that the part of this name is written as. */
export const partId = (partName: string): string => globalId(`part ${partName}`);
