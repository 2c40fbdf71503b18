/** Ways in which logs get damaged between the solver and the reader. Each is a pure function of the text. */
export type Damage = { name: string; apply: (text: string) => string };

function mapLines(change: (line: string, index: number) => string): (text: string) => string {
  return (text) => text.split("\n").map((line, index) => (line === "" ? line : change(line, index))).join("\n");
}

function wrapAt(width: number): (text: string) => string {
  return (text) =>
    text
      .split("\n")
      .map((line) => line.match(new RegExp(`.{1,${width}}`, "g"))?.join("\n") ?? line)
      .join("\n");
}

function wrapWordsAt(width: number): (text: string) => string {
  return (text) =>
    text
      .split("\n")
      .map((line) => line.match(new RegExp(`.{1,${width}}(?: |$)|.{${width}}`, "g"))?.join("\n") ?? line)
      .join("\n");
}

const escape = "\u001b";

/** Damage that takes no information away: the values must come out the same. */
export const harmless: readonly Damage[] = [
  { name: "CRLF ends of line", apply: (text) => text.replaceAll("\n", "\r\n") },
  { name: "CR CR LF ends of line", apply: (text) => text.replaceAll("\n", "\r\r\n") },
  { name: "byte order mark", apply: (text) => `\u00ef\u00bb\u00bf${text}` },
  { name: "whole lines coloured", apply: mapLines((line) => `${escape}[1;32m${line}${escape}[0m`) },
  { name: "numbers coloured", apply: (text) => text.replace(/\d+\.\d+e[+-]\d+/g, (number) => `${escape}[33m${number}${escape}[39m`) },
  { name: "hyperlink sequences", apply: mapLines((line) => `${escape}]8;;x${escape}\\${line}${escape}]8;;${escape}\\`) },
  { name: "time stamps with a bar", apply: mapLines((line) => `2026-12-01T04:26:27.123Z | ${line}`) },
  { name: "time stamps in brackets", apply: mapLines((line) => `[2026-12-01 04:26:27] ${line}`) },
  { name: "time of day", apply: mapLines((line) => `04:26:27 ${line}`) },
  { name: "srun labels", apply: mapLines((line) => `0: ${line}`) },
  { name: "wide srun labels", apply: mapLines((line) => `  0: ${line}`) },
  { name: "bracketed ranks", apply: mapLines((line) => `[0] ${line}`) },
  { name: "Open MPI tags", apply: mapLines((line) => `[1,0]<stdout>:${line}`) },
  { name: "text before and after", apply: (text) => `Loading modules\nassembly took 12.5 s\n${text}\nJob done\nelapsed 31 s\n` },
  { name: "prose of other ranks between the lines", apply: mapLines((line, index) => (index % 3 === 0 ? `0: ${line}\n1: waiting` : `0: ${line}`)) },
  { name: "blank lines between", apply: mapLines((line, index) => (index % 4 === 0 ? `${line}\n` : line)) },
  { name: "trailing spaces", apply: mapLines((line) => `${line}   `) },
  { name: "progress overwritten by CR", apply: mapLines((line, index) => (index % 5 === 0 ? `working 12 %\r${line}` : line)) },
  { name: "a 60 kB line in front", apply: (text) => `${"x".repeat(60_000)}\n${text}` },
  { name: "bytes outside ASCII", apply: (text) => `# r\u00e9sultat \u00ff\u0080\n${text}` },
];

/** Damage that takes information away or makes it doubtful: every value must be right or null. */
export const harmful: readonly Damage[] = [
  ...[0.02, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 0.97, 0.995].map((share) => ({
    name: `cut after ${100 * share} %`,
    apply: (text: string) => text.slice(0, Math.floor(share * text.length)),
  })),
  ...[1, 2, 3, 5, 8].map((characters) => ({
    name: `every seventh line cut ${characters} characters short`,
    apply: mapLines((line, index) => (index % 7 === characters % 7 ? line.slice(0, -characters) : line)),
  })),
  ...[0.05, 0.25, 0.5].map((share) => ({ name: `first ${100 * share} % missing`, apply: (text: string) => text.slice(Math.floor(share * text.length)) })),
  ...[[0.01, 0.06], [0.1, 0.3], [0.3, 0.6], [0.5, 0.9]].map(([from = 0, to = 1]) => ({
    name: `hole from ${100 * from} to ${100 * to} %`,
    apply: (text: string) => text.slice(0, Math.floor(from * text.length)) + text.slice(Math.floor(to * text.length)),
  })),
  ...[2, 3, 7].map((every) => ({ name: `every ${every}th line missing`, apply: (text: string) => text.split("\n").filter((_, index) => index % every !== 1).join("\n") })),
  ...[40, 60, 72, 80, 100, 132].map((width) => ({ name: `wrapped at ${width} columns`, apply: wrapAt(width) })),
  ...[40, 80, 120].map((width) => ({ name: `words wrapped at ${width} columns`, apply: wrapWordsAt(width) })),
  { name: "every line twice", apply: (text) => text.split("\n").map((line) => `${line}\n${line}`).join("\n") },
  { name: "whole log twice", apply: (text) => text + text },
  { name: "two copies line by line from two ranks", apply: mapLines((line) => `0: ${line}\n1: ${line}`) },
  { name: "decimal commas", apply: (text) => text.replace(/(\d)\.(\d)/g, "$1,$2") },
  { name: "thousands separated", apply: (text) => text.replace(/\b(\d{1,3})(\d{3})(\d{3})\b/g, "$1,$2,$3") },
  { name: "indentation lost", apply: mapLines((line) => line.trimStart()) },
  { name: "spaces squeezed", apply: mapLines((line) => line.replace(/ +/g, " ")) },
  { name: "tabs for spaces", apply: mapLines((line) => line.replace(/ {2}/g, "\t")) },
  { name: "quoted as mail", apply: mapLines((line) => `> ${line}`) },
  { name: "lines reversed", apply: (text) => text.split("\n").reverse().join("\n") },
  { name: "halves swapped", apply: (text) => text.slice(text.length / 2) + text.slice(0, text.length / 2) },
  { name: "last line not ended", apply: (text) => text.trimEnd() },
  { name: "line ends lost in pairs", apply: (text) => text.replace(/\n([^\n]*)\n/g, "$1\n") },
  { name: "old Macintosh ends of line", apply: (text) => text.replaceAll("\n", "\r") },
  { name: "upper case", apply: (text) => text.toUpperCase() },
  { name: "digits overwritten", apply: (text) => text.replace(/e-0(\d)/g, "e-*$1") },
  { name: "nan for every residual", apply: (text) => text.replace(/norm +\d\.\d+e[+-]\d+/g, "norm nan") },
];
