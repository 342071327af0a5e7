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
    const { line, msg } = verdict.err;
    throw new ModelError(`The ifcXML is damaged or cut off, line ${line}: ${excerpt(msg)} Export it again.`);
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
    throw new ModelError(`The ifcXML is damaged: ${excerpt(reason)} Export it again.`);
  }
}

const DTD =
  'The XML has a document type declaration (<!DOCTYPE>), which is refused, since it can make a file grow without end. ' +
  'Take it out, or export the model again without it.';

function excerpt(message: string): string {
  const line = message.replace(/[^\x20-\x7e]/g, '?').trim();
  const short = line.length > 120 ? `${line.slice(0, 117)}...` : line;
  return /[.!?]$/.test(short) ? short : `${short}.`;
}
