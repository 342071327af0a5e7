import type { Result } from '../../domain/result.ts';
import { count, verdict } from '../../domain/verdict.ts';
import { drawView } from '../../drawing/draw-view.ts';
import { tellingElevations } from '../../drawing/elevations.ts';
import { sceneOf } from '../../drawing/scene.ts';
import { WHOLE_ISOMETRIC, WHOLE_PLAN } from '../../drawing/view.ts';
import { type Chunks, encodeText } from '../chunks.ts';
import { findingsSection } from './findings-section.ts';
import { forcesSection } from './forces-section.ts';
import { html, Markup } from './html.ts';
import { joinedSection } from './joined-section.ts';
import { loadsSection } from './loads-section.ts';
import { methodSection } from './method-section.ts';
import { STYLE } from './style.ts';

/** The result as one HTML file that needs nothing else: to be read on screen, and printed on A4. */
export function reportOf(result: Result): Chunks {
  return encodeText(pieces(result));
}

function* pieces(result: Result): Generator<string> {
  yield head(result).text;
  for (const { id, title, body } of SECTIONS) yield html`<h2 id="${id}">${title}</h2>\n${body(result)}\n`.text;
  yield html`<p class="caution">${result.caution}</p>\n</body>\n</html>\n`.text;
}

const SECTIONS: readonly { readonly id: string; readonly title: string; readonly body: (result: Result) => Markup }[] =
  [
    { id: 'findings', title: 'Findings', body: findingsSection },
    { id: 'views', title: 'The truss', body: viewsSection },
    { id: 'joined', title: 'Read and joined', body: joinedSection },
    { id: 'loads', title: 'Loads', body: loadsSection },
    { id: 'forces', title: 'Forces', body: forcesSection },
    { id: 'method', title: 'Method and sources', body: methodSection },
  ];

function head(result: Result): Markup {
  const { model, members, bars, nodes, findings, stability } = result;
  const faults = findings.filter(({ severity }) => severity === 'error').length;
  const warnings = findings.filter(({ severity }) => severity === 'warning').length;
  const tile = (number: number, words: string) => html`<li><b>${number}</b>${words}</li>`;
  return html`<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${model.file}: truss report</title>
<style>${new Markup(STYLE)}</style>
</head>
<body>
<h1>${model.file}</h1>
<p class="about">${model.project?.name ?? ''}</p>
<p class="verdict${faults > 0 ? ' fault' : ''}">${verdict(result)}</p>
<ul class="tiles">${tile(members.length, 'members')}${tile(nodes.length, 'nodes')}${tile(bars.length, 'bars')}${tile(stability.mechanisms, 'mechanisms')}${tile(faults, count(faults, 'error').replace(/^\S+ /, ''))}${tile(warnings, count(warnings, 'warning').replace(/^\S+ /, ''))}</ul>
<p class="caution">${result.caution}</p>
<nav><ul>${SECTIONS.map(({ id, title }) => html`<li><a href="#${id}">${title}</a></li>`)}</ul></nav>
`;
}

/** Plan, telling elevations, isometric: each as wide as the page. */
function viewsSection(result: Result): Markup {
  const scene = sceneOf(result);
  const views = [WHOLE_PLAN, ...tellingElevations(scene), WHOLE_ISOMETRIC];
  const figures = views.flatMap((view) => {
    const drawn = drawView(scene, view, { width: 180, height: view.kind === 'elevation' ? 80 : 120 });
    return drawn === null ? [] : [html`<figure class="view">${new Markup(drawn)}</figure>\n`];
  });
  return html`<p>Line weight is the size of a bar's force; orange and whole is compression, blue and dashed is tension; triangles are supports, numbers mark the spots of findings, the gravest first.</p>\n${figures}`;
}
