"""Sparse matrices in coordinate form: Matrix Market files in, PETSc matrices out. numpy and petsc4py only."""

import gzip

import numpy as np
from petsc4py import PETSc


def read_matrix_market(path):
    """A gzipped Matrix Market file: (rows, columns, values, shape) of a coordinate matrix, or the values of an array."""
    with gzip.open(path, "rt") as file:
        header = file.readline().lower().split()
        line = file.readline()
        while line.startswith("%"):
            line = file.readline()
        sizes = [int(word) for word in line.split()]
        numbers = np.array(file.read().split(), dtype=float)
    if "array" in header:
        return numbers
    table = numbers.reshape(-1, 3)
    rows, columns, values = table[:, 0].astype(int) - 1, table[:, 1].astype(int) - 1, table[:, 2]
    if "symmetric" in header:
        off = rows != columns
        rows, columns, values = (
            np.concatenate([rows, columns[off]]),
            np.concatenate([columns, rows[off]]),
            np.concatenate([values, values[off]]),
        )
    return rows, columns, values, (sizes[0], sizes[1])


def aij(rows, columns, values, shape, comm=PETSc.COMM_SELF):
    """A sequential AIJ matrix; entries at the same place are added."""
    count_rows, count_columns = shape
    order = np.lexsort((columns, rows))
    rows, columns, values = np.asarray(rows)[order], np.asarray(columns)[order], np.asarray(values)[order]
    first = np.ones(len(rows), dtype=bool)
    first[1:] = (rows[1:] != rows[:-1]) | (columns[1:] != columns[:-1])
    starts = np.flatnonzero(first)
    sums = np.add.reduceat(values, starts) if len(starts) else values
    counts = np.bincount(rows[starts], minlength=count_rows)
    offsets = np.concatenate([[0], np.cumsum(counts)]).astype(PETSc.IntType)
    matrix = PETSc.Mat().createAIJ(
        size=(count_rows, count_columns), csr=(offsets, columns[starts].astype(PETSc.IntType), sums), comm=comm
    )
    matrix.assemble()
    return matrix


def saddle(velocity, divergence, comm=PETSc.COMM_SELF):
    """K = [[A, Bt], [B, 0]] from the coordinate forms of A and B; no diagonal is stored in the second block."""
    a_rows, a_columns, a_values, (unknowns, _) = velocity
    b_rows, b_columns, b_values, (pressures, _) = divergence
    total = unknowns + pressures
    return aij(
        np.concatenate([a_rows, b_columns, b_rows + unknowns]),
        np.concatenate([a_columns, b_rows + unknowns, b_columns]),
        np.concatenate([a_values, b_values, b_values]),
        (total, total),
        comm,
    )
