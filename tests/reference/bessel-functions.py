#!/usr/bin/python3
"""Modified Bessel functions of orders 0 and 1, real and complex, in 40 digits from mpmath, for tests/shared/numerics.

Usage: /usr/bin/python3 bessel-functions.py > bessel-functions.json
K is scaled by e^z, I by e^-z. Complex arguments lie on rays of the right half-plane, up to a hair from its edge.
"""
import hashlib
import json
import pathlib

import mpmath
from mpmath import mp

here = pathlib.Path(__file__)
mp.dps = 40
xs = [1e-300, 1e-100, 1e-15, 1e-8, 1e-4] + [float(10 ** (mp.mpf(i) / 12)) for i in range(-36, 37)]
# Where the program changes its way of evaluation, and far out.
edges = [1.9999999, 2.0, 2.0000001, 18.4999999, 18.5, 18.5000001]
moduli = [1e-12, 1e-6, 1e-3, 0.05, 0.3, 0.7, 1.2, 1.7, 2.4048, 3.1, 3.8317, 5.5201, 7, 9, 11.8, 14, 16.5, 20, 27, 45, 90, 400, 5000, 1e6]
angles = [0, 0.2, 0.5, 0.8, 1.1, 1.4, 1.55, 1.5707]


def scaled(z):
    grow, fall = mp.exp(z), mp.exp(-z)
    return [f * b for f, b in ((grow, mp.besselk(0, z)), (grow, mp.besselk(1, z)), (fall, mp.besseli(0, z)), (fall, mp.besseli(1, z)))]


def real(x):
    return {'x': x, **dict(zip(('k0', 'k1', 'i0', 'i1'), map(float, scaled(mp.mpf(x)))))}


def complex_case(modulus, angle):
    z = mp.mpc(*(float(part) for part in (modulus * mp.cos(angle), modulus * mp.sin(angle))))
    pairs = [[float(value.real), float(value.imag)] for value in map(mp.mpc, scaled(z))]
    return {'z': [float(z.real), float(z.imag)], 'k': pairs[0] + pairs[1], 'i': pairs[2] + pairs[3]}


print(json.dumps({
    'provenance': {
        'tool': 'mpmath', 'version': mpmath.__version__, 'script': here.name, 'scriptSha256': hashlib.sha256(here.read_bytes()).hexdigest(),
    },
    'real': [real(x) for x in sorted(xs + edges)],
    'complex': [complex_case(mp.mpf(m), mp.mpf(a)) for m in sorted(moduli + edges) for a in angles],
}))
