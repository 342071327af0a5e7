import type { Connection } from './connections.ts';
import type { CurveMember } from './curve-members.ts';

/** What the actions of an analysis model act on, by instance. */
export interface Items {
  readonly connections: ReadonlyMap<number, Connection>;
  readonly members: ReadonlyMap<number, CurveMember>;
}
