"""Least squares straight from the definition, by NumPy and SciPy: the figures of a sample pairing.

usage: leastSquares.py DOCUMENT [DOCUMENT ...]
Prints one JSON object: by document, the held-out NMSE in dB of all takes together, of each take, and the taps.
"""

import csv
import json
import os
import sys

import numpy as np
from scipy.io import wavfile
from scipy.linalg import lstsq


def read(path):
    if path.endswith(".wav"):
        rate, frames = wavfile.read(path)
        return rate, {c + 1: frames[:, c] / 32768 for c in range(frames.shape[1])}
    with open(path, newline="") as file:
        rows = list(csv.reader(file, delimiter=";" if path.endswith("valve.csv") else ","))
    body = [row for row in rows[1:] if row[0].lstrip("-").isdigit()]
    values = np.array([[float(cell.replace(",", ".")) for cell in row] for row in body])
    columns = {name: values[:, c] for c, name in enumerate(rows[0])}
    if "time" not in columns:
        return None, columns
    return 1000 / np.median(np.diff(columns["time"])), columns


def intervals(entry, rate):
    entries = entry if isinstance(entry, list) else [entry]
    return [(int(np.floor(e["from"] * rate + 0.5)), int(np.floor(e["to"] * rate + 0.5))) for e in entries]


def common(left, right):
    pairs = [(max(a, c), min(b, d)) for a, b in left for c, d in right]
    return [(a, b) for a, b in pairs if b > a]


def rows(take, spans, length, delay):
    """The equations of the n that may be used: history inside one run of listed intervals or before the first."""
    listed = sorted(take["fit"] + take["heldOut"])
    gaps = [(a[1], b[0]) for a, b in zip(listed, listed[1:]) if b[0] > a[1]]
    size = len(take["desired"])
    matrix, right = [], []
    for a, b in spans:
        n = np.arange(max(a, length - 1, delay), min(b, size + min(delay, 0)))
        for start, end in gaps:
            n = n[(n < start) | (n - length + 1 >= end)]
            n = n[(n - delay < start) | (n - delay >= end)]
        history = n[:, None] - np.arange(length)[None, :]
        matrix.append(np.hstack([x[history] for x in take["inputs"]]))
        right.append(take["desired"][n - delay])
    return np.vstack(matrix), np.concatenate(right)


def figures(path):
    with open(path) as file:
        document = json.load(file)
    folder = os.path.dirname(path)
    takes = []
    for entry in document["takes"]:
        rate, columns = read(os.path.join(folder, entry["desired"]["file"]))
        rate = rate or document["sampleRate"]
        held_out = intervals(entry["heldOut"], rate)
        judged = common(held_out, intervals(entry["disturbanceOnly"], rate)) if "disturbanceOnly" in entry else held_out
        takes.append({
            "name": entry["name"],
            "inputs": [columns[track["channel"]] for track in entry["inputs"]],
            "desired": columns[entry["desired"]["channel"]],
            "fit": intervals(entry["fit"], rate),
            "heldOut": held_out,
            "judged": judged,
        })
    for key in range(len(takes[0]["inputs"])):
        mean = np.mean(np.concatenate([t["inputs"][key][a:b] for t in takes for a, b in t["fit"]]))
        for t in takes:
            t["inputs"][key] = t["inputs"][key] - mean
    mean = np.mean(np.concatenate([t["desired"][a:b] for t in takes for a, b in t["fit"]]))
    for t in takes:
        t["desired"] = t["desired"] - mean

    length, delay, rho = (document["filter"][key] for key in ("length", "delay", "regularisation"))
    parts = [rows(t, t["fit"], length, delay) for t in takes]
    matrix = np.vstack([part[0] for part in parts])
    right = np.concatenate([part[1] for part in parts])
    powers = [np.mean(np.concatenate([t["inputs"][r][a:b] for t in takes for a, b in t["fit"]]) ** 2)
              for r in range(len(takes[0]["inputs"]))]
    penalty = np.diag(np.sqrt(rho * len(right) * np.repeat(powers, length)))
    taps = lstsq(np.vstack([matrix, penalty]), np.concatenate([right, np.zeros(len(penalty))]))[0]

    def decibels(pairs):
        error = sum(np.sum((d - x @ taps) ** 2) for x, d in pairs)
        return 10 * np.log10(error / sum(np.sum(d**2) for _, d in pairs))

    judged = [rows(t, t["judged"], length, delay) for t in takes]
    return {
        "fitNmseDb": decibels(parts),
        "nmseDb": decibels(judged),
        "takes": [{"name": t["name"], "nmseDb": decibels([pair])} for t, pair in zip(takes, judged)],
        "taps": taps.reshape(len(powers), length).tolist(),
    }


print(json.dumps({os.path.basename(path): figures(path) for path in sys.argv[1:]}))
