import type { FindingCode } from '../domain/finding.ts';

/** Why some part of the model was not read; caught where the element or its section is given up, and made a finding. */
export class NotRead extends Error {
  override readonly name = 'NotRead';
  readonly code: FindingCode;
  readonly advice: string;
  constructor(code: FindingCode, reason: string, advice: string) {
    super(reason);
    this.code = code;
    this.advice = advice;
  }
}

const SECTION_ADVICE = 'Give the member a profile with true dimensions, or name its section in the brief.';

/** The section is not read; `reason` completes "... has no section: ". */
export const noSection = (reason: string): NotRead => new NotRead('no-section', reason, SECTION_ADVICE);

const AXIS_ADVICE = 'Export the member as a profile extruded along its length, or with an Axis line.';

/** The line of force is not found; `reason` completes "... has no line of force: ". */
export const noAxis = (reason: string): NotRead => new NotRead('no-axis', reason, AXIS_ADVICE);

/** A body whose shape only a geometry parser can tell. */
export class NeedsParser extends NotRead {
  constructor(reason: string) {
    super('no-axis', reason, AXIS_ADVICE);
  }
}
