"""
Solve an unassembled system of cubes on four processes, one quarter column of the cube each: mpiexec -n 4 python3 solve-parallel.py JOB.json.
Prints a line "RESULT {...}" and PETSc's report on unused options, like solve.py.
"""

import json
import sys
import time

with open(sys.argv[1]) as file:
    job = json.load(file)

import petsc4py  # noqa: E402

petsc4py.init([sys.argv[0], "-options_file", job["optionsPath"], "-options_left"])

import numpy as np  # noqa: E402
from petsc4py import PETSc  # noqa: E402

from hexahedra import Hexahedra, scatter  # noqa: E402
from matrices import aij  # noqa: E402


def unassembled(local, row_map, column_map, shape, comm):
    """A matrix of type IS from this process's local matrix."""
    rows = PETSc.LGMap().create(row_map.astype(PETSc.IntType), comm=comm)
    columns = rows if row_map is column_map else PETSc.LGMap().create(column_map.astype(PETSc.IntType), comm=comm)
    matrix = PETSc.Mat().create(comm)
    matrix.setType("is")
    matrix.setSizes([(PETSc.DECIDE, shape[0]), (PETSc.DECIDE, shape[1])])
    matrix.setLGMap(rows, columns)
    matrix.setISLocalMat(local)
    matrix.assemble()
    return matrix


def subdomain(system, mine):
    """Coordinate forms of this process's velocity mass and divergence."""
    masses, divergences = [], []
    for axis in range(3):
        numbers = system.velocity_numbers[axis][mine]
        masses.append(scatter(numbers, numbers, system.local_mass[axis][None] / system.nu[mine][:, None, None]))
        local = system.local_divergence[axis]
        divergences.append(scatter(system.pressure_numbers[mine], numbers, np.broadcast_to(local, (len(mine), *local.shape))))
    return [[np.concatenate(part) for part in zip(*parts)] for parts in (masses, divergences)]


def main():
    comm, spec = PETSc.COMM_WORLD, job["system"]
    system = Hexahedra(spec["n"], spec["degree"], spec["contrast"], spec["pattern"], spec["boundary"])
    halves = (system.cells * 2) // system.n
    mine = np.flatnonzero(halves[:, 0] * 2 + halves[:, 1] == comm.rank)
    (m_rows, m_columns, m_values), (d_rows, d_columns, d_values) = subdomain(system, mine)
    n_u, n_p = system.n_u, system.n_p
    rows = np.concatenate([m_rows, d_rows + n_u, d_columns])
    columns = np.concatenate([m_columns, d_columns, d_rows + n_u])
    to_global = np.unique(rows)
    velocities, pressures = to_global[to_global < n_u], to_global[to_global >= n_u] - n_u
    place = lambda numbers, known: np.searchsorted(known, numbers)  # noqa: E731
    local = aij(place(rows, to_global), place(columns, to_global), np.concatenate([m_values, d_values, d_values]), (len(to_global),) * 2)
    K = unassembled(local, to_global, to_global, (n_u + n_p,) * 2, comm)
    local_divergence = aij(place(d_rows, pressures), place(d_columns, velocities), d_values, (len(pressures), len(velocities)))
    divergence = unassembled(local_divergence, pressures, velocities, (n_p, n_u), comm)
    local_velocities = PETSc.IS().createGeneral(np.flatnonzero(to_global < n_u).astype(PETSc.IntType), comm=PETSc.COMM_SELF)
    b, x = K.createVecLeft(), K.createVecRight()
    first, last = b.getOwnershipRange()
    b.setArray(system.right_hand_side(spec["rhs"])[first:last])
    right_hand_side = b.copy()
    ksp = PETSc.KSP().create(comm)
    names = {"PETSc": PETSc, "np": np, "K": K, "divergence": divergence, "local_velocities": local_velocities}
    names |= {"n_u": n_u, "n_p": n_p, "b": b, "x": x, "ksp": ksp}
    started, started_cpu = time.perf_counter(), time.process_time()
    with open(job["callingPath"]) as file:
        exec(compile(file.read(), "calling lines", "exec"), names)
    result = {
        "reason": int(ksp.getConvergedReason()),
        "iterations": int(ksp.getIterationNumber()),
        "seconds": time.perf_counter() - started,
        "cpuSeconds": time.process_time() - started_cpu,
        "krylov": ksp.getType(),
        "preconditioner": ksp.getPC().getType(),
        "splitSizes": [],
    }
    residual = b.duplicate()
    K.mult(x, residual)
    residual.axpy(-1.0, right_hand_side)
    result["trueRelativeResidual"] = residual.norm() / right_hand_side.norm()
    if comm.rank == 0:
        print("RESULT " + json.dumps(result), flush=True)


main()
