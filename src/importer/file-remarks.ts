import { type Reading, unitMissing } from './reading.ts';

/** Findings about the file as a whole. */

export function noteGuessedSchema(reading: Reading, schema: string): void {
  reading.note({
    code: 'schema-guessed',
    key: schema,
    say: () => `The file's schema ${schema} never became a standard; it is read as ${reading.family}.`,
    advice: 'Export the model as IFC4 or IFC4X3_ADD2.',
  });
}

export function noteMissingLengthUnit(reading: Reading): void {
  if (!reading.units.lengthStated) reading.note(unitMissing(reading.units, 'length'));
}

/** @param globalIds one for each element, '' where it has none */
export function noteRepeatedGlobalIds(reading: Reading, globalIds: readonly string[]): void {
  if (areApart(globalIds)) return;
  const count = new Map<string, number>();
  for (const globalId of globalIds) if (globalId !== '') count.set(globalId, (count.get(globalId) ?? 0) + 1);
  for (const [globalId, times] of count) {
    if (times === 1) continue;
    reading.about(globalId);
    reading.note({
      code: 'doubled-globalid',
      key: globalId,
      say: () => `${times} elements have the GlobalId ${globalId}; results cannot be told apart by it.`,
      advice: 'Give each copy a GlobalId of its own; copying in the modelling program does so, copying text does not.',
    });
  }
  reading.about(null);
}

/** Whether no two texts can be the same, by numbers made of them: a set of many texts takes several times as long. */
function areApart(texts: readonly string[]): boolean {
  const numbers = new Float64Array(texts.length);
  for (let i = 0; i < texts.length; i++) numbers[i] = numberOf(texts[i]!);
  numbers.sort();
  for (let i = 1; i < numbers.length; i++) if (numbers[i] === numbers[i - 1]) return false;
  return true;
}

/** A hash of 53 bits: two of 32, as many as a number holds exactly. */
function numberOf(text: string): number {
  let low = text.length;
  let high = 0x811c9dc5;
  for (let i = 0; i < text.length; i++) {
    const letter = text.charCodeAt(i);
    low = Math.imul(low, 31) + letter;
    high = Math.imul(high ^ letter, 0x01000193);
  }
  return (high >>> 11) * 2 ** 32 + (low >>> 0);
}

const ADVICE = {
  'doubled-id': 'Export the model again; the first instance of each number is the one that is read.',
  'encoding-broken': 'Export the model again; texts that cannot be decoded may fail to match selectors.',
  'unreadable-element': 'Export the model again; what is broken is left out.',
} as const;

/** What the STEP reader met: one finding a kind, told by its first case. */
export function noteFileProblems(reading: Reading): void {
  for (const kind of Object.keys(ADVICE) as (keyof typeof ADVICE)[]) {
    const problems = reading.file.problems.filter((problem) => problem.kind === kind);
    const [first] = problems;
    if (first === undefined) continue;
    const more = problems.length - 1;
    reading.note({
      code: kind,
      key: 'file',
      say: () => `${first.message}${more === 0 ? '' : ` There are ${more} more such cases.`}`,
      advice: ADVICE[kind],
    });
  }
}
