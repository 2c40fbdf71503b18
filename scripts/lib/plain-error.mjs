/** A failure that one line explains to the person at the terminal. */
export class PlainError extends Error {
  name = "PlainError";
}

/** Somebody asked for an orderly end (Ctrl-C, SIGTERM). */
export class StopRequested extends Error {
  name = "StopRequested";
}

const causes = {
  ENOSPC: "the disk is full",
  EDQUOT: "the disk quota is used up",
  EROFS: "the disk is read-only",
  EACCES: "permission is denied",
  EPERM: "the operation is not permitted",
  ENOTDIR: "a part of the path is not a folder",
  EMFILE: "too many files are open",
};

/**
 * One line for any error.
 * @param {unknown} error
 * @returns {string}
 */
export function describeError(error) {
  if (error instanceof PlainError) return oneLine(error.message);
  const code = error instanceof Error && "code" in error ? String(error.code) : "";
  const path = error instanceof Error && "path" in error ? String(error.path) : "";
  const cause = Object.hasOwn(causes, code) ? causes[/** @type {keyof typeof causes} */ (code)] : "";
  if (cause !== "") return path === "" ? `Writing failed: ${cause}.` : `Cannot use ${path}: ${cause}.`;
  return oneLine(`Unexpected failure: ${error instanceof Error ? error.message : String(error)}`);
}

/** @param {string} text */
function oneLine(text) {
  return text.replace(/\s*\n\s*/g, " ").trim();
}

/**
 * Runs a command-line program: exit 0 when it ends or was asked to stop, else one line on stderr and exit 1.
 * @param {() => Promise<void>} main
 */
export async function runMain(main) {
  // A reader that went away (`npm start | head`) must not take the database down without order.
  for (const stream of [process.stdout, process.stderr]) stream.on("error", () => undefined);
  try {
    await main();
    process.exitCode ??= 0;
  } catch (error) {
    if (error instanceof StopRequested) {
      process.exitCode = 0;
      return;
    }
    process.stderr.write(`saddlemark: ${describeError(error)}\n`);
    process.exitCode = 1;
  }
}
