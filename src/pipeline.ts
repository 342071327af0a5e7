import { createHash } from 'node:crypto';
import { DEFAULT_BRIEF } from './brief/default-brief.ts';
import { resolveHolds } from './brief/holds.ts';
import { jointLimits } from './brief/joint-limits.ts';
import { type MemberKind, memberKinds } from './brief/member-kinds.ts';
import { namedPlaces } from './brief/named-places.ts';
import { supportFinding } from './brief/no-support.ts';
import { resolveOneWay } from './brief/one-way.ts';
import { applyScope } from './brief/scope.ts';
import { applySections, withoutSettled } from './brief/sections.ts';
import { type TopLevel, topLevels } from './brief/selectors/top-levels.ts';
import { resolveSettlements } from './brief/settlements.ts';
import { resolveGivenSupports, resolveSupports } from './brief/supports.ts';
import type { Brief } from './brief/types.ts';
import { type Finding, finding } from './domain/finding.ts';
import { GENERATOR } from './domain/generator.ts';
import { type Member, recordOf } from './domain/member.ts';
import type { Result } from './domain/result.ts';
import type { Truss } from './domain/truss.ts';
import { assembleResult } from './exporter/assemble-result.ts';
import { setTracesAside } from './exporter/ifc/own-traces.ts';
import { signatureVoid } from './exporter/ifc/signature-void.ts';
import { hasAnalysisView, readAnalysisModel } from './importer/analysis/read-analysis-model.ts';
import { NO_VIEW } from './importer/analysis/remarks.ts';
import type { Evidence } from './importer/evidence/types.ts';
import { openModel } from './importer/files/open-model.ts';
import type { Given } from './importer/given.ts';
import { importModel } from './importer/import-model.ts';
import { placedInScope } from './importer/places-in-scope.ts';
import type { ImportedModel } from './importer/types.ts';
import { type Stage, stageClock } from './stage-clock.ts';
import { bendingBetweenNodes } from './statics/bending/between-nodes.ts';
import { eccentricityMoments } from './statics/bending/eccentricity-moments.ts';
import { bendingFindings, withMoments } from './statics/bending/findings.ts';
import { listed } from './statics/combinations/listed.ts';
import { type BuiltCases, buildCases, type Coverage } from './statics/loads/build-cases.ts';
import { buildGivenCases } from './statics/loads/given-cases.ts';
import { withSettlement } from './statics/loads/settlement-case.ts';
import { addSway } from './statics/loads/sway.ts';
import { withSeverity } from './statics/solution/severity.ts';
import { solveRun } from './statics/solution/solve-run.ts';
import { assessStability } from './statics/stability/assess-stability.ts';
import type { Supports } from './statics/types.ts';
import { withoutBlock } from './step/splice.ts';
import type { StepFile } from './step/step-file.ts';
import { platesOfCleats } from './topology/cleats.ts';
import { joinMembers } from './topology/join-members.ts';
import { type JoinOptions, valueFor } from './topology/options.ts';
import { membersInRole } from './topology/regularity/families.ts';

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

export type { Stage } from './stage-clock.ts';

export interface Run {
  readonly result: Result;
  /** The model, for writing the results back. */
  readonly file: StepFile;
  readonly elementCount: number;
  /** Instances of an earlier run's results that were taken out of a file which another program has rewritten. */
  readonly tracesRemoved: number;
  /** kg, of the bars between their nodes. */
  readonly mass: number;
  /** The members that were read, in scope or not. */
  readonly kinds: readonly MemberKind[];
  /** The nodes that `top: true` would catch, for whoever writes the brief; only of a survey. */
  readonly topLevels: readonly TopLevel[];
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
  const opened = await openModel(bytes);
  const { file, removed } = setTracesAside(opened.file);
  const { imported, scope } = await readInScope(file, brief);
  const { members, findings: sectionFindings } = applySections(scope.members, brief.sections);
  const { given } = imported;

  clock.enter('topology');
  const supportsOf = (truss: Truss) =>
    given === null || brief.supports.length > 0
      ? resolveSupports(truss, members, brief)
      : resolveGivenSupports(truss, given.supports);
  const { findings: limitFindings, ...limits } = jointLimits(members, brief.joints);
  const joining = { ...brief.joints, ...limits, chords: brief.chords };
  const joined = joinMembers(
    given === null ? members : members.map(asLine),
    given === null ? joining : joiningOfView(joining, members.length),
    {
      placeOf: imported.placeOf,
      evidence: withCleats(imported.evidence, scope.cleats),
      supportedNodes: (truss) => nodesOf(supportsOf(truss).supports),
      namedPlaces: namedPlaces(brief, given),
    },
  );
  const { truss } = joined;
  const { supports: placed, findings: supportFindings } = supportsOf(truss);
  const held = resolveHolds(truss, members, brief.holds);
  const supports = { ...placed, holds: held.holds };

  clock.enter('stability');
  const stability = assessStability(truss, supports, { members });

  clock.enter('solve');
  const usesGivenCases = given !== null && brief.cases.length === 0;
  const loadOn = usesGivenCases
    ? () => buildGivenCases(truss, members, given.cases)
    : () => buildCases(truss, members, brief);
  const loaded = extent === 'analyse' && members.length > 0 ? loadOn() : NO_LOADS;
  const { oneWay, findings: oneWayFindings } = resolveOneWay(truss, members, brief);
  const settlements = extent === 'analyse' ? resolveSettlements(truss, members, brief) : [];
  const sway = addSway(truss, supports, loaded.cases, brief.imperfections);
  const cases = withSettlement(sway.cases, settlements);
  const solved = solveRun(truss, supports, stability, cases, {
    brief,
    given: usesGivenCases ? given.combinations : null,
    oneWay,
    members,
    bracing: membersInRole(joined.families, 'bracing'),
  });

  const eccentricities = eccentricityMoments(truss, solved.cases, solved.combinations);
  const bending = bendingBetweenNodes(truss, solved.cases, solved.combinations);

  const findings = [
    ...opened.findings,
    ...signatureVoid(file),
    ...withoutSettled(imported.findings, members),
    ...scope.findings,
    ...sectionFindings,
    ...limitFindings,
    ...withMoments(joined.findings, eccentricities),
    ...(members.length > 0 ? [...supportFindings, ...held.findings] : []),
    ...unusedCases(given, brief, extent),
    ...supportFinding(supports, extent, members.length),
    ...stability.findings.map((found) => withSeverity(found, solved)),
    ...loaded.findings,
    ...oneWayFindings,
    ...solved.findings,
    ...bendingFindings(bending, truss, members),
  ];
  const result = assembleResult({
    generator: GENERATOR,
    model: {
      file: fileName,
      sha256: hashOf(withoutBlock(file)),
      schema: imported.schema,
      lengthUnit: imported.lengthUnit,
      source: imported.source,
      ...(imported.project === null ? {} : { project: imported.project }),
      ...(file.timeStamp === null ? {} : { written: file.timeStamp }),
    },
    gridLines: imported.gridLines,
    members,
    placeOf: imported.placeOf,
    truss,
    supports,
    stability,
    families: joined.families,
    findings,
    cases: solved.cases,
    applied: cases,
    imperfections: sway.words,
    oneWay,
    asked: loaded.asked,
    ...listed(solved.combinations, solved.envelope, solved.generated, solved.buckling),
    analysis: brief.analysis,
    buckling: solved.buckling,
    envelope: solved.envelope,
    holds: solved.holds,
    idle: solved.idle,
    limits: given === null ? joined.limits : null,
    eccentricities,
    bending,
  });
  return {
    result,
    file,
    elementCount: imported.elementCount,
    tracesRemoved: removed,
    mass: truss.bars.reduce((sum, bar) => sum + bar.massPerLength * bar.length, 0),
    kinds: memberKinds(imported.members, scope.members),
    topLevels: extent === 'survey' ? topLevels(truss) : [],
    coverage: loaded.coverage,
    seconds: clock.stop(),
  };
}

const NO_LOADS: BuiltCases = { cases: [], coverage: [], asked: [], findings: [] };

/**
 * The model's physical elements, or its structural analysis view: where the brief asks for it, and where it does not say and
 * no physical element is in scope.
 */
async function readInScope(file: StepFile, brief: Brief) {
  const options = { classes: classesNamed(brief), axes: brief.axes, defaultMaterial: brief.materials.default };
  const ofView = () => {
    const imported = readAnalysisModel(file, options);
    return placedInScope(imported, applyScope(imported.members, brief.scope, hasAnalysisView(file) ? null : NO_VIEW));
  };
  if (brief.source === 'analysis') return ofView();
  const imported = await importModel(file, options);
  const physical = placedInScope(imported, applyScope(imported.members, brief.scope));
  if (brief.source !== null || physical.scope.members.length > 0 || !hasAnalysisView(file)) return physical;
  const view = ofView();
  if (view.scope.members.length === 0) return physical;
  return { ...view, scope: { ...view.scope, findings: [...view.scope.findings, ...elementsLeft(imported)] } };
}

/** What the physical half of a model held where its analysis view was read instead. */
function elementsLeft({ elementCount }: ImportedModel): Finding[] {
  if (elementCount === 0) return [];
  const what =
    elementCount === 1
      ? 'The physical element of the model is'
      : `The ${elementCount} physical elements of the model are`;
  return [
    finding(
      'out-of-scope',
      `${what} not in scope; its structural analysis view is read instead.`,
      'Name the elements under scope: include in the brief, or say source: physical, if they are the truss.',
    ),
  ];
}

/** Classes that the brief's scope names are read besides the usual ones. */
function classesNamed(brief: Brief): string[] {
  return [...new Set(brief.scope.include.flatMap((selector) => (selector.class ? [selector.class] : [])))];
}

/** m; members of an analysis view meet in shared points, which are written with fewer digits than they have. */
const SHARED_POINT = 1e-3;

function joiningOfView(asked: JoinOptions, count: number): JoinOptions {
  const orShared = (limit: JoinOptions['reach']) =>
    Array.from({ length: count }, (_, member) => valueFor(limit, member) ?? SHARED_POINT);
  return { ...asked, reach: orShared(asked.reach), offset: orShared(asked.offset), seated: 'apart', pairs: 'apart' };
}

/** In an analysis view the depth of a section says nothing of how near two joints may be. */
function asLine(member: Member): Member {
  const { section } = member;
  return section === null
    ? member
    : { ...recordOf(member), section: { ...section, depth: SHARED_POINT, width: SHARED_POINT } };
}

function withCleats(evidence: Evidence | null, cleats: readonly Member[]): Evidence | null {
  if (evidence === null || cleats.length === 0) return evidence;
  const { plates, related, assemblies, unreadPlates } = evidence;
  return { plates: [...plates, ...platesOfCleats(cleats)], related, assemblies, unreadPlates };
}

function nodesOf({ restraints, springs }: Supports): ReadonlySet<number> {
  return new Set([...restraints, ...springs].map(({ node }) => node));
}

/** A brief with cases of its own takes the place of the model's. */
function unusedCases(given: Given | null, brief: Brief, extent: RunOptions['extent']): Finding[] {
  if (given === null || given.cases.length === 0 || brief.cases.length === 0 || extent === 'survey') return [];
  const names = given.cases.map(({ name }) => name).join(', ');
  return [
    finding(
      'out-of-scope',
      `The model's own load cases (${names}) are not used: the brief gives its own.`,
      "Leave `cases:` out of the brief to use the model's.",
    ),
  ];
}

function hashOf(chunks: Iterable<Uint8Array>): string {
  const hash = createHash('sha256');
  for (const chunk of chunks) hash.update(chunk);
  return hash.digest('hex');
}
