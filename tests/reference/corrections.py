#!/usr/bin/python3
"""Several corrections of one level at once, by scipy's least squares, for tests/shared/hydraulics/corrections.test.ts.

Usage: /usr/bin/python3 corrections.py > corrections.json
Synthetic drawdown before and during pumping: trend, air pressure with a daily wave, a river and five tides, white noise.
"""
import hashlib
import json
import pathlib

import numpy as np
import scipy
from scipy.optimize import least_squares

here = pathlib.Path(__file__)
rng = np.random.default_rng(11)
truth = {'slope': 2e-8, 'barometric': 0.42, 'river': 0.3}
speeds = {'M2': 28.9841042, 'K1': 15.0410686, 'O1': 13.9430356, 'S2': 30.0, 'N2': 28.4397295}
size = {'M2': 0.05, 'K1': 0.02, 'O1': 0.015, 'S2': 0.02, 'N2': 0.01}

t = np.arange(-30 * 24, 6 * 24) * 3600.0
hours = t / 3600
# Air pressure falls while the river rises, and has a wave of twelve hours as the tides do.
weather = np.sin(hours / 31) + 0.6 * np.cos(hours / 83)
pressure = 10.2 - 0.09 * weather + 0.03 * np.cos(np.radians(30.0) * hours - 0.7) + 0.02 * np.sin(hours / 9)
river = 2 + 0.4 * weather + 0.15 * np.sin(hours / 55)
tide = sum(size[k] * np.cos(np.radians(speeds[k]) * hours - i) for i, k in enumerate(speeds))
# Round numbers, so that the file is what the test computes with.
pressure, river = pressure.round(5), river.round(5)
start = np.argmax(t == 0)
level = (0.05 + truth['slope'] * t + truth['barometric'] * (pressure - pressure[start])
         - truth['river'] * (river - river[start]) + tide + rng.normal(0, 0.002, t.size)).round(5)

before = t <= 0
columns = [np.ones(before.sum()), t[before] / 1e6, pressure[before], -river[before]]
for k in speeds:
    columns += [np.cos(np.radians(speeds[k]) * hours[before]), np.sin(np.radians(speeds[k]) * hours[before])]
design = np.column_stack(columns)
best = least_squares(lambda p: design @ p - level[before], np.zeros(design.shape[1]), xtol=1e-15, ftol=1e-15, gtol=1e-15)
variance = 2 * best.cost / (before.sum() - design.shape[1])
sd = np.sqrt(np.diag(np.linalg.inv(design.T @ design)) * variance)

print(json.dumps({
    'provenance': {
        'tool': 'numpy and scipy.optimize.least_squares', 'version': f'scipy {scipy.__version__}, numpy {np.__version__}',
        'script': here.name, 'scriptSha256': hashlib.sha256(here.read_bytes()).hexdigest(),
    },
    't': t.tolist(), 'level': level.tolist(), 'pressure': pressure.tolist(), 'stage': river.tolist(), 'truth': truth,
    'found': {'slope': float(best.x[1] / 1e6), 'barometric': float(best.x[2]), 'barometricSd': float(sd[2]),
              'river': float(best.x[3]), 'M2': float(np.hypot(best.x[4], best.x[5]))},
}))
