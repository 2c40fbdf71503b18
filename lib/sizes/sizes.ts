import { z } from "zod";

const count = z.number().min(0);

/** All that follows from the answers by counting. Counts are of unknowns before any boundary condition; spacing in the domain's length unit. */
export const sizesSchema = z.object({
  cells: count,
  faces: count,
  boundaryFaces: count,
  facesPerCell: z.number(),
  /** h = (domainVolume / cells)^(1/3) */
  spacing: z.number(),
  /** Edge count n of a structured mesh (cubes, Kuhn tetrahedra, octahedra lattice), else null. */
  divisions: z.number().nullable(),
  velocityUnknowns: count,
  pressureUnknowns: count,
  unknowns: count,
  eliminatedVelocityUnknowns: count,
  perFace: z.number(),
  perCellVelocity: z.number(),
  perCellPressure: z.number(),
  nonzeros: z.object({ velocityBlock: count, divergenceBlock: count, total: count }),
  /** Structural nonzeros of B diag(A)^-1 B^T. */
  schurNonzeros: count,
  /** True where counts are exact (structured, imported), false where they are published means of random meshes. */
  exact: z.boolean(),
});
export type Sizes = z.infer<typeof sizesSchema>;
