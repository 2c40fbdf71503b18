import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { z } from "zod";

const optionalNumber = z.string().transform((text) => (text === "" ? null : Number(text)));
const number = z.coerce.number();

const rowSchema = z.object({
  run_id: z.string(),
  group: z.string(),
  mesh_family: z.enum(["structured_tet", "jittered_tet", "structured_hex"]),
  n_div: number,
  cells: number,
  faces: number,
  faces_boundary: number,
  family: z.enum(["RT", "BDM", "NCF"]),
  degree: number,
  unknowns_velocity: number,
  unknowns_pressure: number,
  unknowns_total: number,
  nnz_A: number,
  nnz_B: number,
  contrast: number,
  pattern: z.enum(["uniform", "checkerboard4", "layers4"]),
  bc: z.enum(["flux", "pressure"]),
  rhs: z.string(),
  ranks: number,
  concurrent_jobs: number,
  solver: z.string(),
  variant: z.string(),
  gamma: optionalNumber,
  rtol: number,
  status: z.string(),
  iterations: optionalNumber,
  true_rel_residual: optionalNumber,
  form_wall_s: optionalNumber,
  setup_wall_s: optionalNumber,
  solve_wall_s: optionalNumber,
  rss_base_MiB_sum: optionalNumber,
  rss_peak_MiB_sum: optionalNumber,
  nnz_pc_block: optionalNumber,
  mumps_infog7_ordering: z.string(),
  mumps_infog29_entries: optionalNumber,
  mumps_rinfog3_flops: optionalNumber,
  mumps_infog22_MB_sum: optionalNumber,
});
export type MeasuredRun = z.infer<typeof rowSchema>;

const dataFolder = new URL("../../data/", import.meta.url);

/** All measured runs of tests/reference/data/runs.csv. */
export function readRuns(): MeasuredRun[] {
  return readTable("runs.csv").map((row) => rowSchema.parse(row));
}

/** A table of the data folder as records by column name. */
export function readTable(name: string): Record<string, string>[] {
  const [header = [], ...rows] = parseCsv(readFileSync(fileURLToPath(new URL(name, dataFolder)), "utf8"));
  return rows.map((row) => Object.fromEntries(header.map((column, index) => [column, row[index] ?? ""])));
}

/** RFC 4180: quoted fields may hold commas, line ends and doubled quotes. */
function parseCsv(text: string): string[][] {
  const rows: string[][] = [];
  let row: string[] = [];
  let field = "";
  let quoted = false;
  for (let i = 0; i < text.length; i += 1) {
    const character = text[i] ?? "";
    if (quoted) {
      if (character !== '"') field += character;
      else if (text[i + 1] === '"') {
        field += '"';
        i += 1;
      } else quoted = false;
    } else if (character === '"') quoted = true;
    else if (character === "," || character === "\n") {
      row.push(field);
      field = "";
      if (character === "\n") {
        rows.push(row);
        row = [];
      }
    } else if (character !== "\r") field += character;
  }
  if (field !== "" || row.length > 0) rows.push([...row, field]);
  return rows;
}
