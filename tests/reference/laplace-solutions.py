#!/usr/bin/python3
"""Wells with storage, slugs and water-table aquifers in from scipy and, in many digits, from mpmath, for tests/shared.

Usage: /usr/bin/python3 laplace-solutions.py > laplace-solutions.json
None of it goes the program's way: the well and the slug are the real integrals of their sources, skin is inverted by
de Hoog's method, and the water-table aquifer is Moench's: real roots of e*tan(e) = g, summed, inverted by Stehfest.
"""
import hashlib
import json
import pathlib

import mpmath
import numpy as np
import scipy
from mpmath import mp, mpf
from scipy.special import j0, j1, y0, y1

here = pathlib.Path(__file__)
mp.dps = 20
NODES, WEIGHTS = np.polynomial.legendre.leggauss(40)


def across(u, alpha):
    return (u * j0(u) - 2 * alpha * j1(u)) ** 2 + (u * y0(u) - 2 * alpha * y1(u)) ** 2


def integral(f, low, high):
    """From 0, in ln u, by Gauss's rule on short panels."""
    ends = np.linspace(np.log(low) - 18, np.log(high), 160)
    half = np.diff(ends) / 2
    w = (ends[:-1, None] + half[:, None]) + half[:, None] * NODES
    u = np.exp(w)
    return float(np.sum(f(u) * u * WEIGHTS * half[:, None]))


def slug(alpha, beta):
    """Cooper, Bredehoeft & Papadopulos 1967."""
    high = np.sqrt(40 * alpha / beta)
    return 8 * alpha / np.pi ** 2 * integral(lambda u: np.exp(-beta * u * u / alpha) / (u * across(u, alpha)), min(alpha, high), high)


def stored(u_w, alpha):
    """4*pi*T*s/Q in a well of finite diameter: Papadopulos & Cooper 1967. The tail falls as the fourth power."""
    return 32 * alpha ** 2 / np.pi ** 2 * integral(
        lambda b: -np.expm1(-b * b / (4 * u_w)) / (b ** 3 * across(b, alpha)), min(alpha, np.sqrt(u_w)), 1000)


def skin_case(ratio, alpha, skin, distance):
    """4*pi*T*s/Q at Tt/(S*r_w^2) = ratio, distance in well radii, None: in the well."""
    def transform(p):
        q = mp.sqrt(p)
        g = mp.besselk(0, q) / (q * mp.besselk(1, q)) + skin
        flow = 1 / (1 + p * g / (2 * alpha))
        return 2 / p * flow * (g if distance is None else mp.besselk(0, distance * q) / (q * mp.besselk(1, q)))
    return mp.invertlaplace(transform, mpf(ratio), method='dehoog')


def root(n, g):
    e = n * mp.pi + mp.atan(g / (n * mp.pi)) if n else mp.sqrt(g / (1 + g / mpf('2.4674')))
    for _ in range(60):
        step = (e - n * mp.pi - mp.atan(g / e)) / (1 + g / (e * e + g * g))
        e -= step
        if abs(step) < mp.eps * e * 4:
            return e
    raise ArithmeticError(f'no root {n} at {g}')


def mean_cosine(e, low, high):
    return mp.cos(e * low) if low == high else (mp.sin(e * high) - mp.sin(e * low)) / (e * (high - low))


with mp.workdps(40):
    STEP = mpf(1) / 8
    COSHES = [mp.cosh(k * STEP) for k in range(120)]


def k0(x):
    """Trapezoidal rule of the integral of exp(-x*cosh t), whose error is below e^-78; mpmath's own is twenty times slower."""
    total = mp.exp(-x) / 2
    for c in COSHES[1:]:
        if x * (c - 1) > 90:
            break
        total += mp.exp(-x * c)
    return total * STEP


def table_transform(p, sigma, beta, source, place):
    """4*pi*T*s/Q against t*Kz/(Sy*b); kappa = sigma*p, g = p."""
    rho, total, n = mp.sqrt(beta), mpf(0), 0
    while True:
        e = root(n, p)
        k = k0(rho * mp.sqrt(sigma * p + e * e))
        total += k * mean_cosine(e, *source) * mean_cosine(e, *place) / (mpf(1) / 2 + mp.sin(2 * e) / (4 * e))
        if k < mpf(10) ** -29:
            return 2 / p * total
        n += 1


def stehfest(transform, t, terms):
    half, total = terms // 2, mpf(0)
    for i in range(1, terms + 1):
        weight = sum(
            mpf(k) ** half * mp.factorial(2 * k) / (mp.factorial(half - k) * mp.factorial(k) * mp.factorial(k - 1) * mp.factorial(i - k) * mp.factorial(2 * k - i))
            for k in range((i + 1) // 2, min(i, half) + 1))
        total += (-1) ** (half + i) * weight * transform(i * mp.log(2) / t)
    return total * mp.log(2) / t


def table_case(time, sigma, beta, source, place):
    """time = Tt/(Sy*r^2)."""
    with mp.workdps(34):
        known = {}

        def transform(p):
            return known.setdefault(p, table_transform(p, mpf(sigma), mpf(beta), source, place))
        t = mpf(time) * mpf(beta)
        value, check = stehfest(transform, t, 26), stehfest(transform, t, 24)
        return {'time': time, 'sigma': sigma, 'beta': beta, 'source': list(map(float, source)), 'place': list(map(float, place)),
                'value': float(value), 'uncertainty': float(abs(value - check))}


whole = (mpf(0), mpf(1))
point = lambda z: (mpf(z), mpf(z))
lower = (mpf('0.125'), mpf('0.5'))
across_both = (mpf('0.25'), mpf('0.875'))
tables = [
    (0.05, 1e-2, 0.2, whole, whole), (300, 1e-2, 0.2, whole, whole),
    (0.0003, 1e-3, 1, whole, point(0.25)), (0.02, 1e-3, 1, whole, point(0.25)), (2, 1e-3, 1, whole, point(0.25)),
    (0.3, 0.1, 10, whole, whole), (10, 0.1, 10, whole, point(1)),
    (0.001, 1e-5, 4, whole, whole), (0.3, 1e-5, 4, whole, whole), (30, 1e-5, 4, whole, across_both),
    (0.01, 1e-2, 0.3, lower, across_both), (1, 1e-2, 0.3, lower, across_both), (100, 1e-2, 0.3, lower, across_both),
    (0.02, 1e-3, 0.5, lower, point(0.9)), (1, 1e-3, 0.5, lower, point(0.3)), (20, 1e-3, 0.5, lower, whole),
    (5, 1e-2, 0.02, whole, whole),
]

print(json.dumps({
    'provenance': {
        'tool': 'mpmath', 'version': f'{mpmath.__version__}, scipy {scipy.__version__}', 'script': here.name,
        'scriptSha256': hashlib.sha256(here.read_bytes()).hexdigest(),
    },
    'slug': [{'alpha': a, 'beta': b, 'value': slug(a, b)} for a in (1e-1, 1e-3, 1e-5, 1e-8) for b in (1e-3, 0.1, 1.0, 10.0, 100.0)],
    'stored': [{'u': u, 'alpha': a, 'value': stored(u, a)} for a in (1e-1, 1e-3, 1e-5) for u in (10.0, 0.1, 1e-3, 1e-6)],
    'skin': [
        {'ratio': r, 'alpha': a, 'skin': s, 'distance': d, 'value': float(skin_case(r, mpf(a), s, d))}
        for r, a in ((300.0, 1e-3), (1e5, 0.1), (1e5, 1e-3)) for s in (0, 4) for d in (None, 20)
    ],
    'waterTable': [table_case(*case) for case in tables],
}, indent=1))
