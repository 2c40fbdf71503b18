import { booleanFact, numberFact, type FactDefinition } from "../fact";

const count = (name: string, label: string, description: string): FactDefinition =>
  numberFact({ name, label, plural: true, group: "sizes", range: [0, 1e16], description });

/** Facts that follow from the answers by counting. Random meshes give means, so counts need not be whole. */
export const sizeFacts: readonly FactDefinition[] = [
  count("cells", "cells", "Cells of the mesh."),
  count("faces", "faces", "Faces of the mesh, boundary included."),
  numberFact({ name: "facesPerCell", label: "faces per cell", plural: true, group: "sizes", range: [4, 1e6], description: "Mean number of faces of a cell." }),
  numberFact({
    name: "spacing",
    label: "spacing h",
    unit: "length units",
    group: "sizes",
    range: [0, 1e12],
    description: "Cube root of the domain's volume over the cells.",
  }),
  count("unknowns", "unknowns", "Velocity and pressure unknowns together."),
  count("velocityUnknowns", "velocity unknowns", "Rows of the velocity block."),
  count("pressureUnknowns", "pressure unknowns", "Rows of the divergence block."),
  count("nonzeros", "nonzeros", "Structural nonzeros of the whole matrix, full storage."),
  count("schurNonzeros", "nonzeros of the Schur complement", "Structural nonzeros of B diag(A)⁻¹ Bᵀ."),
  numberFact({
    name: "unknownsPerCore",
    label: "unknowns per core",
    plural: true,
    group: "sizes",
    range: [0, 1e16],
    description: "Unknowns over cores.",
  }),
  booleanFact({ name: "countsExact", label: "counts are exact", group: "sizes", description: "No for random meshes, whose counts are published means." }),
];
