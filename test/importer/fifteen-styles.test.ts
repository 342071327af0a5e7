import { describe, expect, it } from 'vitest';
import { distance, type Vec3 } from '../../src/domain/vector.ts';
import { importModel } from '../../src/importer/import-model.ts';
import type { ImportedModel } from '../../src/importer/types.ts';
import { openStep } from '../../src/step/step-file.ts';
import { CHS_AREA, RHS_AREA } from './support/drawn-parts.ts';
import { MESH_STYLES, manySolids, oneMesh } from './support/mesh-styles.ts';
import { stepText } from './support/model-text.ts';
import { type Bar, type Drawn, type Schema, spaceTruss, trussModel } from './support/space-truss.ts';
import { StepWriter } from './support/step-writer.ts';
import { SWEPT_STYLES } from './support/swept-styles.ts';

const MILLIMETRES = 1000;
const INCHES = 1 / 0.0254;

function imported(
  schema: Schema,
  elements: readonly ((writer: StepWriter) => Drawn)[],
  perMetre = MILLIMETRES,
): Promise<ImportedModel> {
  const data = trussModel(new StepWriter(perMetre), schema, elements, perMetre === INCHES ? 'in' : 'mm');
  return importModel(openStep(new TextEncoder().encode(stepText(data, schema))));
}

/** The greatest distance of an end from where its bar has it; each bar is found once. */
function worstEnd(model: ImportedModel, bars: readonly Bar[]): number {
  const left = new Set(model.members);
  let worst = 0;
  for (const bar of bars) {
    let [nearest, least] = [null as (typeof model.members)[number] | null, Number.POSITIVE_INFINITY];
    for (const member of left) {
      const away = Math.min(apart(member.axis, [bar.from, bar.to]), apart(member.axis, [bar.to, bar.from]));
      if (away < least) [nearest, least] = [member, away];
    }
    if (nearest === null) return Number.POSITIVE_INFINITY;
    left.delete(nearest);
    worst = Math.max(worst, least);
  }
  return left.size > 0 ? Number.POSITIVE_INFINITY : worst;
}

const apart = (a: readonly [Vec3, Vec3], b: readonly [Vec3, Vec3]): number =>
  Math.max(distance(a[0], b[0]), distance(a[1], b[1]));

const STYLES = [...SWEPT_STYLES, ...MESH_STYLES];
const CASES = STYLES.flatMap((style) => style.schemas.map((schema) => ({ ...style, schema })));

describe('the same space truss', () => {
  it.each(CASES)('written in $schema as $name has the same axes and areas', async (style) => {
    const bars = spaceTruss();
    const model = await imported(
      style.schema,
      bars.map((bar) => (writer) => style.draw(writer, bar)),
    );
    const isMesh = style.axisFrom === 'mesh';
    expect(worstEnd(model, bars)).toBeLessThan(isMesh ? 1e-3 : 1e-6);
    const area = style.isRound === true ? CHS_AREA : RHS_AREA;
    for (const member of model.members) {
      expect(member.axisFrom).toBe(style.axisFrom);
      expect(member.section?.from).toBe(isMesh ? 'mesh' : 'profile');
      expect(Math.abs(member.section!.area / area - 1)).toBeLessThan(isMesh ? 0.02 : 0.001);
    }
    expect(model.findings.map((f) => f.code)).toEqual(isMesh ? ['guessed-section'] : []);
  });

  it.each(STYLES.filter((style) => style.needsParser !== true))(
    'written in inches as $name has the same axes',
    async (style) => {
      const bars = spaceTruss();
      const elements = bars.map((bar) => (writer: StepWriter) => style.draw(writer, bar));
      const model = await imported(style.schemas[0]!, elements, INCHES);
      expect(model.lengthUnit).toBe('in');
      expect(worstEnd(model, bars)).toBeLessThan(style.axisFrom === 'mesh' ? 1e-3 : 1e-6);
    },
  );

  it('written as solids of one element is taken apart into its bars', async () => {
    // No two of them in line end to end, which would be one length of steel.
    const bars = spaceTruss().filter((bar) => Math.abs(bar.along[0]) < 1);
    const model = await imported('IFC4', [(writer) => manySolids(writer, bars)]);
    expect(worstEnd(model, bars)).toBeLessThan(1e-6);
    expect(model.members.map((m) => m.part).sort((a, b) => a - b)).toEqual(bars.map((_, i) => i));
    expect(new Set(model.members.map((m) => m.globalId)).size).toBe(1);
  });

  it('written as one mesh of bars that do not touch is taken apart into its bars', async () => {
    const bars = spaceTruss();
    const short = 0.2;
    const model = await imported('IFC4', [(writer) => oneMesh(writer, bars, short)]);
    expect(Math.abs(worstEnd(model, bars) - short)).toBeLessThan(1e-3);
  });
});

describe('a space truss a thousand kilometres from the origin', () => {
  it.each(STYLES.filter((style) => style.needsParser !== true))(
    'as $name loses less than a nanometre',
    async (style) => {
      const bars = spaceTruss([1e6, -1e6, 0]);
      const elements = bars.map((bar) => (writer: StepWriter) => style.draw(writer, bar));
      const far = await imported(style.schemas[0]!, elements);
      const isMesh = style.axisFrom === 'mesh';
      expect(worstEnd(far, bars)).toBeLessThan(isMesh ? 1e-6 : 1e-9);
    },
  );
});
