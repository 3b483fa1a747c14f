"""SciPy's SuperLU in symmetric mode in a process of its own: `superlu.py PRACTICE MATRIX SOLUTION REPETITIONS`, as ours.ts; one line of JSON.

`superlu.py` without arguments tells the version of SciPy.
"""
import ctypes
import gc
import json
import sys
import time

import numpy as np
import scipy
from scipy.sparse import csc_matrix
from scipy.sparse.linalg import splu


def read_arrays(path):
    """The file of container.ts."""
    with open(path, "rb") as file:
        count = int(np.fromfile(file, "<f8", 1)[0])
        head = np.fromfile(file, "<f8", 2 * count).reshape(count, 2)
        return [np.fromfile(file, "<f8" if kind else "<i4", int(length)) for kind, length in head]


def write_solution(path, x):
    """Two arrays, as container.ts reads them."""
    with open(path, "wb") as file:
        for part in ([2, 1, len(x), 1, len(x)], x.real, x.imag):
            np.asarray(part, "<f8").tofile(file)


def status_bytes(key):
    with open("/proc/self/status") as file:
        return next(1024 * int(line.split()[1]) for line in file if line.startswith(key + ":"))


def settled_memory():
    """Resident set after collecting garbage, and the kernel's high-water mark set back to it."""
    gc.collect()
    ctypes.CDLL(None).malloc_trim(0)
    with open("/proc/self/clear_refs", "w") as file:
        file.write("5")
    return status_bytes("VmRSS")


def factor(a, ordering):
    return splu(a, permc_spec=ordering, diag_pivot_thresh=0.0, options={"SymmetricMode": True})


def once(a, b):
    started = time.perf_counter()
    lu = factor(a, "MMD_AT_PLUS_A")
    factored = time.perf_counter()
    x = lu.solve(b)
    return lu, x, factored - started, time.perf_counter() - factored


def load(path):
    start, rows, re, im, rhs_re, rhs_im = read_arrays(path)
    n = len(start) - 1
    return csc_matrix((re + 1j * im, rows, start), shape=(n, n)), rhs_re + 1j * rhs_im


def main(practice, path, solution, repetitions):
    if practice != "-":
        once(*load(practice))
    a, b = load(path)
    before = settled_memory()
    lu, x, factored, solved = once(a, b)
    peak = status_bytes("VmHWM") - before
    write_solution(solution, x)
    factors, solves, again = [factored], [solved], []
    # L with its unit diagonal: as many numbers as L below the diagonal and D. SuperLU keeps U besides.
    entries = int(lu.L.nnz)
    # The columns in the order found: what is left of the work when the ordering is known.
    order = np.argsort(lu.perm_c)
    ordered = a[order][:, order].tocsc()
    ordered.sort_indices()
    for _ in range(int(repetitions) - 1):
        del lu
        started = time.perf_counter()
        factor(ordered, "NATURAL")
        again.append(time.perf_counter() - started)
        lu, x, factored, solved = once(a, b)
        factors.append(factored)
        solves.append(solved)
    print(json.dumps({"factor": factors, "solve": solves, "again": again, "peakBytes": peak, "entries": entries}))


if len(sys.argv) == 5:
    main(*sys.argv[1:])
else:
    print(scipy.__version__)
