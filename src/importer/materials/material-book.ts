import { RequestError } from '../../domain/errors.ts';
import type { Material, Section } from '../../domain/member.ts';
import { asRef, asRefs, asString } from '../../step/values.ts';
import type { Remark } from '../findings-log.ts';
import { whose } from '../findings-log.ts';
import type { Reading } from '../reading.ts';
import { strengthOf } from './grade.ts';
import { gradeIn, statedYield } from './grades.ts';
import { type Kind, kindIn, STEEL } from './kinds.ts';
import { plausibleNumbers } from './plausible.ts';
import { readStatedMaterials, type StatedNumbers } from './stated-properties.ts';

/** What an element is made of, and the profiles that its material sets name. */
export interface MadeOf {
  readonly material: Material;
  /** Why the material is the default one; null where the file says enough. */
  readonly remark: Remark | null;
  /** Numbers of the file that cannot be true and are set aside. */
  readonly doubts: readonly Remark[];
  readonly profiles: readonly number[];
}

interface Named {
  readonly id: number;
  readonly name: string;
  readonly category: string;
}

const DEEPEST = 16;

/** The materials of a file by the instance that IfcRelAssociatesMaterial points at, each read once. */
export class MaterialBook {
  private readonly reading: Reading;
  /** The brief's grade, for what the file leaves open. */
  private readonly fallback: Material | null;
  private readonly read = new Map<number | null, MadeOf>();
  private readonly strengthened = new Map<Material, Map<string, Material>>();
  private readonly inSections = new Map<Material, Map<Section, Material>>();
  private stated: ReadonlyMap<number, StatedNumbers> | null = null;

  /** @throws RequestError where `defaultMaterial` names no grade that is known. */
  constructor(reading: Reading, defaultMaterial: string | null) {
    this.reading = reading;
    this.fallback = defaultMaterial === null ? null : gradeFromBrief(defaultMaterial);
  }

  madeOf(id: number | null): MadeOf {
    let found = this.read.get(id);
    if (found === undefined) {
      const parts: Named[] = [];
      const profiles: number[] = [];
      if (id !== null) this.gather(id, parts, profiles, 0);
      found = { ...this.choose(parts), profiles };
      this.read.set(id, found);
    }
    return found;
  }

  /** The same where it was asked for before; null where it was not. */
  known(id: number | null): MadeOf | null {
    return this.read.get(id) ?? null;
  }

  /** `material` with the strengths of a part as thick as the section's thickest. */
  inSection(material: Material, section: Section | null): Material {
    if (section === null) return material;
    let known = this.inSections.get(material);
    if (known === undefined) {
      known = new Map();
      this.inSections.set(material, known);
    }
    let found = known.get(section);
    if (found === undefined) {
      found = this.byThickness(material, section);
      known.set(section, found);
    }
    return found;
  }

  private byThickness(material: Material, section: Section): Material {
    const byShape = this.strengthened.get(material) ?? new Map<string, Material>();
    this.strengthened.set(material, byShape);
    const key = `${section.shape} ${section.thickness.toFixed(5)}`;
    const found = byShape.get(key) ?? strengthened(material, section);
    byShape.set(key, found);
    return found;
  }

  /** Walks sets, lists and usages down to materials and profiles, in the order of the file. */
  private gather(id: number, parts: Named[], profiles: number[], depth: number): void {
    if (depth > DEEPEST) return;
    const args = this.reading.args(id);
    const into = (value: (typeof args)[number] | undefined) => {
      const ref = asRef(value);
      if (ref !== null) this.gather(ref, parts, profiles, depth + 1);
    };
    switch (this.reading.typeOf(id)) {
      case 'IFCMATERIAL':
        parts.push({ id, name: (asString(args[0]) ?? '').trim(), category: asString(args[2]) ?? '' });
        return;
      case 'IFCMATERIALLIST':
      case 'IFCMATERIALLAYERSET':
        for (const part of asRefs(args[0])) this.gather(part, parts, profiles, depth + 1);
        return;
      case 'IFCMATERIALPROFILESET':
      case 'IFCMATERIALCONSTITUENTSET':
        for (const part of asRefs(args[2])) this.gather(part, parts, profiles, depth + 1);
        return;
      case 'IFCMATERIALPROFILE':
      case 'IFCMATERIALPROFILEWITHOFFSETS': {
        const profile = asRef(args[3]);
        if (profile !== null) profiles.push(profile);
        into(args[2]);
        return;
      }
      case 'IFCMATERIALCONSTITUENT':
        into(args[2]);
        return;
      case 'IFCMATERIALLAYER':
      case 'IFCMATERIALLAYERWITHOFFSETS':
      case 'IFCMATERIALLAYERSETUSAGE':
      case 'IFCMATERIALPROFILESETUSAGE':
      case 'IFCMATERIALPROFILESETUSAGETAPERING':
        into(args[0]);
        return;
      default:
    }
  }

  /**
   * The first part with a steel grade; else the first whose kind is known; else the first whose stiffness is stated; else
   * the default steel. What the file states of the part goes before what its name says.
   */
  private choose(parts: readonly Named[]): Omit<MadeOf, 'profiles'> {
    for (const part of parts) {
      const graded = gradedSteel(part.name);
      if (graded !== null) return this.withStated(part, graded, STEEL);
    }
    for (const part of parts) {
      const kind = kindIn(part.name) ?? kindIn(part.category);
      if (kind !== null) return this.withStated(part, this.ofKind(part.name, kind), kind);
    }
    for (const part of parts) {
      const stated = this.withStated(part, plainSteel(part.name), null);
      if (stated.material.from === 'properties') return stated;
    }
    const { material, remark } = this.fallback === null ? defaultSteel(parts[0]?.name ?? '') : ofBrief(this.fallback);
    return { material, remark, doubts: parts.flatMap((part) => this.withStated(part, material, null).doubts) };
  }

  private ofKind(name: string, kind: Kind): Material {
    if (kind === STEEL && this.fallback !== null && statedYield(name) === null) return this.fallback;
    const { elasticModulus, density, expansion } = kind;
    const yieldStrength = kind === STEEL ? statedYield(name) : null;
    return { name, elasticModulus, density, expansion, yieldStrength, ultimateStrength: null, from: 'name' };
  }

  /** `from` tells where the strength comes from; where there is none, where the stiffness does. */
  private withStated({ id, name }: Named, material: Material, kind: Kind | null): Omit<MadeOf, 'profiles'> {
    this.stated ??= readStatedMaterials(this.reading);
    const { numbers, doubts } = plausibleNumbers(name, this.stated.get(id) ?? {}, kind);
    const isStated =
      numbers.yieldStrength !== undefined || (material.yieldStrength === null && numbers.elasticModulus !== undefined);
    // A name that grades the steel keeps its ultimate strength only beside its own yield strength.
    const ultimateStrength = numbers.yieldStrength === undefined ? material.ultimateStrength : null;
    return {
      material: { ...material, ultimateStrength, ...numbers, ...(isStated ? { name, from: 'properties' } : {}) },
      remark: null,
      doubts,
    };
  }
}

const ofBrief = (material: Material) => ({ material, remark: null });

function gradedSteel(name: string): Material | null {
  const grade = gradeIn(name);
  if (grade === null) return null;
  const { elasticModulus } = grade;
  return { ...plainSteel(name), elasticModulus, ...strengthOf(grade, null), from: 'name' };
}

/**
 * `material` with the strengths that its grade has in the thickest part of `section`; as it is where its strength is stated
 * or its name says no grade.
 */
export function strengthened(material: Material, section: Section): Material {
  const grade = material.from === 'properties' ? null : gradeIn(material.name, section.shape);
  return grade === null ? material : { ...material, ...strengthOf(grade, section.thickness) };
}

/** @throws RequestError where `name` is no steel grade that is known. */
function gradeFromBrief(name: string): Material {
  const graded = gradedSteel(name.trim());
  if (graded === null) {
    throw new RequestError(
      `The default material '${name}' is no steel grade that is known. Name one like S355 or A992.`,
    );
  }
  return { ...graded, name: name.trim(), from: 'brief' };
}

function plainSteel(name: string): Material {
  const { elasticModulus, density, expansion } = STEEL;
  const steel = { elasticModulus, density, expansion, yieldStrength: null, ultimateStrength: null } as const;
  return { name: name === '' ? 'Steel' : name, ...steel, from: 'default' };
}

function defaultSteel(name: string): Pick<MadeOf, 'material' | 'remark'> {
  return {
    material: plainSteel(name),
    remark: {
      code: 'no-material',
      key: name,
      say: (count, first) =>
        name === ''
          ? `${whose(count, first, 'have', 'has')} no material; steel of E 210 GPa and 7850 kg/m3 is taken.`
          : `${whose(count, first, 'have', 'has')} the material '${name}', which says no grade or kind; steel of E 210 GPa and 7850 kg/m3 is taken.`,
      advice: "Give the members a material named by its grade, like S355, or set the brief's materials: default.",
      most: 50,
    },
  };
}
