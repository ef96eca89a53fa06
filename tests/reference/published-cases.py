#!/usr/bin/python3
"""Least squares by scipy on published tests and on synthetic ones from published figures, for tests/server/journeys.

Usage: /usr/bin/python3 published-cases.py > published-cases.json
Published readings are read from the CSV files beside this script; synthetic ones are kept in the output. Well functions
are evaluated by Gauss–Legendre quadrature, water-table and storing wells by Stehfest's inversion of their transforms.
"""
import csv
import hashlib
import json
import pathlib
from math import factorial, log

import numpy as np
import scipy
from scipy.optimize import curve_fit, least_squares
from scipy.special import exp1, k0, k1, kv
from scipy.stats import linregress

here = pathlib.Path(__file__)
DAY, MINUTE, FT, GPM = 86400.0, 60.0, 0.3048, 231 * 0.0254**3 / 60
nodes, weights = np.polynomial.legendre.leggauss(200)
rng = np.random.default_rng(20)


def readings(name, time_unit):
    rows = [row for row in csv.reader((here.parent / name).read_text().splitlines()) if not row[0].startswith('#')][1:]
    return np.array([[float(t) * time_unit, float(s)] for t, s in rows]).T


def fit(model, t, s, start, step=None):
    """`step`: relative step of derivatives, for models good to six digits only."""
    best, _ = curve_fit(
        model, t, s, p0=np.log(start), method='lm', xtol=1e-13, ftol=1e-13, maxfev=20000, epsfcn=step and step * step)
    rest = model(t, *best) - s
    return {'parameters': np.exp(best).tolist(), 'objective': float(rest @ rest)}


def theis(rate, r):
    return lambda t, lnT, lnS: rate / (4 * np.pi * np.exp(lnT)) * exp1(r * r * np.exp(lnS - lnT) / (4 * t))


def two_piezometers():
    rate = 788 / DAY
    near, far = readings('oude-korendijk.csv', MINUTE), readings('korendijk-90.csv', MINUTE)
    t, s = np.concatenate([near, far], axis=1)

    def model(t, lnT, lnS):
        count = near.shape[1]
        return np.concatenate([theis(rate, 30)(t[:count], lnT, lnS), theis(rate, 90)(t[count:], lnT, lnS)])
    return fit(model, t, s, [5e-3, 1e-4])


def leaky():
    t, s = readings('dalem-90.csv', DAY)
    rate, r = 761 / DAY, 90.0

    def model(t, lnT, lnS, lnB):
        u, rho = r * r * np.exp(lnS - lnT) / (4 * t), r / np.exp(lnB)
        low = np.log(u)
        half = (np.log(u + 60) - low) / 2
        y = np.exp(low[:, None] + half[:, None] * (nodes + 1))
        return rate / (4 * np.pi * np.exp(lnT)) * half * (np.exp(-y - rho**2 / (4 * y)) @ weights)
    return fit(model, t, s, [0.02, 1e-3, 900])


def stehfest_weights(terms):
    half = terms // 2
    return np.array([
        (-1) ** (half + i) * sum(
            k**half * factorial(2 * k) / (factorial(half - k) * factorial(k) * factorial(k - 1) * factorial(i - k) * factorial(2 * k - i))
            for k in range((i + 1) // 2, min(i, half) + 1))
        for i in range(1, terms + 1)])


STEHFEST = stehfest_weights(14)


def inverted(transform, t):
    p = log(2) * np.arange(1, STEHFEST.size + 1)[None, :] / t[:, None]
    return log(2) / t * (transform(p) @ STEHFEST)


def table_transform(p, sigma, beta):
    """4πTs/Q against t·Kz/(Sy·b), averaged over the thickness. Source: Moench 1997."""
    total = np.zeros_like(p)
    for n in range(400):
        e = np.sqrt(p / (1 + p / 2.4674)) if n == 0 else n * np.pi + np.arctan(p / (n * np.pi))
        for _ in range(30):
            e = e - (e - n * np.pi - np.arctan(p / e)) / (1 + p / (e * e + p * p))
        x = np.sqrt(beta * (sigma * p + e * e))
        term = k0(x) * (np.sin(e) / e) ** 2 / (0.5 + np.sin(2 * e) / (4 * e))
        total = total + term
        if np.all(term <= 1e-13 * total):
            break
    return 2 / p * total


def unconfined():
    t, s = readings('vennebulten-90.csv', MINUTE)
    rate, r, b = 873 / DAY, 90.0, 10.0

    def model(t, lnT, lnS, lnSy, lnK):
        T, S, Sy, ratio = np.exp([lnT, lnS, lnSy, lnK])
        beta = ratio * (r / b) ** 2
        return rate / (4 * np.pi * T) * inverted(lambda p: table_transform(p, S / Sy, beta), t * ratio * T / (Sy * b * b))
    return {**fit(model, t, s, [1.7e-2, 5e-4, 5e-3, 1e-3], 3e-4), 'thickness': b}


def recovery():
    t, s = readings('todd-recovery.csv', MINUTE)
    rate, stop = 2500 / DAY, 240 * MINUTE
    line = linregress(np.log10((stop + t) / t), s)
    return {'T': float(np.log(10) * rate / (4 * np.pi * line.slope)), 'slope': float(line.slope), 'n': int(t.size)}


def barrier():
    """Gridley's T and S as published, with a barrier 600 m north of the well; the observation well stands to the east."""
    rate, r, T, S, distance = 220 * GPM, 824 * FT, 10100 * 0.00378541178 / DAY / FT, 2e-5, 600.0
    t = np.geomspace(120, 60000, 60)

    def model(t, lnT, lnS, lnL):
        image = np.hypot(r, 2 * np.exp(lnL))
        return theis(rate, r)(t, lnT, lnS) + theis(rate, image)(t, lnT, lnS)
    s = model(t, *np.log([T, S, distance])) + rng.normal(0, 0.01, t.size)
    return {**fit(model, t, s, [T, S, 500]), 't': t.tolist(), 's': s.tolist(), 'truth': [T, S, distance], 'r': r}


def storing_well():
    """The type curve of Papadopulos & Cooper 1967 for α = 1e-3: a dug well of 1 m radius, T 1e-3 m²/s."""
    rate, radius, T, S = 2e-3, 1.0, 1e-3, 1e-3
    t = np.geomspace(60, 40000, 50)

    def model(t, lnT, lnS):
        T, S = np.exp([lnT, lnS])

        def transform(p):
            q = radius * np.sqrt(p * S / T)
            g = k0(q) / (q * k1(q))
            return g / (1 + radius**2 * p * g / (2 * T)) / p
        return rate / (2 * np.pi * T) * inverted(transform, t)
    s = model(t, *np.log([T, S])) + rng.normal(0, 0.005, t.size)
    return {**fit(model, t, s, [2e-3, 2e-3], 3e-4), 't': t.tolist(), 's': s.tolist(), 'truth': [T, S]}


def steps():
    """Clark 1977 as analysed by Kruseman & de Ridder, from memory: rates of six steps of 3 h, B 3.26e-3 d/m², C 1.45e-7 d²/m⁵."""
    rates = np.array([1306, 1693, 2423, 3261, 4094, 5019]) / DAY
    B, C, trend, length = 3.26e-3 * DAY, 1.45e-7 * DAY**2, 30.0, 10800.0
    starts = length * np.arange(6)
    t = np.round(np.concatenate([start + np.geomspace(60, length, 25) for start in starts]), 3)
    step = np.searchsorted(starts, t, side='left') - 1
    changes = np.diff(np.concatenate([[0], rates]))
    logs = np.array([sum(changes[i] * np.log10((ti - starts[i]) / length) for i in range(n + 1)) for ti, n in zip(t, step)])
    s = B * rates[step] + trend * logs + C * rates[step] ** 2 + rng.normal(0, 0.01, t.size)
    late = t - starts[step] >= 0.1 * length
    x = np.array([sum(changes[i] * np.log10(ti - starts[i]) for i in range(n + 1)) for ti, n in zip(t, step)])
    design = np.column_stack([(step == n).astype(float) for n in range(6)] + [x])[late]
    best = np.linalg.lstsq(design, s[late], rcond=None)[0]
    line = linregress(rates, best[:6] / rates + best[6] * np.log10(length))
    return {'t': t.tolist(), 's': s.tolist(), 'starts': starts.tolist(), 'rates': rates.tolist(), 'stop': 6 * length,
            'B': float(line.intercept), 'C': float(line.slope), 'truth': {'B': B, 'C': C}}


def talbot(transform, t, n=40):
    """Fixed Talbot inversion, Abate & Valko 2004."""
    theta = np.arange(1, n) * np.pi / n
    r = 2 * n / (5 * t)
    s = r * theta * (1 / np.tan(theta) + 1j)
    sigma = theta + (theta / np.tan(theta) - 1) / np.tan(theta)
    inner = np.real(np.exp(t * s) * transform(s) * (1 + 1j * sigma)).sum()
    return r / n * (0.5 * np.exp(r * t) * np.real(transform(np.array([r + 0j]))[0]) + inner)


def slug_curve():
    t, h = readings('dawsonville.csv', 1)
    t, h, radius = t[1:], h[1:] / h[0], 0.076

    def heads(T, S):
        def transform(p):
            x = radius * np.sqrt(p * S / T)
            a = np.pi * radius**2 * kv(0, x) / (2 * np.pi * T * x * kv(1, x))
            return a / (1 + a * p)
        return np.array([talbot(transform, ti) for ti in t])
    best = least_squares(lambda p: heads(*np.exp(p)) - h, np.log([5e-4, 1e-3]), jac='3-point', xtol=1e-14, ftol=1e-14, gtol=1e-14)
    return {'T': float(np.exp(best.x[0])), 'S': float(np.exp(best.x[1])), 'objective': float(2 * best.cost)}


def slug_line(rate, low, high):
    t = 0.25 * np.arange(121)
    h = 0.29 * np.exp(-rate * t) * (1 + np.concatenate([[0], rng.normal(0, 0.01, t.size - 1)]))
    start = np.argmax(h / h[0] <= high)
    end = start + np.argmax(h[start:] / h[0] < low)
    line = linregress(t[start:end], -np.log(h[start:end] / h[0]))
    return {'t': t.tolist(), 'h': h.tolist(), 'n': int(end - start), 'rate': float(line.slope)}


def bouwer_rice():
    """Well geometry of the example in Bouwer & Rice 1976, from memory; the level falls from 0.29 m to 0.0025 m in 32 s."""
    rc, rw, L, depth, thickness = 0.076, 0.12, 4.56, 5.5, 80.0
    line = slug_line(log(0.29 / 0.0025) / 32, 0.2, 0.3)
    x = L / rw
    A = np.polyval([1.573e-14, -6.484e-11, 1.028e-7, -8.148e-5, 3.537e-2, 1.472], x)
    B = np.polyval([4.738e-13, -3.491e-10, -2.682e-6, 5.151e-3, 0.2372], x)
    dissipation = 1 / (1.1 / log(depth / rw) + (A + B * min(6.0, log((thickness - depth) / rw))) / x)
    return {**line, 'K': float(rc**2 * dissipation / (2 * L) * line['rate']),
            'well': {'rc': rc, 'rw': rw, 'L': L, 'depth': depth, 'thickness': thickness}}


def hvorslev():
    """The same fall in a screen inside the aquifer: case 8 of Hvorslev 1951."""
    rc, R, L = 0.05, 0.05, 3.0
    line = slug_line(0.1, 0.15, 0.25)
    shape = 2 * np.pi * L / np.arcsinh(L / (2 * R))
    return {**line, 'K': float(np.pi * rc**2 / shape * line['rate']), 'well': {'rc': rc, 'R': R, 'L': L}}


print(json.dumps({
    'provenance': {
        'tool': 'scipy curve_fit, least_squares and linregress', 'version': scipy.__version__, 'script': here.name,
        'scriptSha256': hashlib.sha256(here.read_bytes()).hexdigest(),
    },
    'twoPiezometers': two_piezometers(), 'leaky': leaky(), 'unconfined': unconfined(), 'recovery': recovery(),
    'barrier': barrier(), 'storingWell': storing_well(), 'steps': steps(), 'slugCurve': slug_curve(),
    'bouwerRice': bouwer_rice(), 'hvorslev': hvorslev(),
}))
