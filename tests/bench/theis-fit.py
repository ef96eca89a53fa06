#!/usr/bin/python3
"""Times scipy's curve_fit (exp1, method lm) on the readings given as JSON on stdin; prints milliseconds, T and S."""
import json
import sys
import time

import numpy as np
from scipy.optimize import curve_fit
from scipy.special import exp1

job = json.load(sys.stdin)
t, s = np.array(job['elapsed_s']), np.array(job['drawdown_m'])
rate, r = job['rate'], job['distance']


def model(t, lnT, lnS):
    return rate / (4 * np.pi * np.exp(lnT)) * exp1(r * r * np.exp(lnS) / (4 * np.exp(lnT) * t))


spent = []
for _ in range(job['repeats']):
    begin = time.perf_counter()
    best, _ = curve_fit(model, t, s, p0=np.log(job['start']), method='lm')
    spent.append(1e3 * (time.perf_counter() - begin))
print(json.dumps({'milliseconds': float(np.median(spent)), 'T': float(np.exp(best[0])), 'S': float(np.exp(best[1]))}))
