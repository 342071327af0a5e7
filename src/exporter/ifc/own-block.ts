import { ModelError } from '../../domain/errors.ts';
import { walkReferences } from '../../step/reference-walk.ts';
import type { StepFile } from '../../step/step-file.ts';

/** Everything that a block of ours can hold. */
export const OWN_TYPES: ReadonlySet<string> = new Set([
  'IFCPERSON',
  'IFCORGANIZATION',
  'IFCPERSONANDORGANIZATION',
  'IFCAPPLICATION',
  'IFCOWNERHISTORY',
  'IFCSIUNIT',
  'IFCPROPERTYSINGLEVALUE',
  'IFCPROPERTYLISTVALUE',
  'IFCPROPERTYTABLEVALUE',
  'IFCPROPERTYSET',
  'IFCQUANTITYLENGTH',
  'IFCELEMENTQUANTITY',
  'IFCRELDEFINESBYPROPERTIES',
  'IFCSIMPLEPROPERTYTEMPLATE',
  'IFCPROPERTYSETTEMPLATE',
  'IFCRELDEFINESBYTEMPLATE',
  'IFCRELDECLARES',
]);

const NAMED_TYPES = ['IFCPROPERTYSET', 'IFCELEMENTQUANTITY', 'IFCPROPERTYSETTEMPLATE'];

/**
 * Throws a ModelError if something that Pinwright did not write stands between its comments: replacing or removing the
 * block would throw it away.
 */
export function forbidForeignInBlock({ block }: StepFile): void {
  if (block === null) return;
  const { instances } = block;
  for (const type of instances.types()) {
    if (!OWN_TYPES.has(type)) refuse(instances.idsOf(type)[0], type);
  }
  for (const type of NAMED_TYPES) {
    for (const id of instances.idsOf(type)) {
      const name = instances.args(id)[2];
      if (typeof name !== 'string' || !name.startsWith('Pinwright_')) refuse(id, type);
    }
  }
}

/**
 * Throws a ModelError if something outside the block refers to what stands in it: without the block it would refer to
 * nothing.
 */
export function forbidReferencesIntoBlock(file: StepFile): void {
  const { block, bytes } = file;
  if (block === null) return;
  const reference = (id: number, to: number) => {
    if (!block.instances.has(to) || file.has(to)) return;
    throw new ModelError(
      `#${id}, an ${file.typeOf(id)}, refers to #${to} among Pinwright's results, so they cannot be taken out or replaced; ` +
        `remove #${id} or what it refers to there.`,
    );
  };
  walkReferences(bytes, 0, block.begin, { reference });
  walkReferences(bytes, block.end, bytes.length, { reference });
}

function refuse(id: number, type: string): never {
  throw new ModelError(
    `#${id}, an ${type}, stands between the comments of Pinwright's results but is not one of them; ` +
      'move it before the comment "Pinwright results: begin".',
  );
}
