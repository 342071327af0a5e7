import type { Axis } from './axes.ts';
import type { Contact } from './contacts.ts';
import { TOLERANCE } from './options.ts';

export type Role = 'start' | 'finish' | 'through';

/** A place on one axis where it meets others: contacts that lie within a joint's size of each other along it. */
export interface Station {
  readonly member: number;
  /** Distance along the axis from its start, m. */
  readonly s: number;
  readonly role: Role;
  /** Indices into the contacts. */
  readonly contacts: readonly number[];
}

/**
 * The stations of every member, each in order along its axis. An end that could be carried to several places goes to
 * the nearest; a place beyond the end that was not chosen is dropped, one within the member is passed through.
 */
export function findStations(axes: readonly (Axis | null)[], contacts: readonly Contact[]): Station[][] {
  const touched = contactsByMember(axes.length, contacts);
  return axes.map((axis, member) => {
    if (axis === null) return [];
    const places = touched[member].map((contact) => ({ contact, s: stationOf(contacts[contact], member) }));
    const clusters = clusterAlong(places, jointSize(axis, axes, contacts, touched[member]));
    return assignRoles(axis, axes, contacts, clusters);
  });
}

interface Place {
  readonly contact: number;
  readonly s: number;
}

export function stationOf(contact: Contact, member: number): number {
  return contact.a === member ? contact.s : contact.t;
}

function contactsByMember(count: number, contacts: readonly Contact[]): number[][] {
  const touched: number[][] = Array.from({ length: count }, () => []);
  contacts.forEach((contact, index) => {
    touched[contact.a].push(index);
    touched[contact.b].push(index);
  });
  return touched;
}

/** A joint is as large as the deepest member that comes to it. */
function jointSize(
  axis: Axis,
  axes: readonly (Axis | null)[],
  contacts: readonly Contact[],
  own: readonly number[],
): number {
  let size = Math.max(TOLERANCE.leastJoint, axis.depth);
  for (const index of own) {
    const { a, b } = contacts[index];
    size = Math.max(size, axes[a === axis.member ? b : a]?.depth ?? 0);
  }
  return size;
}

/** Groups places along a line, nearest pairs first, so that no group grows longer than `size` by chaining. */
export function clusterAlong<T extends { readonly s: number }>(places: readonly T[], size: number): T[][] {
  const groups = [...places].sort((p, q) => p.s - q.s).map((place) => [place]);
  for (;;) {
    let best = -1;
    let least = size;
    for (let i = 0; i + 1 < groups.length; i++) {
      const spread = groups[i + 1][groups[i + 1].length - 1].s - groups[i][0].s;
      if (spread <= least) {
        least = spread;
        best = i;
      }
    }
    if (best < 0) return groups;
    groups.splice(best, 2, [...groups[best], ...groups[best + 1]]);
  }
}

function assignRoles(
  axis: Axis,
  axes: readonly (Axis | null)[],
  contacts: readonly Contact[],
  clusters: readonly Place[][],
): Station[] {
  const middles = clusters.map((cluster) => (cluster[0].s + cluster[cluster.length - 1].s) / 2);
  const start = nearestWithin(middles, 0, (i) => trimLimit(axis, axes, contacts, clusters[i]));
  const finish = nearestWithin(middles, axis.length, (i) => trimLimit(axis, axes, contacts, clusters[i]));
  const oneForBoth = start === finish && start >= 0;
  const nearerStart = oneForBoth && middles[start] < axis.length / 2;
  const stations: Station[] = [];
  clusters.forEach((cluster, i) => {
    const isStart = i === start && (!oneForBoth || nearerStart);
    const isFinish = i === finish && !isStart;
    const inside = middles[i] > 0 && middles[i] < axis.length;
    if (!isStart && !isFinish && !inside) return;
    const role = isStart ? 'start' : isFinish ? 'finish' : 'through';
    const own = cluster.map((place) => place.contact);
    const meant = role === 'through' ? own : withoutPassersBy(axis.member, axes, contacts, own);
    stations.push({ member: axis.member, s: middles[i], role, contacts: meant });
  });
  return stations.filter((station) => isBetweenEnds(station, stations));
}

/** An end is cut for one member that runs on there; others that run by within its reach only pass (bracing at a sag rod). */
function withoutPassersBy(
  member: number,
  axes: readonly (Axis | null)[],
  contacts: readonly Contact[],
  own: readonly number[],
): number[] {
  const runsOn = (contact: Contact): boolean => {
    const other = contact.a === member ? contact.b : contact.a;
    const s = stationOf(contact, other);
    const axis = axes[other];
    const margin = Math.max(axis?.depth ?? 0, axes[member]?.depth ?? 0) + TOLERANCE.detailingGap;
    return axis !== null && s > margin && s < axis.length - margin;
  };
  const met = own.filter((index) => contacts[index].kind === 'meets' && runsOn(contacts[index]));
  if (met.length === 0) return [...own];
  const least = Math.min(...met.map((index) => contacts[index].cost));
  const isMeant = ({ kind, cost }: Contact) => kind === 'meets' && cost <= least + TOLERANCE.leastOffset;
  return own.filter((index) => !runsOn(contacts[index]) || isMeant(contacts[index]));
}

/** What lies on the far side of the chosen end is cut off with the overhang. */
function isBetweenEnds(station: Station, stations: readonly Station[]): boolean {
  const start = stations.find(({ role }) => role === 'start');
  const finish = stations.find(({ role }) => role === 'finish');
  return station.s >= (start?.s ?? station.s) && station.s <= (finish?.s ?? station.s);
}

/** Index of the place nearest to `target` among those within their limit of it; -1 for none. */
function nearestWithin(middles: readonly number[], target: number, limitOf: (i: number) => number): number {
  let best = -1;
  for (let i = 0; i < middles.length; i++) {
    const away = Math.abs(middles[i] - target);
    if (away > limitOf(i)) continue;
    if (best < 0 || away < Math.abs(middles[best] - target)) best = i;
  }
  return best;
}

/** An end may be carried on as far as its contacts were accepted, and trimmed back as far as their depths explain. */
function trimLimit(
  axis: Axis,
  axes: readonly (Axis | null)[],
  contacts: readonly Contact[],
  cluster: readonly Place[],
): number {
  let limit: number = TOLERANCE.overrun;
  for (const place of cluster) {
    const { a, b } = contacts[place.contact];
    const other = axes[a === axis.member ? b : a];
    const beyond = Math.max(-place.s, place.s - axis.length);
    limit = Math.max(limit, (other?.depth ?? 0) + TOLERANCE.overrun, beyond);
  }
  return limit;
}
