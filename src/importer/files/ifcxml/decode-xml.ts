import { ModelError } from '../../../domain/errors.ts';
import { latin1 } from '../../../step/bytes.ts';

export interface DecodedXml {
  readonly text: string;
  /** Whether some bytes were not what the encoding allows. */
  readonly isBroken: boolean;
}

/** XML text without its byte order mark. Throws ModelError for an encoding that is not known. */
export function decodeXml(bytes: Uint8Array): DecodedXml {
  const encoding = encodingOf(bytes);
  try {
    return { text: decoderOf(encoding).decode(bytes), isBroken: false };
  } catch (problem) {
    if (problem instanceof ModelError) throw problem;
    return { text: new TextDecoder('windows-1252').decode(bytes), isBroken: true };
  }
}

function decoderOf(encoding: string): InstanceType<typeof TextDecoder> {
  try {
    return new TextDecoder(encoding, { fatal: true });
  } catch {
    throw new ModelError(`The ifcXML says that it is encoded as ${encoding}, which is not read; save it as UTF-8.`);
  }
}

/** A byte order mark is believed before the declaration (XML 1.0, appendix F). */
function encodingOf(bytes: Uint8Array): string {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return 'utf-16le';
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return 'utf-16be';
  const declared = /^[^>]*?encoding\s*=\s*["']([\w.:-]{1,40})["']/.exec(latin1(bytes, 0, 200))?.[1] ?? 'utf-8';
  // Some writers declare the encoding of the string that they had in memory; the declaration was readable in bytes.
  return bytes[0] === 0xef || /^(?:utf-?16|ucs-?2)/i.test(declared) ? 'utf-8' : declared;
}
