"""Rounding to significance: a derived value never carries digits that its method cannot vouch for.

Four significant digits unless the key or its kind says otherwise (common practice, no source). A
given value is never rounded: it is echoed as typed.
"""

from __future__ import annotations

import math
from collections.abc import Sequence

from specsheet.sheet.model import NOTHING

#: digits of a value that nothing else is said about
DIGITS = 4

#: digits by glossary key
KEY_DIGITS = {
    "reynolds_number": 3,
    "meter_reynolds_number": 3,
    "throat_reynolds_number": 3,
    "uncertainty": 2,
    "error_limit": 2,
    "viscosity": 3,
    "kinematic_viscosity": 3,
    "pressure_loss": 3,
    "reducer_loss": 3,
    "lost_power": 3,
    "yearly_energy": 3,
    "yearly_cost": 3,
    "cavitation_index": 3,
    "turndown": 3,
    "turndown_available": 3,
    "plate_stress": 3,
}

#: digits by kind
KIND_DIGITS = {"ratio": 3, "thermal_conductivity": 3}

#: smallest step worth printing, in SI, by glossary key: what a workshop or a transmitter resolves
KEY_STEPS = {
    "plate_thickness": 1e-4,
    "edge_thickness": 1e-4,
    "upstream_length": 1e-3,
    "downstream_length": 1e-3,
    "capillary_count": 1.0,
    "path_count": 1.0,
    "tube_count": 1.0,
}

#: the same by kind; a temperature is resolved to a tenth of a kelvin, a length to 0.01 mm
KIND_STEPS = {
    "temperature": 0.1,
    "temperature_difference": 0.1,
    "current": 1e-5,
    "length": 1e-5,
    "angle": 1.7e-3,
}

#: below this many steps of its kind a value keeps its significant digits
_FEW_STEPS = 50.0


def digits(key: str, kind: str) -> int:
    """Return the number of significant digits printed of a derived value."""
    return KEY_DIGITS.get(key, KIND_DIGITS.get(kind, DIGITS))


def step(key: str, kind: str, value: float) -> float | None:
    """Return the smallest step worth printing [SI], None where significant digits decide."""
    if key in KEY_STEPS:
        return KEY_STEPS[key]
    smallest = KIND_STEPS.get(kind)
    return None if smallest is None or abs(value) < _FEW_STEPS * smallest else smallest


def significant(value: float, count: int = DIGITS) -> str:
    """Return ``value`` rounded to ``count`` significant digits.

    Five digits or more before the point are grouped by no-break thin spaces; below 1e-4 and from
    1e9 a power of ten is written. A value that is no number gives :data:`NOTHING`.
    """
    if not math.isfinite(value):
        return NOTHING
    if value == 0.0:
        return "0"
    mantissa, _, exponent = f"{value:.{count - 1}e}".partition("e")
    power = int(exponent)
    if power < -4 or power >= 9:
        return f"{_minus(mantissa)}·10{_superscript(power)}"
    text = f"{float(f'{mantissa}e{power}'):.{max(0, count - 1 - power)}f}"
    return text if value > 0.0 and power < 4 else group(text)


def shared_step(key: str, kind: str, values: Sequence[float]) -> float | None:
    """Return the step that a row of values shares [SI], None where significant digits decide.

    The largest value decides, so that 6.3 does not stand beside 3.222; where the smallest would
    be printed as nothing, the step is a tenth or a hundredth of the usual one.
    """
    sizes = [abs(value) for value in values if math.isfinite(value)]
    usual = step(key, kind, max(sizes, default=0.0))
    if usual is None or key in KEY_STEPS:
        return usual
    steps = (usual, usual / 10.0, usual / 100.0)
    least = min(size for size in sizes if size >= steps[-1])
    return next(size for size in steps if size <= least)


def to_step(value: float, smallest: float) -> str:
    """Return ``value`` to the decimals of ``smallest``, both in the unit printed.

    The step is taken to the nearest power of ten: 0.18 (a tenth of a kelvin in °F) gives one
    decimal.
    """
    if not math.isfinite(value):
        return NOTHING
    decimals = max(0, -round(math.log10(smallest)))
    text = f"{value:.{decimals}f}"
    return group(text if float(text) != 0.0 else text.lstrip("-"))


def plain(value: float, count: int = DIGITS) -> str:
    """Return a bound, a tick or a stated value with the digits it has, no more than ``count``."""
    if not math.isfinite(value):
        return NOTHING
    text = significant(value, count)
    return text.rstrip("0").rstrip(".") if "." in text and "·" not in text else text


def group(text: str) -> str:
    """Return a plain decimal number with a true minus and its thousands set apart."""
    sign, body = ("−", text[1:]) if text.startswith("-") else ("", text)
    whole, point, rest = body.partition(".")
    if len(whole) > 4:
        head = len(whole) % 3
        parts = [whole[:head]] if head else []
        parts += [whole[at : at + 3] for at in range(head, len(whole), 3)]
        whole = "\u202f".join(parts)
    return f"{sign}{whole}{point}{rest}"


def _minus(text: str) -> str:
    return text.replace("-", "−")


def _superscript(power: int) -> str:
    return str(power).translate(str.maketrans("-0123456789", "⁻⁰¹²³⁴⁵⁶⁷⁸⁹"))
