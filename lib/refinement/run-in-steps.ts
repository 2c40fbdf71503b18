export type StepOptions = {
  /** Share done, 0 to 1, never falling. */
  onProgress?: (share: number) => void;
  /** Rejects with its reason at the next step. */
  signal?: AbortSignal;
};

/** Work in small steps: yields the share done after each, returns the result. */
export type Steps<Result> = Generator<number, Result, void>;

/** All steps at once. */
export function runAtOnce<Result>(steps: Steps<Result>): Result {
  for (;;) {
    const { done, value } = steps.next();
    if (done === true) return value;
  }
}

/** Steps as a part of longer work: shares run from `start` over `share` of the whole. */
export function* scaled<Result>(steps: Steps<Result>, start: number, share: number): Steps<Result> {
  for (;;) {
    const { done, value } = steps.next();
    if (done === true) return value;
    yield start + share * value;
  }
}

/** All steps with a turn of the event loop after each step, so that others are served, and with a way to stop. */
export async function runInSteps<Result>(steps: Steps<Result>, { onProgress, signal }: StepOptions = {}): Promise<Result> {
  let shown = 0;
  for (;;) {
    signal?.throwIfAborted();
    const { done, value } = steps.next();
    if (done === true) {
      onProgress?.(1);
      return value;
    }
    shown = Math.max(shown, Math.min(1, value));
    onProgress?.(shown);
    await new Promise((resolve) => setTimeout(resolve, 0));
  }
}
