// @vitest-environment jsdom
import { cleanup, render, screen, within } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import { LogLogLines } from "@/components/charts/log-log-lines";
import { judgeMemory, MemoryBar } from "@/components/charts/memory-bar";
import { RangeBars } from "@/components/charts/range-bars";
import { RateTable } from "@/components/charts/rate-table";
import { RatioTrack } from "@/components/charts/ratio-track";
import { makeLogScale } from "@/components/charts/log-scale";
import { ResidualHistory } from "@/components/charts/residual-history";
import { TimeSeries } from "@/components/charts/time-series";
import { WilsonBar } from "@/components/charts/wilson-bar";

// Wilson's 95 % interval of 41 of 52 is 66 to 88 % (z = 1.96, by hand: centre 0.7688, half width 0.1094).
const worked = { x: 41, n: 52, low: 0.6594, high: 0.8781 };

afterEach(cleanup);

/** Accessible names of the drawings, ordinary spaces for narrow ones. */
function pictures(): string[] {
  return screen.getAllByRole("img").map((picture) => (picture.getAttribute("aria-label") ?? "").replaceAll("\u202f", " "));
}

function textOf(element: Element): string {
  return (element.textContent ?? "").replaceAll("\u202f", " ");
}

describe("RangeBars", () => {
  const rows = [
    { id: "a", label: "Direct", mark: "direct-ldlt", low: 10, median: 100, high: 1000, measured: [50] },
    { id: "b", label: "BDDC", mark: "bddc", low: null, median: null, high: null, muted: true, note: "unavailable: no subdomain matrices" },
  ] as const;

  it("tells each row's median, range and measurement in words", () => {
    render(<RangeBars title="Predicted" axisLabel="Total time" unit="ratio" rows={rows} />);
    expect(pictures()).toEqual(["Direct: 100x, 80 % range 10 to 1 000x; measured 50x", "BDDC: no estimate"]);
    expect(screen.getByText("unavailable: no subdomain matrices")).toBeDefined();
  });

  it("draws predicted and measured on one axis: 10 at the left end, 100 half-way, 1000 at the right end, 50 at log(5)/2", () => {
    const { container } = render(<RangeBars title="Predicted" axisLabel="Total time" unit="ratio" rows={rows} />);
    const bar = container.querySelector("li rect");
    expect([bar?.getAttribute("x"), bar?.getAttribute("width")]).toEqual(["0%", "100%"]);
    const places = [...container.querySelectorAll("li svg svg")].map((place) => place.getAttribute("x"));
    expect(places).toEqual(["50%", "34.95%"]);
  });

  it("keeps the full value for hover and names the limit line", () => {
    render(<RangeBars title="Predicted" axisLabel="Total time" unit="seconds" rows={[{ id: "a", label: "Direct", mark: "direct-ldlt", low: 9.1, median: 9.8374, high: 12 }]} reference={{ value: 120, label: "time limit" }} />);
    expect(screen.getByTitle("9.8374 s")).toBeDefined();
    expect(textOf(screen.getByText(/Dashed line/))).toBe("Dashed line: time limit, 2 min");
  });
});

describe("RatioTrack", () => {
  it("is one picture named by the caller's words", () => {
    render(<RatioTrack scale={makeLogScale([1, 10])} low={1} median={2} high={5} colour="var(--ink)" words="Direct, 2x the first" reference={1} measured={3} />);
    expect(pictures()).toEqual(["Direct, 2x the first"]);
  });
});

describe("MemoryBar", () => {
  it.each([
    [{ low: 5, median: 6.2, high: 8 }, "Memory: needs 6.2 GiB, 80 % range 5 to 8 GiB; the machine has 128 GiB. Fits."],
    [{ low: 80, median: 110, high: 150 }, "Memory: needs 110 GiB, 80 % range 80 to 150 GiB; the machine has 128 GiB. May not fit."],
    [{ low: 800, median: 1126.4, high: 1536 }, "Memory: needs 1.1 TiB, 80 % range 800 GiB to 1.5 TiB; the machine has 128 GiB. Does not fit."],
  ])("says in words whether %o fits", (need, sentence) => {
    render(<MemoryBar label="Memory" need={need} limitGiB={128} />);
    expect(pictures()).toEqual([sentence]);
  });

  it.each([
    [{ low: 1, median: 2, high: 3 }, 3, "fits"],
    [{ low: 1, median: 3, high: 3.1 }, 3, "may-not-fit"],
    [{ low: 1, median: 3.1, high: 4 }, 3, "does-not-fit"],
    [{ low: 1, median: 2, high: 3 }, 0, "does-not-fit"],
  ])("judges a need of %o against %d GiB as %s", (need, limit, verdict) => {
    expect(judgeMemory(need, limit)).toBe(verdict);
  });
});

describe("WilsonBar", () => {
  it("tells rate, counts and interval", () => {
    render(<WilsonBar label="Worked" rate={worked} />);
    expect(pictures()).toEqual(["Worked: 41 of 52, 79 %, 95 % interval 66 to 88 %"]);
  });

  it("has no rate without runs, and says so instead of 0 %", () => {
    render(<WilsonBar label="Best" rate={{ x: 0, n: 0, low: 0, high: 1 }} />);
    expect(pictures()).toEqual(["Best: no comparable runs yet"]);
    expect(screen.queryByText(/0.%/)).toBeNull();
  });
});

describe("RateTable", () => {
  it("links every figure to its cases, names it by row and column, and says where there are no runs", () => {
    render(
      <RateTable
        caption="Worked"
        rowHeading="Mesh family"
        columns={[
          { id: "1", label: "k = 1" },
          { id: "2", label: "k = 2" },
        ]}
        rows={[{ id: "cubes", label: "cubes", cells: { "1": { ...worked, href: "/cases?family=cubes&degree=1" }, "2": null } }]}
      />,
    );
    const link = screen.getByRole("link");
    expect(link.getAttribute("href")).toBe("/cases?family=cubes&degree=1");
    expect(link.getAttribute("aria-label")?.replaceAll("\u202f", " ")).toBe("cubes, k = 1: 79 %, 41 of 52, 95 % interval 66 to 88 %");
    expect(within(screen.getByRole("row", { name: /cubes/ })).getByText("no runs")).toBeDefined();
  });

  it("shades in proportion to the rate", () => {
    const cells = { a: { x: 1, n: 2, low: 0.1, high: 0.9, href: "/a" }, b: { x: 2, n: 2, low: 0.3, high: 1, href: "/b" } };
    const { container } = render(<RateTable caption="Worked" rowHeading="Family" columns={[{ id: "a", label: "a" }, { id: "b", label: "b" }]} rows={[{ id: "r", label: "r", cells }]} />);
    const shades = [...container.querySelectorAll("td")].map((cell) => /forest\) (\d+)%/.exec(cell.getAttribute("style") ?? "")?.[1]);
    expect(shades).toEqual(["21", "42"]);
  });
});

describe("TimeSeries", () => {
  const points = [
    { at: "2026-01-31", x: 5, n: 10, low: 0.24, high: 0.76 },
    { at: "2026-02-28", x: 0, n: 0, low: 0, high: 1 },
    { at: "2026-03-31", x: 9, n: 10, low: 0.6, high: 0.98 },
  ];

  it("tells the first and latest rate, and leaves out a period without runs", () => {
    render(<TimeSeries title="Worked over time" points={points} />);
    expect(pictures()).toEqual(["Worked over time: 31 Jan 2026 50 %, 5 of 10 (24 to 76 %); 31 Mar 2026 90 %, 9 of 10 (60 to 98 %)"]);
    expect(screen.getAllByRole("row", { hidden: true }).map(textOf)).toEqual(["UntilRateCounts95 % interval", "31 Jan 202650 %5 of 1024 to 76 %", "31 Mar 202690 %9 of 1060 to 98 %"]);
  });

  it("says in a sentence that there is nothing to draw yet", () => {
    render(<TimeSeries title="Worked over time" points={[]} />);
    expect(screen.getByText("Worked over time: no comparable runs yet.")).toBeDefined();
  });
});

describe("LogLogLines", () => {
  const at = (x: number, median: number) => ({ x, low: median / 2, median, high: median * 2 });

  it("labels where two strategies cross and offers every point as a table", () => {
    render(
      <LogLogLines
        title="Time against size"
        xLabel="unknowns"
        yLabel="Solve time"
        xUnit="count"
        yUnit="seconds"
        series={[
          { id: "direct-ldlt", label: "Direct", points: [at(1e3, 1), at(1e5, 1e4)] },
          { id: "bddc", label: "BDDC", points: [at(1e3, 10), at(1e5, 1e3)] },
        ]}
      />,
    );
    expect(pictures()).toEqual(["Time against size. Direct, BDDC. Direct and BDDC cross at 10 k (1.7 min)"]);
    expect(screen.getAllByRole("row", { hidden: true })).toHaveLength(5);
  });

  it("says in a sentence that there is nothing to draw yet", () => {
    render(<LogLogLines title="Time" xLabel="unknowns" yLabel="time" xUnit="count" yUnit="seconds" series={[]} />);
    expect(screen.getByText("Time: nothing to draw yet.")).toBeDefined();
  });
});

describe("ResidualHistory", () => {
  it("tells both residuals at the end and the tolerance, with a table of all iterations", () => {
    render(
      <ResidualHistory
        title="Run 3"
        tolerance={1e-6}
        history={[
          { iteration: 0, monitored: 1, true: 1 },
          { iteration: 31, monitored: 8e-7, true: 4.1e-6 },
        ]}
      />,
    );
    expect(pictures()).toEqual(["Run 3: from 1 at iteration 0 to 8 × 10⁻⁷ at iteration 31, true 4.1 × 10⁻⁶; tolerance 1 × 10⁻⁶"]);
    expect(screen.getAllByRole("row", { hidden: true }).map(textOf)).toEqual(["IterationMonitoredTrue", "011", "318 × 10⁻⁷4.1 × 10⁻⁶"]);
  });

  it("says so where the log holds no residuals", () => {
    render(<ResidualHistory title="Run 3" history={[]} />);
    expect(screen.getByText("Run 3: the log holds no residuals.")).toBeDefined();
  });
});
