import { connect } from "node:net";
import { setTimeout as delay } from "node:timers/promises";
import { PlainError } from "./plain-error.mjs";

/**
 * @param {{ port: number, name: string, signal: AbortSignal, limitMilliseconds?: number }} options
 */
export async function waitForPort({ port, name, signal, limitMilliseconds = 20_000 }) {
  const deadline = Date.now() + limitMilliseconds;
  while (!(await accepts(port))) {
    signal.throwIfAborted();
    if (Date.now() > deadline) throw new PlainError(`The ${name} did not answer within ${limitMilliseconds / 1000} seconds.`);
    await delay(50);
  }
}

/**
 * Waits until the application says that it is well.
 * @param {{ url: string, signal: AbortSignal, limitMilliseconds?: number }} options
 */
export async function waitForHealth({ url, signal, limitMilliseconds = 120_000 }) {
  const deadline = Date.now() + limitMilliseconds;
  let last = "no answer";
  for (;;) {
    signal.throwIfAborted();
    try {
      const response = await fetch(url, { signal: AbortSignal.any([signal, AbortSignal.timeout(30_000)]) });
      await response.body?.cancel();
      if (response.ok) return;
      last = `status ${response.status}`;
    } catch (error) {
      signal.throwIfAborted();
      last = error instanceof Error ? error.message : String(error);
    }
    if (Date.now() > deadline) throw new PlainError(`The web server is not ready after ${limitMilliseconds / 1000} seconds: ${url} gives ${last}.`);
    await delay(100);
  }
}

/**
 * @param {number} port
 * @returns {Promise<boolean>}
 */
function accepts(port) {
  return new Promise((settle) => {
    const socket = connect({ port, host: "127.0.0.1" });
    socket.once("connect", () => {
      socket.destroy();
      settle(true);
    });
    socket.once("error", () => settle(false));
  });
}
