import { basename } from 'node:path';
import { type Command, Option } from 'commander';
import type { BcfVersion } from '../bcf/types.ts';
import { withReplies } from '../bcf/with-replies.ts';
import { DEFAULT_BRIEF } from '../brief/default-brief.ts';
import { EXIT } from '../domain/errors.ts';
import { contentOf } from '../exporter/content.ts';
import { type OtherOutput, planOutputs } from '../exporter/outputs.ts';
import { wrapped } from '../exporter/summary/layout.ts';
import { summarise } from '../exporter/summary.ts';
import { writeOutputs } from '../exporter/write-outputs.ts';
import { type Run, type RunOptions, runModel, type Stage } from '../pipeline.ts';
import { namingModel } from './failure.ts';
import { asksForHandCheck, type HandCheckFlags, handChecks, readHandChecks } from './hand-check-options.ts';
import { makeProgress } from './progress.ts';
import { readBrief, readModelBytes, readReplies } from './read-files.ts';

export interface RunFlags extends HandCheckFlags {
  readonly brief?: string;
  readonly output?: string[];
  readonly view?: string;
  readonly picture?: string;
  readonly replies?: string;
  readonly bcfVersion?: BcfVersion;
  readonly stamp?: boolean;
  readonly quiet?: boolean;
  readonly timings?: boolean;
}

/** Adds what `survey` and `analyse` have in common. */
export function withRunOptions(command: Command): Command {
  return command
    .argument('<model>', 'an IFC file')
    .option('--brief <file>', 'scope, joints, supports, loads and combinations (YAML or JSON)')
    .option(
      '-o, --output <file>',
      'write a result; the ending picks the format (.json .csv .csv/ .xlsx .html .ifc .ifczip .svg .bcf), - is JSON on stdout; may be repeated',
      (path: string, before: string[] = []) => [...before, path],
    )
    .option('--view <file>', 'write the truss as an IFC structural analysis view, a file of its own')
    .option('--picture <file>', 'write the truss in colours as an IFC file to open beside the model')
    .option('--replies <file>', 'a BCF file that came back: its statuses and comments stand beside the findings')
    .addOption(new Option('--bcf-version <version>', 'of the BCF file written').choices(['2.1', '3.0']).default('3.0'))
    .option('--stamp', 'clock time in what is written; without it the dates are those of the model')
    .option('--quiet', 'no summary and no progress')
    .option('--timings', 'one line of JSON on stderr: seconds by stage, peak memory in bytes');
}

/** Runs a model and writes what was asked for. Gives the exit code. */
export async function runCommand(model: string, extent: RunOptions['extent'], flags: RunFlags): Promise<number> {
  readHandChecks(flags);
  const outputs = flags.output ?? [];
  const others = otherOutputs(flags);
  const plan = planOutputs([...outputs, ...others], model, ...(flags.replies === undefined ? [] : [flags.replies]));
  const stamp = flags.stamp ? new Date().toISOString().replace(/\.\d+/, '') : null;
  const brief = flags.brief === undefined ? DEFAULT_BRIEF : readBrief(flags.brief);
  const replies = flags.replies === undefined ? null : await readReplies(flags.replies);
  const bytes = readModelBytes(model);
  const progress = makeProgress(flags.quiet === true);
  const onStage = (stage: Stage) => progress.stage(STAGE_WORDS[stage]);
  const run = await namingModel(model, () =>
    runModel(bytes, { fileName: basename(model), extent, brief, onStage }),
  ).finally(() => progress.done());
  const analysed = performance.now();
  const result = replies === null ? run.result : withReplies(run.result, replies, basename(flags.replies ?? ''));
  await writeOutputs(plan, contentOf(result, run.file, { version: flags.bcfVersion ?? '3.0', replies, stamp }));
  if (flags.timings) reportTimings(run, (performance.now() - analysed) / 1000);
  const isHandCheck = asksForHandCheck(flags) && !plan.stdout;
  if (isHandCheck) process.stdout.write(handChecks(result, flags));
  if (!flags.quiet && !plan.stdout) {
    const { elementCount, tracesRemoved, mass, coverage, topLevels } = run;
    // Before there are loads the reader is still choosing what belongs to the truss.
    const kinds = extent === 'survey' ? run.kinds : [];
    if (isHandCheck) process.stdout.write(`\n${wrapped(result.caution, 80).join('\n')}\n`);
    else
      process.stdout.write(
        summarise(result, { extras: { elementCount, tracesRemoved, mass, coverage, kinds, topLevels } }),
      );
    const written = [...outputs, ...others.map(({ given }) => given)];
    if (written.length > 0) process.stdout.write(`\nWritten: ${written.join(', ')}\n`);
  }
  return hasFaults(run) ? EXIT.faultsFound : EXIT.done;
}

/** What options of their own ask to be written. */
function otherOutputs({ view, picture }: RunFlags): OtherOutput[] {
  return [
    ...(view === undefined ? [] : [{ given: view, content: { kind: 'view' } } as const]),
    ...(picture === undefined ? [] : [{ given: picture, content: { kind: 'picture' } } as const]),
  ];
}

const STAGE_WORDS: Readonly<Record<Stage, string>> = {
  import: 'Reading the model',
  topology: 'Joining members',
  stability: 'Judging whether it stands',
  solve: 'Solving',
  checks: 'Checking bars',
  export: 'Writing',
};

/** Whether an error stands or a force could not be found. */
function hasFaults({ result }: Run): boolean {
  const refused = [...result.cases, ...result.combinations].some((solved) => solved.refused !== undefined);
  return refused || result.findings.some(({ severity }) => severity === 'error');
}

function reportTimings(run: Run, exportSeconds: number): void {
  const none: Record<Stage, number> = { import: 0, topology: 0, stability: 0, solve: 0, checks: 0, export: 0 };
  const peakMemory = process.resourceUsage().maxRSS * 1024;
  process.stderr.write(`${JSON.stringify({ ...none, ...run.seconds, export: exportSeconds, peakMemory })}\n`);
}
