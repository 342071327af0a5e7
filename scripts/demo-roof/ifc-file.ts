import { subtract, type Vec3 } from '../../src/domain/vector.ts';
import type { StepRef } from '../../src/step/values.ts';
import { enumeration, typed } from '../../src/step/write.ts';
import { globalId, partId } from './global-ids.ts';
import { HALL, type WorkPoint } from './hall.ts';
import { aggregate, type Building, type Storey, writeBuilding } from './ifc-building.ts';
import { extrusion, localPlacement, Profiles, partShape, turnOf } from './ifc-shapes.ts';
import { directionOf, type GussetPlate, type HallModel, KINDS, type Kind, type Part } from './parts.ts';
import type { Grade } from './sections.ts';
import { StepText } from './step-text.ts';

const GRADE_NAMES: Record<Grade, string> = { S235: 'S235JR', S355: 'S355J2' };
const GUSSET_THICKNESS = 10;
const FOOTING = { side: 1600, depth: 700 };
const GROUND_KINDS: readonly Kind[] = ['column', 'gable post', 'wall brace', 'gable brace'];

/** The hall as an IFC4 file. Trusses are assemblies whose parts are placed along themselves; all else is placed square. */
export function hallFile(model: HallModel, fileName: string): string {
  const step = new StepText();
  const building = writeBuilding(step, model.title);
  const writer = new ElementWriter(step, building);
  for (const truss of new Set(model.plates.map((plate) => plate.truss))) {
    const parts = model.parts.filter((part) => part.truss === truss);
    const plates = model.plates.filter((plate) => plate.truss === truss);
    writer.truss(truss, parts, plates);
  }
  for (const part of model.parts) if (part.truss === null) writer.loosePart(part);
  for (const footing of model.footings) writer.footing(footing);
  writer.relationships();
  return step.file('IFC4', fileName, `${HALL.building}, ${model.title}: an invented scenario`);
}

class ElementWriter {
  readonly #step: StepText;
  readonly #building: Building;
  readonly #profiles: Profiles;
  readonly #inStorey = new Groups<Storey>();
  readonly #ofMaterial = new Groups<string>();
  readonly #ofType = new Groups<string>();
  readonly #ofMark = new Groups<string>();
  readonly #materials = new Map<string, StepRef>();
  readonly #types = new Map<string, StepRef>();

  constructor(step: StepText, building: Building) {
    this.#step = step;
    this.#building = building;
    this.#profiles = new Profiles(step);
    this.#inStorey.add(building.ground, building.grid);
  }

  truss(truss: number, parts: readonly Part[], plates: readonly GussetPlate[]): void {
    const step = this.#step;
    const { roof } = this.#building;
    const corner: Vec3 = [0, (truss - 1) * HALL.bay, HALL.bottomLevel];
    const placement = localPlacement(step, roof.placement, subtract(corner, [0, 0, roof.level]));
    const id = globalId(`truss ${truss}`);
    const [place, kind] = [enumeration('FACTORY'), enumeration('TRUSS')];
    const assembly = step.add(
      'IfcElementAssembly',
      id,
      null,
      `Truss ${truss}`,
      null,
      null,
      placement,
      null,
      `T${truss}`,
      place,
      kind,
    );
    const elements = [
      ...parts.map((part) => this.#part(part, placement, corner, true)),
      ...plates.map((plate) => this.#gusset(plate, placement, corner)),
    ];
    aggregate(step, `truss ${truss}`, assembly, elements);
    this.#inStorey.add(roof, assembly);
  }

  loosePart(part: Part): void {
    const { ground, roof } = this.#building;
    const storey = GROUND_KINDS.includes(part.kind) ? ground : roof;
    this.#inStorey.add(storey, this.#part(part, storey.placement, [0, 0, storey.level], false));
  }

  footing(point: WorkPoint): void {
    const step = this.#step;
    const { ground, contexts } = this.#building;
    const placement = localPlacement(step, ground.placement, subtract(point.at, [0, 0, FOOTING.depth]));
    const outline = step.add('IfcRectangleProfileDef', enumeration('AREA'), null, null, FOOTING.side, FOOTING.side);
    const shape = step.add('IfcProductDefinitionShape', null, null, [
      extrusion(step, contexts, outline, FOOTING.depth),
    ]);
    const id = globalId(`footing ${point.name}`);
    const footing = step.add(
      'IfcFooting',
      id,
      null,
      `Pad ${point.name.replace('/base', '-')}`,
      null,
      null,
      placement,
      shape,
      'F1',
      enumeration('PAD_FOOTING'),
    );
    this.#inStorey.add(ground, footing);
    this.#ofMaterial.add(this.#material('C30/37', 'concrete'), footing);
  }

  /** What ties elements to storeys, materials and types: one relationship each, after all elements are known. */
  relationships(): void {
    for (const [storey, elements] of this.#inStorey) {
      this.#relate('IfcRelContainedInSpatialStructure', `within level ${storey.level}`, elements, storey.ref);
    }
    for (const [material, elements] of this.#ofMaterial) {
      this.#relate('IfcRelAssociatesMaterial', `made of ${material}`, elements, this.#materials.get(material)!);
    }
    for (const [type, elements] of this.#ofType) {
      this.#relate('IfcRelDefinesByType', `of type ${type}`, elements, this.#types.get(type)!);
    }
    for (const [mark, elements] of this.#ofMark) this.#commonProperties(mark, elements);
  }

  #part(part: Part, parent: StepRef, parentAt: Vec3, isTurned: boolean): StepRef {
    const step = this.#step;
    const { ifc, predefined, grade, drawsAxis } = KINDS[part.kind];
    const turn = turnOf(directionOf(...part.axis), part.zAxis);
    const placement = localPlacement(step, parent, subtract(part.axis[0], parentAt), isTurned ? turn : null);
    const shape = partShape(step, this.#building.contexts, this.#profiles, part, turn, isTurned, drawsAxis);
    const element = step.add(
      ifc,
      partId(part.name),
      null,
      part.name,
      part.kind,
      part.section,
      placement,
      shape,
      part.name,
      enumeration(predefined),
    );
    this.#ofType.add(this.#type(part), element);
    this.#ofMark.add(`${ifc} ${part.mark}`, element);
    const isBar = part.section.startsWith('RD') || part.section.startsWith('FL');
    this.#ofMaterial.add(isBar ? this.#material(GRADE_NAMES[grade], 'steel') : this.#profileSet(part, grade), element);
    return element;
  }

  #gusset(plate: GussetPlate, parent: StepRef, parentAt: Vec3): StepRef {
    const step = this.#step;
    const across: Vec3 = [0, 1, 0];
    const face = subtract(plate.at, [0, GUSSET_THICKNESS / 2, 0]);
    const placement = localPlacement(step, parent, subtract(face, parentAt), { z: across, x: plate.direction });
    const outline = step.add('IfcRectangleProfileDef', enumeration('AREA'), null, null, plate.length, plate.height);
    const body = extrusion(step, this.#building.contexts, outline, GUSSET_THICKNESS);
    const shape = step.add('IfcProductDefinitionShape', null, null, [body]);
    const section = `PL ${GUSSET_THICKNESS}`;
    const id = partId(plate.name);
    const element = step.add(
      'IfcPlate',
      id,
      null,
      plate.name,
      'gusset plate',
      section,
      placement,
      shape,
      'GP',
      enumeration('SHEET'),
    );
    this.#ofMaterial.add(this.#material(GRADE_NAMES.S355, 'steel'), element);
    return element;
  }

  #material(name: string, category: string): string {
    if (!this.#materials.has(name)) this.#materials.set(name, this.#step.add('IfcMaterial', name, null, category));
    return name;
  }

  #profileSet(part: Part, grade: Grade): string {
    const name = `${part.section} ${GRADE_NAMES[grade]}`;
    if (!this.#materials.has(name)) {
      const material = this.#materials.get(this.#material(GRADE_NAMES[grade], 'steel'))!;
      const profile = this.#step.add(
        'IfcMaterialProfile',
        part.section,
        null,
        material,
        this.#profiles.of(part.section),
        null,
        null,
      );
      this.#materials.set(name, this.#step.add('IfcMaterialProfileSet', name, null, [profile], null));
    }
    return name;
  }

  #relate(entity: string, name: string, elements: readonly StepRef[], what: StepRef): void {
    this.#step.add(entity, globalId(name), null, null, null, elements, what);
  }

  /** The piece mark stands where the standard has it: as the reference of the element's common property set. */
  #commonProperties(key: string, elements: readonly StepRef[]): void {
    const step = this.#step;
    const [ifc, mark] = key.split(' ') as [string, string];
    const reference = step.add('IfcPropertySingleValue', 'Reference', null, typed('IFCIDENTIFIER', mark), null);
    const loadBearing = step.add('IfcPropertySingleValue', 'LoadBearing', null, typed('IFCBOOLEAN', true), null);
    const name = `${ifc.replace('Ifc', 'Pset_')}Common`;
    const set = step.add('IfcPropertySet', globalId(`properties ${key}`), null, name, null, [reference, loadBearing]);
    this.#relate('IfcRelDefinesByProperties', `has properties ${key}`, elements, set);
  }

  #type(part: Part): string {
    const { ifc, predefined } = KINDS[part.kind];
    const name = `${part.kind} ${part.section}`;
    if (!this.#types.has(name)) {
      const id = globalId(`type ${name}`);
      this.#types.set(
        name,
        this.#step.add(`${ifc}Type`, id, null, name, null, null, null, null, null, null, enumeration(predefined)),
      );
    }
    return name;
  }
}

/** Elements gathered by what they share, in the order of first use. */
class Groups<Key> {
  readonly #members = new Map<Key, StepRef[]>();

  add(key: Key, element: StepRef): void {
    const group = this.#members.get(key);
    if (group) group.push(element);
    else this.#members.set(key, [element]);
  }

  [Symbol.iterator](): IterableIterator<[Key, StepRef[]]> {
    return this.#members.entries();
  }
}
