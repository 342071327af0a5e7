import type { Draft } from './drafts.ts';

/** Higher numbers in an id are not kept, so that there is room above. */
const HIGHEST_KEPT = 2 ** 31 - 1;

/** Numbers instances for STEP text: `i12` becomes `#12` where nothing else has that number, the rest come after the highest. */
export class Numbering {
  private readonly byId = new Map<string, number>();
  private readonly byDraft = new Map<Draft, number>();
  private readonly taken = new Set<number>();
  private next = 1;

  constructor(drafts: readonly Draft[]) {
    for (const { id } of drafts) if (id !== null && !this.byId.has(id)) this.keep(id);
    for (const number of this.taken) this.next = Math.max(this.next, number + 1);
  }

  private keep(id: string): void {
    const number = Number(/^\D*(\d{1,10})$/.exec(id)?.[1] ?? 0);
    if (number < 1 || number > HIGHEST_KEPT || this.taken.has(number)) return;
    this.byId.set(id, number);
    this.taken.add(number);
  }

  /** Two drafts with one id get one number, so that the STEP reader says that they are doubled. */
  ofDraft(draft: Draft): number {
    if (draft.id !== null) return this.ofId(draft.id);
    let number = this.byDraft.get(draft);
    if (number === undefined) {
      number = this.next++;
      this.byDraft.set(draft, number);
    }
    return number;
  }

  /** Also of an id that no instance has, so that the reference is found to lead nowhere. */
  ofId(id: string): number {
    let number = this.byId.get(id);
    if (number === undefined) {
      number = this.next++;
      this.byId.set(id, number);
    }
    return number;
  }
}
