import { createHash } from 'node:crypto';
import { DEFAULT_BRIEF } from './brief/default-brief.ts';
import { applyScope } from './brief/scope.ts';
import { resolveSupports } from './brief/supports.ts';
import type { Brief } from './brief/types.ts';
import { type Finding, finding } from './domain/finding.ts';
import { GENERATOR } from './domain/generator.ts';
import type { Result } from './domain/result.ts';
import type { Truss } from './domain/truss.ts';
import { assembleResult } from './exporter/assemble-result.ts';
import { importModel } from './importer/import-model.ts';
import { type BuiltCases, buildCases, type Coverage } from './statics/loads/build-cases.ts';
import { combine } from './statics/solution/combine.ts';
import { envelope } from './statics/solution/envelope.ts';
import { solveCases } from './statics/solution/solve-cases.ts';
import { assessStability } from './statics/stability/assess-stability.ts';
import type { Supports } from './statics/types.ts';
import { withoutBlock } from './step/splice.ts';
import { openStep, type StepFile } from './step/step-file.ts';
import { joinMembers } from './topology/join-members.ts';
import type { JoinOptions } from './topology/options.ts';

export interface RunOptions {
  /** The model's name in outputs; no path. */
  readonly fileName: string;
  /** `survey` reads, joins and judges; `analyse` also loads and solves. */
  readonly extent: 'survey' | 'analyse';
  readonly brief: Brief;
  readonly onStage: (stage: Stage) => void;
}

export const RUN_DEFAULTS: RunOptions = {
  fileName: 'model.ifc',
  extent: 'analyse',
  brief: DEFAULT_BRIEF,
  onStage: () => {},
};

export type Stage = 'import' | 'topology' | 'stability' | 'solve' | 'checks' | 'export';

export interface Run {
  readonly result: Result;
  /** The model, for writing the results back. */
  readonly file: StepFile;
  readonly elementCount: number;
  /** kg, of the bars between their nodes. */
  readonly mass: number;
  /** What each area load of the brief covers. */
  readonly coverage: readonly Coverage[];
  /** Seconds spent in each stage. */
  readonly seconds: Readonly<Partial<Record<Stage, number>>>;
}

/**
 * Reads a model and takes it through the stages. Everything but the clock of `seconds` follows from the bytes and the
 * options alone. Throws ModelError where the bytes cannot be read as a model.
 */
export async function runModel(bytes: Uint8Array, options: Partial<RunOptions> = {}): Promise<Run> {
  const { fileName, extent, brief, onStage } = { ...RUN_DEFAULTS, ...options };
  const clock = stageClock(onStage);

  clock.enter('import');
  const file = openStep(bytes);
  const imported = await importModel(file, {
    classes: classesNamed(brief),
    axes: brief.axes,
    defaultMaterial: brief.materials.default,
  });
  const scope = applyScope(imported.members, brief.scope);
  const { members } = scope;

  clock.enter('topology');
  const supportsOf = (truss: Truss) => resolveSupports(truss, members, brief);
  const joined = joinMembers(members, joinOptions(brief), {
    placeOf: imported.placeOf,
    supportedNodes: (truss) => nodesOf(supportsOf(truss).supports),
  });
  const { truss } = joined;
  const { supports, findings: supportFindings } = supportsOf(truss);

  clock.enter('stability');
  const stability = assessStability(truss, supports);

  clock.enter('solve');
  const loaded = extent === 'analyse' ? buildCases(truss, members, brief) : NO_LOADS;
  const solved = solveCases(truss, supports, stability, loaded.cases);
  const combinations = extent === 'analyse' ? combine(solved.cases, brief.combinations) : [];
  const forces = envelope(truss, solved.cases, combinations);

  const isCarried = solved.cases.length > 0 && solved.cases.every(({ refused }) => refused === null);
  const findings = [
    ...imported.findings,
    ...scope.findings,
    ...joined.findings,
    ...supportFindings,
    ...supportFinding(supports, extent, members.length),
    ...stability.findings.map((found) => withSeverity(found, isCarried)),
    ...loaded.findings,
    ...solved.findings,
  ];
  const result = assembleResult({
    generator: GENERATOR,
    model: {
      file: fileName,
      sha256: hashOf(withoutBlock(file)),
      schema: imported.schema,
      lengthUnit: imported.lengthUnit,
      source: imported.source,
    },
    members,
    truss,
    supports,
    stability,
    findings,
    cases: solved.cases,
    combinations,
    envelope: forces,
  });
  return {
    result,
    file,
    elementCount: imported.elementCount,
    mass: truss.bars.reduce((sum, bar) => sum + bar.massPerLength * bar.length, 0),
    coverage: loaded.coverage,
    seconds: clock.stop(),
  };
}

const NO_LOADS: BuiltCases = { cases: [], coverage: [], findings: [] };

/** Classes that the brief's scope names are read besides the usual ones. */
function classesNamed(brief: Brief): string[] {
  return [...new Set(brief.scope.include.flatMap((selector) => (selector.class ? [selector.class] : [])))];
}

function joinOptions({ joints, chords }: Brief): Partial<JoinOptions> {
  return { ...joints, chords };
}

function nodesOf({ restraints, springs }: Supports): ReadonlySet<number> {
  return new Set([...restraints, ...springs].map(({ node }) => node));
}

function supportFinding(supports: Supports, extent: RunOptions['extent'], memberCount: number): Finding[] {
  if (memberCount === 0 || supports.restraints.length + supports.springs.length > 0) return [];
  return [
    finding(
      'no-support',
      'Nothing supports the truss.',
      'Say where it stands under `supports:` in the brief, for example `- {at: {lowest: true}, fix: xyz}`.',
      { severity: extent === 'survey' ? 'note' : 'error' },
    ),
  ];
}

/** A mechanism that every load leaves alone is a warning (CONTRACT section 4). */
function withSeverity(found: Finding, isCarried: boolean): Finding {
  return found.code === 'moves-freely' && isCarried ? { ...found, severity: 'warning' } : found;
}

function stageClock(onStage: (stage: Stage) => void) {
  const seconds: Partial<Record<Stage, number>> = {};
  let running: { readonly stage: Stage; readonly since: number } | null = null;
  const stop = () => {
    if (running) seconds[running.stage] = (performance.now() - running.since) / 1000;
    running = null;
    return seconds;
  };
  const enter = (stage: Stage) => {
    stop();
    onStage(stage);
    running = { stage, since: performance.now() };
  };
  return { enter, stop };
}

function hashOf(chunks: Iterable<Uint8Array>): string {
  const hash = createHash('sha256');
  for (const chunk of chunks) hash.update(chunk);
  return hash.digest('hex');
}
