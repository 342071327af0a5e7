import type { Result, ResultFinding } from '../domain/result.ts';
import { NAMESPACE, uuidText, uuidVersion5 } from '../domain/uuid.ts';
import { along, scale } from '../domain/vector.ts';
import { count } from '../domain/verdict.ts';
import { millimetres } from '../domain/words.ts';
import { PALETTE } from '../drawing/palette.ts';
import { rasterise } from '../drawing/rasterise.ts';
import { clippingDepth, drawSnapshot } from '../drawing/snapshot.ts';
import { type Spot, spotOf } from '../drawing/spot.ts';
import { spotCamera } from '../drawing/spot-camera.ts';
import { type FindingGroup, groupFindings } from './group-findings.ts';
import type { Topic, TopicView } from './types.ts';
import { AUTHOR, isGlobalId, OPEN, PRIORITIES, TYPES } from './words.ts';

/** Of a cause that repeats so many spots are shown; all are named. */
const MOST_VIEWS = 4;
const MOST_TOLD = 40;
const LONGEST_TITLE = 140;
const PIXELS = 800;

/** A topic for each finding of a result, or for several of one cause; `date` is an xs:dateTime. */
export function makeTopics(result: Result, date: string): Topic[] {
  return groupFindings(result).map((group) => makeTopic(result, group, date));
}

function makeTopic(result: Result, { guid, findings }: FindingGroup, date: string): Topic {
  const [first] = findings;
  const { code, severity } = first!;
  return {
    guid,
    title: titleOf(findings),
    type: TYPES[severity],
    status: OPEN,
    priority: PRIORITIES[severity],
    labels: [AUTHOR, code],
    created: date,
    author: AUTHOR,
    modified: null,
    assignedTo: null,
    description: descriptionOf(result, findings),
    comments: [],
    views: spotsOf(result, findings).map(({ finding, spot }, k) => viewOf(result, guid, finding, spot, k)),
  };
}

function titleOf(findings: readonly ResultFinding[]): string {
  const [{ message, place }] = findings as [ResultFinding];
  const where = place === null || message.includes(place) ? '' : `${place}: `;
  const often = findings.length > 1 ? `${findings.length} times, first ` : '';
  const title = `${often}${where}${message}`.replace(/\s+/g, ' ').trim();
  const characters = [...title];
  return characters.length <= LONGEST_TITLE ? title : `${characters.slice(0, LONGEST_TITLE - 1).join('')}…`;
}

function descriptionOf(result: Result, findings: readonly ResultFinding[]): string {
  const told = findings.slice(0, MOST_TOLD).map((finding) => {
    const { message, place, gap } = finding;
    const before = [place, gap === null ? null : millimetres(gap)].filter(
      (word) => word !== null && !message.includes(word),
    );
    return before.length === 0 ? message : `${before.join(', ')}: ${message}`;
  });
  const more = findings.length - told.length;
  const advice = [...new Set(findings.map((finding) => finding.advice))].slice(0, 3);
  return [
    ...told,
    ...(more > 0 ? [`and ${count(more, 'more place')}`] : []),
    ...advice.map((words) => `To do: ${words}`),
    `Found in ${result.model.file} by ${result.generator.name} ${result.generator.version}.`,
    result.caution,
  ].join('\n\n');
}

/** The spots to show: of findings about the same point one, since their pictures would be the same. */
function spotsOf(result: Result, findings: readonly ResultFinding[]): { finding: ResultFinding; spot: Spot }[] {
  const seen = new Set<string>();
  const spots: { finding: ResultFinding; spot: Spot }[] = [];
  for (const finding of findings) {
    const key = [finding.at?.map((value) => value.toFixed(3)), ...finding.members].join('|');
    if (seen.has(key)) continue;
    seen.add(key);
    if (spots.length < MOST_VIEWS) spots.push({ finding, spot: spotOf(result, finding) });
  }
  return spots;
}

function viewOf(result: Result, topic: string, finding: ResultFinding, spot: Spot, index: number): TopicView {
  const camera = spotCamera(spot, result.members);
  const title = finding.message;
  const place = [finding.code, finding.place].filter((word) => word !== null).join(', ');
  const cut = clippingDepth(spot, camera);
  const [main, ...others] = [...new Set(spot.members)].filter(isGlobalId);
  return {
    guid: uuidText(uuidVersion5(NAMESPACE, `view\n${topic}\n${index}`)),
    camera,
    coloured: [
      { colour: PALETTE.concerned.slice(1).toUpperCase(), globalIds: main === undefined ? [] : [main] },
      { colour: PALETTE.beside.slice(1).toUpperCase(), globalIds: others },
    ].filter(({ globalIds }) => globalIds.length > 0),
    clipping:
      spot.at === null ? null : { at: along(camera.eye, camera.direction, cut), hidden: scale(camera.direction, -1) },
    snapshot: rasterise(drawSnapshot(result, spot, camera, { title, place }), { width: PIXELS }),
  };
}
