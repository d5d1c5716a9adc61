"""Taps by SciPy for the cases on standard input; one list of taps a case on standard output, all JSON."""
import json
import sys

import numpy as np
from scipy.linalg import lstsq, solve_toeplitz


def covariance(case):
    """Least squares on the explicit data matrix, ridge rows below it."""
    rows, right = [], []
    length, delay = case["length"], case["delay"]
    inputs = [np.array(x) for x in case["inputs"]]
    desired = np.array(case["desired"])
    start, end = case["fit"]
    power = [np.mean(x[start:end] ** 2) for x in inputs]
    for n in range(start, end):
        if n - length + 1 < 0 or not 0 <= n - delay < len(desired):
            continue
        rows.append(np.concatenate([x[n - np.arange(length)] for x in inputs]))
        right.append(desired[n - delay])
    count = len(rows)
    ridge = np.sqrt(count * case["regularisation"] * np.repeat(power, length))
    matrix = np.vstack([np.array(rows), np.diag(ridge)])
    taps = lstsq(matrix, np.concatenate([right, np.zeros(len(ridge))]), lapack_driver="gelsy")[0]
    return taps.tolist()


def autocorrelation(case):
    """scipy.linalg.solve_toeplitz on full correlations of the windowed signals."""
    length, delay = case["length"], case["delay"]
    start, end = case["fit"]
    x = np.array(case["inputs"][0])[start:end]
    d = np.array(case["desired"])[start:end]
    count = end - start
    r = np.correlate(x, x, "full")[count - 1 : count - 1 + length] / count
    full = np.correlate(d, x, "full") / count
    # full[count - 1 + m] = sum_i d[i + m] x[i]; the delayed desired signal needs m = k - delay.
    p = np.array([full[count - 1 + k - delay] for k in range(length)])
    column = r.copy()
    column[0] += case["regularisation"] * np.mean(x**2)
    return solve_toeplitz(column, p).tolist()


cases = json.load(sys.stdin)
json.dump([covariance(c) if c["windowing"] == "covariance" else autocorrelation(c) for c in cases], sys.stdout)
