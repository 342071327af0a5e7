import { IfcAPI } from 'web-ifc';

/** A value as the independent parser gives it; the numbers of `type` are its own. */
type Parsed =
  | null
  | undefined
  | number
  | boolean
  | readonly Parsed[]
  | {
      type: number;
      value?: string | number | boolean | readonly number[];
      name?: string;
      _internalValue?: string | number;
    };

interface Instance {
  readonly id: number;
  readonly entity: string;
  readonly attributes: readonly (readonly [string, Parsed])[];
}

const REF = 5;

/** Attributes that may hold one of several types, so that the type has to be written: the parser does not tell them apart. */
const CHOICES =
  /^(?:NominalValue|Trim[12]|ValueComponent|EnumerationValues|ListValues|(?:Upper|Lower)BoundValue|Segments|PlacementRefDirection|.*Stiffness.*)$/;

/** The instances of STEP text with the names of their attributes, as an independent parser knows them. */
async function instancesOf(bytes: Uint8Array): Promise<{ schema: string; instances: Instance[] }> {
  const api = new IfcAPI();
  await api.Init();
  api.SetLogLevel(6);
  const model = api.OpenModel(bytes);
  try {
    const ids = api.GetAllLines(model);
    const instances = Array.from({ length: ids.size() }, (_, i): Instance => {
      const line = api.GetLine(model, ids.get(i)) as Record<string, Parsed>;
      const attributes = Object.entries(line).filter(([name]) => name !== 'expressID' && name !== 'type');
      return { id: ids.get(i), entity: api.GetNameFromTypeCode(Number(line.type)), attributes };
    });
    return { schema: api.GetModelSchema(model), instances };
  } finally {
    api.CloseModel(model);
    api.Dispose();
  }
}

const escaped = (text: string) =>
  text
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('"', '&quot;')
    .replace(/[^\x20-\x7e]/g, (c) => `&#${c.codePointAt(0)};`);

function textOf(value: Parsed): string {
  if (typeof value === 'number' || typeof value === 'boolean') return String(value);
  if (value === null || value === undefined || Array.isArray(value)) return '';
  const single = value as Exclude<Parsed, null | undefined | number | boolean | readonly Parsed[]>;
  if (single.type === 3)
    return single.value === 2 || single.value === undefined ? 'unknown' : String(single.value).toLowerCase();
  const bare = single._internalValue ?? single.value ?? '';
  return escaped(Array.isArray(bare) ? bare.join(' ') : String(bare));
}

function refOf(value: Parsed): number | null {
  if (typeof value !== 'object' || value === null || !('type' in value)) return null;
  return value.type === REF ? Number(value.value) : null;
}

const isAbsent = (value: Parsed) => value === null || value === undefined || refOf(value) === 0;

/** The same model as ifcXML in the dialect of its schema. */
export async function xmlOfStep(bytes: Uint8Array): Promise<string> {
  const { schema, instances } = await instancesOf(bytes);
  return schema === 'IFC2X3' ? olderXml(instances) : newerXml(instances, schema);
}

const typeName = (value: Parsed): string => (value as { name?: string }).name ?? 'IfcReal';

function olderXml(instances: readonly Instance[]): string {
  const entityOf = new Map(instances.map(({ id, entity }) => [id, entity]));
  const item = (value: Parsed, isTyped: boolean, pos: string): string => {
    const ref = refOf(value);
    if (ref !== null) return `<${entityOf.get(ref) ?? 'IfcRoot'}${pos} xsi:nil="true" ref="i${ref}"/>`;
    const name = isTyped ? typeName(value) : 'ex:double-wrapper';
    return `<${name}${pos}>${textOf(value)}</${name}>`;
  };
  const attribute = ([name, value]: readonly [string, Parsed]): string => {
    if (isAbsent(value)) return '';
    if (Array.isArray(value)) {
      const items = (value as readonly Parsed[]).map((part, i) => item(part, CHOICES.test(name), ` ex:pos="${i}"`));
      return `<${name} ex:cType="list">${items.reverse().join('')}</${name}>`;
    }
    const isHeld = refOf(value) !== null || CHOICES.test(name);
    return `<${name}>${isHeld ? item(value, true, '') : textOf(value)}</${name}>`;
  };
  const lines = instances.map(
    ({ id, entity, attributes }) => `<${entity} id="i${id}">${attributes.map(attribute).join('')}</${entity}>`,
  );
  return `<ex:iso_10303_28 xmlns:ex="urn:iso.org:standard:10303:part(28):version(2):xmlschema:common" xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance">
<uos configuration="i-ifc2x3" xmlns="http://www.iai-tech.org/ifcXML/IFC2x3/FINAL">\n${lines.join('\n')}\n</uos></ex:iso_10303_28>`;
}

/** Instances stand where they are first referred to. */
function newerXml(instances: readonly Instance[], schema: string): string {
  const byId = new Map(instances.map((instance) => [instance.id, instance]));
  const written = new Set<number>();
  const instanceAs = (tag: string | null, id: number): string => {
    const instance = byId.get(id);
    const entity = instance?.entity ?? 'IfcRoot';
    const name = tag ?? entity;
    const type = tag === null ? '' : ` xsi:type="${entity}"`;
    if (instance === undefined || written.has(id)) return `<${name}${type} xsi:nil="true" href="i${id}"/>`;
    written.add(id);
    const simple: string[] = [];
    const inside: string[] = [];
    for (const [attribute, value] of instance.attributes) {
      if (isAbsent(value)) continue;
      const list = Array.isArray(value) ? (value as readonly Parsed[]) : null;
      const ref = refOf(value);
      if (ref !== null) inside.push(instanceAs(attribute, ref));
      else if (CHOICES.test(attribute) || isOfTextOrRefs(list)) inside.push(held(attribute, list ?? [value]));
      else if (list === null) simple.push(` ${attribute}="${textOf(value)}"`);
      else if (isInSequences(attribute, list)) inside.push(sequences(attribute, list));
      else if (list.length > 0) simple.push(` ${attribute}="${list.flat().map(textOf).join(' ')}"`);
    }
    return `<${name} id="i${id}"${type}${simple.join('')}>${inside.join('')}</${name}>`;
  };
  const held = (attribute: string, list: readonly Parsed[]): string => {
    const items = list.map((value) => {
      const ref = refOf(value);
      if (ref !== null) return instanceAs(null, ref);
      const name = `${typeName(value)}-wrapper`;
      return `<${name}>${Array.isArray(value) ? (value as readonly Parsed[]).map(textOf).join(' ') : textOf(value)}</${name}>`;
    });
    return `<${attribute}>${items.join('')}</${attribute}>`;
  };
  const tops = instances.map(({ id }) => (written.has(id) ? '' : instanceAs(null, id)));
  const namespace = `https://standards.buildingsmart.org/IFC/RELEASE/${schema === 'IFC4' ? 'IFC4/ADD2_TC1' : 'IFC4_3'}`;
  return `<ifcXML xmlns="${namespace}" xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance">\n${tops.join('\n')}\n</ifcXML>`;
}

function isOfTextOrRefs(list: readonly Parsed[] | null): boolean {
  const first = list?.[0];
  return first !== undefined && (refOf(first) !== null || (first as { type?: number }).type === 1);
}

/** Lists of lists whose inner length the schema fixes are written in one row. */
function isInSequences(attribute: string, list: readonly Parsed[]): boolean {
  return Array.isArray(list[0]) && !/^(?:CoordList|CoordIndex|Normals)$/.test(attribute);
}

function sequences(attribute: string, list: readonly Parsed[]): string {
  const inner = list.map((values) => (values as readonly Parsed[]).map(textOf).join(' '));
  return `<${attribute}>${inner.map((text) => `<Seq-IfcPositiveInteger-wrapper>${text}</Seq-IfcPositiveInteger-wrapper>`).join('')}</${attribute}>`;
}
