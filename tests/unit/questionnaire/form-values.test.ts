import { describe, expect, it } from "vitest";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { fromFormValues, readNumber, toFormValues } from "@/lib/questionnaire/form-values";
import { questionnaireSchema } from "@/lib/questionnaire/questionnaire-schema";

describe("readNumber", () => {
  it.each([
    ["400 000", 400000],
    ["1e-6", 1e-6],
    [".5", 0.5],
    ["2.", 2],
    ["400\u2009000", 400000],
    ["1E6", 1e6],
  ])("reads %s", (typed, value) => expect(readNumber(typed)).toBe(value));

  it.each(["400,000", "abc", "1e", "0x10", "--1", "Infinity"])("does not guess at %s", (typed) => expect(readNumber(typed)).toBeNaN());

  it("takes an empty field as no answer", () => expect(readNumber("  ")).toBeUndefined());
});

describe("form values", () => {
  it("give back the questionnaire they were made from", () => {
    const questionnaire = questionnaireSchema.parse(defaultQuestionnaire);
    expect(questionnaireSchema.parse(fromFormValues(toFormValues(questionnaire)))).toEqual(questionnaire);
  });

  it("keep an imported mesh's counts and leave the size out", () => {
    const questionnaire = questionnaireSchema.parse({
      ...defaultQuestionnaire, size: undefined, meshFamily: "imported", imported: { cells: 10, faces: 50, boundaryFaces: 30 },
    });
    const again = questionnaireSchema.parse(fromFormValues(toFormValues(questionnaire)));
    expect(again.imported).toEqual({ cells: 10, faces: 50, boundaryFaces: 30 });
    expect(again.size).toBeUndefined();
  });
});
