import type { Result } from '../../../domain/result.ts';
import type { StepRef } from '../../../step/values.ts';
import { enumeration } from '../../../step/write.ts';
import { label } from '../block.ts';
import type { FileFrame, NewFile } from '../new-file.ts';

/** How many attributes follow the tag, in IFC2X3 and from IFC4 on. */
const MORE: Readonly<Record<string, readonly [in2x3: number, later: number]>> = {
  IfcBeam: [0, 1],
  IfcColumn: [0, 1],
  IfcMember: [0, 1],
  IfcPlate: [0, 1],
  IfcRailing: [1, 1],
  IfcPile: [2, 2],
  IfcElementAssembly: [2, 2],
  IfcBuildingElementPart: [0, 1],
  IfcBuildingElementProxy: [1, 1],
};

/**
 * The building elements that bars stand for, by GlobalId: bare of shape, under their own GlobalId, name and mark, so that
 * whoever has the model too can tell which bar is which element.
 */
export function writeStandIns(
  file: NewFile,
  frame: FileFrame,
  { members }: Result,
  role: string,
): Map<string, StepRef> {
  const written = new Map<string, StepRef>();
  for (const member of members) {
    if (member.axisFrom === 'analysis-view' || written.has(member.globalId)) continue;
    const isKnown = Object.hasOwn(MORE, member.class);
    const type = isKnown ? member.class : 'IfcBuildingElementProxy';
    const more = MORE[type]![file.isIfc2x3 ? 0 : 1];
    const name = member.name === null ? null : label(member.name);
    const tag = member.tag === null ? null : label(member.tag);
    const id = file.sameGlobalId(member.globalId, `${role} element`);
    const head = [id, frame.owner, name, null, isKnown ? null : member.class, null, null, tag];
    written.set(member.globalId, file.add(type.toUpperCase(), ...head, ...tailOf(type, more)));
  }
  if (written.size > 0) {
    const tie = file.globalId(`${role} contained`, '');
    file.add('IFCRELCONTAINEDINSPATIALSTRUCTURE', tie, frame.owner, null, null, [...written.values()], frame.building);
  }
  return written;
}

/** IFC2X3 wants the kind of a railing, a pile or an assembly said or left out as the schema has it. */
function tailOf(type: string, more: number) {
  const tail = Array<ReturnType<typeof enumeration> | null>(more).fill(null);
  if (type === 'IfcPile') tail[0] = enumeration('NOTDEFINED');
  if (type === 'IfcElementAssembly') tail[1] = enumeration('NOTDEFINED');
  return tail;
}
