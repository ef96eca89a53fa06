#!/usr/bin/python3
"""Least squares by scipy on published and synthetic pumping tests, for tests/shared/hydraulics.

Usage: /usr/bin/python3 hydraulics-fits.py > hydraulics-fits.json
The published readings are read from the CSV files beside this script; the synthetic ones are kept in the output.
"""
import csv
import hashlib
import json
import pathlib

import numpy as np
import scipy
from scipy.optimize import curve_fit
from scipy.special import exp1
from scipy.stats import linregress

here = pathlib.Path(__file__)
FT, GPM = 0.3048, 231 * 0.0254**3 / 60


def readings(name, unit):
    rows = [row for row in csv.reader((here.parent / name).read_text().splitlines()) if not row[0].startswith('#')][1:]
    return np.array([[float(t) * 60, float(s) * unit] for t, s in rows]).T


def theis(rate, distance):
    return lambda t, lnT, lnS: rate / (4 * np.pi * np.exp(lnT)) * exp1(distance**2 * np.exp(lnS) / (4 * np.exp(lnT) * t))


def fit(t, s, rate, distance, log):
    model = theis(rate, distance)
    f = (lambda *a: np.log(model(*a))) if log else model
    best, cov = curve_fit(f, t, np.log(s) if log else s, p0=np.log([5e-3, 1e-4]), method='lm', xtol=1e-14, ftol=1e-14)
    rest = f(t, *best) - (np.log(s) if log else s)
    return {
        'T': float(np.exp(best[0])), 'S': float(np.exp(best[1])), 'objective': float(rest @ rest),
        'lnCovariance': cov.tolist(),
    }


def line(t, s, rate, distance, t1, t2):
    inside = (t >= t1) & (t <= t2)
    r = linregress(np.log10(t[inside]), s[inside])
    T = np.log(10) * rate / (4 * np.pi * r.slope)
    S = 4 * np.exp(-np.euler_gamma) * T * 10 ** (-r.intercept / r.slope) / distance**2
    return {
        'from_s': t1, 'to_s': t2, 'n': int(inside.sum()), 'slope': float(r.slope), 'intercept': float(r.intercept),
        'slopeSd': float(r.stderr), 'interceptSd': float(r.intercept_stderr), 'T': float(T), 'S': float(S),
    }


ok = dict(zip(('t', 's'), readings('oude-korendijk.csv', 1)), rate=788 / 86400, distance=30)
gr = dict(zip(('t', 's'), readings('gridley.csv', FT)), rate=220 * GPM, distance=824 * FT)
rng = np.random.default_rng(1)
t = np.geomspace(30, 2e5, 80)
synthetic = dict(t=t, s=theis(0.02, 45)(t, np.log(8e-3), np.log(3e-4)) + rng.normal(0, 0.01, t.size), rate=0.02, distance=45)


def all_fits(d, t1, t2):
    args = d['t'], d['s'], d['rate'], d['distance']
    return {
        'rate': d['rate'], 'distance': d['distance'],
        'drawdown': fit(*args, False), 'line': line(*args, t1, t2),
        **({'logDrawdown': fit(*args, True)} if (d['s'] > 0).all() else {}),
    }


print(json.dumps({
    'provenance': {
        'tool': 'scipy curve_fit (exp1, lm) and linregress', 'version': scipy.__version__, 'script': here.name,
        'scriptSha256': hashlib.sha256(here.read_bytes()).hexdigest(),
    },
    'oudeKorendijk': all_fits(ok, 1.4 * 60, 18 * 60),
    'gridley': all_fits(gr, 100 * 60, 500 * 60),
    'synthetic': {**all_fits(synthetic, 2e4, 2e5), 't': t.tolist(), 's': synthetic['s'].tolist()},
}, indent=1))
