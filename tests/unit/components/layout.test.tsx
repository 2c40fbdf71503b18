// @vitest-environment jsdom
import { cleanup, render, screen, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import Link from "next/link";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { Caution } from "@/components/layout/caution";
import { DeskShell } from "@/components/layout/desk-shell";
import { EmptyState } from "@/components/layout/empty-state";
import { FindButton } from "@/components/layout/find-button";
import { FindDialog, type FindItem } from "@/components/layout/find-dialog";
import { Mark } from "@/components/layout/mark";
import { Legend, Margin, MarginFacts, MarginSection, Sheet } from "@/components/layout/sheet";

const route = vi.hoisted(() => ({ path: "/cases/12" }));
vi.mock("next/navigation", () => ({ usePathname: () => route.path }));

beforeEach(() => {
  route.path = "/cases/12";
});
afterEach(cleanup);

const destinations = [
  { label: "Cases", href: "/cases" },
  { label: "Hit rates", href: "/hit-rates" },
];

describe("DeskShell", () => {
  const shell = (
    <DeskShell destinations={destinations} teams={<button>Team A</button>} person={<button>Person</button>} demonstration>
      <h1>Case 12</h1>
    </DeskShell>
  );

  it("begins with a link past the band to the work", async () => {
    render(shell);
    await userEvent.tab();
    expect(document.activeElement?.textContent).toBe("Skip to the work");
    expect(document.activeElement?.getAttribute("href")).toBe(`#${screen.getByRole("main").id}`);
  });

  it("marks the destination that holds the present page, and only that", () => {
    render(shell);
    const here = screen.getAllByRole("link").filter((link) => link.getAttribute("aria-current") === "page");
    expect(new Set(here.map((link) => link.textContent))).toEqual(new Set(["Cases"]));
  });

  it("says that demonstration data is invented, for demonstration teams only", () => {
    const { rerender } = render(shell);
    expect(screen.getByText("Demonstration data: invented")).toBeDefined();
    rerender(<DeskShell destinations={destinations}>x</DeskShell>);
    expect(screen.queryByText("Demonstration data: invented")).toBeNull();
  });

  it("discloses the destinations on a narrow page, and closes on Escape and on a change of page", async () => {
    const { rerender } = render(shell);
    const button = screen.getByRole("button", { name: "Menu" });
    const panel = document.getElementById(button.getAttribute("aria-controls") ?? "");
    expect([button.getAttribute("aria-expanded"), panel?.hidden]).toEqual(["false", true]);
    await userEvent.click(button);
    expect([button.getAttribute("aria-expanded"), panel?.hidden]).toEqual(["true", false]);
    await userEvent.keyboard("{Escape}");
    expect(panel?.hidden).toBe(true);
    await userEvent.click(button);
    route.path = "/hit-rates";
    rerender(<DeskShell destinations={destinations}>x</DeskShell>);
    expect(panel?.hidden).toBe(true);
  });
});

describe("Sheet", () => {
  it("puts the margin beside the work as a complementary landmark with headed notes", () => {
    render(
      <Sheet
        margin={
          <Margin>
            <MarginSection title="Sizes">
              <MarginFacts facts={[{ name: "Cells", value: "29 791" }]} />
            </MarginSection>
            <MarginSection title="Legend">
              <Legend items={[{ sign: "▲", text: "measured run" }]} />
            </MarginSection>
          </Margin>
        }
      >
        work
      </Sheet>,
    );
    const margin = screen.getByRole("complementary", { name: "Margin notes" });
    expect(within(margin).getAllByRole("heading", { level: 2 }).map((heading) => heading.textContent)).toEqual(["Sizes", "Legend"]);
    expect(within(margin).getByRole("definition").textContent).toBe("29 791");
    expect(within(margin).getByRole("listitem").textContent).toContain("measured run");
  });
});

describe("FindDialog", () => {
  const items: readonly FindItem[] = [
    { id: "1", label: "Terrain", group: "Pages" },
    { id: "2", label: "Case 12: layered aquifer", group: "Cases" },
    { id: "3", label: "Case 21: fault zone", group: "Cases" },
  ];

  it("filters as one types and chooses by arrows and Enter, without the mouse", async () => {
    const onChoose = vi.fn();
    render(<FindDialog open onOpenChange={() => undefined} items={items} onChoose={onChoose} />);
    const box = screen.getByRole("combobox", { name: "Find a case or page" });
    await userEvent.type(box, "case");
    expect(screen.getAllByRole("option").map((option) => option.getAttribute("aria-selected"))).toEqual(["true", "false"]);
    await userEvent.keyboard("{ArrowDown}");
    expect(document.getElementById(box.getAttribute("aria-activedescendant") ?? "")?.textContent).toContain("Case 21");
    await userEvent.keyboard("{ArrowDown}{Enter}");
    expect(onChoose).toHaveBeenCalledExactlyOnceWith(items[2]);
  });

  it("hands the text to the caller's search and then shows the caller's items unfiltered", async () => {
    const onSearch = vi.fn();
    render(<FindDialog open onOpenChange={() => undefined} items={items} onSearch={onSearch} onChoose={() => undefined} />);
    await userEvent.type(screen.getByRole("combobox"), "zz");
    expect(onSearch).toHaveBeenLastCalledWith("zz");
    expect(screen.getAllByRole("option")).toHaveLength(3);
  });

  it("says what to try when nothing is found, and Enter then does nothing", async () => {
    const onChoose = vi.fn();
    render(<FindDialog open onOpenChange={() => undefined} items={items} onChoose={onChoose} />);
    await userEvent.type(screen.getByRole("combobox"), "zz{Enter}");
    expect(screen.getByRole("status").textContent).toBe("Nothing found. Try a case number or part of a title.");
    expect(onChoose).not.toHaveBeenCalled();
  });

  it.each(["{Control>}k{/Control}", "{Meta>}K{/Meta}"])("opens on %s from anywhere on the page, and not on k alone", async (keys) => {
    const onFind = vi.fn();
    render(<FindButton onFind={onFind} />);
    await userEvent.keyboard("k");
    expect(onFind).not.toHaveBeenCalled();
    await userEvent.keyboard(keys);
    expect(onFind).toHaveBeenCalledOnce();
  });
});

describe("Mark", () => {
  it("is decoration beside the name and a named picture alone", () => {
    const { container } = render(<Mark />);
    expect(container.querySelector("svg")?.getAttribute("aria-hidden")).toBe("true");
    render(<Mark title="Saddlemark" />);
    expect(screen.getByRole("img", { name: "Saddlemark" })).toBeDefined();
  });
});

describe("EmptyState", () => {
  it("says what belongs here and what to do first", () => {
    render(<EmptyState title="No cases yet" text="Describe the system you want to solve." action={<Link href="/cases/new">Describe a case</Link>} />);
    expect(screen.getByRole("heading", { name: "No cases yet" })).toBeDefined();
    expect(screen.getByRole("link", { name: "Describe a case" }).getAttribute("href")).toBe("/cases/new");
  });
});

describe("Caution", () => {
  it.each([/not a guarantee/, /mesh is right/, /licensed practice/, /take the node down/])("says %s", (words) => {
    render(<Caution />);
    expect(screen.getByRole("note").textContent).toMatch(words);
  });
});
