import type { BaseSyntheticEvent, ReactNode } from "react";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";

type FormBodyProps = { send: (event?: BaseSyntheticEvent) => Promise<void>; problem: string | null; busy: boolean; submit: string; /** "plain" where the page has several forms. */ variant?: "main" | "plain"; children: ReactNode };

/** Fields, then what is wrong with the whole, then the one button. `noValidate`: our sentences, not the browser's bubbles. */
export function FormBody({ send, problem, busy, submit, variant = "main", children }: FormBodyProps) {
  return (
    // Until the script has loaded, a plain submit must not put a password into the address.
    <form method="post" noValidate onSubmit={(event) => void send(event)} className="grid gap-4">
      {children}
      {problem !== null && (
        <Notice tone="bad" announce>
          {problem}
        </Notice>
      )}
      <Button type="submit" variant={variant} disabled={busy} className="justify-self-start">
        {submit}
      </Button>
    </form>
  );
}
