#!/usr/bin/python3
"""Huber fits by scipy on a confined and a leaky synthetic test with readings far off, for tests/shared/hydraulics.

Usage: /usr/bin/python3 robust-fits.py > robust-fits.json
scipy.optimize.least_squares with loss 'huber' and f_scale c; c is 1.345 times 1.4826 times the median size of the
residuals of the fit itself (of the plain fit at first), until it no longer changes.
"""
import hashlib
import json
import pathlib

import numpy as np
import scipy
from scipy.optimize import least_squares
from scipy.special import exp1

here = pathlib.Path(__file__)
nodes, weights = np.polynomial.legendre.leggauss(200)
rate, distance = 0.01, 40.0


def leaky(u, rho):
    low, high = np.log(u), np.log(u + 60)
    half = (high - low) / 2
    y = np.exp(low[:, None] + half[:, None] * (nodes + 1))
    return half * (np.exp(-y - rho**2 / (4 * y)) @ weights)


def drawdown(t, logs, shape):
    T, S, *rest = np.exp(logs)
    return rate / (4 * np.pi * T) * shape(distance**2 * S / (4 * T * t), *rest)


def fit(shape, truth, logarithmic, seed):
    t = np.logspace(np.log10(30), np.log10(86400), 50)
    random = np.random.default_rng(seed)
    s = drawdown(t, np.log(truth), shape) + random.normal(0, 0.004, t.size)
    far = random.choice(t.size, 6, replace=False)
    s[far] += 0.12 * random.uniform(0.5, 1.5, far.size)

    def rest(logs):
        model = drawdown(t, logs, shape)
        return np.log(model / s) if logarithmic else model - s

    exact = {'xtol': 1e-15, 'ftol': 1e-15, 'gtol': 1e-15, 'x_scale': 'jac', 'jac': '3-point', 'max_nfev': 2000}
    best = least_squares(rest, np.log(truth), **exact)
    plain, limit = best.x, 0.0
    while True:
        following = 1.345 * 1.4826 * float(np.median(np.abs(rest(best.x))))
        if abs(following / limit - 1 if limit else 1) < 1e-8:
            break
        limit = following
        best = least_squares(rest, best.x, loss='huber', f_scale=limit, **exact)
    return {
        't': t.tolist(), 's': s.tolist(), 'truth': truth, 'logarithmic': logarithmic,
        'plain': np.exp(plain).tolist(), 'parameters': np.exp(best.x).tolist(), 'limit': limit,
        'objective': float(2 * best.cost), 'beyond': int(np.sum(np.abs(rest(best.x)) > limit)),
    }


print(json.dumps({
    'provenance': {
        'tool': 'scipy.optimize.least_squares', 'version': scipy.__version__, 'script': here.name,
        'scriptSha256': hashlib.sha256(here.read_bytes()).hexdigest(),
    },
    'rate': rate, 'distance': distance,
    'theis': fit(lambda u: exp1(u), (3e-3, 2e-4), False, 21),
    'theis-log': fit(lambda u: exp1(u), (3e-3, 2e-4), True, 22),
    'leaky': fit(lambda u, B: leaky(u, distance / B), (3e-3, 2e-4, 120.0), False, 23),
}))
