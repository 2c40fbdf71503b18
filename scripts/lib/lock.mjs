import { spawn } from "node:child_process";
import { PlainError } from "./plain-error.mjs";

/**
 * Holds an exclusive lock on a file until released or until this process ends, however it ends:
 * a helper of util-linux keeps the lock while its pipe to us is open, so a killed process leaves no stale lock.
 * @param {string} file
 * @param {{ wait?: boolean }} [options] wait for the present holder
 * @returns {Promise<(() => void) | null>} how to release it, or null when another process holds it
 */
export function takeLock(file, { wait = false } = {}) {
  return new Promise((settle, fail) => {
    const args = [...(wait ? [] : ["--nonblock"]), "--conflict-exit-code", "75", file, "sh", "-c", "echo held; exec cat"];
    // A group of its own: Ctrl-C at the terminal must not release the lock before the services are stopped.
    const holder = spawn("flock", args, { detached: true, stdio: ["pipe", "pipe", "ignore"] });
    holder.once("error", () => fail(new PlainError("The program flock is missing; install Debian's package util-linux.")));
    holder.once("exit", (code) => (code === 75 ? settle(null) : fail(new PlainError(`Cannot lock ${file}.`))));
    holder.stdout.once("data", () => {
      holder.removeAllListeners("exit");
      holder.unref();
      for (const pipe of [holder.stdin, holder.stdout]) if ("unref" in pipe && typeof pipe.unref === "function") pipe.unref();
      settle(() => holder.stdin.destroy());
    });
  });
}
