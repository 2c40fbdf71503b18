import { readFileSync } from "node:fs";
import { createRequire } from "node:module";

const axe = readFileSync(createRequire(import.meta.url).resolve("axe-core/axe.min.js"), "utf8");
/** These need a layout or a whole page, which only a browser has. */
const leftToTheBrowser = ["color-contrast", "region", "page-has-heading-one", "landmark-one-main"];

/** Ids of axe-core's rules that the document in jsdom breaks. */
export async function violations(): Promise<string[]> {
  window.eval(axe);
  const loaded: unknown = Reflect.get(window, "axe");
  if (typeof loaded !== "object" || loaded === null || !("run" in loaded) || typeof loaded.run !== "function") throw new Error("axe is not there.");
  const rules = Object.fromEntries(leftToTheBrowser.map((id) => [id, { enabled: false }]));
  const found: { violations: { id: string }[] } = await loaded.run(document.body, { rules, resultTypes: ["violations"] });
  return found.violations.map(({ id }) => id);
}
