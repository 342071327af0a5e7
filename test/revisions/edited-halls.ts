import { createHash } from 'node:crypto';
import { type Chance, chanceOf } from '../../scripts/bench/roofs/chance.ts';
import { hallFile } from '../../scripts/demo-roof/ifc-file.ts';
import { directionOf, type HallModel, type Part } from '../../scripts/demo-roof/parts.ts';
import { hallModel, REVISION_A } from '../../scripts/demo-roof/revisions.ts';
import type { SectionName } from '../../scripts/demo-roof/sections.ts';
import { add, anyNormal, scale } from '../../src/domain/vector.ts';

/** What was done to one member, by its name. */
export type Edit =
  | { readonly kind: 'removed' | 'added' | 'moved'; readonly name: string }
  | { readonly kind: 'resized'; readonly name: string; readonly section: readonly [string, string] };

export const soundHall = (): HallModel => hallModel(REVISION_A);

/** The demo hall with as many edits, each of another member. */
export function editedHall(seed: number, count: number): { readonly model: HallModel; readonly edits: Edit[] } {
  const chance = chanceOf(seed);
  const sound = soundHall();
  const victims = chance.shuffled(sound.parts).slice(0, count);
  const edits: Edit[] = [];
  const done = new Map<string, readonly Part[]>();
  for (const part of victims) {
    const { parts, edit } = chance.pick([remove, copyAside, move, resize])(part, chance);
    done.set(part.name, parts);
    edits.push(edit);
  }
  return { model: { ...sound, parts: sound.parts.flatMap((part) => done.get(part.name) ?? [part]) }, edits };
}

type Editor = (part: Part, chance: Chance) => { readonly parts: readonly Part[]; readonly edit: Edit };

const remove: Editor = ({ name }) => ({ parts: [], edit: { kind: 'removed', name } });

const copyAside: Editor = (part) => {
  const copy = { ...shifted(part, 700), name: `${part.name}-new`, through: [] };
  return { parts: [part, copy], edit: { kind: 'added', name: copy.name } };
};

const move: Editor = (part, chance) => ({
  parts: [shifted(part, chance.between(60, 450))],
  edit: { kind: 'moved', name: part.name },
});

const resize: Editor = (part, chance) => {
  const others: readonly SectionName[] = ['HEA 180', 'IPE 160', 'SHS 80x80x5', 'CHS 76.1x3.2'];
  const section = chance.pick(others.filter((one) => one !== part.section));
  return {
    parts: [{ ...part, section }],
    edit: { kind: 'resized', name: part.name, section: [part.section, section] },
  };
};

/** Sideways, mm. */
function shifted(part: Part, by: number): Part {
  const aside = scale(anyNormal(directionOf(...part.axis)), by);
  return { ...part, axis: [add(part.axis[0], aside), add(part.axis[1], aside)] };
}

/** The hall as a file; as an exporter would write it that gives every element a new GlobalId, or that keeps no order. */
export function fileOf(model: HallModel, { renewed = false, shuffledBy = 0 } = {}): Uint8Array {
  const parts = shuffledBy === 0 ? model.parts : chanceOf(shuffledBy).shuffled(model.parts);
  const text = hallFile({ ...model, parts }, 'hall.ifc');
  return new TextEncoder().encode(
    renewed ? text.replace(/\('[0-9A-Za-z_$]{22}'/g, (id) => `('${renewedId(id)}'`) : text,
  );
}

const renewedId = (id: string): string =>
  `0${createHash('sha256').update(id).digest('base64url').slice(0, 21).replaceAll('-', '$')}`;
