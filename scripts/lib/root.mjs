import { fileURLToPath } from "node:url";

/** The project's folder, without a trailing slash. Bundles lie as deep (dist/bench/), so the same step up holds there. */
export const projectRoot = fileURLToPath(new URL("../..", import.meta.url)).replace(/\/$/, "");
