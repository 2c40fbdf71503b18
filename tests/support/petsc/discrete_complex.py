"""Discrete gradient, curl and coordinates of the cubes' vertices, edges and unknown faces (lowest order)."""

import numpy as np


def lattice(counts):
    return np.arange(int(np.prod(counts))).reshape(counts)


def along(n, axis, long, short):
    """Number of places in each direction: `long` along `axis`, `short` across."""
    counts = [short] * 3
    counts[axis] = long
    return counts


def discrete_gradient(n):
    vertices = lattice([n + 1] * 3)
    rows, columns, values, offset = [], [], [], 0
    for axis in range(3):
        edges = lattice(along(n, axis, n, n + 1)) + offset
        offset += edges.size
        for shift, value in ((0, -1.0), (1, 1.0)):
            index = [slice(None)] * 3
            index[axis] = slice(shift, shift + n)
            rows.append(edges.ravel())
            columns.append(vertices[tuple(index)].ravel())
            values.append(np.full(edges.size, value))
    return np.concatenate(rows), np.concatenate(columns), np.concatenate(values), (offset, vertices.size)


def discrete_curl(system):
    """Circulation around every unknown face; edges of the boundary are kept, so that hypre sees whole faces."""
    n = system.n
    numbers, offset = [], 0
    for axis in range(3):
        numbers.append(lattice(along(n, axis, n, n + 1)) + offset)
        offset += numbers[-1].size
    rows, columns, values = [], [], []
    for axis in range(3):
        faces = face_numbers(system, axis)
        first, second = (axis + 1) % 3, (axis + 2) % 3
        for edge_axis, moved, signs in ((first, second, (1.0, -1.0)), (second, first, (-1.0, 1.0))):
            for shift, sign in enumerate(signs):
                index = [slice(None)] * 3
                index[moved] = slice(shift, shift + n)
                edges = numbers[edge_axis][tuple(index)]
                kept = faces.ravel() >= 0
                rows.append(faces.ravel()[kept])
                columns.append(edges.ravel()[kept])
                values.append(np.full(kept.sum(), sign))
    return np.concatenate(rows), np.concatenate(columns), np.concatenate(values), (system.n_u, offset)


def face_numbers(system, axis):
    counts, flat = system.velocity_points(axis)
    faces = np.full(int(np.prod(counts)), -1)
    faces[flat.ravel()] = system.velocity_numbers[axis].ravel()
    return faces.reshape(counts)


def coordinates(n):
    grid = np.stack(np.meshgrid(*[np.arange(n + 1) / n] * 3, indexing="ij"), axis=-1)
    return grid.reshape(-1, 3)
