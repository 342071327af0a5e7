import type { StepFile } from '../../step/step-file.ts';
import { asRef, asRefs } from '../../step/values.ts';
import { globalIdOf } from './global-id.ts';
import type { Related, RelationshipClass } from './types.ts';

const CLASSES: readonly RelationshipClass[] = [
  'IfcRelConnectsElements',
  'IfcRelConnectsPathElements',
  'IfcRelConnectsWithRealizingElements',
];

/** Attributes 5 to 7 are the relating, the related and the realising elements in every schema that is read. */
export function readRelated(file: StepFile): Related[] {
  return CLASSES.flatMap((by) =>
    file.idsOf(by.toUpperCase()).flatMap((id): Related[] => {
      const args = file.args(id);
      const [a, b] = [asRef(args[5]), asRef(args[6])];
      if (a === null || b === null || a === b || !file.has(a) || !file.has(b)) return [];
      const realising = by === 'IfcRelConnectsWithRealizingElements' ? asRefs(args[7]) : [];
      return [
        {
          a: globalIdOf(file, a),
          b: globalIdOf(file, b),
          by,
          realising: realising.filter((element) => file.has(element)).map((element) => globalIdOf(file, element)),
        },
      ];
    }),
  );
}
