import { type Finding, finding } from '../../domain/finding.ts';
import type { Member } from '../../domain/member.ts';
import type { Truss } from '../../domain/truss.ts';
import { count } from '../../domain/verdict.ts';
import type { IdleBar } from './idle-bars.ts';

const NAMED = 4;

/**
 * The bars that no load of the brief reaches, in the order in which a person would find them; bracing apart, since it waits for what is not among the loads.
 * Bars that are slack everywhere are said elsewhere.
 * @param bracing members that brace, by index
 */
export function idleFindings(
  truss: Truss,
  members: readonly Pick<Member, 'globalId'>[],
  everywhere: readonly IdleBar[],
  bracing: ReadonlySet<number>,
): Finding[] {
  const memberOf = ({ bar }: IdleBar) => truss.bars[bar].members[0];
  const shown = everywhere.filter(({ rule }) => rule !== 'slack');
  const braces = shown.filter((one) => bracing.has(memberOf(one)));
  const others = shown.filter((one) => !bracing.has(memberOf(one)));
  return [...say(others, '', OTHERS_STAY), ...say(braces, ' of bracing', BRACES_STAY)];

  function say(idle: readonly IdleBar[], kind: string, advice: string): Finding[] {
    if (idle.length === 0) return [];
    const told = idle.slice(0, NAMED).map((one) => `${truss.bars[one.bar].name} (${reason(truss, one)})`);
    const more = idle.length > NAMED ? `; and ${idle.length - NAMED} more` : '';
    const [{ bar, node }] = idle;
    const first = truss.nodes[node ?? truss.bars[bar].from];
    return [
      finding(
        'slack-bar',
        `${count(idle.length, 'bar')}${kind} ${idle.length === 1 ? 'carries' : 'carry'} nothing in any load case: ${told.join('; ')}${more}.`,
        advice,
        {
          members: [...new Set(idle.map((one) => members[memberOf(one)].globalId))],
          nodes: [...new Set(idle.map((one) => one.node ?? truss.bars[one.bar].from))],
          at: first.at,
          place: first.place,
        },
      ),
    ];
  }
}

const BRACES_STAY =
  'They are idle only because what they are for is not among the loads: imperfections, wind along them, the force that keeps compressed chords straight. Leave them in, and load them before they are sized.';
const OTHERS_STAY =
  'Leave them in unless something else keeps these joints in place: a bar without force still holds them, and imperfections or other loads may need it.';

function reason(truss: Truss, { rule, node }: IdleBar): string {
  const joint = node === null ? '' : (truss.nodes[node].place ?? 'its joint');
  switch (rule) {
    case 'alone':
      return `alone at the unloaded joint ${joint}`;
    case 'two':
      return `one of two bars not in line at the unloaded joint ${joint}`;
    case 'three':
      return `one of three bars not in one plane at the unloaded joint ${joint}`;
    case 'out-of-line':
      return `all else at ${joint} lies in one line`;
    case 'out-of-plane':
      return `all else at ${joint} lies in one plane`;
    case 'slack':
      return 'slack';
    case 'whole':
      return 'no single joint shows it, the balance of all of them does';
  }
}
