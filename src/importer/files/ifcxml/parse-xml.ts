import { XMLParser, XMLValidator } from 'fast-xml-parser';
import { ModelError } from '../../../domain/errors.ts';
import { CDATA, elementsIn, type RawNode, TEXT, type XmlElement } from './xml-element.ts';

/**
 * The root element of XML text. Entities are never expanded and a document type declaration is refused, so that the text
 * cannot grow. Throws ModelError where it is not well-formed or its elements lie deeper in one another than `depth`.
 */
export function parseXml(text: string, depth: number): XmlElement {
  if (/<!DOCTYPE/i.test(text)) throw new ModelError(DTD);
  const verdict = XMLValidator.validate(text);
  if (verdict !== true) {
    throw damaged(faultOf(text, verdict.err));
  }
  const [root] = elementsIn(nodesOf(text, depth));
  if (root === undefined) throw new ModelError('The XML has no element in it.');
  return root;
}

function nodesOf(text: string, depth: number): readonly RawNode[] {
  const parser = new XMLParser({
    preserveOrder: true,
    ignoreAttributes: false,
    attributeNamePrefix: '',
    parseTagValue: false,
    parseAttributeValue: false,
    trimValues: false,
    processEntities: false,
    textNodeName: TEXT,
    cdataPropName: CDATA,
    jPath: false,
    // The parser counts the elements around the one that it opens.
    maxNestedTags: depth - 1,
    tagValueProcessor: (_name, value) => (value.trim() === '' ? '' : value),
  });
  try {
    return parser.parse(text) as readonly RawNode[];
  } catch (problem) {
    const reason = problem instanceof Error ? problem.message : String(problem);
    if (/nested tags/i.test(reason)) {
      throw new ModelError(
        `The ifcXML has elements nested deeper than ${depth}; export the model as STEP text (.ifc).`,
      );
    }
    throw damaged(/closed/i.test(reason) ? endsEarly(text) : null);
  }
}

const DTD =
  'The XML has a document type declaration (<!DOCTYPE>), which is refused, since it can make a file grow without end. ' +
  'Take it out, or export the model again without it.';

interface Fault {
  readonly line: number;
  readonly words: string;
}

const damaged = (fault: Fault | null): ModelError =>
  new ModelError(
    `The ifcXML is damaged or cut off${fault === null ? '' : `, line ${fault.line}: ${fault.words}`}. Export it again.`,
  );

/** What the checker's codes and words come to, in ours: its own speak of its inside. */
const FAULTS: readonly (readonly [told: RegExp, words: string])[] = [
  [/Expected closing tag|has not been opened|proper closing/i, 'an element is closed that is not the one last opened'],
  [/^Attribute|Attributes for/i, 'an attribute has no value, no closing quote, or stands twice'],
  [/char .* is not expected/i, 'a character such as & stands there that must be written as an entity'],
  [/space after|Tag .* is an invalid name|Invalid tag/i, 'a < stands there that begins no element'],
  [/Extra text/i, 'something follows after the end of the model'],
  [/Start tag expected/i, 'there is no element in it'],
];

function faultOf(text: string, { line, msg }: { line: number; msg: string }): Fault {
  // Of elements left open the checker has the names, in brackets, and no line.
  if (/^Invalid '\[/.test(msg) || isCutWithinTag(text)) return endsEarly(text);
  const words = FAULTS.find(([told]) => told.test(msg))?.[1] ?? 'it is not well-formed XML';
  return { line, words };
}

const isCutWithinTag = (text: string): boolean => text.lastIndexOf('<') > text.lastIndexOf('>');

const endsEarly = (text: string): Fault => ({
  line: text.trimEnd().split('\n').length,
  words: 'the text ends there with elements still open',
});
