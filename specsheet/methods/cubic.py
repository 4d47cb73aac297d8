"""One phase or two: the tangent-plane test with a cubic equation of state.

Sources: D.-Y. Peng and D. B. Robinson, Ind. Eng. Chem. Fundam. 15 (1976) 59 (equation of state,
without interaction between components); M. L. Michelsen, Fluid Phase Equilibria 9 (1982) 1
(stability by successive substitution). From memory; checked against an independent library and
against dew points of multi-fluid equations in the tests.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

from specsheet.methods.equilibrium import Critical, wilson_ratio

_ROOT2 = math.sqrt(2.0)
#: answers: two phases, or one on the gas root, the liquid root, or the only root
TWO, GAS, LIQUID, ONLY = "two_phase", "gas", "liquid", "only"
#: volume by that of the molecules, below which a fluid is dense; 3.95 at the critical point
_DENSE = 3.0
_STEPS = 60
_CONVERGED = 1e-9
#: a trial phase whose amounts all lie this near to the feed is the feed itself
_TRIVIAL = 1e-3


@dataclass(frozen=True, slots=True)
class _Reduced:
    """Square roots of the attraction and the volumes of the components, in units of RT/p."""

    roots: tuple[float, ...]
    volumes: tuple[float, ...]


def _reduced(temperature: float, pressure: float, components: Sequence[Critical]) -> _Reduced:
    roots, volumes = [], []
    for item in components:
        w = item.acentric
        if w <= 0.491:
            slope = 0.37464 + 1.54226 * w - 0.26992 * w * w
        else:
            slope = 0.379642 + 1.48503 * w - 0.164423 * w * w + 0.016666 * w**3
        ratio = temperature / item.temperature
        alpha = 1.0 + slope * (1.0 - math.sqrt(ratio))
        reduced = pressure / item.pressure
        roots.append(math.sqrt(0.45724 * reduced) / ratio * alpha)
        volumes.append(0.07780 * reduced / ratio)
    return _Reduced(tuple(roots), tuple(volumes))


def _factors(a: float, b: float) -> list[float]:
    """Return the real roots of the cubic in the compressibility factor that exceed ``b``."""
    c2, c1, c0 = b - 1.0, a - 3.0 * b * b - 2.0 * b, b**3 + b * b - a * b
    shift = -c2 / 3.0
    p = c1 - c2 * c2 / 3.0
    q = 2.0 * c2**3 / 27.0 - c2 * c1 / 3.0 + c0
    inner = q * q / 4.0 + p**3 / 27.0
    if inner > 0.0:
        root = math.sqrt(inner)
        found = [math.cbrt(-q / 2.0 + root) + math.cbrt(-q / 2.0 - root) + shift]
    else:
        size = 2.0 * math.sqrt(max(-p / 3.0, 0.0))
        cosine = 0.0 if size == 0.0 else max(-1.0, min(1.0, 3.0 * q / (p * size)))
        angle = math.acos(cosine) / 3.0
        found = [size * math.cos(angle - 2.0 * math.pi * k / 3.0) + shift for k in range(3)]
    return [z for z in found if z > b]


@dataclass(frozen=True, slots=True)
class _Branch:
    """The root of the lower Gibbs energy: ln phi of each component, which root, volume by b."""

    logarithms: tuple[float, ...]
    root: str
    volume: float


def _branch(fractions: Sequence[float], data: _Reduced) -> _Branch:
    total = sum(x * root for x, root in zip(fractions, data.roots, strict=True))
    b = sum(x * volume for x, volume in zip(fractions, data.volumes, strict=True))
    a = total * total
    roots = _factors(a, b)
    low, high = min(roots), max(roots)
    best = _logarithms(high, a, b, total, data)
    if high - low < 1e-9:
        return _Branch(best, ONLY, high / b)
    dense = _logarithms(low, a, b, total, data)
    energy = sum(x * (d - v) for x, d, v in zip(fractions, dense, best, strict=True))
    return _Branch(dense, LIQUID, low / b) if energy < 0.0 else _Branch(best, GAS, high / b)


def _logarithms(z: float, a: float, b: float, total: float, data: _Reduced) -> tuple[float, ...]:
    attraction = a / (2.0 * _ROOT2 * b)
    attraction *= math.log((z + (1.0 + _ROOT2) * b) / (z + (1.0 - _ROOT2) * b))
    free = math.log(z - b)
    return tuple(
        volume / b * (z - 1.0) - free - attraction * (2.0 * root / total - volume / b)
        for root, volume in zip(data.roots, data.volumes, strict=True)
    )


def compressibility_factors(
    *,
    temperature: float,
    pressure: float,
    fractions: Sequence[float],
    components: Sequence[Critical],
) -> tuple[float, float]:
    """Return the smallest and the largest root Z [-]; the same twice where there is one only.

    Args:
        temperature: [K]
        pressure: [Pa]
        fractions: mole fractions [-], summing to one.
        components: critical constants.
    """
    data = _reduced(temperature, pressure, components)
    total = sum(x * root for x, root in zip(fractions, data.roots, strict=True))
    b = sum(x * volume for x, volume in zip(fractions, data.volumes, strict=True))
    roots = _factors(total * total, b)
    return min(roots), max(roots)


def log_fugacity_coefficients(
    *,
    temperature: float,
    pressure: float,
    fractions: Sequence[float],
    components: Sequence[Critical],
) -> tuple[float, ...]:
    """Return ln phi of each component, at the root of the lower Gibbs energy.

    Args:
        temperature: [K]
        pressure: [Pa]
        fractions: mole fractions [-], summing to one.
        components: critical constants.
    """
    return _branch(fractions, _reduced(temperature, pressure, components)).logarithms


def phase(
    *,
    temperature: float,
    pressure: float,
    fractions: Sequence[float],
    components: Sequence[Critical],
) -> str:
    """Tell whether a mixture splits, and on which root it stands if it does not.

    Returns one of :data:`TWO`, :data:`GAS`, :data:`LIQUID`, or :data:`ONLY` for one phase where
    the equation has one root alone.

    Args:
        temperature: [K]
        pressure: [Pa]
        fractions: mole fractions [-], all above zero, summing to one.
        components: critical constants.
    """
    data = _reduced(temperature, pressure, components)
    feed = _branch(fractions, data)
    level = [math.log(x) + value for x, value in zip(fractions, feed.logarithms, strict=True)]
    ratios = [
        wilson_ratio(temperature=temperature, pressure=pressure, component=item)
        for item in components
    ]
    heavy = [x / ratio for x, ratio in zip(fractions, ratios, strict=True)]
    light = [x * ratio for x, ratio in zip(fractions, ratios, strict=True)]
    if any(_splits(trial, fractions, level, data) for trial in (heavy, light)):
        return TWO
    if feed.root == ONLY and feed.volume < _DENSE:
        # an only root this dense is a liquid, unless the mixture is too hot for one (Kay's rule)
        warmest = sum(x * item.temperature for x, item in zip(fractions, components, strict=True))
        return LIQUID if temperature < warmest else ONLY
    return feed.root


def _splits(
    trial: list[float], feed: Sequence[float], level: Sequence[float], data: _Reduced
) -> bool:
    """Tell whether a trial phase ends below the tangent plane of the feed."""
    amounts = trial
    for _ in range(_STEPS):
        total = sum(amounts)
        fractions = [amount / total for amount in amounts]
        found = _branch(fractions, data).logarithms
        before = amounts
        amounts = [math.exp(d - value) for d, value in zip(level, found, strict=True)]
        if all(abs(x / z - 1.0) < _TRIVIAL for x, z in zip(amounts, feed, strict=True)):
            return False
        change = sum(math.log(new / old) ** 2 for new, old in zip(amounts, before, strict=True))
        if change < _CONVERGED:
            break
    return sum(amounts) > 1.0 + 1e-6
