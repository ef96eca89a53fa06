#!/usr/bin/python3
"""Least squares by numpy and scipy on synthetic step, slug and antecedent data, for tests/shared/hydraulics.

Usage: /usr/bin/python3 test-kinds.py > test-kinds.json
Heads with inertia and storage come from the Laplace-space solution, inverted by mpmath.
"""
import hashlib
import json
import pathlib

import mpmath
import numpy as np
import scipy
from mpmath import mp
from scipy.optimize import least_squares
from scipy.special import exp1, kv
from scipy.stats import linregress

here = pathlib.Path(__file__)
rng = np.random.default_rng(7)


def step_test():
    T, S, r, C = 4e-3, 3e-4, 0.15, 1500.0
    starts, rates = [0.0, 3600.0, 7200.0, 10800.0], [0.008, 0.014, 0.02, 0.027]
    t = np.sort(np.concatenate([s + np.geomspace(60, 3600, 25) for s in starts]))
    t = np.unique(np.round(t, 6))
    drawdown = np.zeros_like(t)
    for i, start in enumerate(starts):
        change = rates[i] - (rates[i - 1] if i else 0)
        on = t > start
        drawdown[on] += change / (4 * np.pi * T) * exp1(r * r * S / (4 * T * (t[on] - start)))
    step = np.searchsorted(starts, t, side='left') - 1
    drawdown += C * np.array(rates)[step] ** 2 + rng.normal(0, 0.01, t.size)
    late = t - np.array(starts)[step] >= 360
    changes = np.diff([0.0] + rates)
    x = np.array([sum(changes[i] * np.log10(ti - starts[i]) for i in range(n + 1)) for ti, n in zip(t, step)])
    design = np.column_stack([(step == n).astype(float) for n in range(4)] + [x])[late]
    best = np.linalg.lstsq(design, drawdown[late], rcond=None)[0]
    q = np.array(rates)
    per_rate = best[:4] / q + best[4] * np.log10(3600)
    line = linregress(q, per_rate)
    f = lambda p: p[0] + p[1] * (q / q.mean()) ** (p[2] - 1) - per_rate
    free = min(
        (least_squares(f, [per_rate[0], 0.3 * per_rate[0], P], bounds=([-np.inf, 0, 1.5], [np.inf, np.inf, 3.5]),
                       xtol=1e-15, ftol=1e-15, gtol=1e-15) for P in (1.7, 2.2, 3)), key=lambda r: r.cost)
    return {
        't': t.tolist(), 's': drawdown.tolist(), 'starts': starts, 'rates': rates, 'truth': {'C': C, 'T': T},
        'trend': float(best[4]), 'perRate': per_rate.tolist(), 'B': float(line.intercept), 'C': float(line.slope),
        'sdB': float(line.intercept_stderr), 'sdC': float(line.stderr),
        'free': {'B': float(free.x[0]), 'C': float(free.x[1] / q.mean() ** (free.x[2] - 1)), 'P': float(free.x[2]),
                 'squares': float(2 * free.cost)},
    }


def slug_line():
    t = np.arange(1.0, 61.0)
    h = np.exp(-t / 17) * (1 + rng.normal(0, 0.01, t.size))
    start = np.argmax(h <= 0.3)
    end = start + np.argmax(h[start:] < 0.2)
    r = linregress(t[start:end], -np.log10(h[start:end]))
    return {'t': t.tolist(), 'h': h.tolist(), 'n': int(end - start), 'slope': float(r.slope), 'intercept': float(r.intercept)}


def talbot(transform, t, n=40):
    """Fixed Talbot inversion, Abate & Valko 2004."""
    k = np.arange(1, n)
    theta = k * np.pi / n
    r = 2 * n / (5 * t)
    s = r * theta * (1 / np.tan(theta) + 1j)
    sigma = theta + (theta / np.tan(theta) - 1) / np.tan(theta)
    inner = np.real(np.exp(t * s) * transform(s) * (1 + 1j * sigma)).sum()
    return r / n * (0.5 * np.exp(r * t) * np.real(transform(np.array([r + 0j]))[0]) + inner)


def stored(T, S, rw, rc, t):
    def transform(p):
        x = rw * np.sqrt(p * S / T)
        g = kv(0, x) / (2 * np.pi * T * x * kv(1, x))
        a = np.pi * rc * rc * g
        return a / (1 + a * p)
    return np.array([talbot(transform, ti) for ti in t])


def storage_slug():
    rw, rc, T, S = 0.1, 0.05, 3e-5, 2e-4
    t = np.geomspace(2, 600, 40)
    h = stored(T, S, rw, rc, t) + rng.normal(0, 0.004, t.size)
    f = lambda p: stored(np.exp(p[0]), np.exp(p[1]), rw, rc, t) - h
    best = least_squares(f, np.log([1e-5, 1e-3]), jac='3-point', xtol=1e-15, ftol=1e-15, gtol=1e-15)
    return {'rw': rw, 'rc': rc, 'truth': {'T': T, 'S': S}, 't': t.tolist(), 'h': h.tolist(),
            'T': float(np.exp(best.x[0])), 'S': float(np.exp(best.x[1])), 'squares': float(2 * best.cost)}


def inertial(T, S, r, length, t):
    """Kipp 1985: column of the given length, casing and screen of one radius, released from rest at 1."""
    g = mp.mpf('9.80665')

    def transform(p):
        x = r * mp.sqrt(p * S / T)
        a = mp.pi * r * r * mp.besselk(0, x) / (2 * mp.pi * T * x * mp.besselk(1, x))
        return (length / g * p + a) / (length / g * p * p + a * p + 1)
    return [float(mp.invertlaplace(transform, ti, method='dehoog', degree=40)) for ti in t]


def spring(p, t):
    w, z, a, v = p
    tau = w * t
    eta = np.sqrt(complex(1 - z * z))
    return np.real(np.exp(-z * tau) * (a * np.cos(eta * tau) + (v + z * a) * np.sin(eta * tau) / eta))


def inertia_slug(T, last):
    S, r, length = 1e-4, 0.05, 20.0
    t = np.linspace(last / 30, last, 30)
    h = np.array(inertial(T, S, r, length, t))
    best = least_squares(lambda p: spring(p, t) - h, [0.7, 0.4, 1, 0], xtol=1e-15, ftol=1e-15, gtol=1e-15)
    return {'T': T, 'S': S, 'r': r, 'length': length, 't': t.tolist(), 'h': h.tolist(),
            'frequency': float(best.x[0]), 'damping': float(best.x[1]), 'start': float(best.x[2]),
            'squares': float(2 * best.cost)}


def antecedent():
    t = np.arange(-30 * 24, 10 * 24) * 3600.0
    hours = t / 3600
    pressure = 10.2 + 0.12 * np.sin(hours / 19) + 0.07 * np.cos(hours / 47) + 0.05 * np.sin(hours / 7.3)
    delayed = 10.2 + 0.12 * np.sin((hours - 2) / 19) + 0.07 * np.cos((hours - 2) / 47) + 0.05 * np.sin((hours - 2) / 7.3)
    noise = rng.normal(0, 0.002, t.size)
    s = 0.02 + 1e-8 * t + 0.45 * delayed + noise
    before = t <= 0
    lagged = np.interp(t - 7200, t, pressure)
    use = before & (t >= t[0] + 6 * 3600)
    design = np.column_stack([np.ones(use.sum()), t[use], lagged[use]])
    efficiency = np.linalg.lstsq(design, s[use], rcond=None)[0][2]
    speeds = {'M2': 28.9841042, 'S2': 30.0, 'N2': 28.4397295, 'K1': 15.0410686, 'O1': 13.9430356}
    size = {'M2': 0.11, 'S2': 0.04, 'N2': 0.025, 'K1': 0.05, 'O1': 0.03}
    tide = sum(size[k] * np.cos(np.radians(speeds[k]) * hours - i) for i, k in enumerate(speeds))
    d = 0.3 + 2e-8 * t + tide + noise
    columns = [np.ones(before.sum()), t[before]]
    for k in ('M2', 'K1', 'O1', 'S2', 'N2'):
        columns += [np.cos(np.radians(speeds[k]) * hours[before]), np.sin(np.radians(speeds[k]) * hours[before])]
    best = np.linalg.lstsq(np.column_stack(columns), d[before], rcond=None)[0]
    return {
        't': t.tolist(), 'pressure': pressure.tolist(), 'level': s.tolist(), 'from': float(t[0] + 6 * 3600),
        'efficiency': float(efficiency), 'tidal': d.tolist(), 'truth': size,
        'amplitudes': {k: float(np.hypot(*best[2 + 2 * i:4 + 2 * i])) for i, k in enumerate(('M2', 'K1', 'O1', 'S2', 'N2'))},
    }


print(json.dumps({
    'provenance': {
        'tool': 'numpy lstsq, scipy linregress and least_squares, mpmath invertlaplace',
        'version': f'{scipy.__version__}, mpmath {mpmath.__version__}', 'script': here.name,
        'scriptSha256': hashlib.sha256(here.read_bytes()).hexdigest(),
    },
    'step': step_test(),
    'slugLine': slug_line(),
    'storage': storage_slug(),
    'swinging': inertia_slug(1.5e-2, 40),
    'critical': inertia_slug(2e-3, 25),
    'antecedent': antecedent(),
}, indent=None))
