#!/usr/bin/python3
"""Special functions and quantiles in 40 digits from mpmath, for tests/shared/numerics.

Usage: /usr/bin/python3 numerics-functions.py > numerics-functions.json
"""
import hashlib
import json
import pathlib

import mpmath
from mpmath import mp
from scipy import stats

here = pathlib.Path(__file__)
mp.dps = 40
low, high, count = mp.mpf('1e-15'), mp.mpf(50), 240
us = [float(low * (high / low) ** (mp.mpf(i) / (count - 1))) for i in range(count)]
# Arguments at which the program changes from series to continued fraction, and beyond the stated range.
us += [1.0, 1.9999999, 2.0, 2.0000001, 100.0, 700.0]
xs = [0.5, 1e-3, 0.1, 1.0, 1.5, 3.2, 17.0, 151.0]
betas = [(x, a, b) for x in (1e-4, 0.03, 0.3, 0.5, 0.81, 0.999) for a, b in ((0.5, 0.5), (2.0, 3.5), (17.0, 0.5), (0.5, 60.0))]
ps = [1e-12, 1e-5, 0.001, 0.025, 0.1, 0.3, 0.5, 0.74, 0.95, 0.975, 0.9999]


def student_quantile(p, f):
    tail = lambda t: mp.betainc(mp.mpf(f) / 2, mp.mpf(1) / 2, 0, f / (f + t * t), regularized=True) / 2
    # scipy's quantile, good to ten digits, is only where the search begins.
    return float(mp.findroot(lambda t: tail(t) - (1 - mp.mpf(p)), mp.mpf(float(stats.t.ppf(p, f)))))


print(json.dumps({
    'provenance': {
        'tool': 'mpmath', 'version': mpmath.__version__, 'script': here.name, 'scriptSha256': hashlib.sha256(here.read_bytes()).hexdigest(),
    },
    'exponentialIntegral': [{'u': u, 'value': float(mp.e1(mp.mpf(u)))} for u in us],
    'logGamma': [{'x': x, 'value': float(mp.loggamma(mp.mpf(x)))} for x in xs],
    'incompleteBeta': [
        {'x': x, 'a': a, 'b': b, 'value': float(mp.betainc(a, b, 0, mp.mpf(x), regularized=True))} for x, a, b in betas
    ],
    'normalQuantile': [{'p': p, 'value': float(mp.sqrt(2) * mp.erfinv(2 * mp.mpf(p) - 1))} for p in ps],
    'studentQuantile': [
        {'p': p, 'freedom': f, 'value': student_quantile(p, f)}
        for p in (0.6, 0.9, 0.975, 0.9995) for f in (1.0, 1.7, 2.0, 4.4, 10.0, 31.0, 998.0)
    ],
}, indent=1))
