"use client";

import { useId, useState, type KeyboardEvent } from "react";
import { cn } from "@/components/ui/cn";
import { Dialog, DialogContent, DialogTitle } from "@/components/ui/dialog";

export type FindItem = { id: string; label: string; /** Heading under which it is listed. */ group: string; hint?: string };

type FindDialogProps = {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  items: readonly FindItem[];
  /** Told of each change of the text. Without it the items are filtered here by their labels. */
  onSearch?: (text: string) => void;
  onChoose: (item: FindItem) => void;
  busy?: boolean;
};

/** One box to go anywhere: type, arrow down, Enter. */
export function FindDialog({ open, onOpenChange, items, onSearch, onChoose, busy = false }: FindDialogProps) {
  return (
    <Dialog open={open} onOpenChange={onOpenChange}>
      <DialogContent aria-describedby={undefined} className="top-[12dvh] max-w-xl translate-y-0 gap-3">
        <DialogTitle>Find</DialogTitle>
        <FindBox items={items} busy={busy} onChoose={onChoose} {...(onSearch === undefined ? {} : { onSearch })} />
      </DialogContent>
    </Dialog>
  );
}

function FindBox({ items, onSearch, onChoose, busy }: Pick<FindDialogProps, "items" | "onSearch" | "onChoose" | "busy">) {
  const [text, setText] = useState("");
  const [active, setActive] = useState(0);
  const listId = useId();
  const wanted = text.trim().toLowerCase();
  const shown = onSearch === undefined ? items.filter((item) => `${item.label} ${item.hint ?? ""}`.toLowerCase().includes(wanted)) : items;
  const current = Math.min(active, shown.length - 1);

  function onKeyDown(event: KeyboardEvent): void {
    const chosen = shown[current];
    if (event.key === "Enter" && chosen !== undefined) onChoose(chosen);
    else if (event.key === "ArrowDown") setActive(Math.min(current + 1, shown.length - 1));
    else if (event.key === "ArrowUp") setActive(Math.max(current - 1, 0));
    else return;
    event.preventDefault();
  }

  return (
    <>
      <input
        role="combobox"
        aria-label="Find a case or page"
        aria-expanded={shown.length > 0}
        aria-controls={listId}
        aria-autocomplete="list"
        aria-activedescendant={shown.length > 0 ? `${listId}-${current}` : undefined}
        placeholder="A case number, a title, a page"
        value={text}
        onChange={(event) => {
          setText(event.target.value);
          setActive(0);
          onSearch?.(event.target.value);
        }}
        onKeyDown={onKeyDown}
        className="h-11 w-full rounded-sheet border border-contour bg-sheet px-3 text-base placeholder:text-faint"
      />
      <FindList id={listId} items={shown} active={current} onPoint={setActive} onChoose={onChoose} />
      <p role="status" className="text-xs text-faint">
        {busy ? "Searching" : shown.length === 0 ? "Nothing found. Try a case number or part of a title." : `${shown.length} found`}
      </p>
    </>
  );
}

type FindListProps = { id: string; items: readonly FindItem[]; active: number; onPoint: (index: number) => void; onChoose: (item: FindItem) => void };

function FindList({ id, items, active, onPoint, onChoose }: FindListProps) {
  return (
    <ul id={id} role="listbox" aria-label="Results" className={cn("max-h-[45dvh] overflow-y-auto", items.length === 0 && "hidden")}>
      {items.map((item, index) => (
        <li
          key={item.id}
          id={`${id}-${index}`}
          role="option"
          aria-selected={index === active}
          ref={index === active ? scrollIntoSight : undefined}
          onMouseMove={() => onPoint(index)}
          onClick={() => onChoose(item)}
          className="flex cursor-pointer items-baseline justify-between gap-4 rounded-sheet px-3 py-2 text-sm aria-selected:bg-ink aria-selected:text-sheet"
        >
          <span className="min-w-0 truncate">{item.label}</span>
          <span className="shrink-0 text-xs opacity-85">{item.hint ?? item.group}</span>
        </li>
      ))}
    </ul>
  );
}

function scrollIntoSight(element: HTMLElement | null): void {
  element?.scrollIntoView?.({ block: "nearest" });
}
