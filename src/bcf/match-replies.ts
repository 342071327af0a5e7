import type { Result, ResultFinding } from '../domain/result.ts';
import { type FindingGroup, groupFindings } from './group-findings.ts';
import type { ReturnedTopic } from './types.ts';
import { AUTHOR, NEEDS_LOADS } from './words.ts';

export type MatchedBy = 'guid' | 'members' | 'place';

export interface Match {
  readonly group: FindingGroup;
  readonly topic: ReturnedTopic;
  readonly by: MatchedBy;
}

export interface Matches {
  readonly matched: readonly Match[];
  /** Our topics about this model whose finding is not there any more. */
  readonly gone: readonly ReturnedTopic[];
  /** Topics of others, of other models, and those that this run cannot judge. */
  readonly others: readonly ReturnedTopic[];
}

/** A topic and a finding speak of the same members if they share this part of them. */
const SHARED = 0.5;

/**
 * Which returned topic answers which finding: by its id; where the members have changed by code and common members; where
 * the GlobalIds have been renewed by code and place. Each topic answers one group of findings.
 */
export function matchReplies(result: Result, returned: readonly ReturnedTopic[]): Matches {
  const groups = groupFindings(result);
  const free = new Map(returned.map((topic) => [topic.guid, topic]));
  const answers = new Map<FindingGroup, { topic: ReturnedTopic; by: MatchedBy }>();
  const answer = (by: MatchedBy, find: (group: FindingGroup) => ReturnedTopic | undefined) => {
    for (const group of groups) {
      if (answers.has(group)) continue;
      const topic = find(group);
      if (topic === undefined) continue;
      answers.set(group, { topic, by });
      free.delete(topic.guid);
    }
  };
  const ours = (topic: ReturnedTopic) => isOurs(topic) && isOfThisModel(topic, result);
  answer('guid', ({ guid }) => free.get(guid));
  answer('members', (group) => best([...free.values()].filter(ours), (topic) => sharedMembers(group, topic), SHARED));
  answer('place', (group) => [...free.values()].filter(ours).find((topic) => isAtPlace(group.findings, topic)));

  const left = [...free.values()];
  const isJudged = ({ labels }: ReturnedTopic) =>
    result.cases.length > 0 || !labels.some((label) => NEEDS_LOADS.has(label));
  return {
    matched: groups.flatMap((group) => {
      const found = answers.get(group);
      return found === undefined ? [] : [{ group, ...found }];
    }),
    gone: left.filter((topic) => ours(topic) && isJudged(topic)),
    others: left.filter((topic) => !(ours(topic) && isJudged(topic))),
  };
}

export function isOurs({ author, labels }: ReturnedTopic): boolean {
  return author === AUTHOR || labels.includes(AUTHOR);
}

/** A topic that names another project is about another model. */
function isOfThisModel({ projects }: ReturnedTopic, { model }: Result): boolean {
  return projects.length === 0 || model.project === undefined || projects.includes(model.project.globalId);
}

/** The share of members that a topic and findings of the same code have in common. */
function sharedMembers({ findings }: FindingGroup, topic: ReturnedTopic): number {
  if (!topic.labels.includes(findings[0]!.code)) return 0;
  const concerned = new Set(findings.flatMap(({ members }) => members));
  const both = topic.components.filter((globalId) => concerned.has(globalId)).length;
  return both / Math.max(1, concerned.size, topic.components.length);
}

function isAtPlace(findings: readonly ResultFinding[], { labels, title, description }: ReturnedTopic): boolean {
  const [{ code, place }] = findings as [ResultFinding];
  return place !== null && labels.includes(code) && (title.includes(place) || description.includes(place));
}

/** The candidate of the highest score, if that is at least `least`; the first among equals. */
function best<T>(candidates: readonly T[], score: (candidate: T) => number, least: number): T | undefined {
  let found: T | undefined;
  let most = 0;
  for (const candidate of candidates) {
    const value = score(candidate);
    if (value >= least && value > most) [found, most] = [candidate, value];
  }
  return found;
}
