/** ISO date of the last day of a month such as "2026-11". */
export function monthEnd(month: string): string {
  const [year = 0, number = 1] = month.split("-").map(Number);
  return new Date(Date.UTC(year, number, 0)).toISOString().slice(0, 10);
}
