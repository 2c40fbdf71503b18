import { combine, denseMatrix, identity, multiply, transpose, type DenseMatrix } from "../dense";
import type { Point3 } from "../quadrature";
import { outwardNormal, type Polyhedron } from "./polyhedron";
import { faceBasis, meanOn, sampleCell, scalarBasis, vectorBasis, type CellSamples, type GradientField, type ScalarField } from "./sampled-fields";

/**
 * Local velocity mass matrix of the mixed virtual element of degree k on a convex polyhedron, ndof x ndof, for unit coefficient and cell volume 1
 * (both only scale it).
 *
 * Degrees of freedom (Beirao da Veiga, Brezzi, Marini & Russo, Numer. Math. 133, 2016): means over each face of v.n against an orthonormal basis of P_k
 * of the face; means over the cell against an orthonormal basis of grad P_(k-1), then of the complement of grad P_(k+1) in P_k^3, orthogonal in L2. The projection Pi onto P_k^3
 * follows from them by parts: (v, grad q) = -(div v, q) + sum over faces of (v.n, q). The matrix is
 *
 *   M = Piᵀ G Pi + (I - D Pi)ᵀ W (I - D Pi)
 *
 * with G = I in the orthonormal basis, D the degrees of freedom of polynomials and W the stabilisation: h_f times the L2 norm of the normal flux on each face f
 * (weight h_f |f| / |K| on its means, h_f = |f|^(1/2); Brezzi, Falk & Marini, M2AN 48(4), 2014, from memory), 1 on the moments inside. Other bases (plain monomials) and
 * other stabilisations give other diagonals and so another spectrum: with W = I random cells are four times worse conditioned.
 */
export function vemMixedMassMatrix(cell: Polyhedron, degree: number): DenseMatrix {
  return vemMixedMatrices(cell, degree).mass;
}

/**
 * The mass matrix and the divergence block, dim P_(k-1) x ndof: means over the cell of div v against an orthonormal basis of P_(k-1), lengths in
 * units of the cube root of the cell's volume, outward fluxes positive.
 */
export function vemMixedMatrices(cell: Polyhedron, degree: number): { mass: DenseMatrix; divergence: DenseMatrix } {
  const samples = sampleCell(cell, 2 * degree + 2);
  const scalars = scalarBasis(samples, degree + 1);
  const { gradients, complement } = vectorBasis(samples, scalars, degree);
  const faces = cell.faces.map((_, face) => ({ basis: faceBasis(samples, face, degree), normal: outwardNormal(cell, face), area: samples.faceAreas[face] ?? 0 }));
  const perFace = faces[0]?.basis.length ?? 0;
  const innerGradients = polynomials(degree - 1) - 1;
  const dofs = { faces: faces.length * perFace, innerGradients, complement: complement.length, perFace };
  const divergence = divergenceRows({ samples, scalars, gradients, complement, faces, dofs, degree });
  const projection = projectionMatrix({ samples, gradients, complement, faces, dofs }, divergence);
  const evaluation = evaluationMatrix({ samples, gradients, complement, faces, dofs });
  const rest = combine(1, identity(projection.columns), -1, multiply(evaluation, projection));
  return {
    mass: combine(1, multiply(transpose(projection), projection), 1, multiply(transpose(rest), weighted(rest, faces, samples.volume))),
    divergence: denseMatrix(divergence.length, projection.columns, (r, j) => divergence[r]?.row[j] ?? 0),
  };
}

/** W times the rows of `rest`. */
function weighted(rest: DenseMatrix, faces: readonly Face[], volume: number): DenseMatrix {
  const weights = faces.flatMap(({ basis, area }) => basis.map(() => area ** 1.5 / volume));
  return denseMatrix(rest.rows, rest.columns, (i, j) => (weights[i] ?? 1) * (rest.data[i * rest.columns + j] ?? 0));
}

type Face = { basis: ScalarField[]; normal: Point3; area: number };
type Dofs = { faces: number; innerGradients: number; complement: number; perFace: number };
type Local = { samples: CellSamples; gradients: GradientField[]; complement: Float64Array[]; faces: Face[]; dofs: Dofs };

function polynomials(degree: number): number {
  return degree < 0 ? 0 : ((degree + 1) * (degree + 2) * (degree + 3)) / 6;
}

type Scalars = readonly { value: ScalarField; gradient: Float64Array }[];
type Divergence = { value: ScalarField; row: Float64Array };

/** Means of div v against the orthonormal basis of P_(k-1), by parts: fluxes less the moments against gradients. */
function divergenceRows({ samples, scalars, gradients, faces, dofs, degree }: Local & { scalars: Scalars; degree: number }): Divergence[] {
  const count = dofs.faces + dofs.innerGradients + dofs.complement;
  return scalars.slice(0, polynomials(degree - 1)).map((scalar) => {
    const row = fluxRow(scalar.value, samples, faces, count);
    for (let a = 0; a < dofs.innerGradients; a += 1) {
      const field = gradients[a];
      if (field) row[dofs.faces + a] = (row[dofs.faces + a] ?? 0) - samples.innerVector(scalar.gradient, field.vector);
    }
    return { value: scalar.value, row };
  });
}

/** Coefficients of Pi v in the orthonormal basis (gradients, complement) from the degrees of freedom of v. */
function projectionMatrix({ samples, gradients, complement, faces, dofs }: Local, divergences: readonly Divergence[]): DenseMatrix {
  const count = dofs.faces + dofs.innerGradients + dofs.complement;
  const matrix = denseMatrix(gradients.length + complement.length, count);
  gradients.forEach((field, a) => {
    if (a < dofs.innerGradients) {
      matrix.data[a * count + dofs.faces + a] = 1;
      return;
    }
    const row = fluxRow(field.potential, samples, faces, count);
    for (const divergence of divergences) {
      const share = samples.innerScalar(divergence.value, field.potential);
      divergence.row.forEach((entry, j) => (row[j] = (row[j] ?? 0) - share * entry));
    }
    matrix.data.set(row, a * count);
  });
  complement.forEach((_, b) => {
    matrix.data[(gradients.length + b) * count + dofs.faces + dofs.innerGradients + b] = 1;
  });
  return matrix;
}

/** (1/|K|) sum over faces of (v.n, q) as a row over the degrees of freedom: v.n is a polynomial that its moments give. */
function fluxRow(potential: ScalarField, samples: CellSamples, faces: readonly Face[], count: number): Float64Array {
  const row = new Float64Array(count);
  let column = 0;
  faces.forEach(({ basis, area }, face) => {
    for (const psi of basis) {
      row[column] = (area / samples.volume) * meanOn(samples, face, (point) => (psi[point] ?? 0) * (potential[point] ?? 0));
      column += 1;
    }
  });
  return row;
}

/** Degrees of freedom (rows) of the polynomial basis (columns). */
function evaluationMatrix({ samples, gradients, complement, faces, dofs }: Local): DenseMatrix {
  const fields = [...gradients.map(({ vector }) => vector), ...complement];
  const matrix = denseMatrix(dofs.faces + dofs.innerGradients + dofs.complement, fields.length);
  fields.forEach((field, j) => {
    let row = 0;
    faces.forEach(({ basis, normal }, face) => {
      for (const psi of basis) {
        matrix.data[row * fields.length + j] = meanOn(samples, face, (point) => {
          const flux = (field[3 * point] ?? 0) * normal[0] + (field[3 * point + 1] ?? 0) * normal[1] + (field[3 * point + 2] ?? 0) * normal[2];
          return flux * (psi[point] ?? 0);
        });
        row += 1;
      }
    });
  });
  for (let a = 0; a < dofs.innerGradients; a += 1) matrix.data[(dofs.faces + a) * fields.length + a] = 1;
  for (let b = 0; b < dofs.complement; b += 1) {
    matrix.data[(dofs.faces + dofs.innerGradients + b) * fields.length + gradients.length + b] = 1;
  }
  return matrix;
}
