"""What p-multigrid asks of a program: the embedding of degree 1 into a higher degree and the vertex patches, on cubes."""

import numpy as np
from petsc4py import PETSc

from hexahedra import Hexahedra, kron3, lagrange, nodes_of, scatter


def embedding(system):
    """Velocities of degree 1 in the basis of the system's degree, as coordinate form."""
    coarse = Hexahedra(system.n, 1, 1.0, "blocks", system.boundary)
    along = lagrange(nodes_of(1), nodes_of(system.degree))
    across = lagrange(nodes_of(0), nodes_of(system.degree - 1))
    copies = copies_of(system)
    parts = []
    for axis in range(3):
        factors = [across, across]
        factors.insert(axis, along)
        fine = system.velocity_numbers[axis]
        shares = np.where(fine >= 0, 1.0 / copies[np.where(fine >= 0, fine, 0)], 0.0)
        parts.append(scatter(fine, coarse.velocity_numbers[axis], kron3(*factors)[None] * shares[:, :, None]))
    return (*[np.concatenate(part) for part in zip(*parts)], (system.n_u, coarse.n_u))


def copies_of(system):
    """Number of cells that share each velocity unknown."""
    flat = np.concatenate([numbers.ravel() for numbers in system.velocity_numbers])
    return np.bincount(flat[flat >= 0], minlength=system.n_u)


def vertex_patches(system):
    """For each vertex the velocities all of whose cells touch it."""
    numbers, copies, n = np.concatenate(system.velocity_numbers, axis=1), copies_of(system), system.n
    patches = []
    for vertex in np.ndindex(n + 1, n + 1, n + 1):
        star = np.all((system.cells >= np.array(vertex) - 1) & (system.cells <= np.array(vertex)), axis=1)
        inside = numbers[star].ravel()
        found, counts = np.unique(inside[inside >= 0], return_counts=True)
        whole = found[counts == copies[found]]
        if len(whole):
            patches.append(PETSc.IS().createGeneral(whole.astype(PETSc.IntType), comm=PETSc.COMM_SELF))
    return patches
