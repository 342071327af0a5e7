import { asRef, asString } from '../../step/values.ts';
import type { GivenLoad } from '../given.ts';
import { NotRead } from '../not-read.ts';
import type { Sources } from '../read-element.ts';
import type { Frames } from './frames.ts';
import type { Items } from './items.ts';
import { lineLoads } from './line-actions.ts';
import { pointLoads } from './point-actions.ts';
import { loadNotTaken } from './remarks.ts';

const POINT = ['IFCSTRUCTURALPOINTACTION'];
const LINE = ['IFCSTRUCTURALLINEARACTION', 'IFCSTRUCTURALLINEARACTIONVARYING', 'IFCSTRUCTURALCURVEACTION'];
export const SURFACE = ['IFCSTRUCTURALPLANARACTION', 'IFCSTRUCTURALPLANARACTIONVARYING', 'IFCSTRUCTURALSURFACEACTION'];

/** The loads of every point and line action, unfactored, by instance. What cannot be taken is said. */
export function readActions(sources: Sources, frames: Frames, items: Items): Map<number, readonly GivenLoad[]> {
  const { reading } = sources;
  const itemOf = itemsByActivity(sources);
  const loads = new Map<number, readonly GivenLoad[]>();
  for (const type of [...POINT, ...LINE]) {
    for (const id of reading.file.idsOf(type)) {
      reading.about(asString(reading.args(id)[0]) ?? `#${id}`);
      const item = itemOf.get(id);
      try {
        if (item === undefined) reading.note(loadNotTaken('on nothing', 'the model does not say what they act on'));
        else if (POINT.includes(type)) loads.set(id, pointLoads(sources, frames, items, id, item));
        else loads.set(id, lineLoads(sources, frames, items, id, item));
      } catch (problem) {
        if (!(problem instanceof NotRead)) throw problem;
        reading.note(loadNotTaken(problem.message, problem.message));
      } finally {
        reading.about(null);
      }
    }
  }
  return loads;
}

/** By IfcRelConnectsStructuralActivity. */
function itemsByActivity({ reading }: Sources): Map<number, number> {
  const items = new Map<number, number>();
  for (const id of reading.file.idsOf('IFCRELCONNECTSSTRUCTURALACTIVITY')) {
    const args = reading.args(id);
    const [item, activity] = [asRef(args[4]), asRef(args[5])];
    if (item !== null && activity !== null) items.set(activity, item);
  }
  return items;
}
