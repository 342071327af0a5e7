/** Tells on stderr what is being done, where that is a terminal; silent elsewhere. */
export interface Progress {
  readonly stage: (words: string) => void;
  readonly done: () => void;
}

export function makeProgress(quiet: boolean): Progress {
  if (quiet || !process.stderr.isTTY) return { stage: () => {}, done: () => {} };
  const clear = '\r\u001b[K';
  return {
    stage: (words) => process.stderr.write(`${clear}${words}…`),
    done: () => process.stderr.write(clear),
  };
}
