"use client";

import { useState, useTransition } from "react";
import { notify } from "@/components/ui/notify";
import { AlertDialog, AlertDialogAction, AlertDialogCancel, AlertDialogContent, AlertDialogDescription, AlertDialogTitle, AlertDialogTrigger } from "@/components/ui/alert-dialog";
import { Button } from "@/components/ui/button";
import { DialogActions } from "@/components/ui/dialog";
import type { FormResult } from "@/lib/auth/form-answer";

type Props = {
  /** The verb on the button and in the question. */
  label: string;
  /** Names the thing for those who can't see the row. */
  accessibleLabel: string;
  title: string;
  text: string;
  act: () => Promise<FormResult<void>>;
  done: string;
  onDone?: () => void;
};

/** A button that asks first. */
export function ConfirmButton({ label, accessibleLabel, title, text, act, done, onDone }: Props) {
  const [open, setOpen] = useState(false);
  const [busy, start] = useTransition();

  function confirm(): void {
    start(async () => {
      const result = await act();
      setOpen(false);
      if (!result.ok) {
        notify(result.message, "error");
        return;
      }
      notify(done, "success");
      onDone?.();
    });
  }

  return (
    <AlertDialog open={open} onOpenChange={setOpen}>
      <AlertDialogTrigger asChild>
        <Button size="small" aria-label={accessibleLabel}>
          {label}
        </Button>
      </AlertDialogTrigger>
      <AlertDialogContent>
        <AlertDialogTitle>{title}</AlertDialogTitle>
        <AlertDialogDescription>{text}</AlertDialogDescription>
        <DialogActions>
          <AlertDialogCancel>Keep</AlertDialogCancel>
          <AlertDialogAction
            disabled={busy}
            onClick={(event) => {
              // Stays open until the answer is there.
              event.preventDefault();
              confirm();
            }}
          >
            {label}
          </AlertDialogAction>
        </DialogActions>
      </AlertDialogContent>
    </AlertDialog>
  );
}
