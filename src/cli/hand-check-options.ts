import { type Command, Option } from 'commander';
import { RequestError } from '../domain/errors.ts';
import type { Result } from '../domain/result.ts';
import { norm, type Vec3 } from '../domain/vector.ts';
import { cutTable, factorsOf, jointTable, wholeTable } from '../exporter/hand-check.ts';
import { checkCut, type Plane, planeAcross, planeThrough, worstStateAcross } from '../statics/hand-check/check-cut.ts';
import { checkJoint, nearestNode, worstStateAt } from '../statics/hand-check/check-joint.ts';
import { checkWhole } from '../statics/hand-check/check-whole.ts';
import { carriedStates, type State, stateOf } from '../statics/hand-check/state.ts';

/** What `analyse` can be asked to show for a check by hand, in place of the summary. */
export interface HandCheckFlags {
  readonly joint?: string[];
  readonly cut?: string[];
  readonly balance?: boolean;
  readonly case?: string;
}

const gather = (one: string, before: string[] = []): string[] => [...before, one];

export function withHandChecks(command: Command): Command {
  return command
    .addOption(
      new Option(
        '--joint <node>',
        'balance of a joint by hand: a node (n12) or the nearest to x,y,z in metres; may be repeated',
      ).argParser(gather),
    )
    .addOption(
      new Option(
        '--cut <plane>',
        'method of sections: x=12, y=3.5, z=6, or x,y,z/nx,ny,nz (point and normal); may be repeated',
      ).argParser(gather),
    )
    .option('--balance', 'loads against reactions of the whole, case by case')
    .option(
      '--case <name>',
      'case or combination that --joint and --cut show; default: the one with the largest force there',
    );
}

export const asksForHandCheck = ({ joint = [], cut = [], balance }: HandCheckFlags): boolean =>
  joint.length + cut.length > 0 || balance === true;

/** A place or a plane that cannot be read is said before the model is. */
export function readHandChecks({ joint = [], cut = [] }: HandCheckFlags): void {
  for (const text of joint) readPlace(text);
  for (const text of cut) readPlane(text);
}

export function handChecks(result: Result, flags: HandCheckFlags): string {
  const states = carriedStates(result);
  if (states.length === 0) throw new RequestError('there is no case with forces to check by hand');
  const asked = flags.case === undefined ? null : stateOf(result, flags.case);
  const blocks = [
    ...(flags.balance ? [wholeTable((asked === null ? states : [asked]).map((one) => checkWhole(result, one)))] : []),
    ...(flags.joint ?? []).map((text) => ofJoint(result, text, asked, states)),
    ...(flags.cut ?? []).map((text) => ofCut(result, text, asked, states)),
  ];
  return `${blocks.map((lines) => lines.join('\n')).join('\n\n')}\n`;
}

function ofJoint(result: Result, text: string, asked: State | null, states: readonly State[]): string[] {
  const place = readPlace(text);
  const node = typeof place === 'string' ? place : (nearestNode(result, place)?.node ?? 'n1');
  const state = asked ?? worstStateAt(result, node, states) ?? states[0];
  return jointTable(checkJoint(result, node, state), factorsOf(result, state.name));
}

function ofCut(result: Result, text: string, asked: State | null, states: readonly State[]): string[] {
  const plane = readPlane(text);
  const state = asked ?? worstStateAcross(result, plane, states);
  return cutTable(checkCut(result, plane, state), text, factorsOf(result, state.name));
}

function readPlace(text: string): string | Vec3 {
  if (/^n\d+$/.test(text.trim())) return text.trim();
  const point = readTriple(text);
  if (point === null)
    throw new RequestError(`--joint ${text}: a node such as n12, or a point such as 12,18,6.4 in metres, is due`);
  return point;
}

const AXES: Readonly<Record<string, Vec3>> = { x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] };

function readPlane(text: string): Plane {
  const [, axis, value] = /^\s*([xyz])\s*=\s*([-+\d.eE]+)\s*(?:m)?\s*$/.exec(text) ?? [];
  if (axis !== undefined && Number.isFinite(Number(value))) return planeAcross(AXES[axis], Number(value));
  const [point, normal] = text.split('/').map(readTriple);
  if (point && normal && norm(normal) > 0) return planeThrough(point, normal);
  throw new RequestError(
    `--cut ${text}: a plane such as x=12 is due, or a point and a normal such as 12,0,0/1,1,0, in metres`,
  );
}

function readTriple(text: string): Vec3 | null {
  const parts = text.split(',').map((part) => (part.trim() === '' ? Number.NaN : Number(part)));
  return parts.length === 3 && parts.every(Number.isFinite) ? [parts[0], parts[1], parts[2]] : null;
}
