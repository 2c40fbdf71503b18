import { StopRequested } from "./plain-error.mjs";

/**
 * One signal for everything that ends a program early: Ctrl-C, SIGTERM, a closed terminal, or a service that died.
 * @returns {{ signal: AbortSignal, abort: (reason: Error) => void, onImpatience: (work: () => void) => void }}
 */
export function listenForStop() {
  const controller = new AbortController();
  /** @type {() => void} */
  let impatience = () => undefined;
  for (const name of /** @type {const} */ (["SIGINT", "SIGTERM", "SIGHUP"])) {
    process.on(name, () => {
      // npm passes a Ctrl-C on that the terminal has sent already: only a later one is impatience.
      if (!controller.signal.aborted) controller.abort(new StopRequested());
      else if (Date.now() - firstAt > 1_000) impatience();
    });
  }
  if (process.env.npm_lifecycle_event !== undefined) watchParent(controller);
  let firstAt = 0;
  controller.signal.addEventListener("abort", () => {
    firstAt = Date.now();
  });
  return {
    signal: controller.signal,
    abort: (reason) => controller.abort(reason),
    onImpatience: (work) => {
      impatience = work;
    },
  };
}

/**
 * Started by npm, the end of npm (kill -9 too) is the end of the run: nobody else could stop it any more.
 * @param {AbortController} controller
 */
function watchParent(controller) {
  const parent = process.ppid;
  const timer = setInterval(() => {
    if (process.ppid !== parent && !controller.signal.aborted) controller.abort(new StopRequested());
  }, 250);
  timer.unref();
}

/**
 * Never settles before the signal; then throws its reason.
 * @param {AbortSignal} signal
 * @returns {Promise<never>}
 */
export function untilStopped(signal) {
  return new Promise((_settle, fail) => {
    if (signal.aborted) fail(signal.reason);
    signal.addEventListener("abort", () => fail(signal.reason));
  });
}
