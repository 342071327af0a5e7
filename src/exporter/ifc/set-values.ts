import type { Result, ResultFinding } from '../../domain/result.ts';
import { count, countCombinations, envelopeTitle, verdict } from '../../domain/verdict.ts';
import { ultimateTitle } from '../schedules/runs.ts';
import type { BarForces, ElementForces } from './member-forces.ts';
import type { SetValues } from './set-definitions.ts';

/** What stands on an element about its forces. */
export function forceValues(forces: ElementForces, result: Result): SetValues<'Pinwright_Forces'> {
  const { bars, byRun } = forces;
  const known = bars.some((bar) => !bar.unknown);
  const tension = worst(bars, 'tension');
  const compression = worst(bars, 'compression');
  const split = bars.length > 1;
  const complete = split && bars.every((bar) => !bar.unknown);
  return {
    GreatestTension: known ? (tension?.tension?.force ?? 0) : null,
    TensionFrom: tension?.tension?.from ?? null,
    TensionBar: split ? (tension?.name ?? null) : null,
    GreatestCompression: known ? (compression?.compression?.force ?? 0) : null,
    CompressionFrom: compression?.compression?.from ?? null,
    CompressionBar: split ? (compression?.name ?? null) : null,
    NumberOfBars: bars.length,
    EnvelopeOver: envelopeTitle(result),
    SignConvention: 'tension positive, compression negative',
    Note: note(forces),
    BarNames: split ? bars.map((bar) => bar.name) : null,
    TensionAlongElement: complete ? bars.map((bar) => bar.tension?.force ?? 0) : null,
    CompressionAlongElement: complete ? bars.map((bar) => bar.compression?.force ?? 0) : null,
    [result.combinations.length > 0 ? 'ForceByCombination' : 'ForceByCase']: byRun,
    ...supportValues(forces, result),
  };
}

function supportValues({ support }: ElementForces, result: Result): SetValues<'Pinwright_Forces'> {
  if (support === null) return {};
  const { down, uplift, horizontal } = support;
  return {
    SupportDown: down?.force ?? 0,
    SupportDownFrom: down?.from ?? null,
    SupportUplift: uplift?.force ?? 0,
    SupportUpliftFrom: uplift?.from ?? null,
    SupportHorizontal: horizontal?.force ?? 0,
    SupportHorizontalFrom: horizontal?.from ?? null,
    SupportNote: `Of the whole joint at the support, all bars that meet there together (${ultimateTitle(result)}).`,
  };
}

type Side = 'tension' | 'compression';

function worst(bars: readonly BarForces[], of: Side): BarForces | null {
  const size = (bar: BarForces): number => Math.abs(bar[of]?.force ?? 0);
  return bars.reduce<BarForces | null>(
    (most, bar) => (size(bar) > (most === null ? 0 : size(most)) ? bar : most),
    null,
  );
}

function note({ bars, missingRuns }: ElementForces): string | null {
  const sentences: string[] = [];
  const unknown = bars.filter((bar) => bar.unknown).length;
  if (unknown === bars.length) sentences.push('No force could be found: see the findings of the model.');
  else if (unknown > 0) sentences.push(`The forces of ${unknown} of ${count(bars.length, 'bar')} could not be found.`);
  else if (missingRuns > 0)
    sentences.push(
      `${count(missingRuns, 'load case or combination', 'load cases or combinations')} could not be carried and is not in these forces.`,
    );
  const others = [...new Set(bars.flatMap((bar) => bar.others))];
  if (others.length > 0)
    sentences.push(`The forces are those of bars that stand for this element together with ${others.join(', ')}.`);
  return sentences.length === 0 ? null : sentences.join(' ');
}

/** What stands on an element about its findings. */
export function findingValues(findings: readonly ResultFinding[]): SetValues<'Pinwright_Findings'> {
  const sentences = findings.map(sentence);
  const gravest = (['error', 'warning', 'note'] as const).find((grade) =>
    findings.some(({ severity }) => severity === grade),
  );
  return {
    Count: findings.length,
    Severity: gravest ?? null,
    Codes: [...new Set(findings.map(({ code }) => code))].join(', '),
    Findings: sentences.length === 1 ? sentences[0] : sentences.map((text, k) => `${k + 1}. ${text}`).join(' '),
    Sentences: sentences.length === 1 ? null : sentences,
  };
}

function sentence({ severity, code, place, message, advice }: ResultFinding): string {
  const where = place === null || message.includes(place) ? '' : ` at ${place}`;
  return `${severity} ${code}${where}: ${message}${advice === '' ? '' : ` ${advice}`}`;
}

/** What stands on the project about the run. No file name: the same model under another name gives the same block. */
export function runValues(result: Result): SetValues<'Pinwright_Run'> {
  const { generator, model, stability, findings } = result;
  const ofSeverity = (grade: string): number => findings.filter(({ severity }) => severity === grade).length;
  return {
    Program: `${generator.name} ${generator.version}`,
    ModelSha256: model.sha256,
    Verdict: verdict(result),
    Caution: result.caution,
    Members: result.members.length,
    Nodes: result.nodes.length,
    Bars: result.bars.length,
    Mechanisms: stability.mechanisms,
    SelfStressStates: stability.selfStressStates,
    Errors: ofSeverity('error'),
    Warnings: ofSeverity('warning'),
    Notes: ofSeverity('note'),
    LoadCases: result.cases.length,
    Combinations: countCombinations(result),
    EnvelopeOver: result.cases.length === 0 ? null : envelopeTitle(result),
  };
}
