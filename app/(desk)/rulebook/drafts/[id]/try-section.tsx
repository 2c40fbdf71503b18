"use client";

import { useQuery } from "@tanstack/react-query";
import { useEffect, useState, type ComponentProps } from "react";
import { TryPanel } from "@/components/rulebook/try-panel";
import { Notice } from "@/components/ui/notice";
import type { DraftView } from "@/lib/api/contract/drafts";
import { problemText } from "@/lib/queries/call-api";
import { trialQuery } from "@/lib/queries/rulebook";

const pauseMilliseconds = 500;

type TrySectionProps = { rules: DraftView["rules"]; rule: ComponentProps<typeof TryPanel>["rule"]; /** The rules are free of errors. */ free: boolean };

/** Tries the rules as they stand on a chosen case; asks again when the typing rests. */
export function TrySection({ rules, rule, free }: TrySectionProps) {
  const [caseNumber, setCaseNumber] = useState("");
  const settled = useSettled(rules);
  const { data, error, isFetching } = useQuery(trialQuery(caseNumber, settled, free));
  const notice = !free ? (
    <p className="text-sm text-faint">Mend the errors first; then the ranking follows your changes.</p>
  ) : error !== null ? (
    <Notice tone="bad">{problemText(error)}</Notice>
  ) : caseNumber === "" ? (
    <p className="text-sm text-faint">Choose a case to see which conditions hold there and what would come first.</p>
  ) : (
    <p role="status" className="text-sm text-faint">{isFetching ? "Asking what these rules say." : ""}</p>
  );
  return <TryPanel rule={rule} trial={data ?? null} notice={notice} onChoose={setCaseNumber} />;
}

function useSettled<Value>(value: Value): Value {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), pauseMilliseconds);
    return () => clearTimeout(timer);
  }, [value]);
  return settled;
}
