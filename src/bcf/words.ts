import type { FindingCode, Severity } from '../domain/finding.ts';

/** Who the topics are from. */
export const AUTHOR = 'Pinwright';

export const TYPES: Readonly<Record<Severity, string>> = { error: 'Error', warning: 'Warning', note: 'Information' };
export const PRIORITIES: Readonly<Record<Severity, string>> = { error: 'High', warning: 'Normal', note: 'Low' };
export const OPEN = 'Open';
export const CLOSED = 'Closed';

/** What people call a topic that they are done with. */
export const isClosed = (status: string): boolean =>
  /^(?:closed?|resolved?|done|fixed|solved|completed?|rejected|won't fix)$/i.test(status.trim());

/** Findings that only loads bring to light: a survey cannot say that they are gone. */
export const NEEDS_LOADS: ReadonlySet<string> = new Set<FindingCode>([
  'load-moves-it',
  'no-load',
  'unstable-balance',
  'works-in-bending',
  'overstressed',
  'slender',
  'support-lifts',
  'second-order-matters',
  'slack-bar',
]);

const GLOBAL_ID = /^[0-3][0-9A-Za-z_$]{21}$/;

/** Whether a GlobalId is one that the format's schemas take. */
export const isGlobalId = (text: string): boolean => GLOBAL_ID.test(text);

/** Where a model does not say when it was written: the schemas want some date. */
const UNKNOWN_DATE = '1970-01-01T00:00:00Z';

/** A date and time as XML Schema writes it, of what a model's header says. */
export function xmlDate(written: string | undefined): string {
  const match = /^(\d{4}-\d\d-\d\d)T(\d\d:\d\d)(:\d\d)?(?:\.\d+)?(Z|[+-]\d\d:?\d\d)?$/.exec(written?.trim() ?? '');
  if (match === null || Number.isNaN(Date.parse(`${match[1]}T${match[2]}:00Z`))) return UNKNOWN_DATE;
  const [, day, time, seconds = ':00', zone = ''] = match;
  if (Number(seconds.slice(1)) > 59) return UNKNOWN_DATE;
  return `${day}T${time}${seconds}${zone.replace(/^([+-]\d\d)(\d\d)$/, '$1:$2')}`;
}
