import { parameterCatalogue } from "@/lib/advice/parameter-catalogue";
import { AppError, type FieldError } from "@/lib/shared/app-error";
import { editionFile, parseEdition, type EditionFile } from "@/rules/edition-json-schema";
import { ruleSetSchema, type RuleSet } from "@/rules/rule-schema";

/** What is sent may nest this deep; a condition in an `all` or `any` takes two levels. Keeps the parser within its stack. */
const deepest = 200;

/**
 * Rules as they were sent, in the form of the schema; what they say may still be wrong. `place` is where they stand in the body. Throws
 * AppError "invalid" with the place of every misfit.
 */
export function readRules(value: unknown, place: string): RuleSet {
  refuseDeep(value, place);
  const parsed = ruleSetSchema.safeParse(value);
  if (parsed.success) return parsed.data;
  const located = parseEdition({ ...editionFile([], ""), rules: value }, parameterCatalogue);
  throw refused("These rules don't fit.", located.problems.map(({ path, message }) => ({ path: path.replace(/^rules/, place), message })));
}

/** An exported edition that somebody brings. Throws AppError "invalid" with the place of everything that is wrong, under `place`. */
export function readEditionFile(value: unknown, place: string): EditionFile {
  refuseDeep(value, place);
  const parsed = parseEdition(value, parameterCatalogue);
  if (parsed.ok) return parsed.edition;
  const errors = parsed.problems.filter(({ severity }) => severity === "error");
  throw refused("This edition can't be imported as it is.", errors.map(({ path, message }) => ({ path: path === "" ? place : `${place}.${path}`, message })));
}

function refused(message: string, fields: readonly FieldError[]): AppError {
  return new AppError("invalid", message, { fields: fields.slice(0, 200) });
}

function refuseDeep(value: unknown, place: string): void {
  if (depthExceeds(value, deepest)) throw refused("These rules nest too deep.", [{ path: place, message: `Conditions nest at most ${deepest / 2 - 4} deep.` }]);
}

/** Walks without recursion. */
function depthExceeds(value: unknown, limit: number): boolean {
  const waiting: { item: unknown; depth: number }[] = [{ item: value, depth: 0 }];
  for (let next = waiting.pop(); next !== undefined; next = waiting.pop()) {
    const { item, depth } = next;
    if (typeof item !== "object" || item === null) continue;
    if (depth > limit) return true;
    for (const child of Object.values(item)) waiting.push({ item: child, depth: depth + 1 });
  }
  return false;
}
