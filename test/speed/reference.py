"""The reference side of the benchmark: SciPy on the same work. Reads "NAME\n" lines, answers with seconds.

Every function returns a closure that does the timed work, after loading its data from the folder given.
"""
import os
import sys
import time

import numpy as np
from scipy.linalg import cho_factor, cho_solve, solve_toeplitz
from scipy.signal import coherence, oaconvolve, welch

folder = sys.argv[1]


def load(name, dtype="<f8"):
    return np.fromfile(os.path.join(folder, name), dtype=dtype)


def correlations_chunked():
    x, d, lags, chunk = load("x.f64"), load("d.f64"), 1024, 8192

    def work():
        r = np.zeros(lags)
        p = np.zeros(lags)
        for start in range(lags - 1, len(x), chunk):
            end = min(len(x), start + chunk)
            history = x[start - lags + 1 : end]
            r += oaconvolve(history, x[start:end][::-1], mode="valid")[:lags][::-1]
            p += oaconvolve(history, d[start:end][::-1], mode="valid")[:lags][::-1]
        return r, p

    return work


def correlations_batched():
    x, d, lags, batch = load("x.f64"), load("d.f64"), 1024, 512

    def work():
        blocks = len(x) // lags
        shaped_x = x[: blocks * lags].reshape(blocks, lags)
        shaped_d = d[: blocks * lags].reshape(blocks, lags)
        r = np.zeros(lags + 1, complex)
        p = np.zeros(lags + 1, complex)
        sign = np.where(np.arange(lags + 1) % 2, -1.0, 1.0)
        before = np.zeros(lags + 1, complex)
        for start in range(0, blocks, batch):
            fx = np.fft.rfft(shaped_x[start : start + batch], 2 * lags, axis=1)
            fd = np.fft.rfft(shaped_d[start : start + batch], 2 * lags, axis=1)
            shifted = np.vstack([before, fx[:-1]])
            joined = np.conj(fx + sign * shifted)
            r += np.einsum("ij,ij->j", fx, joined)
            p += np.einsum("ij,ij->j", fd, joined)
            before = fx[-1]
        return np.fft.irfft(r)[:lags], np.fft.irfft(p)[:lags]

    return work


def overlap_save():
    x, w = load("x.f64"), load("w.f64")
    return lambda: oaconvolve(x, w)[: len(x)]


def toeplitz(size):
    column, right = load(f"toeplitz{size}.f64"), load(f"right{size}.f64")
    return lambda: solve_toeplitz(column, right)


def covariance(name):
    data = load(f"{name}.f64")
    inputs, length = int(data[0]), int(data[1])
    size = inputs * length
    rest = data[2:]
    columns = rest[: inputs * size].reshape(inputs, inputs, length)
    before = rest[inputs * size : (inputs + 1) * size - inputs].reshape(inputs, length - 1)
    after = rest[(inputs + 1) * size - inputs : (inputs + 2) * size - 2 * inputs].reshape(inputs, length - 1)
    right = rest[(inputs + 2) * size - 2 * inputs :]

    def work():
        matrix = np.empty((size, size))
        for r in range(inputs):
            for s in range(inputs):
                block = matrix[r * length : (r + 1) * length, s * length : (s + 1) * length]
                block[0, :] = columns[s, r]
                block[:, 0] = columns[r, s]
                for k in range(length - 1):
                    block[k + 1, 1:] = block[k, :-1] + before[r, k] * before[s] - after[r, k] * after[s]
        return cho_solve(cho_factor(matrix, lower=True, overwrite_a=True), right)

    return work


def csv():
    import pandas

    return lambda: pandas.read_csv(os.path.join(folder, "long.csv"))


def inspection():
    x, d = load("x.f64"), load("d.f64")

    def work():
        coherence(x, d, fs=48000, nperseg=2048)
        welch(x, fs=48000, nperseg=2048)

    return work


def search():
    x, d, length = load("search_x.f64"), load("search_d.f64"), 1024
    x, d = x - x.mean(), d - d.mean()
    matrix = np.zeros((length, length))
    right = np.zeros((length, 33))
    n = np.arange(1040, 45000)
    for part in np.array_split(n, 16):
        rows_of = x[part[:, None] - np.arange(length)]
        matrix += rows_of.T @ rows_of
        right += rows_of.T @ np.stack([d[part - delay] for delay in range(-16, 17)], axis=1)
    matrix /= len(n)
    right /= len(n)
    lengths = [int(round(8 * 128 ** (i / 23))) for i in range(24)]
    power = matrix[0, 0]

    def work():
        for k in range(9):
            for m in lengths:
                regular = matrix[:m, :m] + 10.0 ** (k - 8) * power * np.eye(m)
                cho_solve(cho_factor(regular, lower=True, overwrite_a=True), right[:m])

    return work


rows = {
    "correlations_chunked": correlations_chunked,
    "correlations_batched": correlations_batched,
    "overlap_save": overlap_save,
    "toeplitz1024": lambda: toeplitz(1024),
    "toeplitz4096": lambda: toeplitz(4096),
    "toeplitz16384": lambda: toeplitz(16384),
    "covariance1024": lambda: covariance("covariance1024"),
    "covariance4096": lambda: covariance("covariance4096"),
    "covariance3x1024": lambda: covariance("covariance3x1024"),
    "csv": csv,
    "inspection": inspection,
    "search": search,
}

ready = {}
for line in sys.stdin:
    name = line.strip()
    if name not in ready:
        ready.clear()
        ready[name] = rows[name]()
        ready[name]()
    began = time.perf_counter()
    ready[name]()
    print(time.perf_counter() - began, flush=True)
