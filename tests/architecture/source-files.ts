import { readdirSync, readFileSync } from "node:fs";
import { join, posix, relative } from "node:path";
import { fileURLToPath } from "node:url";

const root = fileURLToPath(new URL("../../", import.meta.url));

export type SourceFile = { path: string; text: string; imports: string[] };

const importPattern = /(?:^|\n)\s*(?:import|export)\s(?:[^;'"]*?\sfrom\s)?["']([^"']+)["']|import\(\s*["']([^"']+)["']\s*\)/g;

/** Imports of ours as paths from the project's root, packages by name. */
function importsOf(path: string, text: string): string[] {
  return [...text.matchAll(importPattern)].flatMap((match) => {
    const target = match[1] ?? match[2];
    if (target === undefined) return [];
    if (target.startsWith("@/")) return [target.slice(2)];
    if (target.startsWith(".")) return [posix.normalize(posix.join(posix.dirname(path), target))];
    return [target];
  });
}

/** Every TypeScript file under a top-level folder, with its imports. */
export function sourceFiles(folder: string): SourceFile[] {
  const entries = readdirSync(join(root, folder), { recursive: true, withFileTypes: true });
  return entries
    .filter((entry) => entry.isFile() && /\.tsx?$/.test(entry.name))
    .map((entry) => {
      const path = relative(root, join(entry.parentPath, entry.name)).replaceAll("\\", "/");
      const text = readFileSync(join(root, path), "utf8");
      return { path, text, imports: importsOf(path, text) };
    });
}

export function topLevelNames(): string[] {
  return readdirSync(root);
}
