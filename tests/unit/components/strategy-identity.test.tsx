// @vitest-environment jsdom
import { readFileSync } from "node:fs";
import { render, screen } from "@testing-library/react";
import { describe, expect, it } from "vitest";
import { strategyColours, strategyHatches, strategyShapes } from "@/components/charts/strategy-identity";
import { StrategyMark } from "@/components/charts/strategy-mark";
import { strategyIds } from "@/lib/shared/strategy-ids";

const css = readFileSync("app/globals.css", "utf8");

function tokensOf(selector: string): Map<string, string> {
  const block = new RegExp(`\\n${selector} \\{([^}]*)\\}`).exec(`\n${css}`)?.[1] ?? "";
  return new Map([...block.matchAll(/--([a-z0-9-]+): (#[0-9a-f]{6});/g)].map((match) => [match[1] ?? "", match[2] ?? ""]));
}

/** WCAG 2.2, "relative luminance" and "contrast ratio". */
function contrast(one: string, other: string): number {
  const luminance = (hex: string): number => {
    const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((start) => {
      const channel = Number.parseInt(hex.slice(start, start + 2), 16) / 255;
      return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
    });
    return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
  };
  const [high = 0, low = 0] = [luminance(one), luminance(other)].sort((a, b) => b - a);
  return (high + 0.05) / (low + 0.05);
}

const themes = [
  ["light", tokensOf(":root")],
  ["dark", tokensOf("\\.dark")],
] as const;

describe.each(themes)("the %s theme", (_name, tokens) => {
  const sheet = tokens.get("sheet") ?? "";
  const paper = tokens.get("paper") ?? "";

  it.each(["ink", "faint", "water", "forest", "peg", "warn", "bad"])("sets %s text at 4.5:1 or more on paper and sheet (WCAG 1.4.3)", (token) => {
    for (const ground of [sheet, paper]) expect(contrast(tokens.get(token) ?? "", ground)).toBeGreaterThanOrEqual(4.5);
  });

  it.each([...strategyIds.map((id) => `strategy-${id}`), "contour"])("draws %s at 3:1 or more on paper and sheet (WCAG 1.4.11)", (token) => {
    for (const ground of [sheet, paper]) expect(contrast(tokens.get(token) ?? "", ground)).toBeGreaterThanOrEqual(3);
  });

  it("gives every strategy a colour of its own", () => {
    expect(new Set(strategyIds.map((id) => tokens.get(`strategy-${id}`)))).toHaveProperty("size", strategyIds.length);
  });
});

describe("strategy marks", () => {
  it("tell the strategies apart without colour, by shape and by hatch", () => {
    const ids = [...strategyIds, "other"] as const;
    expect(new Set(ids.map((id) => strategyShapes[id].path)).size).toBe(ids.length);
    expect(new Set(ids.map((id) => strategyShapes[id].name)).size).toBe(ids.length);
    expect(new Set(ids.map((id) => strategyHatches[id].path)).size).toBe(ids.length);
    expect(new Set(ids.map((id) => strategyColours[id])).size).toBe(ids.length);
  });

  it("have a name where they stand alone and are hidden from screen readers beside text", () => {
    const { container } = render(
      <>
        <StrategyMark id="bddc" title="BDDC" />
        <StrategyMark id="bddc" />
      </>,
    );
    expect(screen.getAllByRole("img")).toHaveLength(1);
    expect(screen.getByRole("img", { name: "BDDC" })).toBeDefined();
    expect(container.querySelectorAll("svg[aria-hidden]")).toHaveLength(1);
  });
});
