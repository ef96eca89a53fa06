#!/usr/bin/python3
"""Normal, Student and binomial probabilities from scipy, for tests/shared/geostatistics/distributions.test.ts.

Usage: /usr/bin/python3 distributions.py > distributions.json
"""
import hashlib
import json
import pathlib

import scipy
from scipy import special, stats

here = pathlib.Path(__file__)
xs = [-7.5, -4, -1.959964, -0.3, 0, 0.01, 1, 2.5, 6]
student = [(x, df) for x in (-12.7, -2, -0.5, 0, 1, 2.776, 8) for df in (1, 3, 4.5, 11, 28, 120)]
binomial = [(k, n, p) for n, p in ((12, 0.95), (30, 0.95), (150, 0.95), (150, 0.8)) for k in (n, n - 1, n - 6, int(n * p) - 5)]
print(json.dumps({
    'provenance': {
        'tool': 'scipy', 'version': scipy.__version__, 'script': here.name,
        'scriptSha256': hashlib.sha256(here.read_bytes()).hexdigest(),
    },
    'normal': [{'x': x, 'p': float(stats.norm.cdf(x))} for x in xs],
    'student': [{'x': x, 'df': df, 'p': float(special.stdtr(df, x)), 'density': float(stats.t.pdf(x, df))} for x, df in student],
    'logGamma': [{'x': x, 'value': float(special.gammaln(x))} for x in (0.5, 1, 1.5, 3.2, 17, 151, 2001)],
    'binomial': [
        {'k': k, 'n': n, 'p': p, 'value': float(stats.binomtest(k, n, p).pvalue)} for k, n, p in binomial
    ],
}, indent=1))
