import { RequestError } from '../../domain/errors.ts';
import type { Material } from '../../domain/member.ts';
import { asRef, asRefs, asString } from '../../step/values.ts';
import type { Remark } from '../findings-log.ts';
import { whose } from '../findings-log.ts';
import type { Reading } from '../reading.ts';
import { gradeIn, statedYield } from './grades.ts';
import { kindIn, STEEL } from './kinds.ts';

/** What an element is made of, and the profiles that its material sets name. */
export interface MadeOf {
  readonly material: Material;
  /** Why the material is the default one; null where the file says enough. */
  readonly remark: Remark | null;
  readonly profiles: readonly number[];
}

interface Named {
  readonly name: string;
  readonly category: string;
}

const DEEPEST = 16;

/** The materials of a file by the instance that IfcRelAssociatesMaterial points at, each read once. */
export class MaterialBook {
  private readonly reading: Reading;
  /** The brief's grade, for what the file leaves open. */
  private readonly fallback: Material | null;
  private readonly known = new Map<number | null, MadeOf>();

  /** @throws RequestError where `defaultMaterial` names no grade that is known. */
  constructor(reading: Reading, defaultMaterial: string | null) {
    this.reading = reading;
    this.fallback = defaultMaterial === null ? null : gradeFromBrief(defaultMaterial);
  }

  madeOf(id: number | null): MadeOf {
    let found = this.known.get(id);
    if (found === undefined) {
      const parts: Named[] = [];
      const profiles: number[] = [];
      if (id !== null) this.gather(id, parts, profiles, 0);
      found = { ...this.choose(parts), profiles };
      this.known.set(id, found);
    }
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
        parts.push({ name: (asString(args[0]) ?? '').trim(), category: asString(args[2]) ?? '' });
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

  /** The first part with a steel grade; else the first whose kind is known; else the default steel. */
  private choose(parts: readonly Named[]): Omit<MadeOf, 'profiles'> {
    for (const part of parts) {
      const graded = gradedSteel(part.name);
      if (graded !== null) return { material: graded, remark: null };
    }
    for (const { name, category } of parts) {
      const kind = kindIn(name) ?? kindIn(category);
      if (kind === null) continue;
      if (kind === STEEL && this.fallback !== null && statedYield(name) === null) {
        return { material: this.fallback, remark: null };
      }
      const { elasticModulus, density, expansion } = kind;
      const yieldStrength = kind === STEEL ? statedYield(name) : null;
      return {
        material: { name, elasticModulus, density, expansion, yieldStrength, ultimateStrength: null, from: 'name' },
        remark: null,
      };
    }
    if (this.fallback !== null) return { material: this.fallback, remark: null };
    return defaultSteel(parts[0]?.name ?? '');
  }
}

function gradedSteel(name: string): Material | null {
  const grade = gradeIn(name);
  if (grade === null) return null;
  return { name, ...grade, density: STEEL.density, expansion: STEEL.expansion, from: 'name' };
}

function gradeFromBrief(name: string): Material {
  const graded = gradedSteel(name.trim());
  if (graded === null) {
    throw new RequestError(
      `The default material '${name}' is no steel grade that is known. Name one like S355 or A992.`,
    );
  }
  return { ...graded, from: 'brief' };
}

function defaultSteel(name: string): Omit<MadeOf, 'profiles'> {
  const { elasticModulus, density, expansion } = STEEL;
  const steel = { elasticModulus, density, expansion, yieldStrength: null, ultimateStrength: null } as const;
  return {
    material: { name: name === '' ? 'Steel' : name, ...steel, from: 'default' },
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
