"use client";

import dynamic from "next/dynamic";
import { useSyncExternalStore } from "react";
import { noNotices, presentNotices, subscribeNotices } from "./notify";

const ToastStack = dynamic(() => import("./toast-stack").then((module) => module.ToastStack), { ssr: false });

/** Shows what `notify` says; loads its script with the first notice. */
export function Toaster() {
  const notices = useSyncExternalStore(subscribeNotices, presentNotices, noNotices);
  return notices.length === 0 ? null : <ToastStack notices={notices} />;
}
