import type { StepFile } from '../../step/step-file.ts';
import { asRef, asRefs } from '../../step/values.ts';

/** The building element that a structural member stands for, by member: IfcRelAssignsToProduct, in IFC2X3 IfcRelConnectsStructuralElement. */
export function elementsBehind(file: StepFile): Map<number, number> {
  const behind = new Map<number, number>();
  for (const id of file.idsOf('IFCRELASSIGNSTOPRODUCT')) {
    const args = file.args(id);
    const product = asRef(args[6]);
    if (product !== null) for (const member of asRefs(args[4])) behind.set(member, product);
  }
  for (const id of file.idsOf('IFCRELCONNECTSSTRUCTURALELEMENT')) {
    const args = file.args(id);
    const [element, member] = [asRef(args[4]), asRef(args[5])];
    if (element !== null && member !== null) behind.set(member, element);
  }
  return behind;
}
