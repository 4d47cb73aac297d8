"""Base conditions that a unit of gas volume names.

* ``Nm3``: 0 °C, 101.325 kPa (DIN 1343)
* ``Sm3``: 15 °C, 101.325 kPa (ISO 13443)
* ``scf``: 60 °F, 14.696 psia, the customary base of the gas trade in US units
"""

from __future__ import annotations

from specsheet.quantity.value import Base

#: pound-force per square inch [Pa]: 0.45359237 kg x 9.80665 m/s2 / (0.0254 m)2, exact
PSI = 0.45359237 * 9.80665 / 0.0254**2

NORMAL = Base("0 °C, 101.325 kPa (DIN 1343)", 273.15, 101325.0)
STANDARD = Base("15 °C, 101.325 kPa (ISO 13443)", 288.15, 101325.0)
CUSTOMARY = Base("60 °F, 14.696 psia", (60.0 + 459.67) / 1.8, 14.696 * PSI)
