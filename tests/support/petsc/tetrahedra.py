"""Lowest-order Raviart-Thomas systems on the unit cube cut into n^3 cubes of six tetrahedra each; fluxes through faces as unknowns."""

from itertools import permutations

import numpy as np

from hexahedra import scatter


class Tetrahedra:
    """Local matrices and numbering; the flux is prescribed on the whole boundary."""

    def __init__(self, n, contrast=1.0, pattern="blocks", boundary="flux-everywhere"):
        self.n, self.boundary = n, boundary
        corner = np.stack(np.meshgrid(*[np.arange(n)] * 3, indexing="ij"), axis=-1).reshape(-1, 3)
        cells = []
        for order in permutations(range(3)):
            steps = np.zeros((4, 3), dtype=int)
            for position, axis in enumerate(order):
                steps[position + 1 :, axis] += 1
            cells.append(corner[:, None, :] + steps[None, :, :])
        lattice = np.concatenate(cells)
        vertices = (lattice[..., 0] * (n + 1) + lattice[..., 1]) * (n + 1) + lattice[..., 2]
        block = (np.tile(corner, (6, 1)) * 4) // n
        index = block[:, 2] if pattern == "layers" else block.sum(axis=1)
        self.nu = np.where(index % 2 == 0, 1.0, float(contrast))
        self.points, self.vertices = lattice / n, np.sort(vertices, axis=1)
        self.points = np.take_along_axis(self.points, np.argsort(vertices, axis=1)[:, :, None], axis=1)
        self.number()
        self.local()

    def number(self):
        opposite = np.array([[1, 2, 3], [0, 2, 3], [0, 1, 3], [0, 1, 2]])
        triples = self.vertices[:, opposite].reshape(-1, 3)
        _, inverse, counts = np.unique(triples, axis=0, return_inverse=True, return_counts=True)
        kept = counts == 2 if self.boundary == "flux-everywhere" else counts > 0
        numbers = np.full(len(counts), -1)
        numbers[kept] = np.arange(kept.sum())
        self.faces = numbers[inverse].reshape(-1, 4)
        first = np.full(len(counts), len(inverse))
        np.minimum.at(first, inverse, np.arange(len(inverse)))
        self.signs = np.where(first[inverse] == np.arange(len(inverse)), 1.0, -1.0).reshape(-1, 4)
        self.n_u, self.n_p = int(kept.sum()), len(self.vertices)

    def local(self):
        """The basis function of the face opposite to vertex i is (x - x_i) / (3 |T|): unit flux through that face."""
        edges = self.points[:, 1:] - self.points[:, :1]
        volume = np.abs(np.linalg.det(edges)) / 6
        weights = (np.ones((4, 4)) + np.eye(4)) / 20
        differences = self.points[:, None, :, :] - self.points[:, :, None, :]
        gram = np.einsum("tiad,ab,tjbd->tij", differences, weights, differences) * volume[:, None, None]
        scale = 1 / (9 * volume**2 * self.nu)
        self.masses = gram * scale[:, None, None] * self.signs[:, :, None] * self.signs[:, None, :]

    def velocity_block(self):
        return (*scatter(self.faces, self.faces, self.masses), (self.n_u, self.n_u))

    def divergence_block(self):
        cells = np.arange(self.n_p)[:, None]
        return (*scatter(cells, self.faces, -self.signs[:, None, :]), (self.n_p, self.n_u))

    def right_hand_side(self, kind):
        b = np.zeros(self.n_u + self.n_p)
        if kind == "random":
            b[:] = np.random.default_rng(7).standard_normal(len(b))
        else:
            b[self.n_u], b[-1] = -1.0, 1.0
        if self.boundary == "flux-everywhere":
            b[self.n_u :] -= b[self.n_u :].mean()
        return b
