import type { Result } from '../../domain/result.ts';
import { html, type Markup } from './html.ts';

/** How the numbers came about, what was taken for granted, and on whose authority. */
export function methodSection({ model, generator, analysis, combining }: Result): Markup {
  return html`<p>Members' axes are read from the model and joined where they meet, within a reach that follows from the depths of the sections; a member that runs on is split only where something triangulates with it. Nodes are pins. Mechanisms are counted by the inertia of the stiffness matrix and found as its null space; a load case that a mechanism would have to carry is refused. Bar forces follow from the balance of every joint and the bars' stretch (direct stiffness method, ${analysis === 'second-order' ? 'second order: balance in the deformed shape' : 'first order: small movements'}), bars of one section along their length, linear elastic.</p>
<dl>
<dt>Model</dt><dd>${model.file}, ${model.schema}, lengths in ${model.lengthUnit}, ${model.source === 'analysis' ? 'its structural analysis view' : 'its physical elements'}</dd>
<dt>SHA-256</dt><dd>${model.sha256}</dd>
${model.written === undefined ? null : html`<dt>Written</dt><dd>${model.written}</dd>`}
<dt>Combinations</dt><dd>${combining?.rule ?? 'none, or as the brief lists them'}</dd>
<dt>Made by</dt><dd>${generator.name} ${generator.version}</dd>
</dl>
<p>Not covered: bending, shear and torsion of members, connections, buckling of single bars where no check is shown, fatigue, fire, earthquake, erection.</p>`;
}
