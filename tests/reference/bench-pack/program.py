"""
Plays the program of a bench pack's user: assembles a measured system, over as many processes as it is started on, and solves it with
whatever options it is given. Runs the calling lines that stand in the pack beside the options file, as the pack asks.

Usage, from the pack's folder: program.py SYSTEM [PETSc options]; SYSTEM is a name in tests/reference/options/systems.
"""

import os
import sys

import petsc4py

petsc4py.init(sys.argv)

import numpy as np  # noqa: E402
from petsc4py import PETSc  # noqa: E402

here = os.path.dirname(os.path.abspath(__file__))
sys.path.insert(0, os.path.join(here, "../../support/petsc"))
from matrices import read_matrix_market  # noqa: E402

base = os.path.join(here, "../options/systems", sys.argv[1])
comm = PETSc.COMM_WORLD


def assemble():
    """This process's rows of K = [[A, Bt], [B, 0]], velocity unknowns first."""
    a_rows, a_columns, a_values, (n_u, _) = read_matrix_market(base + "_A.mtx.gz")
    b_rows, b_columns, b_values, (n_p, _) = read_matrix_market(base + "_B.mtx.gz")
    rows = np.concatenate([a_rows, b_columns, b_rows + n_u])
    columns = np.concatenate([a_columns, b_rows + n_u, b_columns])
    values = np.concatenate([a_values, b_values, b_values])
    right_hand_side = PETSc.Vec().createMPI(n_u + n_p, comm=comm)
    first, last = right_hand_side.getOwnershipRange()
    mine = (rows >= first) & (rows < last)
    rows, columns, values = rows[mine] - first, columns[mine], values[mine]
    order = np.lexsort((columns, rows))
    starts = np.concatenate([[0], np.cumsum(np.bincount(rows, minlength=last - first))]).astype(PETSc.IntType)
    local = last - first
    matrix = PETSc.Mat().createAIJ(
        size=((local, n_u + n_p), (local, n_u + n_p)), csr=(starts, columns[order].astype(PETSc.IntType), values[order]), comm=comm
    )
    matrix.assemble()
    right_hand_side.setArray(read_matrix_market(base + "_rhs_random.mtx.gz")[first:last])
    return matrix, right_hand_side, n_u, n_p


K, b, n_u, n_p = assemble()
x = b.duplicate()
x.set(0.0)
ksp = PETSc.KSP().create(comm)
strategy = os.path.basename(sys.argv[sys.argv.index("-options_file") + 1]).removesuffix(".petsc")
with open(os.path.join("calling-lines", strategy + ".py")) as file:
    calling_lines = file.read()
exec(compile(calling_lines, "calling lines", "exec"))
