import type { Result } from '../../domain/result.ts';
import { knownSchema, type SchemaFamily } from '../../importer/schema.ts';
import { DERIVED, type StepRef } from '../../step/values.ts';
import { encodeString, enumeration, InstanceWriter, integer, typed, type ValueToWrite } from '../../step/write.ts';
import { type Chunks, encodeText } from '../chunks.ts';
import { decodeGlobalId, drawGlobalId } from './global-id.ts';
import { secondsOf } from './owner-history.ts';

const SCHEMA_NAMES: Readonly<Record<SchemaFamily, string>> = { IFC2X3: 'IFC2X3', IFC4: 'IFC4', IFC4X3: 'IFC4X3_ADD2' };

/** Writes the instances of an IFC file of its own, in the schema and under the project of the model it tells of. */
export class NewFile extends InstanceWriter {
  readonly family: SchemaFamily;
  readonly isIfc2x3: boolean;
  private readonly result: Result;
  private readonly used = new Set<string>();

  /** In the model's own schema, or in `family`. */
  constructor(result: Result, family: SchemaFamily = knownSchema(result.model.schema).family) {
    super(1);
    this.result = result;
    this.family = family;
    this.isIfc2x3 = family === 'IFC2X3';
  }

  /** The GlobalId of a role of something, drawn again, always the same way, while this file has it already. */
  globalId(role: string, of: string, part = 0): string {
    let draw = 0;
    let id = drawGlobalId(role, of, part);
    while (this.used.has(id)) id = drawGlobalId(role, of, part, ++draw);
    this.used.add(id);
    return id;
  }

  /** `globalId` itself where it is one and not taken, else one drawn for the role. */
  sameGlobalId(globalId: string, role: string): string {
    if (decodeGlobalId(globalId) === null || this.used.has(globalId)) return this.globalId(role, globalId);
    this.used.add(globalId);
    return globalId;
  }

  /** The header with what the file is, the lines as they come, and the end. */
  chunks(what: string, view: string, lines: Iterable<string>): Chunks {
    return encodeText(this.pieces(what, view, lines));
  }

  private *pieces(what: string, view: string, lines: Iterable<string>): Generator<string> {
    const { model, generator } = this.result;
    const program = encodeString(`${generator.name} ${generator.version}`);
    const stamp = encodeString(
      /^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d/.exec(model.written ?? '')?.[0] ?? '1970-01-01T00:00:00',
    );
    yield 'ISO-10303-21;\nHEADER;\n';
    yield `FILE_DESCRIPTION((${encodeString(`ViewDefinition [${view}]`)},${encodeString(what)}),'2;1');\n`;
    yield `FILE_NAME('',${stamp},(''),(''),${program},${program},'');\n`;
    yield `FILE_SCHEMA((${encodeString(SCHEMA_NAMES[this.family])}));\nENDSEC;\nDATA;\n`;
    for (const line of lines) yield `${line}\n`;
    yield 'ENDSEC;\nEND-ISO-10303-21;\n';
  }
}

/** What everything in the file refers to. */
export interface FileFrame {
  readonly owner: StepRef | null;
  readonly project: StepRef;
  readonly building: StepRef;
  /** The model's context in three dimensions. */
  readonly context: StepRef;
  /** At the origin of the model's world. */
  readonly origin: StepRef;
}

/** Project, units (all SI, all said), context and building. */
export function writeFrame(file: NewFile, { model, generator }: Result, role: string): FileFrame {
  const owner = writeOwner(file, model.written ?? null, generator.version);
  const point = file.add('IFCCARTESIANPOINT', [0, 0, 0]);
  const world = file.add('IFCAXIS2PLACEMENT3D', point, null, null);
  const context = file.add('IFCGEOMETRICREPRESENTATIONCONTEXT', null, 'Model', integer(3), 1e-6, world, null);
  const origin = file.add('IFCLOCALPLACEMENT', null, world);
  const units = file.add('IFCUNITASSIGNMENT', writeUnits(file));
  const own = model.project;
  const name = own?.name ?? null;
  const id =
    own === undefined ? file.globalId(`${role} project`, '') : file.sameGlobalId(own.globalId, `${role} project`);
  const project = file.add('IFCPROJECT', id, owner, name ?? 'Unnamed', null, null, null, null, [context], units);
  const building = file.add(
    'IFCBUILDING',
    file.globalId(`${role} building`, own?.globalId ?? ''),
    owner,
    name,
    null,
    null,
    origin,
    null,
    null,
    enumeration('ELEMENT'),
    null,
    null,
    null,
  );
  const tie = file.globalId(`${role} aggregates`, own?.globalId ?? '');
  file.add('IFCRELAGGREGATES', tie, owner, null, null, project, [building]);
  return { owner, project, building, context, origin };
}

function writeOwner(file: NewFile, written: string | null, version: string): StepRef | null {
  if (!file.isIfc2x3) return null;
  const name = 'Pinwright';
  const person = file.add('IFCPERSON', null, name, null, null, null, null, null, null);
  const organization = file.add('IFCORGANIZATION', null, name, null, null, null);
  const user = file.add('IFCPERSONANDORGANIZATION', person, organization, null);
  const program = file.add('IFCAPPLICATION', organization, version, name, name);
  const created = integer(secondsOf(written));
  return file.add('IFCOWNERHISTORY', user, program, null, enumeration('NOCHANGE'), null, null, null, created);
}

type Part = readonly [unit: StepRef, exponent: number];

function writeUnits(file: NewFile): StepRef[] {
  const si = (kind: string, name: string, prefix: string | null = null) =>
    file.add('IFCSIUNIT', DERIVED, enumeration(kind), prefix === null ? null : enumeration(prefix), enumeration(name));
  const derived = (kind: string, ...parts: readonly Part[]) => {
    const elements = parts.map(([unit, exponent]) => file.add('IFCDERIVEDUNITELEMENT', unit, integer(exponent)));
    return file.add('IFCDERIVEDUNIT', elements, enumeration(kind), null, ...(file.family === 'IFC4X3' ? [null] : []));
  };
  const metre = si('LENGTHUNIT', 'METRE');
  const newton = si('FORCEUNIT', 'NEWTON');
  const kilogram = si('MASSUNIT', 'GRAM', 'KILO');
  const kelvin = si('THERMODYNAMICTEMPERATUREUNIT', 'KELVIN');
  return [
    metre,
    newton,
    kilogram,
    kelvin,
    si('AREAUNIT', 'SQUARE_METRE'),
    si('VOLUMEUNIT', 'CUBIC_METRE'),
    si('PLANEANGLEUNIT', 'RADIAN'),
    si('PRESSUREUNIT', 'PASCAL'),
    si('TIMEUNIT', 'SECOND'),
    derived('LINEARFORCEUNIT', [newton, 1], [metre, -1]),
    derived('LINEARSTIFFNESSUNIT', [newton, 1], [metre, -1]),
    derived('TORQUEUNIT', [newton, 1], [metre, 1]),
    derived('MODULUSOFELASTICITYUNIT', [newton, 1], [metre, -2]),
    derived('MASSDENSITYUNIT', [kilogram, 1], [metre, -3]),
    derived('MOMENTOFINERTIAUNIT', [metre, 4]),
    derived('WARPINGCONSTANTUNIT', [metre, 6]),
    derived('THERMALEXPANSIONCOEFFICIENTUNIT', [kelvin, -1]),
  ];
}

/** A property with its value typed. */
export const single = (file: NewFile, name: string, type: string, value: ValueToWrite): StepRef =>
  file.add('IFCPROPERTYSINGLEVALUE', name, null, typed(type, value), null);
