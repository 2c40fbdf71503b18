import { z } from "zod";

export const instantSchema = z.iso.datetime();

/** Id of a case: its UUID or its number in the team. */
export const caseRefSchema = z.union([z.uuid(), z.string().regex(/^[1-9]\d{0,8}$/)]);
export const caseParams = z.strictObject({ id: caseRefSchema });
export const idParams = z.strictObject({ id: z.uuid() });

export const defaultPageSize = 50;
export const largestPage = 200;

/** Whole numbers written in an address: digits only. */
export function wholeQuery(min: number, max: number) {
  const message = `Give a whole number from ${min} to ${max}.`;
  return z.string().regex(/^\d{1,9}$/, message).transform(Number).pipe(z.int().min(min, message).max(max, message));
}

export const pageShape = { limit: wholeQuery(1, largestPage).default(defaultPageSize), cursor: z.string().min(1).max(1000).optional() };
export const pageQuery = z.strictObject(pageShape);

export function listOf<Item extends z.ZodType>(item: Item) {
  return z.object({ items: z.array(item), nextCursor: z.string().nullable() });
}

/** Somebody of the team; the name is null after they left it. */
export const personSchema = z.object({ id: z.string(), name: z.string().nullable() }).nullable();
export type PersonView = z.infer<typeof personSchema>;
