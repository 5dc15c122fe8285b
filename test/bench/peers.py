"""The same computations in numpy and scipy, for the benchmark's ratios.

Speaks lines of JSON: {"load": name, "input": {...}} once a case, then {"time": true} for one timed run.
Arrays arrive and leave as base64 of little-endian doubles.
"""

import base64
import json
import sys
import time

import numpy as np


def band_solve(band, load, n, half):
    """LAPACK's band Cholesky (pbtrf, pbtrs) on the lower band of an n x n matrix, rows of half + 1."""
    from scipy.linalg import cho_solve_banded, cholesky_banded

    # ours stands row by row (columns i - half ... i); LAPACK wants the diagonals as rows
    rows = band.reshape(n, half + 1)
    lower = np.zeros((half + 1, n))
    for k in range(half + 1):
        lower[k, : n - k] = rows[k:, half - k]

    def work():
        return cho_solve_banded((cholesky_banded(lower, lower=True, check_finite=False), True), load, check_finite=False)

    return work


def draws(means, factor, residual, constant, linear, triangle, near, normals, weights, loads, pairs, damage, value, piles, block):
    """Joint draws of all piles at all nodes at once, their settlements, the largest distortion and its damage."""
    n, nodes = piles, len(weights)
    values = normals.reshape(nodes, 2 * n, block)
    factor = np.tril(factor.reshape(nodes, n, n))
    means, residual, constant = (a.reshape(nodes, n, 1) for a in (means, residual, constant))
    linear, triangle = linear.reshape(nodes, n, 5, 1), triangle.reshape(nodes, n, 5, 5)
    near = near.astype(int).reshape(n, 5)
    first, second = pairs.reshape(-1, 3)[:, :2].astype(int).T
    distance = pairs.reshape(-1, 3)[:, 2][:, None]
    at, share = damage.reshape(-1, 2).T

    def work():
        xi = factor @ values[:, :n]
        around = xi[:, near]
        second_order = constant + np.sum(around * (linear + triangle @ around), axis=2)
        settlement = loads[:, None] * np.exp(-(means + xi + residual * values[:, n:] + second_order))
        distortion = np.max(np.abs(settlement[:, first] - settlement[:, second]) / distance, axis=1)
        return np.array([value * np.sum(weights * np.mean(np.interp(distortion, at, share, left=0.0), axis=1))])

    return work


def band_solve_many(band, loads, n, half):
    """As band_solve, for loads n x columns."""
    return band_solve(band, loads.reshape(n, -1), n, half)


def cholesky(matrix, n, times):
    matrix = matrix.reshape(n, n)

    def work():
        for _ in range(times):
            factor = np.linalg.cholesky(matrix)
        return factor

    return work


def product(factor, normals, n):
    factor, normals = factor.reshape(n, n), normals.reshape(n, -1)
    return lambda: factor @ normals


def eigenvalues(matrix, n):
    matrix = matrix.reshape(n, n)
    return lambda: np.linalg.eigh(matrix).eigenvalues


def pile_form(band, n, half, load, forces, shares):
    """Second-order form of a pile: one band factor, the head load and the forces of the form's cells solved, M by the definition."""
    from scipy.linalg import cho_solve_banded, cholesky_banded

    rows = band.reshape(n, half + 1)
    lower = np.zeros((half + 1, n))
    for k in range(half + 1):
        lower[k, : n - k] = rows[k:, half - k]
    forces = forces.reshape(n, -1)

    def work():
        factor = (cholesky_banded(lower, lower=True, check_finite=False), True)
        compliance = load @ cho_solve_banded(factor, load, check_finite=False)
        product = forces.T @ cho_solve_banded(factor, forces, check_finite=False)
        return (np.diag(shares) + np.outer(shares, shares)) / 2 - product / compliance

    return work


def sobol_normals(dimensions, count):
    from scipy.special import ndtri
    from scipy.stats import qmc

    # a scrambled coordinate of 30 digits may be 0, whose normal is no number
    return lambda: np.mean(ndtri(np.maximum(qmc.Sobol(dimensions, scramble=True).random(count), 2.0**-32)), axis=0)


PEERS = {
    "band_solve": band_solve,
    "band_solve_many": band_solve_many,
    "cholesky": cholesky,
    "draws": draws,
    "eigenvalues": eigenvalues,
    "pile_form": pile_form,
    "product": product,
    "sobol_normals": sobol_normals,
}


def decoded(value):
    return np.frombuffer(base64.b64decode(value), "<f8").copy() if isinstance(value, str) else value


def main():
    work = None
    for line in sys.stdin:
        request = json.loads(line)
        if "load" in request:
            work = PEERS[request["load"]](**{name: decoded(value) for name, value in request["input"].items()})
            work()  # the first call pays for imports and for memory
            print(json.dumps({"ready": True}), flush=True)
        else:
            begun = time.perf_counter()
            answer = work()
            took = (time.perf_counter() - begun) * 1e3
            text = base64.b64encode(np.ascontiguousarray(answer, "<f8").tobytes()).decode()
            print(json.dumps({"milliseconds": took, "answer": text}), flush=True)


main()
