#!/usr/bin/python3
"""Factors from each unit to SI by scipy.constants, for core/quantity.

Usage: python3 scipy_constants.py > scipy_constants.csv
"""

import scipy
from scipy import constants as c

rows = [
    ("length", "in", c.inch), ("length", "ft", c.foot), ("length", "mil", c.mil), ("length", "µm", c.micron),
    ("length", "mm", c.milli), ("length", "cm", c.centi),
    ("mass", "lb", c.pound), ("mass", "oz", c.ounce), ("mass", "g", c.gram),
    ("areal-density", "lb/ft²", c.pound / c.foot**2), ("areal-density", "oz/yd²", c.ounce / c.yard**2),
    ("areal-density", "oz/ft²", c.ounce / c.foot**2),
    ("line-tension", "lbf/in", c.lbf / c.inch), ("line-tension", "lbf/ft", c.lbf / c.foot),
    ("pressure", "psi", c.psi), ("pressure", "ksi", 1000 * c.psi), ("pressure", "atm", c.atm), ("pressure", "bar", c.bar),
    ("pressure", "lbf/ft²", c.lbf / c.foot**2),
    ("density", "lb/ft³", c.pound / c.foot**3), ("density", "lb/in³", c.pound / c.inch**3),
    ("angle", "°", c.degree), ("time", "min", c.minute),
    ("expansion", "1/°F", 1 / c.degree_Fahrenheit),
    ("speed", "ft/s", c.foot), ("speed", "in/s", c.inch),
]
print(f"# scipy_constants.py, scipy {scipy.__version__}: dimension, unit, SI value of one unit")
for dimension, unit, factor in rows:
    print(f"{dimension},{unit},{factor!r}")
points = [(-459.67, "°F"), (-40, "°F"), (0, "°F"), (32, "°F"), (68, "°F"), (212, "°F"), (-273.15, "°C"), (-40, "°C"), (0, "°C"), (20, "°C"), (100, "°C")]
names = {"°F": "Fahrenheit", "°C": "Celsius"}
for number, unit in points:
    print(f"temperature,{number!r} {unit},{float(c.convert_temperature(number, names[unit], 'Kelvin'))!r}")
