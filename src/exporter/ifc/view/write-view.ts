import type { Result } from '../../../domain/result.ts';
import type { SchemaFamily } from '../../../importer/schema.ts';
import type { StepRef } from '../../../step/values.ts';
import { enumeration } from '../../../step/write.ts';
import type { Chunks } from '../../chunks.ts';
import { NewFile, writeFrame } from '../new-file.ts';
import { writeStandIns } from './stand-ins.ts';
import { ROLE, viewOf } from './view-parts.ts';
import { type WrittenBar, writeBars } from './write-bars.ts';
import { assign, type WrittenGroups, writeLoads } from './write-loads.ts';
import { conditionsOf, type WrittenNode, writeNodes } from './write-nodes.ts';
import { writeResults } from './write-results.ts';

/**
 * The truss as the structural analysis view of an IFC file of its own: members, connections, supports, loads, combinations
 * and results, in SI units and world axes, in the model's schema. The same result gives the same bytes.
 */
export function writeView(result: Result): Chunks {
  const file = new NewFile(result, familyThatHolds(result));
  return file.chunks('the truss that was analysed, pin-jointed', 'StructuralAnalysisView', viewLines(file, result));
}

/** A hold across the world's axes cannot be said in IFC2X3, so that such a view is IFC4. */
function familyThatHolds(result: Result): SchemaFamily | undefined {
  return [...conditionsOf(result).values()].some(({ frame }) => frame !== null) &&
    result.model.schema.startsWith('IFC2')
    ? 'IFC4'
    : undefined;
}

function* viewLines(file: NewFile, result: Result): Generator<string> {
  const frame = writeFrame(file, result, ROLE);
  const view = viewOf(file, frame, result);
  const elements = writeStandIns(file, frame, result, ROLE);
  yield* file.take();
  const nodes: WrittenNode[] = [];
  yield* writeNodes(view, nodes);
  const bars: WrittenBar[] = [];
  yield* writeBars(view, nodes, elements, bars);
  const groups: WrittenGroups = { cases: new Map(), combinations: new Map() };
  yield* writeLoads(view, nodes, bars, groups);
  const results: StepRef[] = [];
  yield* writeResults(view, nodes, bars, groups, results);

  const { model, generator, caution } = result;
  const loads = [...groups.cases.values(), ...groups.combinations.values()];
  const of = model.project?.globalId ?? model.sha256;
  const analysis = file.add(
    'IFCSTRUCTURALANALYSISMODEL',
    file.globalId(`${ROLE} model`, of),
    frame.owner,
    'Pin-jointed truss',
    `By ${generator.name} ${generator.version} from the model of SHA-256 ${model.sha256}. ${caution}`,
    null,
    enumeration('LOADING_3D'),
    null,
    loads.length === 0 ? null : loads,
    results.length === 0 ? null : results,
    ...(file.isIfc2x3 ? [] : [frame.origin]),
  );
  assign(view, [...nodes.map(({ connection }) => connection), ...bars.map(({ member }) => member)], analysis, 'model');
  const tie = file.globalId(`${ROLE} serves`, of);
  if (file.isIfc2x3) file.add('IFCRELSERVICESBUILDINGS', tie, frame.owner, null, null, analysis, [frame.building]);
  else file.add('IFCRELDECLARES', tie, frame.owner, null, null, frame.project, [analysis]);
  yield* file.take();
}
