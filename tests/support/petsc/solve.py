"""
Solve small systems with options files and their calling lines, as a user would.

Usage: solve.py JOBS.json, a list of { system, optionsPath, callingPath, repeat }. Every job runs in a child process with a PETSc
of its own, because PETSc reports unused options only when it ends. Prints a JSON list of { status, output }; the output holds a
line "RESULT {...}" and PETSc's report. Needs petsc4py and numpy (Debian: python3-petsc4py).
"""

import ctypes
import glob
import json
import os
import sys
import tempfile
import time

import numpy as np
import petsc4py


def preload():
    """Map PETSc's libraries once, before the children are forked; they are not initialised here."""
    for path in glob.glob(os.path.join(os.path.dirname(petsc4py.__file__), "lib", "PETSc*.so")):
        ctypes.CDLL(path)


def run_job(job):
    petsc4py.init([sys.argv[0], "-options_file", job["optionsPath"], "-options_left"])
    from systems import load_system

    with open(job["callingPath"]) as file:
        lines = file.read()
    loaded = load_system(job["system"])
    results = [solve(loaded, lines) for _ in range(job.get("repeat", 1))]
    print("RESULT " + json.dumps(min(results, key=lambda result: result["cpuSeconds"])), flush=True)


def vector(values):
    from petsc4py import PETSc

    result = PETSc.Vec().createSeq(len(values))
    result.setArray(values)
    return result


def solve(system, calling_lines):
    """One set-up and solve. The matrices are copied, so that repeats start alike."""
    from petsc4py import PETSc

    names = {name: value.copy() if isinstance(value, PETSc.Mat) else value for name, value in system.items()}
    right_hand_side = system["right_hand_side"]
    names |= {"PETSc": PETSc, "np": np, "b": vector(right_hand_side), "x": vector(np.zeros_like(right_hand_side))}
    names["ksp"] = ksp = PETSc.KSP().create(PETSc.COMM_SELF)
    started, started_cpu = time.perf_counter(), time.process_time()
    exec(compile(calling_lines, "calling lines", "exec"), names)
    seconds, cpu = time.perf_counter() - started, time.process_time() - started_cpu
    b = vector(right_hand_side)
    residual = b.duplicate()
    system["K"].mult(names["x"], residual)
    residual.axpy(-1.0, b)
    true_residual = residual.norm() / b.norm()
    return {
        "reason": int(ksp.getConvergedReason()),
        "iterations": int(ksp.getIterationNumber()),
        "trueRelativeResidual": true_residual if np.isfinite(true_residual) else 1e300,
        "seconds": seconds,
        "cpuSeconds": cpu,
        "krylov": ksp.getType(),
        "preconditioner": ksp.getPC().getType(),
        "splitSizes": split_sizes(ksp.getPC()),
    }


def split_sizes(pc):
    """Unknowns of each block of a splitting preconditioner, also inside an inner solve; none for others."""
    if pc.getType() == "ksp":
        return split_sizes(pc.getKSP().getPC())
    if pc.getType() != "fieldsplit":
        return []
    return [block.getOperators()[1].getSize()[0] for block in pc.getFieldSplitSubKSP()]


def in_child(job):
    """Output and exit status of one job."""
    with tempfile.TemporaryFile() as capture:
        child = os.fork()
        if child == 0:
            os.dup2(capture.fileno(), 1)
            os.dup2(capture.fileno(), 2)
            try:
                run_job(job)
            except BaseException:
                import traceback

                traceback.print_exc()
                sys.stderr.flush()
                os._exit(1)
            sys.exit(0)
        _, status = os.waitpid(child, 0)
        capture.seek(0)
        return {"status": os.waitstatus_to_exitcode(status), "output": capture.read().decode(errors="replace")}


def main():
    with open(sys.argv[1]) as file:
        jobs = json.load(file)
    preload()
    print(json.dumps([in_child(job) for job in jobs]), flush=True)


main()
