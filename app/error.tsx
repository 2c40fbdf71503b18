"use client";

import { ErrorSheet } from "@/components/layout/error-sheet";

export default function ErrorPage({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return <ErrorSheet {...(error.digest === undefined ? {} : { reference: error.digest })} onRetry={reset} />;
}
