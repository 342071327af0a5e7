import { enumeration, integer } from '../../../step/write.ts';
import type { Base } from './attribute-table.ts';
import type { DraftValue } from './drafts.ts';
import type { XmlRemarks } from './remarks.ts';

/** The value that text stands for; null, with a remark, where it stands for none. `where` names the attribute. */
export function simpleValue(text: string, base: Base, where: string, remarks: XmlRemarks): DraftValue {
  if (base === 's') return text;
  const word = text.trim();
  if (word === '') return null;
  const value = valueOfWord(word, base, remarks);
  if (value === undefined) {
    remarks.cannotRead(where, word);
    return null;
  }
  return value;
}

/** The values in a list of XML Schema, which white space parts. */
export function simpleList(text: string, base: Base, where: string, remarks: XmlRemarks): DraftValue[] {
  if (base === 's') return [text];
  const words = text.trim().split(/\s+/);
  // One word with a comma may be a number or two of them: it is not guessed at.
  if (words.length === 1 && words[0]!.includes(',')) {
    remarks.cannotRead(where, words[0]!);
    return [];
  }
  return words.filter((word) => word !== '').map((word) => simpleValue(word, base, where, remarks));
}

function valueOfWord(word: string, base: Base, remarks: XmlRemarks): DraftValue | undefined {
  if (base === 'r') return realOf(word, remarks);
  if (base === 'i') {
    const number = realOf(word, remarks);
    return number !== undefined && Number.isSafeInteger(number) ? integer(number) : number;
  }
  if (base === 'b' || base === 'l') return truthOf(word.toLowerCase().replaceAll('.', ''), base);
  if (base === 'e') {
    const name = word.toUpperCase().replaceAll('.', '');
    return /^[A-Z][A-Z0-9_]*$/.test(name) ? enumeration(name) : undefined;
  }
  return undefined;
}

function truthOf(word: string, base: 'b' | 'l'): DraftValue | undefined {
  if (['true', '1', 't'].includes(word)) return true;
  if (['false', '0', 'f'].includes(word)) return false;
  return base === 'l' && ['unknown', 'u'].includes(word) ? enumeration('U') : undefined;
}

function realOf(word: string, remarks: XmlRemarks): number | undefined {
  const match = /^[+-]?(?:\d+(?:[.,]\d*)?|[.,]\d+)(?:e[+-]?\d+)?$/i.exec(word);
  if (match === null) return undefined;
  const number = Number(word.replace(',', '.'));
  if (!Number.isFinite(number)) return undefined;
  if (word.includes(',')) remarks.decimalComma(word);
  return number;
}
