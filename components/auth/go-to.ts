/** Loads another page afresh: after signing in or out, or changing the team, nothing fetched before may stay in the browser. */
export function goTo(address: string): void {
  window.location.assign(address);
}
