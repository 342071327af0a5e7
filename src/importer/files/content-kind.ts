import { ModelError } from '../../domain/errors.ts';
import { asBuffer, SPACE } from '../../step/bytes.ts';

/** What a file holds, told by its first bytes. Whatever is none of the others is left to the STEP reader to judge. */
export type ContentKind = 'step' | 'xml' | 'zip';

const LESS_THAN = 0x3c;

/** Throws ModelError for archives of other kinds, which are told by their first bytes just as well. */
export function contentKind(bytes: Uint8Array): ContentKind {
  if (isZip(bytes)) return 'zip';
  if (isXml(bytes)) return 'xml';
  for (const [name, start] of OTHER_ARCHIVES) {
    if (start.every((byte, i) => bytes[i] === byte)) {
      throw new ModelError(`The file is a ${name} archive, which is not read; unpack it and name the IFC file in it.`);
    }
  }
  return 'step';
}

/** First bytes by which archives are known, from their formats' own descriptions. */
const OTHER_ARCHIVES: readonly (readonly [name: string, start: readonly number[]])[] = [
  ['gzip', [0x1f, 0x8b]],
  ['7z', [0x37, 0x7a, 0xbc, 0xaf, 0x27, 0x1c]],
  ['RAR', [0x52, 0x61, 0x72, 0x21, 0x1a, 0x07]],
];

/** An entry, an empty directory, or the mark of an archive in parts (ZIP application note 4.3). */
function isZip(bytes: Uint8Array): boolean {
  if (bytes[0] !== 0x50 || bytes[1] !== 0x4b) return false;
  return ['\x03\x04', '\x05\x06', '\x07\x08'].includes(String.fromCharCode(bytes[2] ?? 0, bytes[3] ?? 0));
}

/** A `<` comes first, after marks of the encoding and white space. In UTF-16 every other byte of both is zero. */
function isXml(bytes: Uint8Array): boolean {
  const marked = [0xff, 0xfe, 0xef].includes(bytes[0] ?? 0);
  let p = marked ? (bytes[0] === 0xef ? 3 : 2) : 0;
  while (p < bytes.length && bytes[p] <= SPACE) p++;
  return bytes[p] === LESS_THAN;
}

const IN_COMMENTS = String.raw`(?:\s|/\*[^*]*\*+(?:[^/*][^*]*\*+)*/)*`;
const STEP_START = new RegExp(`^${IN_COMMENTS}ISO-10303-21\\s*;`, 'i');
const XML_ROOT = /<(?:[\w.-]+:)?(?:ifcXML|iso_10303_28|uos)[\s/>]/;
const LOOKED_AT = 4096;

/** Whether XML text has an element that ifcXML begins with. */
export const namesIfcXml = (text: string): boolean => XML_ROOT.test(text);

/** Whether bytes that begin like this hold an IFC model; `start` is the beginning of a file. */
export function looksLikeModel(start: Uint8Array): boolean {
  const text = asBuffer(start)
    .toString('latin1', 0, LOOKED_AT)
    .replaceAll('\0', '')
    .replace(/^(?:\xef\xbb\xbf|\xff\xfe|\xfe\xff)/, '');
  if (STEP_START.test(text)) return !/FILE_SCHEMA[\s(]*'(?!IFC)/i.test(text);
  return text.trimStart().startsWith('<') && namesIfcXml(text);
}
