import { basename } from 'node:path';
import type { Command } from 'commander';
import { DEFAULT_BRIEF } from '../brief/default-brief.ts';
import type { Brief } from '../brief/types.ts';
import { EXIT } from '../domain/errors.ts';
import type { Result } from '../domain/result.ts';
import { planFor } from '../exporter/outputs.ts';
import { writeOutputs } from '../exporter/write-outputs.ts';
import { runModel } from '../pipeline.ts';
import { compareResults } from '../revisions/compare-results.ts';
import { COMPARISON_FORMATS, comparisonContent } from '../revisions/comparison-outputs.ts';
import { summariseComparison } from '../revisions/comparison-summary.ts';
import { namingModel } from './failure.ts';
import { makeProgress } from './progress.ts';
import { readBrief, readModelBytes } from './read-files.ts';

interface CompareFlags {
  readonly brief?: string;
  readonly oldBrief?: string;
  readonly output?: string[];
  readonly quiet?: boolean;
}

export function withCompareOptions(command: Command): Command {
  return command
    .argument('<old>', 'an IFC file')
    .argument('<new>', 'a later revision of it')
    .option('--brief <file>', 'scope, joints, supports, loads and combinations of both (YAML or JSON)')
    .option('--old-brief <file>', 'of the old one, where it had another')
    .option(
      '-o, --output <file>',
      'write the comparison; the ending picks the format (.json .csv .csv/), - is JSON on stdout; may be repeated',
      (path: string, before: string[] = []) => [...before, path],
    )
    .option('--quiet', 'no summary and no progress');
}

/** Analyses two revisions and tells what changed. Gives the exit code: 1 where an error finding is new. */
export async function compareCommand(oldModel: string, newModel: string, flags: CompareFlags): Promise<number> {
  const outputs = flags.output ?? [];
  const plan = planFor(COMPARISON_FORMATS, outputs, oldModel, newModel);
  const brief = flags.brief === undefined ? DEFAULT_BRIEF : readBrief(flags.brief);
  const oldBrief = flags.oldBrief === undefined ? brief : readBrief(flags.oldBrief);
  const [old, now] = [
    await analysed(oldModel, oldBrief, 'the old revision', flags),
    await analysed(newModel, brief, 'the new revision', flags),
  ];
  const comparison = compareResults(old, now);
  await writeOutputs(plan, comparisonContent(comparison));
  if (!flags.quiet && !plan.stdout) {
    process.stdout.write(summariseComparison(comparison, old, now));
    if (outputs.length > 0) process.stdout.write(`\nWritten: ${outputs.join(', ')}\n`);
  }
  const isWorse = comparison.findings.new.some(({ severity }) => severity === 'error');
  return isWorse ? EXIT.faultsFound : EXIT.done;
}

async function analysed(model: string, brief: Brief, words: string, { quiet }: CompareFlags): Promise<Result> {
  const bytes = readModelBytes(model);
  const progress = makeProgress(quiet === true);
  progress.stage(`Analysing ${words}`);
  const { result } = await namingModel(model, () => runModel(bytes, { fileName: basename(model), brief })).finally(() =>
    progress.done(),
  );
  return result;
}
