"use client";

import { ChevronDown } from "lucide-react";
import { useFormContext, useFormState } from "react-hook-form";
import { useState } from "react";
import { Collapsible, CollapsibleContent, CollapsibleTrigger } from "@/components/ui/collapsible";
import type { FormValues } from "@/lib/questionnaire/form-values";
import { NumberQuestion } from "./question-field";

/** Answers whose default fits most cases; opens by itself when one of them was refused. */
export function MoreQuestions() {
  const { control } = useFormContext<FormValues>();
  const { errors } = useFormState({ control });
  const [open, setOpen] = useState(false);
  const refused = Boolean(errors.domainVolume ?? errors.aspectRatio ?? errors.coefficientScale ?? errors.anisotropy ?? errors.hardware?.timeLimitSeconds);
  return (
    <Collapsible open={open || refused} onOpenChange={setOpen} className="border-y border-hairline">
      <CollapsibleTrigger className="group flex min-h-11 w-full items-center justify-between gap-3 text-left text-sm font-semibold">
        <span>
          More answers <span className="font-normal text-faint">volume, scale, anisotropy, aspect ratio, time limit: the defaults fit most cases</span>
        </span>
        <ChevronDown aria-hidden className="size-4 shrink-0 transition-transform group-data-[state=open]:rotate-180" />
      </CollapsibleTrigger>
      <CollapsibleContent>
        <div className="grid items-start gap-x-6 gap-y-5 pt-2 pb-5 sm:grid-cols-2">
          <NumberQuestion name="domainVolume" />
          <NumberQuestion name="aspectRatio" />
          <NumberQuestion name="coefficientScale" />
          <NumberQuestion name="anisotropy" />
          <NumberQuestion name="hardware.timeLimitSeconds" />
        </div>
      </CollapsibleContent>
    </Collapsible>
  );
}
