"""Hybridised form of a system of cubes: copies of the face velocities for every cell, tied by multipliers, condensed cell by cell."""

import numpy as np
from petsc4py import PETSc

from matrices import aij


def vector(values):
    result = PETSc.Vec().createSeq(len(values))
    result.setArray(values)
    return result


class Hybrid:
    """H and the maps between residuals of K and the multipliers. A multiplier stands for every velocity unknown shared by two cells."""

    def __init__(self, system):
        self.system = system
        cells = len(system.cells)
        self.numbers = np.concatenate(system.velocity_numbers, axis=1)
        flat = self.numbers.ravel()
        used = np.bincount(flat[flat >= 0], minlength=system.n_u)
        self.copies = used
        self.multiplier_of = np.full(system.n_u, -1)
        self.multiplier_of[used == 2] = np.arange(int((used == 2).sum()))
        self.count = int((used == 2).sum())
        local = self.numbers.shape[1]
        pressures = system.pressure_numbers.shape[1]
        first = np.full(system.n_u, flat.size)
        kept = flat >= 0
        np.minimum.at(first, flat[kept], np.flatnonzero(kept))
        safe = np.where(flat >= 0, flat, 0)
        signs = np.where(first[safe] == np.arange(flat.size), 1.0, -1.0)
        shared = (flat >= 0) & (used[safe] == 2)
        self.signs = np.where(shared, signs, 0.0).reshape(cells, local)
        self.multipliers = np.where(shared, self.multiplier_of[safe], -1).reshape(cells, local)
        self.local, self.pressures = local, pressures
        self.inverse = np.linalg.inv(self.cell_matrices())
        velocity = self.inverse[:, :local, :local]
        values = self.signs[:, :, None] * velocity * self.signs[:, None, :]
        rows = np.broadcast_to(self.multipliers[:, :, None], values.shape)
        columns = np.broadcast_to(self.multipliers[:, None, :], values.shape)
        inside = (rows >= 0) & (columns >= 0)
        self.H = aij(rows[inside], columns[inside], values[inside], (self.count, self.count))

    def cell_matrices(self):
        """M = [[A, Bt], [B, 0]] of every cell; an eliminated velocity keeps a unit diagonal and no coupling."""
        system, local, pressures = self.system, self.local, self.pressures
        matrices = np.zeros((len(system.cells), local + pressures, local + pressures))
        start = 0
        for mass, divergence in zip(system.local_mass, system.local_divergence):
            end = start + len(mass)
            matrices[:, start:end, start:end] = mass[None] / system.nu[:, None, None]
            matrices[:, local:, start:end] = divergence[None]
            matrices[:, start:end, local:] = divergence.T[None]
            start = end
        gone = np.hstack([self.numbers < 0, np.zeros((len(system.cells), pressures), dtype=bool)])
        matrices[gone[:, :, None] | gone[:, None, :]] = 0.0
        cell, place = np.nonzero(gone)
        matrices[cell, place, place] = 1.0
        return matrices

    def cell_residuals(self, residual):
        """The residual of K by cells, a shared velocity's halved between its two."""
        values = residual.getArray(readonly=True)
        safe = np.where(self.numbers >= 0, self.numbers, 0)
        velocity = np.where(self.numbers >= 0, values[safe] / self.copies[safe], 0.0)
        return np.hstack([velocity, values[self.system.n_u + self.system.pressure_numbers]])

    def condense(self, residual):
        solved = np.einsum("cij,cj->ci", self.inverse, self.cell_residuals(residual))[:, : self.local]
        return vector(self.gather(solved * self.signs))

    def gather(self, values):
        result = np.zeros(self.count)
        inside = self.multipliers >= 0
        np.add.at(result, self.multipliers[inside], values[inside])
        return result

    def recover(self, multipliers, residual):
        right = self.cell_residuals(residual)
        values = multipliers.getArray(readonly=True)
        tied = np.where(self.multipliers >= 0, values[np.where(self.multipliers >= 0, self.multipliers, 0)], 0.0)
        right[:, : self.local] -= self.signs * tied
        solved = np.einsum("cij,cj->ci", self.inverse, right)
        result = np.zeros(self.system.n_u + self.system.n_p)
        inside = self.numbers >= 0
        velocity = solved[:, : self.local]
        np.add.at(result, self.numbers[inside], velocity[inside] / self.copies[self.numbers[inside]])
        result[self.system.n_u + self.system.pressure_numbers] = solved[:, self.local :]
        return vector(result)

    def kernel(self):
        """Multipliers of the pressure 1: C lambda + Bt 1 = 0 for every cell."""
        ones = np.zeros((len(self.system.cells), self.local))
        start = 0
        for divergence in self.system.local_divergence:
            ones[:, start : start + divergence.shape[1]] = -divergence.sum(axis=0)
            start += divergence.shape[1]
        counts = self.gather(np.where(self.signs != 0, 1.0, 0.0))
        return vector(self.gather(ones * self.signs) / counts)
