import { parseBrief } from '../../../../src/brief/parse-brief.ts';
import type { Result } from '../../../../src/domain/result.ts';
import { joinChunks } from '../../../../src/exporter/chunks.ts';
import { writeView } from '../../../../src/exporter/ifc/view/write-view.ts';
import { runModel } from '../../../../src/pipeline.ts';

/** A model analysed, its truss written as a view, and what an analysis of that file finds, by its own supports and loads. */
export async function thereAndBack(model: string | Uint8Array, brief: string) {
  const bytes = typeof model === 'string' ? new Uint8Array(Buffer.from(model, 'latin1')) : model;
  const { result: there } = await runModel(bytes, { brief: parseBrief(brief, 'brief.yaml') });
  const view = joinChunks(writeView(there));
  const { result: back } = await runModel(view);
  return { there, view, text: Buffer.from(view).toString('latin1'), back };
}

/** Bars by the places of their ends, to a hundredth of a millimetre. */
function barsByPlace({ bars, nodes }: Result): Map<string, number> {
  const at = new Map(nodes.map((node) => [node.id, node.at.map((x) => Math.round(x * 1e5) / 1e5 + 0).join(' ')]));
  return new Map(bars.map(({ from, to }, k) => [[at.get(from), at.get(to)].sort().join(' | '), k]));
}

/** What two results say of the same truss, told alike: to be compared as it is. Forces in N, rounded to a millionth of the greatest. */
export function told(result: Result, order: Result) {
  const own = barsByPlace(result);
  const places = [...barsByPlace(order).keys()];
  const runs = [...result.cases, ...result.combinations];
  const greatest = Math.max(1, ...runs.flatMap((run) => run.axialForce.map((force) => Math.abs(force ?? 0))));
  const rounded = (force: number | null) => (force === null ? null : Math.round((force / greatest) * 1e6) + 0);
  const { mechanisms, selfStressStates, restraints, springs } = result.stability;
  return {
    bars: own.size,
    nodes: result.nodes.length,
    stability: { mechanisms, selfStressStates, restraints, springs },
    runs: runs.map((run) => ({
      name: run.name,
      kind: 'nature' in run ? run.nature : run.limit,
      refused: run.refused !== undefined,
      factors: 'factors' in run ? run.factors : null,
      forces: places.map((place) => {
        const k = own.get(place);
        return k === undefined ? 'no such bar' : rounded(run.axialForce[k]!);
      }),
      reactions: run.reactions.length,
    })),
  };
}
