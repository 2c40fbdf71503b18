import { z } from "zod";
import { AppError } from "@/lib/shared/app-error";

/**
 * Place in a list after which the next page begins: opaque text that holds the sort it belongs to and the last row's values.
 * Text of another sort, or that somebody made up, is refused at the field "cursor".
 */
export function encodeCursor(sort: string, values: readonly (string | number)[]): string {
  return Buffer.from(JSON.stringify([sort, ...values]), "utf8").toString("base64url");
}

const cursorSchema = z.tuple([z.string()], z.union([z.string(), z.number()]));

export function decodeCursor<Values extends z.ZodType>(cursor: string | undefined, sort: string, valuesSchema: Values): z.output<Values> | null {
  if (cursor === undefined) return null;
  const [cursorSort, ...values] = parse(cursor);
  const parsed = valuesSchema.safeParse(values);
  if (cursorSort !== sort || !parsed.success) throw badCursor();
  return parsed.data;
}

function parse(cursor: string): z.output<typeof cursorSchema> {
  try {
    const text = Buffer.from(cursor, "base64url").toString("utf8");
    const parsed = cursorSchema.safeParse(JSON.parse(text));
    if (parsed.success && !text.includes("\\u0000")) return parsed.data;
  } catch {
    // Not JSON: answered below.
  }
  throw badCursor();
}

function badCursor(): AppError {
  const message = "This cursor does not belong to this list; start again without one.";
  return new AppError("invalid", "The cursor can't be used.", { fields: [{ path: "cursor", message }] });
}
