/** What is wrong in a file that can be read all the same. The kinds are finding codes. */
export type StepProblemKind = 'doubled-id' | 'encoding-broken' | 'unreadable-element';

export interface StepProblem {
  readonly kind: StepProblemKind;
  /** The instance it stands in; null for the header and for text that is no instance. */
  readonly id: number | null;
  /** One sentence, printable, that names the instance. */
  readonly message: string;
}

/** A file can be made of nothing but faults; the list of them must not outgrow it. */
const MOST_LISTED = 10_000;

/** Problems in the order they were met, one of a kind for an instance. */
export class StepProblems {
  readonly list: StepProblem[] = [];
  /** How many more were met once the list was full. */
  omitted = 0;
  private readonly seen = new Set<string>();

  add(kind: StepProblemKind, id: number | null, message: string): void {
    if (this.list.length >= MOST_LISTED) {
      this.omitted++;
      return;
    }
    const key = `${kind} ${id ?? message}`;
    if (this.seen.has(key)) return;
    this.seen.add(key);
    this.list.push({ kind, id, message });
  }
}
