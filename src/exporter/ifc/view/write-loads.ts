import type { Result } from '../../../domain/result.ts';
import type { StepRef } from '../../../step/values.ts';
import { enumeration, type ValueToWrite } from '../../../step/write.ts';
import { label } from '../block.ts';
import { ROLE, type View } from './view-parts.ts';
import type { WrittenBar } from './write-bars.ts';
import type { WrittenNode } from './write-nodes.ts';

type Nature = Result['cases'][number]['nature'];

/** IfcActionTypeEnum and IfcActionSourceTypeEnum. */
const ACTIONS: Readonly<Record<Nature, readonly [type: string, source: string]>> = {
  permanent: ['PERMANENT_G', 'DEAD_LOAD_G'],
  imposed: ['VARIABLE_Q', 'LIVE_LOAD_Q'],
  snow: ['VARIABLE_Q', 'SNOW_S'],
  wind: ['VARIABLE_Q', 'WIND_W'],
  thermal: ['VARIABLE_Q', 'TEMPERATURE_T'],
  accidental: ['EXTRAORDINARY_A', 'NOTDEFINED'],
};

const SETTLING = ['PERMANENT_G', 'SETTLEMENT_U'] as const;

/** The load group of each case and combination, by name. */
export interface WrittenGroups {
  readonly cases: Map<string, StepRef>;
  readonly combinations: Map<string, StepRef>;
}

/** Load cases with what acts at nodes (own weight among it) and on bars, and combinations of them. */
export function* writeLoads(
  view: View,
  nodes: readonly WrittenNode[],
  bars: readonly WrittenBar[],
  into: WrittenGroups,
): Generator<string> {
  const { file, result } = view;
  for (const loadCase of result.cases) {
    const { name, nature } = loadCase;
    const [type, source] = (loadCase.settlements ?? []).length > 0 ? SETTLING : ACTIONS[nature];
    const group = writeGroup(view, name, ['LOAD_CASE', type, source, 1, null]);
    into.cases.set(name, group);
    const actions: StepRef[] = [];
    yield* writeActions(view, nodes, bars, loadCase, actions);
    assign(view, actions, group, `loads of ${name}`);
    yield* file.take();
  }
  for (const { name, limit, factors } of result.combinations) {
    const group = writeGroup(view, name, ['LOAD_COMBINATION', 'NOTDEFINED', 'NOTDEFINED', 1, limit]);
    into.combinations.set(name, group);
    for (const [loadCase, factor] of Object.entries(factors)) {
      const own = into.cases.get(loadCase);
      if (own !== undefined) addByFactor(view, { name, group }, { name: loadCase, group: own }, factor);
    }
    yield* file.take();
  }
}

/** Forces and settlements at nodes; what warmth or misfit makes of bars as the change of temperature that does it. */
function* writeActions(
  { file, frame, result, nodeKeys }: View,
  nodes: readonly WrittenNode[],
  bars: readonly WrittenBar[],
  { name, loads, stretch = [], settlements = [] }: Result['cases'][number],
  into: StepRef[],
): Generator<string> {
  const nodeOf = new Map(result.nodes.map(({ id }, k) => [id, k]));
  const barOf = new Map(result.bars.map(({ id }, k) => [id, k]));
  const act = (
    type: string,
    role: string,
    key: string,
    item: StepRef,
    load: StepRef,
    tail: readonly ValueToWrite[],
  ) => {
    const id = file.globalId(`${ROLE} ${role}`, `${name}\n${key}`);
    const rest = [load, enumeration(role === 'warmth' ? 'LOCAL_COORDS' : 'GLOBAL_COORDS'), false, ...tail];
    const action = file.add(type, id, frame.owner, null, null, null, null, null, ...rest);
    connectActivity({ file, frame }, item, action, id);
    into.push(action);
  };
  const causedBy = file.isIfc2x3 ? [null] : [];
  const atNode = (node: string, role: string, type: string, value: readonly number[]) => {
    const k = nodeOf.get(node)!;
    const load = file.add(type, null, ...value, null, null, null);
    act('IFCSTRUCTURALPOINTACTION', role, nodeKeys[k]!, nodes[k]!.connection, load, causedBy);
  };
  for (const { node, force } of loads) {
    atNode(node, 'action', 'IFCSTRUCTURALLOADSINGLEFORCE', force);
    yield* file.take();
  }
  for (const { node, movement } of settlements) {
    atNode(node, 'settlement', 'IFCSTRUCTURALLOADSINGLEDISPLACEMENT', movement);
    yield* file.take();
  }
  for (const { bar, by } of stretch) {
    const { member, globalId, expansion } = bars[barOf.get(bar)!]!;
    const change = by / (expansion * result.bars[barOf.get(bar)!]!.length);
    if (!Number.isFinite(change)) continue;
    const load = file.add('IFCSTRUCTURALLOADTEMPERATURE', null, change, null, null);
    const along = file.isIfc2x3 ? [enumeration('TRUE_LENGTH')] : [null, enumeration('CONST')];
    act('IFCSTRUCTURALLINEARACTION', 'warmth', globalId, member, load, [...causedBy, ...along]);
    yield* file.take();
  }
}

type GroupValues = readonly [
  predefined: string,
  type: string,
  source: string,
  coefficient: number,
  purpose: string | null,
];

function writeGroup({ file, frame }: View, name: string, [kind, type, source, coefficient, purpose]: GroupValues) {
  const isCase = kind === 'LOAD_CASE' && !file.isIfc2x3;
  return file.add(
    isCase ? 'IFCSTRUCTURALLOADCASE' : 'IFCSTRUCTURALLOADGROUP',
    file.globalId(`${ROLE} ${kind}`, name),
    frame.owner,
    label(name),
    null,
    null,
    enumeration(kind),
    enumeration(type),
    enumeration(source),
    coefficient,
    purpose,
    ...(isCase ? [null] : []),
  );
}

interface Named {
  readonly name: string;
  readonly group: StepRef;
}

/** IFC2X3 has no relationship with a factor: a group in between has it as its coefficient. */
function addByFactor(view: View, combination: Named, loadCase: Named, factor: number): void {
  const { file, frame } = view;
  const pair = `${combination.name}\n${loadCase.name}`;
  if (!file.isIfc2x3) {
    const id = file.globalId(`${ROLE} factor`, pair);
    const rest = [[loadCase.group], null, combination.group, factor];
    file.add('IFCRELASSIGNSTOGROUPBYFACTOR', id, frame.owner, null, null, ...rest);
    return;
  }
  const values = ['LOAD_COMBINATION_GROUP', 'NOTDEFINED', 'NOTDEFINED', factor, null] as const;
  const between = writeGroup(view, `${loadCase.name} times ${factor} in ${combination.name}`, values);
  assign(view, [loadCase.group], between, `case of ${pair}`);
  assign(view, [between], combination.group, `part of ${pair}`);
}

export function assign({ file, frame }: View, items: readonly StepRef[], group: StepRef, of: string): void {
  if (items.length === 0) return;
  file.add('IFCRELASSIGNSTOGROUP', file.globalId(`${ROLE} assigns`, of), frame.owner, null, null, items, null, group);
}

export function connectActivity(
  { file, frame }: Pick<View, 'file' | 'frame'>,
  item: StepRef,
  activity: StepRef,
  of: string,
): void {
  const id = file.globalId(`${ROLE} acts`, of);
  file.add('IFCRELCONNECTSSTRUCTURALACTIVITY', id, frame.owner, null, null, item, activity);
}
