#!/usr/bin/python3
"""Declustering, robust z, plotting positions and a line by numpy and scipy on the meuse and jura data,
for tests/shared/geostatistics/regional-statistics.test.ts. The data come from gstat-kriging.json (R packages sp, gstat).

Declustering is written from Deutsch (1989), Computers & Geosciences 15(3): each occupied cell has the same weight, shared
by its values; averaged over shifted grids; of the sizes tried, the one whose mean differs most from the plain mean.

Usage: /usr/bin/python3 regional-statistics.py > regional-statistics.json
"""
import hashlib
import json
import pathlib

import numpy as np
import scipy
from scipy import stats

here = pathlib.Path(__file__)
gstat = json.loads((here.parent / 'gstat-kriging.json').read_text())


def cell_weights(x, y, size, origins=8):
    weights = np.zeros(len(x))
    for k in range(origins):
        cells = np.column_stack([np.floor((x + k * size / origins) / size), np.floor((y + k * size / origins) / size)])
        _, member, count = np.unique(cells, axis=0, return_inverse=True, return_counts=True)
        weights += 1 / (len(count) * count[member.ravel()])
    return weights / origins


def decluster(x, y, z):
    whole = np.hypot(np.ptp(x), np.ptp(y))
    means = []
    sizes = whole * np.geomspace(0.01, 0.5, 20)
    for size in sizes:
        means.append(float(np.sum(cell_weights(x, y, size) * z)))
    best = int(np.argmax(np.abs(np.array(means) - z.mean())))
    weights = cell_weights(x, y, sizes[best])
    return {
        'cellSize': float(sizes[best]), 'mean': means[best], 'means': means,
        'deviation': float(np.sqrt(np.sum(weights * (z - means[best]) ** 2))),
        'weights': [float(w) for w in weights],
    }


def case(name):
    data = gstat[name]['data']
    x, y, z = (np.array(data[key], dtype=float) for key in 'xyz')
    # A few planted values far outside, so that some scores pass the limit of 3.5.
    spoiled = np.concatenate([z, [z.max() + 6, z.min() - 5]])
    mad = stats.median_abs_deviation(spoiled)
    robust = 0.6745 * (spoiled - np.median(spoiled)) / mad
    positions = stats.mstats.plotting_positions(z, alpha=0.5, beta=0.5)
    line = stats.linregress(x, z)
    half = stats.t.ppf(0.975, len(x) - 2) * line.stderr
    return {
        'declustered': decluster(x, y, z),
        'robust': {'planted': [float(v) for v in spoiled[-2:]], 'scores': [float(v) for v in robust],
                   'outliers': [int(i) for i in np.flatnonzero(np.abs(robust) > 3.5)]},
        # Ties are given their places by their order in the data, as a stable sort does.
        'normalScores': [float(stats.norm.ppf((r - 0.5) / len(z))) for r in stats.rankdata(z, method='ordinal')],
        'positions': [float(p) for p in np.sort(np.asarray(positions))],
        'line': {'slope': float(line.slope), 'intercept': float(line.intercept), 'low': float(line.slope - half),
                 'high': float(line.slope + half), 'explained': float(line.rvalue ** 2)},
    }


print(json.dumps({
    'provenance': {
        'tool': 'numpy and scipy', 'version': f'{np.__version__}, {scipy.__version__}', 'script': here.name,
        'scriptSha256': hashlib.sha256(here.read_bytes()).hexdigest(),
    },
    'meuse': case('meuse'),
    'jura': case('jura'),
}, indent=1))
