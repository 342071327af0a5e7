/** The stages of a run, as timings and progress name them. */
export type Stage = 'import' | 'topology' | 'stability' | 'solve' | 'checks' | 'export';

/** Seconds spent in each stage; `onStage` hears of each as it begins. */
export function stageClock(onStage: (stage: Stage) => void) {
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
