import type { StepRef } from '../../step/values.ts';
import { enumeration, ref, type ValueToWrite } from '../../step/write.ts';
import type { Block } from './block.ts';
import type { Common } from './property-set.ts';
import { definitionOf, holdsQuantities, type PropertyDefinition, type SetName } from './set-definitions.ts';

/** So that one relationship stays a line of reasonable length however many elements there are. */
const SETS_A_RELATIONSHIP = 1000;

/**
 * Tells a reader what the property sets mean: a template for each name that is in use, declared to the project and tied
 * to the sets.
 */
export function writeTemplates(
  block: Block,
  common: Common,
  project: { readonly id: number; readonly globalId: string },
  setsByName: ReadonlyMap<SetName, readonly StepRef[]>,
): void {
  const { owner } = common;
  const templates: StepRef[] = [];
  for (const [name, sets] of setsByName) {
    if (sets.length === 0) continue;
    const globalId = block.globalId('template', `${project.globalId} ${name}`);
    const template = writeTemplate(block, common, name, globalId);
    templates.push(template);
    for (let k = 0; k < sets.length; k += SETS_A_RELATIONSHIP) {
      const tie = block.globalId('defines', globalId, k / SETS_A_RELATIONSHIP);
      const some = sets.slice(k, k + SETS_A_RELATIONSHIP);
      block.add('IFCRELDEFINESBYTEMPLATE', tie, owner, null, null, some, template);
    }
  }
  if (templates.length === 0) return;
  const declares = block.globalId('declares', project.globalId);
  block.add('IFCRELDECLARES', declares, owner, null, null, ref(project.id), templates);
}

function writeTemplate(block: Block, { owner, units }: Common, name: SetName, globalId: string): StepRef {
  const set = definitionOf(name);
  const { says, applicableTo, properties } = set;
  const templates = Object.entries(properties).map(([property, definition]) => {
    const id = block.globalId('template', `${globalId} ${property}`);
    const rest = valueParameters(definition, units[definition.measure] ?? null);
    return block.add('IFCSIMPLEPROPERTYTEMPLATE', id, owner, property, definition.says, ...rest);
  });
  const type = enumeration(holdsQuantities(set) ? 'QTO_OCCURRENCEDRIVEN' : 'PSET_OCCURRENCEDRIVEN');
  return block.add('IFCPROPERTYSETTEMPLATE', globalId, owner, name, says, type, applicableTo, templates);
}

/** TemplateType, both measures, Enumerators, both units, Expression, AccessState. */
function valueParameters({ kind, measure }: PropertyDefinition, unit: StepRef | null): readonly ValueToWrite[] {
  const type = { single: 'P_SINGLEVALUE', list: 'P_LISTVALUE', table: 'P_TABLEVALUE', quantity: 'Q_LENGTH' }[kind];
  const measures = kind === 'quantity' ? [null, null] : kind === 'table' ? ['IfcLabel', measure] : [measure, null];
  const units = kind === 'table' ? [null, unit] : [unit, null];
  return [enumeration(type), ...measures, null, ...units, null, enumeration('READONLY')];
}
