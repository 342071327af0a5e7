import type { Result } from '../../../domain/result.ts';
import { DERIVED, type StepRef } from '../../../step/values.ts';
import { enumeration } from '../../../step/write.ts';
import { label } from '../block.ts';
import { elementForces } from '../member-forces.ts';
import { writeSet } from '../property-set.ts';
import { forceValues } from '../set-values.ts';
import { ROLE, type View } from './view-parts.ts';
import type { WrittenBar } from './write-bars.ts';
import { assign, connectActivity, type WrittenGroups } from './write-loads.ts';
import type { WrittenNode } from './write-nodes.ts';

/**
 * A result group for each case and combination that was solved: reactions at supports, axial forces in bars. IFC2X3 has no
 * reaction of a curve: there the bars have their forces as property sets.
 */
export function* writeResults(
  view: View,
  nodes: readonly WrittenNode[],
  bars: readonly WrittenBar[],
  groups: WrittenGroups,
  into: StepRef[],
): Generator<string> {
  const { file, result } = view;
  for (const run of result.cases) yield* writeRun(view, nodes, bars, run, groups.cases.get(run.name)!, into);
  for (const run of result.combinations) {
    yield* writeRun(view, nodes, bars, run, groups.combinations.get(run.name)!, into);
  }
  if (file.isIfc2x3 && result.cases.length > 0) yield* forcesAsProperties(view, bars);
}

type Run = Result['cases'][number] | Result['combinations'][number];

function* writeRun(
  view: View,
  nodes: readonly WrittenNode[],
  bars: readonly WrittenBar[],
  run: Run,
  group: StepRef,
  into: StepRef[],
): Generator<string> {
  if (run.refused !== undefined) return;
  const { file, frame, result, nodeKeys } = view;
  const indexOf = new Map(result.nodes.map(({ id }, k) => [id, k]));
  const reactions: StepRef[] = [];
  const activity = (type: string, role: string, of: string, item: StepRef, rest: readonly (StepRef | Enumerated)[]) => {
    const id = file.globalId(`${ROLE} ${role}`, of);
    const written = file.add(type, id, frame.owner, null, null, null, null, null, ...rest);
    connectActivity(view, item, written, id);
    reactions.push(written);
  };
  for (const { node, force } of run.reactions) {
    const k = indexOf.get(node)!;
    const load = file.add('IFCSTRUCTURALLOADSINGLEFORCE', null, ...force, null, null, null);
    const rest = [load, enumeration('GLOBAL_COORDS')];
    activity('IFCSTRUCTURALPOINTREACTION', 'reaction', `${run.name}\n${nodeKeys[k]}`, nodes[k]!.connection, rest);
    yield* file.take();
  }
  for (const [k, force] of run.axialForce.entries()) {
    if (file.isIfc2x3 || force === null) continue;
    const { member, globalId } = bars[k]!;
    const load = file.add('IFCSTRUCTURALLOADSINGLEFORCE', TENSION_POSITIVE, force, null, null, null, null, null);
    const rest = [load, enumeration('LOCAL_COORDS'), enumeration('CONST')];
    activity('IFCSTRUCTURALCURVEREACTION', 'bar force', `${run.name}\n${globalId}`, member, rest);
    yield* file.take();
  }
  const theory = `${isSecondOrder(result, run) ? 'SECOND' : 'FIRST'}_ORDER_THEORY`;
  const written = file.add(
    'IFCSTRUCTURALRESULTGROUP',
    file.globalId(`${ROLE} results`, run.name),
    frame.owner,
    label(`Results of ${run.name}`),
    file.isIfc2x3
      ? 'Reactions at supports. Forces of bars are in their property sets.'
      : 'Reactions at supports and axial forces of bars.',
    null,
    enumeration(theory),
    group,
    result.oneWay === undefined && !isSecondOrder(result, run),
  );
  assign(view, reactions, written, `results of ${run.name}`);
  into.push(written);
  yield* file.take();
}

type Enumerated = ReturnType<typeof enumeration>;

const TENSION_POSITIVE = 'axial force, tension positive';

/** Cases by themselves are always first order. */
const isSecondOrder = ({ analysis }: Result, run: Run): boolean => analysis === 'second-order' && 'limit' in run;

function* forcesAsProperties(view: View, bars: readonly WrittenBar[]): Generator<string> {
  const { file, frame, result } = view;
  const asOwn = { ...result, bars: result.bars.map((bar, k) => ({ ...bar, members: [bars[k]!.globalId] })) };
  const forcesOf = elementForces(asOwn);
  const newton = file.add('IFCSIUNIT', DERIVED, enumeration('FORCEUNIT'), null, enumeration('NEWTON'));
  // Under ids of their own: these sets are not what an annotated model has.
  const writer = {
    isIfc2x3: true,
    add: file.add.bind(file),
    globalId: (role: string, of: string, part?: number) => file.globalId(`${ROLE} ${role}`, of, part),
  };
  const common = { owner: frame.owner, units: { IfcForceMeasure: newton } };
  for (const { member, globalId } of bars) {
    const forces = forcesOf(globalId);
    if (forces !== null)
      writeSet(writer, common, 'Pinwright_Forces', forceValues(forces, asOwn), globalId, [member.id]);
    yield* file.take();
  }
}
