"""Systems for the tests by name: measured ones from Matrix Market files, model ones from the generators."""

import os

import numpy as np

from degrees import embedding, vertex_patches
from discrete_complex import coordinates, discrete_curl, discrete_gradient
from hexahedra import Hexahedra
from hybrid import Hybrid
from matrices import aij, read_matrix_market, saddle
from tetrahedra import Tetrahedra

folder = os.path.join(os.path.dirname(os.path.abspath(__file__)), "../../reference/options/systems")


def load_system(spec):
    """Names that the calling lines may use: K, A, B, W, W_inverse, n_u, n_p and what the family adds; right_hand_side as an array."""
    return {"files": from_files, "hexahedra": hexahedra, "tetrahedra": tetrahedra}[spec["kind"]](spec)


def common(velocity, divergence, right_hand_side, **more):
    return {
        "K": saddle(velocity, divergence),
        "A": aij(*velocity),
        "B": aij(*divergence),
        "n_u": velocity[3][0],
        "n_p": divergence[3][0],
        "right_hand_side": right_hand_side,
        **more,
    }


def from_files(spec):
    base = os.path.join(folder, spec["name"])
    velocity, divergence = read_matrix_market(base + "_A.mtx.gz"), read_matrix_market(base + "_B.mtx.gz")
    b = read_matrix_market(f"{base}_rhs_{spec['rhs']}.mtx.gz")
    pressures = divergence[3][0]
    mass = aij(np.arange(pressures), np.arange(pressures), np.full(pressures, 1.0 / pressures), (pressures, pressures))
    return common(velocity, divergence, b, W=mass, W_inverse=None)


def hexahedra(spec):
    system = Hexahedra(spec["n"], spec["degree"], spec["contrast"], spec["pattern"], spec["boundary"])
    more = {"W": aij(*system.pressure_mass()), "W_inverse": aij(*system.pressure_mass_inverse())}
    if spec["degree"] > 1:
        more |= {"interpolation": aij(*embedding(system)), "patches": vertex_patches(system)}
    if spec["degree"] == 1:
        more |= {
            "W_inverse": None,
            "gradient": aij(*discrete_gradient(spec["n"])),
            "curl": aij(*discrete_curl(system)),
            "coordinates": coordinates(spec["n"]),
        }
    if spec.get("hybridised"):
        hybrid = Hybrid(system)
        more |= {"H": hybrid.H, "condense": hybrid.condense, "recover": hybrid.recover, "multiplier_kernel": hybrid.kernel()}
    return common(system.velocity_block(), system.divergence_block(), system.right_hand_side(spec["rhs"]), **more)


def tetrahedra(spec):
    system = Tetrahedra(spec["n"], spec["contrast"], spec["pattern"], spec["boundary"])
    volume = 1.0 / system.n_p
    mass = aij(np.arange(system.n_p), np.arange(system.n_p), np.full(system.n_p, volume), (system.n_p, system.n_p))
    return common(system.velocity_block(), system.divergence_block(), system.right_hand_side(spec["rhs"]), W=mass, W_inverse=None)
