import { setValue, type Assembly } from "@/lib/logs/assembly";
import { countOf } from "@/lib/logs/mumps-reader";
import { heldFactors } from "@/lib/logs/recognise-strategy";
import { lineOf, numberOf, wordOf, type ViewNode } from "@/lib/logs/solver-view";

/** The factorisation that the strategy holds: kind, package, entries, and what MUMPS reports of it. */
export function assembleFactor(assembly: Assembly): void {
  const { view, problems } = assembly;
  const factors = view === null ? [] : heldFactors(view);
  if (factors.length > 1) {
    problems.add("note", factors[1]?.line ?? null, `The solver holds ${factors.length} factorisations; their figures are left open.`);
    return;
  }
  const [factor] = factors;
  const kind = kindOf(assembly);
  if (kind !== null) setValue(assembly, "factorisation", kind.value, kind.line);
  if (factor === undefined) return reportOwnStatistics(assembly);
  setValue(assembly, "factorPackage", wordOf(factor, "package"), lineOf(factor, "package"));
  if (wordOf(factor, "package") === "mumps") reportMumps(assembly, factor);
  else if (wordOf(factor, "package") === "petsc") setValue(assembly, "factorEntries", numberOf(factor, "nonzeros"), lineOf(factor, "nonzeros"));
}

function kindOf({ view }: Assembly): { value: "lu" | "cholesky"; line: number } | null {
  const pc = view?.preconditioner ?? null;
  if (pc === null) return null;
  for (const node of [pc, ...pc.children]) {
    const type = node.kind === "PC" ? node.type.value : null;
    if ((type === "lu" || type === "cholesky") && node.type.line !== null) return { value: type, line: node.type.line };
  }
  return null;
}

function reportMumps(assembly: Assembly, factor: ViewNode): void {
  const { program, result, problems } = assembly;
  const read = (name: string) => numberOf(factor, name);
  const counted = (name: string) => {
    const value = read(name);
    return value === null ? null : countOf(value);
  };
  const entries = counted("INFOG(29)");
  const line = lineOf(factor, "INFOG(29)");
  result.mumps = {
    version: program.mumps.version,
    errorCode: program.failure.mumpsCode?.code ?? program.mumps.value("INFOG(1)")?.value ?? null,
    errorDetail: program.failure.mumpsCode?.detail ?? program.mumps.value("INFOG(2)")?.value ?? null,
    estimatedEntries: counted("INFOG(20)"),
    entries,
    compressedEntries: counted("INFOG(35)"),
    factorFlops: read("RINFOG(3)"),
    memoryMegabytesSum: read("INFOG(22)"),
    memoryMegabytesMax: read("INFOG(21)"),
    delayedPivots: read("INFOG(13)"),
    nullPivots: read("INFOG(28)"),
  };
  const own = program.mumps.value("INFOG(29)");
  if (own !== null && entries !== null && countOf(own.value) !== entries) {
    problems.add("warning", own.line, `MUMPS prints ${own.value} factor entries, the solver view ${entries}; they are left open.`);
    return;
  }
  if (entries !== null && entries > 0) setValue(assembly, "factorEntries", entries, line);
}

/** MUMPS' own output where no solver view was printed. */
function reportOwnStatistics(assembly: Assembly): void {
  const { program, result, view } = assembly;
  const { mumps, failure } = program;
  const code = failure.mumpsCode;
  if (view !== null || (mumps.version === null && code === null)) return;
  const read = (name: string) => mumps.value(name)?.value ?? null;
  const counted = (name: string) => {
    const value = read(name);
    return value === null ? null : countOf(value);
  };
  result.mumps = {
    version: mumps.version,
    errorCode: code?.code ?? read("INFOG(1)"),
    errorDetail: code?.detail ?? read("INFOG(2)"),
    estimatedEntries: counted("INFOG(20)"),
    entries: counted("INFOG(29)"),
    compressedEntries: null,
    factorFlops: read("RINFOG(3)"),
    memoryMegabytesSum: read("INFOG(22)"),
    memoryMegabytesMax: null,
    delayedPivots: read("INFOG(13)"),
    nullPivots: null,
  };
  if (mumps.distinct("INFOG(29)") > 1) {
    assembly.problems.add("note", null, "MUMPS reports several factorisations; their entries are left open.");
  } else setValue(assembly, "factorEntries", result.mumps.entries, mumps.value("INFOG(29)")?.line ?? null);
}
