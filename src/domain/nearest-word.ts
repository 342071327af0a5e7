/** The word of `words` that was most likely meant by `written`; null where none is near. */
export function nearestWord(written: string, words: readonly string[]): string | null {
  const lower = written.toLowerCase();
  let best: string | null = null;
  // A third of the letters may be wrong: "fixx" is "fix", "weather" is nothing.
  let least = Math.max(1, Math.floor(Math.min(lower.length, 24) / 3)) + 1;
  for (const word of words) {
    const edits = word.toLowerCase() === lower ? 0 : editDistance(lower, word.toLowerCase(), least);
    if (edits < least) {
      best = word;
      least = edits;
    }
  }
  return best;
}

/** "; did you mean …?", or nothing. */
export function didYouMean(written: string, words: readonly string[]): string {
  const near = nearestWord(written, words);
  return near === null || near === written ? '' : `; did you mean "${near}"?`;
}

/** Edit distance with swaps of neighbours (optimal string alignment); gives `limit` up once lengths alone exceed it. */
function editDistance(a: string, b: string, limit: number): number {
  if (Math.abs(a.length - b.length) >= limit) return limit;
  let beforeLast: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const swap = a[i - 1] === b[j - 1] ? 0 : 1;
      let edits = Math.min(last[j]! + 1, row[j - 1]! + 1, last[j - 1]! + swap);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1])
        edits = Math.min(edits, beforeLast[j - 2]! + 1);
      row.push(edits);
    }
    beforeLast = last;
    last = row;
  }
  return last[b.length]!;
}
