"""The whole job as a script: read, sums by chunked oaconvolve, shift updates, solve. Prints the taps' sum."""
import sys

import numpy as np
from scipy.io import wavfile
from scipy.linalg import cho_factor, cho_solve
from scipy.signal import oaconvolve

rate, data = wavfile.read(sys.argv[1])
lags, chunk = 1024, 8192
to = int(round(float(sys.argv[2]) * rate))
x, d = (data[:, c].astype(float) / 32768 for c in (0, 1))
x -= x[:to].mean()
d -= d[:to].mean()
r = np.zeros(lags)
p = np.zeros(lags)
for start in range(lags - 1, to, chunk):
    end = min(to, start + chunk)
    history = x[start - lags + 1 : end]
    r += oaconvolve(history, x[start:end][::-1], mode="valid")[:lags][::-1]
    p += oaconvolve(history, d[start:end][::-1], mode="valid")[:lags][::-1]
matrix = np.empty((lags, lags))
matrix[0, :] = matrix[:, 0] = r
before, after = x[lags - 2 :: -1][: lags - 1], x[to - 1 : to - lags : -1]
for k in range(lags - 1):
    matrix[k + 1, 1:] = matrix[k, :-1] + before[k] * before - after[k] * after
matrix[np.diag_indices(lags)] += 1e-6 * np.mean(x[:to] ** 2) * (to - lags + 1)
w = cho_solve(cho_factor(matrix, lower=True), p)
y = oaconvolve(x[to - lags + 1 :], w, mode="valid")
e = d[to:] - y
print(w.sum(), 10 * np.log10(np.sum(e**2) / np.sum(d[to:] ** 2)))
