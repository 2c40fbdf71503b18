// @vitest-environment jsdom
import { cleanup, render, screen } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { useState } from "react";
import { afterEach, describe, expect, it, vi } from "vitest";
import { Button } from "@/components/ui/button";
import { CodeBlock } from "@/components/ui/code-block";
import { Dialog, DialogContent, DialogTitle, DialogTrigger } from "@/components/ui/dialog";
import { Field, FieldSet } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { Quantity, QuantityRange } from "@/components/ui/quantity";
import { SegmentedControl } from "@/components/ui/segmented-control";
import { Select } from "@/components/ui/select";
import { Table, TableBody, TableCell, TableHead, TableHeader, TableRow } from "@/components/ui/table";

// jsdom has no CSS.escape, which the test library needs to find the group of a radio button; ids of React need no escaping.
vi.stubGlobal("CSS", { escape: (text: string) => text });

afterEach(cleanup);

function describedBy(element: HTMLElement): string[] {
  return (element.getAttribute("aria-describedby") ?? "").split(" ").filter(Boolean).map((id) => document.getElementById(id)?.textContent ?? `no element ${id}`);
}

describe("Field", () => {
  it("links label, help and error to the control inside and marks it invalid", () => {
    render(
      <Field label="Memory per node" help="What one node has." error="Memory must be above 0 GiB." required>
        <Input defaultValue="0" />
      </Field>,
    );
    const box = screen.getByLabelText("Memory per node");
    expect(describedBy(box)).toEqual(["What one node has.", "Memory must be above 0 GiB."]);
    expect(box.getAttribute("aria-invalid")).toBe("true");
    expect(box.getAttribute("aria-required")).toBe("true");
  });

  it("claims neither error nor description where there is none", () => {
    render(
      <Field label="Mesh family">
        <Select>
          <option>cubes</option>
        </Select>
      </Field>,
    );
    const box = screen.getByLabelText("Mesh family");
    expect(box.hasAttribute("aria-describedby")).toBe(false);
    expect(box.hasAttribute("aria-invalid")).toBe(false);
  });

  it("announces an error that appears later", () => {
    const form = (error?: string) => (
      <Field label="Degree" error={error}>
        <Input />
      </Field>
    );
    const { rerender } = render(form());
    rerender(form("Degrees run from 1 to 6."));
    expect(screen.getByText("Degrees run from 1 to 6.").getAttribute("aria-live")).toBe("polite");
  });

  it("gives several controls one name and one description", () => {
    render(
      <FieldSet legend="Boundary" help="One of two." error="Choose one.">
        <input type="radio" aria-label="flux" />
      </FieldSet>,
    );
    expect(describedBy(screen.getByRole("group", { name: "Boundary" }))).toEqual(["One of two.", "Choose one."]);
  });
});

describe("SegmentedControl", () => {
  function Host({ onChoose }: { onChoose: (value: string) => void }) {
    const [value, setValue] = useState<"time" | "memory" | "robustness">("time");
    return (
      <SegmentedControl
        legend="Priority"
        options={[
          { value: "time", label: "Time" },
          { value: "memory", label: "Memory" },
          { value: "robustness", label: "Robustness", disabled: true },
        ]}
        value={value}
        onValueChange={(next) => {
          setValue(next);
          onChoose(next);
        }}
      />
    );
  }

  it("is a named group of radio buttons that the arrow keys move through", async () => {
    const onChoose = vi.fn();
    render(<Host onChoose={onChoose} />);
    expect(screen.getByRole("group", { name: "Priority" })).toBeDefined();
    await userEvent.click(screen.getByRole("radio", { name: "Time" }));
    await userEvent.keyboard("{ArrowRight}");
    expect(onChoose).toHaveBeenLastCalledWith("memory");
    expect(screen.getByRole("radio", { name: "Memory" })).toHaveProperty("checked", true);
  });
});

describe("Dialog", () => {
  it("opens by keyboard, takes the focus, closes on Escape and gives the focus back", async () => {
    render(
      <Dialog>
        <DialogTrigger asChild>
          <Button>Withdraw</Button>
        </DialogTrigger>
        <DialogContent aria-describedby={undefined}>
          <DialogTitle>Withdraw this run</DialogTitle>
        </DialogContent>
      </Dialog>,
    );
    await userEvent.tab();
    await userEvent.keyboard("{Enter}");
    const dialog = screen.getByRole("dialog", { name: "Withdraw this run" });
    expect(dialog.contains(document.activeElement)).toBe(true);
    await userEvent.keyboard("{Escape}");
    expect(screen.queryByRole("dialog")).toBeNull();
    expect(document.activeElement).toBe(screen.getByRole("button", { name: "Withdraw" }));
  });
});

describe("CodeBlock", () => {
  it("copies the whole text and says so", async () => {
    const user = userEvent.setup();
    render(<CodeBlock title="PETSc options" code={"-ksp_type minres\n"} fileName="case-12.opts" />);
    await user.click(screen.getByRole("button", { name: "Copy PETSc options" }));
    expect(await navigator.clipboard.readText()).toBe("-ksp_type minres\n");
    expect(screen.getByRole("status").textContent).toBe("Copied.");
  });

  it("says what to do where the browser refuses to copy", async () => {
    const user = userEvent.setup();
    vi.spyOn(navigator.clipboard, "writeText").mockRejectedValueOnce(new Error("denied"));
    render(<CodeBlock title="Options" code="x" />);
    await user.click(screen.getByRole("button", { name: "Copy Options" }));
    expect(screen.getByRole("status").textContent).toBe("The browser refused to copy. Select the text and copy it by hand.");
    expect(screen.queryByRole("button", { name: /Download/ })).toBeNull();
  });
});

describe("Quantity", () => {
  it("is short on screen and full on hover", () => {
    const { container } = render(
      <>
        <Quantity value={42.3178} unit="seconds" />
        <Quantity value={null} unit="gibibytes" />
        <QuantityRange low={31.25} high={58} unit="seconds" />
      </>,
    );
    const shown = [...container.querySelectorAll("span")].map((span) => [span.textContent, span.title].map((text) => text?.replaceAll("\u202f", " ")));
    expect(shown).toEqual([
      ["42 s", "42.3178 s"],
      ["–", "not known"],
      ["31 to 58 s", "31.25 s to 58 s"],
    ]);
  });
});

describe("Notice", () => {
  it.each([
    ["bad", true, "alert", "Error: Row 14"],
    ["good", true, "status", "Done: Row 14"],
    ["warn", false, "note", "Caution: Row 14"],
  ] as const)("of tone %s (announced: %s) is a %s and says its tone in a word", (tone, announce, role, text) => {
    render(<Notice tone={tone} announce={announce} title="Row 14" />);
    expect(screen.getByRole(role).textContent).toBe(text);
  });
});

describe("Table", () => {
  it("names the box it scrolls in and lets the keyboard reach it", () => {
    render(
      <Table label="Runs">
        <TableHeader>
          <TableRow>
            <TableHead numeric>Time</TableHead>
          </TableRow>
        </TableHeader>
        <TableBody>
          <TableRow>
            <TableCell numeric>42 s</TableCell>
          </TableRow>
        </TableBody>
      </Table>,
    );
    expect(screen.getByRole("region", { name: "Runs" }).tabIndex).toBe(0);
    expect(screen.getByRole("columnheader", { name: "Time" }).getAttribute("scope")).toBe("col");
  });
});

describe("Button", () => {
  it("never submits a form unless told to", () => {
    render(
      <>
        <Button>Copy</Button>
        <Button type="submit">Save</Button>
      </>,
    );
    expect(screen.getAllByRole("button").map((button) => button.getAttribute("type"))).toEqual(["button", "submit"]);
  });
});
