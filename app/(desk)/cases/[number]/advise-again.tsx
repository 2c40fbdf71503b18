"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { RefreshCw } from "lucide-react";
import { notify } from "@/components/ui/notify";
import { Button } from "@/components/ui/button";
import { callApi, problemText } from "@/lib/queries/call-api";
import { caseKeys } from "@/lib/queries/cases";

/** Asks for new advice under the live edition and the present record; the old advice stays as it was given. */
export function AdviseAgain({ reference }: { reference: string }) {
  const queryClient = useQueryClient();
  const again = useMutation({
    mutationFn: () => callApi<{ changes: unknown[] }>(`/cases/${reference}/advice`, { method: "POST" }),
    onSuccess: async ({ changes }) => {
      await queryClient.invalidateQueries({ queryKey: caseKeys.all });
      notify(changes.length === 0 ? "New advice: it says the same as before." : "New advice: what changed stands above the ranking.");
    },
    onError: (error) => notify(problemText(error)),
  });
  return (
    <Button onClick={() => again.mutate()} disabled={again.isPending}>
      <RefreshCw aria-hidden className={again.isPending ? "animate-spin motion-reduce:animate-none" : ""} /> Advise again
    </Button>
  );
}
