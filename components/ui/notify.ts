export const noticeKinds = ["plain", "success", "error"] as const;
export type NoticeKind = (typeof noticeKinds)[number];
export type ShortNotice = { id: number; text: string; kind: NoticeKind };

const none: readonly ShortNotice[] = [];
let notices: readonly ShortNotice[] = none;
const listeners = new Set<() => void>();

/** A short answer to what the person just did. The first one loads what shows them. */
export function notify(text: string, kind: NoticeKind = "plain"): void {
  notices = [...notices.slice(-20), { id: (notices.at(-1)?.id ?? 0) + 1, text, kind }];
  for (const listener of listeners) listener();
}

export function subscribeNotices(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function presentNotices(): readonly ShortNotice[] {
  return notices;
}

export function noNotices(): readonly ShortNotice[] {
  return none;
}
