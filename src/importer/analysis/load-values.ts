import type { Vec3 } from '../../domain/vector.ts';
import { asEnum, type StepValue } from '../../step/values.ts';
import { NotRead } from '../not-read.ts';
import type { Reading } from '../reading.ts';
import { loadNotTaken } from './remarks.ts';

/** The force of IfcStructuralLoadSingleForce, or force per length of IfcStructuralLoadLinearForce; SI, axes as given. */
export function forceOf(reading: Reading, load: number, kind: 'force' | 'linearForce'): Vec3 | null {
  const type = reading.typeOf(load);
  const due = kind === 'force' ? 'IFCSTRUCTURALLOADSINGLEFORCE' : 'IFCSTRUCTURALLOADLINEARFORCE';
  if (!type.startsWith(due)) {
    reading.note(loadNotTaken(type, OTHER_LOADS.get(type) ?? 'they are of a kind that bars do not take'));
    return null;
  }
  const args = reading.args(load);
  const part = (i: number): number => reading.quantity(args[i], kind) ?? 0;
  const turns = [4, 5, 6].some((i) => typeof args[i] === 'number' && args[i] !== 0);
  if (turns)
    reading.note(loadNotTaken('moments', 'they are moments, which pinned bars do not take (their forces are taken)'));
  return [part(1), part(2), part(3)];
}

/** K, of IfcStructuralLoadTemperature; null where the load is another. What bends a member is said. */
export function temperatureOf(reading: Reading, load: number): number | null {
  if (reading.typeOf(load) !== 'IFCSTRUCTURALLOADTEMPERATURE') return null;
  const args = reading.args(load);
  const bends = [2, 3].some((i) => typeof args[i] === 'number' && args[i] !== 0);
  if (bends)
    reading.note(
      loadNotTaken('gradients', 'they are warmer on one side, which only bends pinned bars (the mean is taken)'),
    );
  return reading.quantity(args[1], 'temperature') ?? 0;
}

/** m, of IfcStructuralLoadSingleDisplacement; null where the load is another. */
export function displacementOf(reading: Reading, load: number): Vec3 | null {
  if (!reading.typeOf(load).startsWith('IFCSTRUCTURALLOADSINGLEDISPLACEMENT')) return null;
  const args = reading.args(load);
  const part = (i: number): number => reading.quantity(args[i], 'length') ?? 0;
  return [part(1), part(2), part(3)];
}

const OTHER_LOADS: ReadonlyMap<string, string> = new Map([
  ['IFCSTRUCTURALLOADTEMPERATURE', 'they are temperatures'],
  ['IFCSTRUCTURALLOADSINGLEDISPLACEMENT', 'they are settlements or imposed movements'],
  ['IFCSTRUCTURALLOADSINGLEDISPLACEMENTDISTORTION', 'they are settlements or imposed movements'],
  ['IFCSTRUCTURALLOADPLANARFORCE', 'they act on surfaces'],
]);

export const isLocal = (value: StepValue | undefined): boolean => asEnum(value) === 'LOCAL_COORDS';

/** An action that is not taken; `reason` completes "3 loads of the model are not taken: ...". */
export const notTaken = (reason: string): NotRead =>
  new NotRead('no-load', reason, 'Give what it stands for in the brief.');
