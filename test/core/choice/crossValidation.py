"""Cross-validated errors by NumPy for the case on standard input, on standard output, all JSON.

Least squares on the explicit data matrix with ridge rows below it, then the left-out blocks filtered sample by sample.
"""
import json
import sys

import numpy as np


def rows(inputs, length, intervals):
    n = np.concatenate([np.arange(start, end) for start, end in intervals])
    return n, np.hstack([x[n[:, None] - np.arange(length)] for x in inputs])


def main():
    case = json.load(sys.stdin)
    inputs = [np.array(x) for x in case["inputs"]]
    desired = np.array(case["desired"])
    powers = [np.mean(x * x) for x in inputs]
    result = []
    for fold in case["folds"]:
        for length in case["lengths"]:
            n, matrix = rows(inputs, length, fold["training"])
            for rho in case["regularisations"]:
                ridge = np.sqrt(len(n) * rho * np.repeat(powers, length))
                tall = np.vstack([matrix, np.diag(ridge)])
                right = np.stack([desired[n - delay] for delay in case["delays"]], axis=1)
                right = np.vstack([right, np.zeros((len(ridge), len(case["delays"])))])
                taps = np.linalg.lstsq(tall, right, rcond=None)[0]
                own = np.sum((right - tall @ taps)[: len(n)] ** 2, axis=0)
                hat = matrix.T @ matrix
                freedom = np.trace(np.linalg.solve(hat + np.diag(ridge**2), hat))
                errors = []
                for block in fold["blocks"]:
                    m, left_out = rows(inputs, length, block)
                    output = left_out @ taps
                    errors.append(
                        [np.sum((desired[m - delay] - output[:, d]) ** 2) for d, delay in enumerate(case["delays"])]
                    )
                result.append({"errors": errors, "fit": own.tolist(), "freedom": freedom})
    json.dump(result, sys.stdout)


main()
