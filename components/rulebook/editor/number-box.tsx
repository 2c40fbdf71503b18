"use client";

import { useState, type ComponentProps } from "react";
import { Input } from "@/components/ui/input";

type NumberBoxProps = Omit<ComponentProps<typeof Input>, "value" | "onChange" | "type"> & { value: number; onNumber: (value: number) => void };

/** A box for one number, such as 0.5 or 2e6. While what stands in it is no number, the last one that was stays in force. */
export function NumberBox({ value, onNumber, ...props }: NumberBoxProps) {
  const [text, setText] = useState(String(value));
  const read = numberOf(text);
  // Changed from outside, by undo or in the JSON.
  if (read !== null && read !== value) setText(String(value));
  return (
    <Input
      {...props}
      inputMode="decimal"
      value={text}
      aria-invalid={read === null || props["aria-invalid"]}
      title={read === null ? `Write a number, such as 0.5 or 2e6. ${String(value)} stays in force until then.` : undefined}
      onChange={(event) => {
        setText(event.target.value);
        const number = numberOf(event.target.value);
        if (number !== null) onNumber(number);
      }}
      onBlur={() => read === null && setText(String(value))}
    />
  );
}

/** Null for what is no finite number. Thin and plain spaces between digits are allowed. */
export function numberOf(text: string): number | null {
  const plain = text.replaceAll(/[\s\u202f]/g, "");
  if (plain === "") return null;
  const number = Number(plain);
  return Number.isFinite(number) ? number : null;
}
