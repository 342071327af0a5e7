import { groupFindings } from '../../bcf/group-findings.ts';
import type { Result, ResultFinding } from '../../domain/result.ts';
import { count } from '../../domain/verdict.ts';
import { drawSnapshot } from '../../drawing/snapshot.ts';
import { spotOf } from '../../drawing/spot.ts';
import { spotCamera } from '../../drawing/spot-camera.ts';
import { html, Markup, NOTHING } from './html.ts';

/** Pictures of one cause, and of all: each takes some ten milliseconds and kilobytes. */
const PICTURES_OF_A_CAUSE = 2;
const MOST_PICTURES = 60;
/** Places of one cause that are told in words. */
const MOST_TOLD = 12;
const HEIGHT = 300;

const SEVERITIES = ['error', 'warning', 'note'] as const;

/** Every finding, the gravest first, those of one cause together, each with pictures of its spot. */
export function findingsSection(result: Result): Markup {
  const groups = groupFindings(result);
  const ordered = SEVERITIES.flatMap((severity) => groups.filter(({ findings }) => findings[0]?.severity === severity));
  if (ordered.length === 0) return html`<p>No finding.</p>`;
  let left = MOST_PICTURES;
  return html`${ordered.map(({ findings }) => {
    const pictured = findings
      .filter((one) => one.severity !== 'note' && (one.at !== null || one.members.length > 0))
      .slice(0, Math.min(left, PICTURES_OF_A_CAUSE));
    left -= pictured.length;
    return tell(findings, pictured, result);
  })}`;
}

function tell(findings: readonly ResultFinding[], pictured: readonly ResultFinding[], result: Result): Markup {
  const [first] = findings;
  if (first === undefined) return NOTHING;
  const often = findings.length > 1 ? `, ${findings.length} times` : '';
  const told = findings.slice(0, MOST_TOLD).map((one) => html`<p>${sentence(one)}</p>\n`);
  const more = findings.length - MOST_TOLD;
  const advice = [...new Set(findings.map((one) => one.advice))].slice(0, 3);
  return html`<section class="finding ${first.severity}">
<h3>${first.severity} ${first.code}<span>${often}</span></h3>
${told}${more > 0 ? html`<p>and ${count(more, 'more place')}: see the findings table of the JSON, CSV or XLSX.</p>` : null}
${advice.map((words) => html`<p><b>To do:</b> ${words}</p>\n`)}
${pictured.length === 0 ? null : html`<div class="pictures">${pictured.map((one) => picture(one, result))}</div>`}
</section>
`;
}

function sentence({ message, place, reply }: ResultFinding): string {
  const before = place === null || message.includes(place) ? '' : `${place}: `;
  return `${before}${message}${reply === undefined ? '' : ` (${reply.status} in the BCF that came back)`}`;
}

function picture(finding: ResultFinding, result: Result): Markup {
  const spot = spotOf(result, finding);
  const drawn = drawSnapshot(result, spot, spotCamera(spot, result.members), { height: HEIGHT });
  return html`<figure>${new Markup(drawn)}<figcaption>${finding.place ?? 'The members concerned'}</figcaption></figure>`;
}
