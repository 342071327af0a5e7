/** The public library: the whole run, and each stage by itself. */

export { makeTopics } from './bcf/make-topics.ts';
export { type ReadBcfOptions, readBcf } from './bcf/read-bcf.ts';
export type { BcfVersion, ReturnedBcf, ReturnedTopic, Topic, TopicView } from './bcf/types.ts';
export { withReplies } from './bcf/with-replies.ts';
export { type BcfOptions, writeBcf } from './bcf/write-bcf.ts';
export { briefJsonSchema } from './brief/json-schema.ts';
export { parseBrief } from './brief/parse-brief.ts';
export { applyScope } from './brief/scope.ts';
export { selectMembers } from './brief/selectors/select-members.ts';
export { selectNodes } from './brief/selectors/select-nodes.ts';
export { resolveSupports } from './brief/supports.ts';
export type { Brief, MemberSelector, NodeSelector } from './brief/types.ts';
export { CAUTION } from './domain/caution.ts';
export { EXIT, ModelError, PinwrightError, RequestError } from './domain/errors.ts';
export type { Finding, FindingCode, Severity } from './domain/finding.ts';
export { type Material, type Member, recordOf, type Section } from './domain/member.ts';
export type { Result } from './domain/result.ts';
export type { Truss, TrussBar, TrussNode } from './domain/truss.ts';
export type { Vec3 } from './domain/vector.ts';
export type { Camera } from './drawing/camera.ts';
export { drawView, type ViewOptions } from './drawing/draw-view.ts';
export { tellingElevations } from './drawing/elevations.ts';
export { type RasterOptions, rasterise } from './drawing/rasterise.ts';
export { type Scene, sceneOf } from './drawing/scene.ts';
export { drawSheet, type SheetOptions } from './drawing/sheet.ts';
export { drawSnapshot, type SnapshotOptions } from './drawing/snapshot.ts';
export { type Spot, spotOf } from './drawing/spot.ts';
export { type CameraOptions, spotCamera } from './drawing/spot-camera.ts';
export {
  elevationLooking,
  elevationThrough,
  planBetween,
  type View,
  WHOLE_ISOMETRIC,
  WHOLE_PLAN,
} from './drawing/view.ts';
export { annotate } from './exporter/ifc/annotate.ts';
export { writePicture } from './exporter/ifc/picture/write-picture.ts';
export { writeView } from './exporter/ifc/view/write-view.ts';
export { resultJsonSchema, resultToJson } from './exporter/json.ts';
export { reportOf } from './exporter/report/report.ts';
export { summarise } from './exporter/summary.ts';
export { readAnalysisModel } from './importer/analysis/read-analysis-model.ts';
export { type OpenedModel, openModel } from './importer/files/open-model.ts';
export type { OpenOptions } from './importer/files/options.ts';
export type { Given } from './importer/given.ts';
export { importModel } from './importer/import-model.ts';
export type { ImportedModel } from './importer/types.ts';
export { type Run, type RunOptions, runModel, type Stage } from './pipeline.ts';
export { compareResults } from './revisions/compare-results.ts';
export { type Comparison, comparisonJsonSchema } from './revisions/comparison.ts';
export { summariseComparison } from './revisions/comparison-summary.ts';
export { analyseWhole } from './statics/analyse-whole.ts';
export { type CutCheck, checkCut, type Plane, planeAcross, planeThrough } from './statics/hand-check/check-cut.ts';
export { checkJoint, type JointCheck, nearestNode } from './statics/hand-check/check-joint.ts';
export { checkWhole, type WholeCheck } from './statics/hand-check/check-whole.ts';
export { carriedStates, type State, stateOf } from './statics/hand-check/state.ts';
export { buildCases } from './statics/loads/build-cases.ts';
export { combine } from './statics/solution/combine.ts';
export { envelope } from './statics/solution/envelope.ts';
export { solveCases } from './statics/solution/solve-cases.ts';
export { assessStability } from './statics/stability/assess-stability.ts';
export type {
  BarEnvelope,
  GroundSpring,
  LoadCase,
  Mode,
  NodalForce,
  Restraint,
  SolvedCase,
  SolvedCombination,
  Stability,
  Supports,
} from './statics/types.ts';
export { openStep, type StepFile } from './step/step-file.ts';
export { joinMembers } from './topology/join-members.ts';
export type { JoinOptions } from './topology/options.ts';
