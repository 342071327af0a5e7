import { ModelError } from '../../../domain/errors.ts';
import type { Finding } from '../../../domain/finding.ts';
import { DERIVED } from '../../../step/values.ts';
import { encodeString, instanceLine, ref, type ValueToWrite } from '../../../step/write.ts';
import { knownSchema } from '../../schema.ts';
import { namesIfcXml } from '../content-kind.ts';
import type { OpenOptions } from '../options.ts';
import { AttributeTable } from './attribute-table.ts';
import { decodeXml } from './decode-xml.ts';
import { Draft, type DraftValue, XmlRef } from './drafts.ts';
import { InstanceReader } from './instance-reader.ts';
import { Numbering } from './numbering.ts';
import { parseXml } from './parse-xml.ts';
import { XmlRemarks } from './remarks.ts';
import { schemaOfXml } from './schema-of-xml.ts';
import type { XmlElement } from './xml-element.ts';

export interface ConvertedXml {
  /** STEP text (ISO 10303-21) with the same instances. */
  readonly step: Uint8Array;
  readonly findings: readonly Finding[];
}

/**
 * STEP text of an ifcXML, in the dialect of IFC2X3 (ISO 10303-28 edition 1) or of IFC4 and later. Instances of entities that
 * `schema/` does not tell of, such as colours, documents and costs, are left out with a finding that counts them; what refers
 * to them is left empty.
 * @throws ModelError where the text is no ifcXML, names no schema that is read, or goes beyond the limits.
 */
export function stepOfIfcXml(bytes: Uint8Array, { largestXml, depth }: OpenOptions): ConvertedXml {
  if (bytes.length > largestXml) {
    const limit = Math.round(largestXml / 1024 ** 2);
    throw new ModelError(`The ifcXML is larger than the limit of ${limit} MiB; export the model as STEP text (.ifc).`);
  }
  const remarks = new XmlRemarks();
  const { text, isBroken } = decodeXml(bytes);
  if (isBroken) remarks.brokenEncoding();
  if (!namesIfcXml(text)) throw new ModelError(NO_IFCXML);
  const root = parseXml(text, depth);
  const outer = outerElements(root);
  const schema = schemaOfXml(outer);
  const reader = new InstanceReader(new AttributeTable(knownSchema(schema).family), remarks);
  for (const element of outer) reader.read(element);
  reader.join();
  return { step: stepText(headerLines(outer, schema), reader), findings: remarks.findings() };
}

const NO_IFCXML = 'The file is XML but no ifcXML. Name an IFC model, or export one as STEP text (.ifc).';
const ROOTS = ['ifcxml', 'iso_10303_28', 'uos'];

/** The root, and the units of serialisation in it that older files have. */
function outerElements(root: XmlElement): XmlElement[] {
  if (!ROOTS.includes(root.name.toLowerCase())) throw new ModelError(NO_IFCXML);
  return [root, ...root.children().filter(({ name }) => name === 'uos')];
}

function headerLines(outer: readonly XmlElement[], schema: string): string[] {
  const header = outer
    .flatMap((element) => element.children())
    .find(({ name }) => name === 'header' || name === 'iso_10303_28_header');
  const entries = new Map(header?.children().map((entry) => [entry.name.toLowerCase(), entry.text().trim()]));
  const entry = (name: string) => encodeString(entries.get(name) ?? '');
  const fileName = [
    entry('name'),
    entry('time_stamp'),
    `(${entry('author')})`,
    `(${entry('organization')})`,
    entry('preprocessor_version'),
    entry('originating_system'),
    entry('authorization'),
  ];
  return [
    `FILE_DESCRIPTION((${encodeString('made from ifcXML')}),'2;1');`,
    `FILE_NAME(${fileName.join(',')});`,
    `FILE_SCHEMA((${encodeString(schema)}));`,
  ];
}

const LINES_AT_ONCE = 50_000;

/** In pieces, since the whole may be longer than a string can be. */
function stepText(header: readonly string[], reader: InstanceReader): Uint8Array {
  const pieces: Buffer[] = [];
  const write = (lines: readonly string[]) => pieces.push(Buffer.from(`${lines.join('\n')}\n`, 'latin1'));
  write(['ISO-10303-21;', 'HEADER;', ...header, 'ENDSEC;', 'DATA;']);
  const lines = instanceLines(reader);
  for (let i = 0; i < reader.drafts.length; i += LINES_AT_ONCE) write(lines(i, i + LINES_AT_ONCE));
  write(['ENDSEC;', 'END-ISO-10303-21;']);
  return Buffer.concat(pieces);
}

function instanceLines({ drafts, byId, leftOut }: InstanceReader): (from: number, to: number) => string[] {
  const numbers = new Numbering(drafts);
  const resolved = (value: DraftValue): ValueToWrite => {
    if (value instanceof Draft) return ref(numbers.ofDraft(value));
    if (value instanceof XmlRef) {
      return leftOut.has(value.id) && !byId.has(value.id) ? null : ref(numbers.ofId(value.id));
    }
    if (!Array.isArray(value)) return value;
    const isGone = (item: DraftValue) => item instanceof XmlRef && resolved(item) === null;
    return value.filter((item) => !isGone(item)).map(resolved);
  };
  return (from, to) =>
    drafts.slice(from, to).map((draft) => {
      const { name, attributes } = draft.shape;
      const values = attributes.map(({ isDerived }, i) => (isDerived ? DERIVED : resolved(draft.values[i] ?? null)));
      return instanceLine(numbers.ofDraft(draft), name.toUpperCase(), values);
    });
}
