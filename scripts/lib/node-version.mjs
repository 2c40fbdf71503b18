import { PlainError } from "./plain-error.mjs";

const oldest = { major: 20, minor: 18 };

/**
 * Refuses a Node that is too old for the pinned packages.
 * @param {string} version such as "20.20.2"
 */
export function checkNodeVersion(version) {
  const [major = 0, minor = 0] = version.split(".").map(Number);
  if (major > oldest.major || (major === oldest.major && minor >= oldest.minor)) return;
  throw new PlainError(`Node ${version} is too old; install Node ${oldest.major}.${oldest.minor} or newer.`);
}
