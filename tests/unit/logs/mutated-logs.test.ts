import fc from "fast-check";
import { expect, it } from "vitest";
import { parsedLogSchema } from "@/lib/logs/parsed-log";
import { logNames, logText, readText } from "./read-log";

const texts = logNames.map(logText);

type Edit = { at: number; remove: number; insert: string };

const snippet = fc.oneof(
  fc.string({ maxLength: 12 }),
  fc.constantFrom("\n", "\r\n", " ", "  ", "nan", "1e999", "-1", "999999999999999999999", "e+400", "\u001b[31m", "\u001b]8;;", "[0]", "1: ", "INFOG(29) (x): -5\n", "iterations ", "KSP Object: 3 MPI processes\n", "||r(i)||/||b||"),
);
const edit: fc.Arbitrary<Edit> = fc.record({ at: fc.double({ min: 0, max: 1, noNaN: true }), remove: fc.nat(200), insert: snippet });

function mutate(text: string, edits: readonly Edit[]): string {
  return edits.reduce((current, { at, remove, insert }) => {
    const place = Math.floor(at * current.length);
    return current.slice(0, place) + insert + current.slice(place + remove);
  }, text);
}

/** Every number anywhere in a value, to see that none is NaN or infinite. */
function numbersIn(value: unknown): number[] {
  if (typeof value === "number") return [value];
  if (value === null || typeof value !== "object") return [];
  return Object.values(value).flatMap(numbersIn);
}

it("never crashes and never gives a number that is not finite, over 5 000 mutated logs", () => {
  fc.assert(
    fc.property(fc.nat(texts.length - 1), fc.array(edit, { minLength: 1, maxLength: 12 }), fc.double({ min: 0, max: 1, noNaN: true }), (index, edits, share) => {
      const text = mutate(texts[index] ?? "", edits);
      const result = readText(text.slice(0, Math.ceil(share * text.length)));
      expect(numbersIn(result).every(Number.isFinite)).toBe(true);
      parsedLogSchema.parse(result);
    }),
    { numRuns: 5_000, seed: 20_261_201 },
  );
}, 300_000);

it("never crashes on bytes that are no log at all", () => {
  fc.assert(
    fc.property(fc.uint8Array({ maxLength: 2_000 }), (bytes) => {
      const result = readText(Buffer.from(bytes).toString("latin1"));
      expect(result.outcome).toBeNull();
      expect(result.problems.length).toBeGreaterThan(0);
    }),
    { numRuns: 500, seed: 20_261_202 },
  );
});
