/** One line of CSV (RFC 4180) without its line end. Text that a spreadsheet would run as a formula gets an apostrophe in front. */
export function csvLine(cells: readonly (string | number | boolean | null)[]): string {
  return cells.map(csvCell).join(",");
}

export const csvLineEnd = "\r\n";

function csvCell(cell: string | number | boolean | null): string {
  if (cell === null) return "";
  if (typeof cell !== "string") return String(cell);
  const text = /^[=+\-@\t\r]/.test(cell) ? `'${cell}` : cell;
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
