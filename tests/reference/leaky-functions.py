#!/usr/bin/python3
"""Well functions of leaky aquifers and of partly penetrating wells from mpmath, for tests/shared/numerics and hydraulics.

Usage: /usr/bin/python3 leaky-functions.py > leaky-functions.json
W(u, rho) is integrated in ln y (in y for u of 1 or more); H(u, beta) by a trapezoidal sum in ln(y/u − 1) with a step of 1/25. A few values of
both come a second way, by Talbot inversion of their Laplace transforms. Partly penetrating wells are computed without
Fourier series: the vertical spread of a line sink between two planes as a sum of image sinks, integrated over time.
"""
import hashlib
import json
import pathlib

import mpmath
from mpmath import mp

here = pathlib.Path(__file__)
mp.dps = 25
us = [1e-15, 1e-10, 1e-6, 1e-3, 0.01, 0.1, 0.5, 0.9, 1.1, 2.0, 3.9, 4.1, 8.0, 20.0, 50.0]
rhos = [1e-6, 1e-4, 3e-3, 0.05, 0.3, 1.0, 1.9, 2.1, 4.0, 7.0, 10.0]
h_us = [1e-15, 1e-10, 1e-5, 1e-2, 0.3, 2.0, 10.0, 50.0]
betas = [1e-4, 0.01, 0.1, 1.0, 5.0, 30.0, 100.0]


def leaky(u, rho):
    u, rho = mp.mpf(u), mp.mpf(rho)
    if u >= 1:
        return mp.quad(lambda y: mp.exp(-y - rho**2 / (4 * y)) / y, [u + step for step in (0, 0.5, 1, 2, 4, 7, 11, 16, 24, 36, 60)])
    top = mp.log(200 / u + 2)
    pieces = int(mp.ceil(top / 2))
    return mp.quad(lambda x: mp.exp(-u * mp.exp(x) - rho**2 / (4 * u) * mp.exp(-x)), [top * i / pieces for i in range(pieces + 1)])


def aquitard(u, beta):
    u, beta = mp.mpf(u), mp.mpf(beta)
    ratio = beta / u
    centre = float(mp.log(ratio if ratio < 1 else ratio ** (mp.mpf(2) / 3)))
    low, high = min(-60.0, centre - 4), max(float(mp.log(120 / u)), centre + 3)

    def integrand(k):
        z = mp.exp(mp.mpf(k) / 25)
        return mp.exp(-u * (1 + z)) * z / (1 + z) * mp.erfc(beta / mp.sqrt(u * z * (1 + z)))

    return mp.fsum(integrand(k) for k in range(int(low * 25), int(high * 25) + 25)) / 25


def inverted(transform):
    return float(mp.invertlaplace(transform, 1, method='talbot', degree=40))


def leaky_inverted(u, rho):
    return inverted(lambda p: 2 * mp.besselk(0, mp.sqrt(4 * u * p + rho**2)) / p)


def aquitard_inverted(u, beta):
    return inverted(lambda p: 2 * mp.besselk(0, mp.sqrt(4 * u * p + 4 * beta * mp.sqrt(4 * u * p))) / p)


def partial(case):
    """Dimensionless drawdown 4πTs/Q of a line sink over `pumped`, averaged over `observed`; depths over thickness."""
    u, r, a, leakage = (mp.mpf(case[k]) for k in ('u', 'r', 'anisotropy', 'leakage'))
    (d, l), (top, bottom) = case['pumped'], case['observed']

    def spread(z, width):
        # Image sinks above and below; width is the spread of a point after the time that belongs to y.
        reach = int(mp.ceil(3 + 4 * width))
        edge = lambda x: mp.erf(x / width)
        terms = (edge(l - s * z + 2 * k) - edge(d - s * z + 2 * k) for k in range(-reach, reach + 1) for s in (1, -1))
        return mp.fsum(terms) / (2 * (l - d))

    def mean_spread(width):
        if top == bottom:
            return spread(mp.mpf(top), width)
        # The antiderivative of erf makes the mean over the screen exact.
        reach = int(mp.ceil(3 + 4 * width))
        whole = lambda x: x * mp.erf(x / width) + width / mp.sqrt(mp.pi) * mp.exp(-((x / width) ** 2))
        total = mp.mpf(0)
        for k in range(-reach, reach + 1):
            for edge, sign in ((l, 1), (d, -1)):
                total += sign * (whole(edge - top + 2 * k) - whole(edge - bottom + 2 * k))
                total += sign * (whole(edge + bottom + 2 * k) - whole(edge + top + 2 * k))
        return total / (2 * (l - d) * (bottom - top))

    def integrand(x):
        y = u * mp.exp(x)
        width = r * mp.sqrt(a / y)
        share = mean_spread(width) if width < 4 else mp.mpf(1)
        return mp.exp(-y - leakage**2 / (4 * y)) * share

    end = mp.log(60 / u + 2)
    pieces = int(mp.ceil(end / 2))
    return mp.quad(integrand, [end * i / pieces for i in range(pieces + 1)])


mp.dps = 18
penetration = [
    {'u': u, 'r': r, 'anisotropy': a, 'leakage': leakage, 'pumped': pumped, 'observed': observed}
    for u in (1.0, 0.05, 1e-3)
    for r, a, leakage, pumped, observed in (
        (0.5, 1.0, 0, (0.0, 0.5), (0.75, 0.75)),
        (0.2, 0.1, 0, (0.3, 0.6), (0.0, 1.0)),
        (0.2, 0.1, 0, (0.3, 0.6), (0.5, 0.9)),
        (0.05, 0.5, 0, (0.6, 1.0), (0.6, 1.0)),
        (0.3, 0.2, 0.4, (0.1, 0.4), (0.2, 0.2)),
    )
]
for case in penetration:
    case['value'] = float(partial(case))
mp.dps = 25
print(json.dumps({
    'provenance': {
        'tool': 'mpmath', 'version': mpmath.__version__, 'script': here.name, 'scriptSha256': hashlib.sha256(here.read_bytes()).hexdigest(),
    },
    'leaky': [{'u': u, 'rho': rho, 'value': float(leaky(u, rho))} for u in us for rho in rhos],
    'leakyInverted': [
        {'u': u, 'rho': rho, 'value': leaky_inverted(u, rho)} for u in (1e-3, 0.05, 0.7) for rho in (0.01, 0.3, 2.0)
    ],
    'aquitard': [{'u': u, 'beta': beta, 'value': float(aquitard(u, beta))} for u in h_us for beta in betas],
    'aquitardInverted': [
        {'u': u, 'beta': beta, 'value': aquitard_inverted(u, beta)} for u in (1e-3, 0.05, 0.7) for beta in (0.01, 0.3, 2.0)
    ],
    'erfcScaled': [
        {'x': x, 'value': float(mp.exp(mp.mpf(x) ** 2) * mp.erfc(x))}
        for x in (0.0, 1e-9, 0.01, 0.2, 0.46, 0.46875, 0.47, 0.8, 1.5, 2.7, 3.99, 4.0, 4.01, 7.0, 26.0, 300.0)
    ],
    'penetration': penetration,
}))
