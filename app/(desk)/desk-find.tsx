"use client";

import dynamic from "next/dynamic";
import { useCallback, useState } from "react";
import { FindButton } from "@/components/layout/find-button";

// Loaded at the first search: no page needs the dialog to be shown.
const DeskFindDialog = dynamic(() => import("./desk-find-dialog").then((module) => module.DeskFindDialog), { ssr: false });

/** The band's find box: pages by name, cases by number or title. */
export function DeskFind() {
  const [asked, setAsked] = useState(false);
  const [open, setOpen] = useState(false);
  const show = useCallback(() => {
    setAsked(true);
    setOpen(true);
  }, []);
  return (
    <>
      <FindButton onFind={show} />
      {asked && <DeskFindDialog open={open} onOpenChange={setOpen} />}
    </>
  );
}
