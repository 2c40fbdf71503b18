// @vitest-environment jsdom
import { render } from "@testing-library/react";
import { describe, expect, it, vi } from "vitest";
import { ResidualLines } from "@/components/charts/residual-lines";

// jsdom lays nothing out and lacks the observer: give every box one fixed size.
vi.spyOn(HTMLElement.prototype, "getBoundingClientRect").mockReturnValue(new DOMRect(0, 0, 480, 256));
vi.stubGlobal(
  "ResizeObserver",
  class {
    observe(): void {}
    unobserve(): void {}
    disconnect(): void {}
  },
);

describe("ResidualLines", () => {
  it("labels whole decades from above the largest to below the smallest residual and draws both curves", () => {
    const history = [
      { iteration: 0, monitored: 1, true: 1 },
      { iteration: 10, monitored: 2e-3, true: 5e-3 },
      { iteration: 20, monitored: 4e-5, true: 0 },
    ];
    const { container } = render(<ResidualLines history={history} tolerance={1e-4} />);
    const labels = [...container.querySelectorAll(".recharts-yAxis text, .recharts-yAxis-tick-labels text")].map((label) => label.textContent);
    expect(new Set(labels)).toEqual(new Set(["10⁻⁵", "10⁻⁴", "10⁻³", "10⁻²", "10⁻¹", "1"]));
    expect(container.querySelectorAll("path.recharts-line-curve")).toHaveLength(2);
    expect(container.querySelectorAll(".recharts-reference-line")).not.toHaveLength(0);
  });
});
