#!/usr/bin/python3
"""Running medians and an antecedent trend by scipy, for a seeded noisy series.

Usage: /usr/bin/python3 readings-filters.py > readings-filters.json
"""
import hashlib
import json
import pathlib

import numpy
import scipy
from scipy.ndimage import median_filter
from scipy.stats import linregress, norm

rng = numpy.random.default_rng(7)
values = numpy.round(12 + 0.01 * numpy.arange(200) ** 0.5 + rng.normal(0, 0.02, 200), 4)
times = numpy.cumsum(rng.integers(30, 90, 200)).astype(float) - 6000
before = times <= 0
trend = linregress(times[before], values[before])

script = pathlib.Path(__file__)
print(json.dumps({
    'provenance': {
        'tool': 'scipy.ndimage.median_filter, scipy.stats.linregress', 'version': f'scipy {scipy.__version__}',
        'script': script.name, 'scriptSha256': hashlib.sha256(script.read_bytes()).hexdigest(),
    },
    'times': times.tolist(),
    'values': values.tolist(),
    'median11': median_filter(values, 11).tolist(),
    'median51': median_filter(values, 51).tolist(),
    'trend': {'intercept': trend.intercept, 'slope': trend.slope, 'readings': int(before.sum())},
    'madToSigma': 1 / norm.ppf(0.75),
}))
