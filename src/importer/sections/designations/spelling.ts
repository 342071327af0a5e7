/**
 * A designation in one spelling: capitals, decimal points, X between dimensions, no blanks but those that part a whole
 * number from its fraction, letters before numbers: 'RHS150X100X6.3' of '150*100*6,3 rhs'.
 */
export function plainSpelling(text: string): string {
  const plain = text
    .toUpperCase()
    .normalize('NFKC')
    .replace(/[\u2044\u2215]/g, '/')
    .replace(/[×✕✖*]/g, 'X')
    .replace(/[″”"]|''/g, '')
    .replace(/[Øø⌀∅Φ]/g, 'Ø')
    .replace(/(\d),(\d)/g, '$1.$2')
    .replace(/(\d)\s+(\d+\/\d)/g, '$1-$2')
    .replace(/(\d)\s*MM\b/g, '$1')
    .replace(/\s+/g, '');
  return lettersFirst(
    plain.replace(/([A-ZØ])(?:[-_:]+|\.(?!\d))(?=[A-ZØ\d])/g, '$1').replace(/(\d)[-_:]+(?=[A-ZØ])/g, '$1'),
  );
}

/** Letters that stand behind the dimensions go before them; the letters of 'HE 200 A' belong where they are. */
function lettersFirst(plain: string): string {
  const behind = /^([\d./X-]*\d)((?!X)[A-ZØ]{1,6})$/.exec(plain);
  return behind === null ? plain : `${behind[2]}${behind[1]}`;
}

/** The dimensions of '150X100X6.3' or '80/80/8'; null where a part of it is no positive number. */
export function metricDimensions(written: string): number[] | null {
  const parts = written.split(/[X/]/).map((part) => (/^\d+(\.\d+)?$|^\.\d+$/.test(part) ? Number(part) : Number.NaN));
  return parts.every((part) => part > 0) ? parts : null;
}

/** The dimensions of '3-1/2X3X1/4'; null where a part of it is no number or fraction. */
export function inchDimensions(written: string): number[] | null {
  const parts = written.split('X').map(inches);
  return parts.every((part) => part > 0) ? parts : null;
}

function inches(written: string): number {
  const match = /^(?:(\d+)-)?(\d+)\/(\d+)$/.exec(written);
  if (match === null) return /^\d*\.?\d+$/.test(written) ? Number(written) : Number.NaN;
  return Number(match[1] ?? 0) + Number(match[2]) / Number(match[3]);
}
