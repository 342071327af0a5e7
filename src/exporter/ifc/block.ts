import type { StepFile } from '../../step/step-file.ts';
import { InstanceWriter, integer, typed, type ValueToWrite } from '../../step/write.ts';
import { firstFreeId } from './free-ids.ts';
import { drawGlobalId } from './global-id.ts';
import type { Measure } from './set-definitions.ts';
import { takenIn } from './taken.ts';
import type { UsedGlobalIds } from './used-global-ids.ts';

/** IfcLabel and IfcIdentifier end here (ISO 16739). */
const LONGEST_LABEL = 255;

/** Writes the instances of a block, with numbers and GlobalIds that the model does not have. */
export class Block extends InstanceWriter {
  readonly isIfc2x3: boolean;
  private readonly used: UsedGlobalIds;

  /** For at most so many instances. */
  constructor(file: StepFile, mostInstances: number) {
    const taken = takenIn(file);
    super(firstFreeId(file, taken, mostInstances));
    this.isIfc2x3 = file.schema.startsWith('IFC2');
    this.used = taken.globalIds;
  }

  /** The GlobalId for a role of something: drawn again, always the same way, while the model has it already. */
  globalId(role: string, of: string, part = 0): string {
    let draw = 0;
    let id = drawGlobalId(role, of, part);
    while (this.used.has(id)) id = drawGlobalId(role, of, part, ++draw);
    return id;
  }
}

/** A value with its type, as properties hold it. */
export function measured(measure: Measure, value: number | string): ValueToWrite {
  const type = measure.toUpperCase();
  if (typeof value === 'string') return typed(type, measure === 'IfcLabel' ? label(value) : value);
  return typed(type, measure === 'IfcInteger' ? integer(value) : value);
}

/** The text, cut to the length that a label may have. */
export function label(text: string): string {
  const characters = [...text];
  return characters.length <= LONGEST_LABEL ? text : `${characters.slice(0, LONGEST_LABEL - 1).join('')}…`;
}
