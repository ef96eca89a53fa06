#!/usr/bin/python3
"""Factors of the program's units, composed in exact rational arithmetic and, where scipy has the unit, taken from it.

Usage: /usr/bin/python3 units-factors.py > units-factors.json
"""
import hashlib
import json
import pathlib
from fractions import Fraction as F

import scipy
from scipy import constants as c

ft, inch, survey = F(3048, 10000), F(254, 10000), F(1200, 3937)
gal_us, gal_imp = 231 * inch**3, F(454609, 10**8)
acre_ft = 43560 * survey**3
minute, hour, day, litre = 60, 3600, 86400, F(1, 1000)
psi = F(45359237, 10**8) * F(980665, 10**5) / inch**2
water = 1000 * F(980665, 10**5)
mercury = F(135951, 10) * F(980665, 10**5)

discharge = {
    'm3/s': (F(1), 'm'), 'L/s': (litre, 'm'), 'L/min': (litre / minute, 'm'), 'm3/h': (F(1, hour), 'm'),
    'm3/d': (F(1, day), 'm'), 'ML/d': (F(1000, day), 'm'), 'gpm-us': (gal_us / minute, 'ft'),
    'gpm-imp': (gal_imp / minute, 'ft'), 'ft3/min': (ft**3 / minute, 'ft'), 'ft3/s': (ft**3, 'ft'),
    'MGD-us': (10**6 * gal_us / day, 'ft'), 'MGD-imp': (10**6 * gal_imp / day, 'ft'), 'acre-ft/d': (acre_ft / day, 'ft'),
}
rational = {
    'm': F(1), 'cm': F(1, 100), 'mm': F(1, 1000), 'ft': ft, 'ft-us': survey, 'in': inch,
    's': F(1), 'min': F(minute), 'h': F(hour), 'd': F(day),
    'm2/s': F(1), 'm2/d': F(1, day), 'm2/h': F(1, hour), 'm2/min': F(1, minute), 'cm2/s': F(1, 10**4),
    'ft2/d': ft**2 / day, 'ft2/min': ft**2 / minute, 'gpd-us/ft': gal_us / day / ft, 'gpd-imp/ft': gal_imp / day / ft,
    'm/s': F(1), 'm/d': F(1, day), 'cm/s': F(1, 100), 'ft/d': ft / day,
    'gpd-us/ft2': gal_us / day / ft**2, 'gpd-imp/ft2': gal_imp / day / ft**2,
    'Pa': F(1), 'hPa': F(100), 'kPa': F(1000), 'bar': F(10**5), 'psi': psi,
    'mmHg': mercury / 1000, 'inHg': mercury * inch,
    'mH2O': water, 'cmH2O': water / 100, 'ftH2O': water * ft, '1': F(1), '%': F(1, 100),
}
for unit, (factor, per) in discharge.items():
    rational[unit] = factor
    rational[f'{unit}/{per}'] = factor / (ft if per == 'ft' else 1)

from_scipy = {
    'ft': c.foot, 'ft-us': c.survey_foot, 'in': c.inch, 'min': c.minute, 'h': c.hour, 'd': c.day,
    'psi': c.psi, 'bar': c.bar, 'L/s': c.liter, 'gpm-us': c.gallon_US / c.minute, 'gpm-imp': c.gallon_imp / c.minute,
    'gpd-us/ft': c.gallon_US / c.day / c.foot, 'gpd-imp/ft2': c.gallon_imp / c.day / c.foot**2,
    'ft3/s': c.foot**3, 'mH2O': 1000 * c.g,
}
script = pathlib.Path(__file__)
print(json.dumps({
    'provenance': {
        'tool': 'python fractions and scipy.constants', 'version': f'scipy {scipy.__version__}',
        'script': script.name, 'scriptSha256': hashlib.sha256(script.read_bytes()).hexdigest(),
    },
    'rational': {unit: float(value) for unit, value in rational.items()},
    'scipy': from_scipy,
}, indent=1))
