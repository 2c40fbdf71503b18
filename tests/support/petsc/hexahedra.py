"""Mixed systems on the unit cube cut into n^3 cubes: tensor-product face elements of any degree, from one-dimensional matrices."""

import numpy as np


def nodes_of(degree):
    return np.linspace(0.0, 1.0, degree + 1) if degree > 0 else np.array([0.5])


def lagrange(nodes, points, derivative=False):
    """Values (or derivatives) of the Lagrange polynomials of `nodes` at `points`: one row a point."""
    vandermonde = np.vander(nodes, increasing=True)
    powers = np.vander(points, len(nodes), increasing=True)
    if derivative:
        powers = np.hstack([np.zeros((len(points), 1)), powers[:, :-1] * np.arange(1, len(nodes))])
    return powers @ np.linalg.inv(vandermonde)


def line_matrices(degree):
    """Mass of the continuous and the discontinuous basis on [0, 1], and the product of derivative and discontinuous basis."""
    points, weights = np.polynomial.legendre.leggauss(degree + 1)
    points, weights = (points + 1) / 2, weights / 2
    along, across = nodes_of(degree), nodes_of(degree - 1)
    continuous, discontinuous = lagrange(along, points), lagrange(across, points)
    slope = lagrange(along, points, derivative=True)
    scaled = weights[:, None]
    return continuous.T @ (scaled * continuous), discontinuous.T @ (scaled * discontinuous), discontinuous.T @ (scaled * slope)


def kron3(first, second, third):
    return np.kron(np.kron(first, second), third)


class Hexahedra:
    """Local matrices, numbering and coefficient of one system. Velocities of the boundary are dropped where the flux is prescribed."""

    def __init__(self, n, degree=1, contrast=1.0, pattern="blocks", boundary="flux-everywhere"):
        self.n, self.degree, self.boundary = n, degree, boundary
        h = self.h = 1.0 / n
        mass_c, mass_d, slope = line_matrices(degree)
        self.local_mass, self.local_divergence = [], []
        for axis in range(3):
            masses = [mass_d, mass_d]
            masses.insert(axis, mass_c)
            slopes = [mass_d, mass_d]
            slopes.insert(axis, slope)
            self.local_mass.append(kron3(*masses) / h)
            self.local_divergence.append(-kron3(*slopes))
        self.local_pressure_mass = kron3(mass_d, mass_d, mass_d) * h**3
        self.cells = np.stack(np.meshgrid(*[np.arange(n)] * 3, indexing="ij"), axis=-1).reshape(-1, 3)
        self.nu = self.coefficient(contrast, pattern)
        self.number()

    def coefficient(self, contrast, pattern):
        block = (self.cells * 4) // self.n
        index = block[:, 2] if pattern == "layers" else block.sum(axis=1)
        return np.where(index % 2 == 0, 1.0, float(contrast))

    def velocity_points(self, axis):
        """Global lattice of one velocity component and the lattice places of every cell's local unknowns."""
        k, n = self.degree, self.n
        counts = [n * k, n * k, n * k]
        counts[axis] = n * k + 1
        steps = [np.arange(k + 1 if direction == axis else k) for direction in range(3)]
        places = [self.cells[:, direction, None] * k + steps[direction][None, :] for direction in range(3)]
        flat = (
            (places[0][:, :, None, None] * counts[1] + places[1][:, None, :, None]) * counts[2] + places[2][:, None, None, :]
        ).reshape(len(self.cells), -1)
        return counts, flat

    def number(self):
        self.velocity_numbers, offset = [], 0
        for axis in range(3):
            counts, flat = self.velocity_points(axis)
            kept = np.ones(counts, dtype=bool)
            if self.boundary == "flux-everywhere":
                edge = [slice(None)] * 3
                for end in (0, counts[axis] - 1):
                    edge[axis] = end
                    kept[tuple(edge)] = False
            numbers = np.full(kept.size, -1)
            numbers[kept.ravel()] = offset + np.arange(kept.sum())
            offset += int(kept.sum())
            self.velocity_numbers.append(numbers[flat])
        self.n_u = offset
        per_cell = self.degree**3
        self.pressure_numbers = np.arange(len(self.cells) * per_cell).reshape(len(self.cells), per_cell)
        self.n_p = self.pressure_numbers.size

    def velocity_block(self):
        parts = []
        for axis in range(3):
            values = self.local_mass[axis][None, :, :] / self.nu[:, None, None]
            parts.append(scatter(self.velocity_numbers[axis], self.velocity_numbers[axis], values))
        return (*[np.concatenate(part) for part in zip(*parts)], (self.n_u, self.n_u))

    def divergence_block(self):
        parts = []
        for axis in range(3):
            values = np.broadcast_to(self.local_divergence[axis], (len(self.cells), *self.local_divergence[axis].shape))
            parts.append(scatter(self.pressure_numbers, self.velocity_numbers[axis], values))
        return (*[np.concatenate(part) for part in zip(*parts)], (self.n_p, self.n_u))

    def pressure_mass(self):
        values = np.broadcast_to(self.local_pressure_mass, (len(self.cells), *self.local_pressure_mass.shape))
        return (*scatter(self.pressure_numbers, self.pressure_numbers, values), (self.n_p, self.n_p))

    def pressure_mass_inverse(self):
        inverse = np.linalg.inv(self.local_pressure_mass)
        values = np.broadcast_to(inverse, (len(self.cells), *inverse.shape))
        return (*scatter(self.pressure_numbers, self.pressure_numbers, values), (self.n_p, self.n_p))

    def right_hand_side(self, kind):
        b = np.zeros(self.n_u + self.n_p)
        if kind == "random":
            b[:] = np.random.default_rng(7).standard_normal(len(b))
        else:
            b[self.n_u + self.pressure_numbers[0]] = -1.0
            b[self.n_u + self.pressure_numbers[-1]] = 1.0
        if self.boundary == "flux-everywhere":
            b[self.n_u :] -= b[self.n_u :].mean()
        return b


def scatter(rows, columns, values):
    """Coordinate form of local matrices, without the entries of dropped unknowns and exact zeros."""
    row_index = np.broadcast_to(rows[:, :, None], values.shape)
    column_index = np.broadcast_to(columns[:, None, :], values.shape)
    kept = (row_index >= 0) & (column_index >= 0) & (np.abs(values) > 1e-14 * np.abs(values).max())
    return row_index[kept], column_index[kept], np.ascontiguousarray(values)[kept]
