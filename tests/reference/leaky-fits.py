#!/usr/bin/python3
"""Least squares by scipy on seeded synthetic leaky and partly penetrating tests, for tests/shared/hydraulics.

Usage: /usr/bin/python3 leaky-fits.py > leaky-fits.json
Well functions are evaluated by 200-point Gauss–Legendre quadrature in ln y, H by a trapezoidal sum in ln(y/u − 1).
Depths are counted from the aquifer's top.
"""
import hashlib
import json
import pathlib

import numpy as np
import scipy
from scipy.optimize import curve_fit
from scipy.special import erfc

here = pathlib.Path(__file__)
nodes, weights = np.polynomial.legendre.leggauss(200)
rate, distance, thickness = 0.01, 40.0, 25.0
pumped, observed = (2.0, 10.0), (14.0, 18.0)
z = np.exp(np.arange(-200, 200) * 0.15)


def leaky(u, rho):
    low, high = np.log(u), np.log(u + 60)
    half = (high - low) / 2
    y = np.exp(low[:, None] + half[:, None] * (nodes + 1))
    return half * (np.exp(-y - rho**2 / (4 * y)) @ weights)


def aquitard(u, beta):
    y = u[:, None] * (1 + z)
    return 0.15 * np.sum(np.exp(-y) * z / (1 + z) * erfc(beta / np.sqrt(y * z)), axis=1)


def mean_cosine(n, screen):
    top, bottom = (n * np.pi * depth / thickness for depth in screen)
    return (np.sin(bottom) - np.sin(top)) / (bottom - top)


def partial(u, anisotropy):
    modes = ((n, n * np.pi * distance / thickness * np.sqrt(anisotropy)) for n in range(1, 41))
    return leaky(u, 0.0) + sum(2 * mean_cosine(n, pumped) * mean_cosine(n, observed) * leaky(u, rho) for n, rho in modes)


def fit(shape, truth, third, seed):
    t = np.logspace(np.log10(30), np.log10(86400), 40)

    def model(t, *logs):
        T, S, x = np.exp(logs)
        return rate / (4 * np.pi * T) * shape(distance**2 * S / (4 * T * t), third(x))

    s = model(t, *np.log(truth)) + np.random.default_rng(seed).normal(0, 0.005, t.size)
    best, covariance = curve_fit(model, t, s, p0=np.log(truth), method='lm', xtol=1e-14, ftol=1e-14)
    rest = model(t, *best) - s
    return {
        't': t.tolist(), 's': s.tolist(), 'parameters': np.exp(best).tolist(), 'objective': float(rest @ rest),
        'lnCovariance': covariance.tolist(),
    }


print(json.dumps({
    'provenance': {
        'tool': 'scipy.optimize.curve_fit', 'version': scipy.__version__, 'script': here.name,
        'scriptSha256': hashlib.sha256(here.read_bytes()).hexdigest(),
    },
    'rate': rate, 'distance': distance, 'thickness': thickness, 'pumped': pumped, 'observed': observed,
    'leaky': fit(leaky, (3e-3, 2e-4, 120.0), lambda B: distance / B, 11),
    'leaky-storage': fit(aquitard, (3e-3, 2e-4, 150.0), lambda length: distance / length, 12),
    'partial-penetration': fit(partial, (3e-3, 2e-4, 0.1), lambda ratio: ratio, 13),
}))
