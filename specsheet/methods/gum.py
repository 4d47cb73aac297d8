"""Combination of uncertainties by the GUM: JCGM 100:2008, clauses 5 and 6, annex G.

Contributions are standard uncertainties of the result (sensitivity times input), so the sensitivity
coefficients are already inside them. They may be relative or absolute, all alike.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cache
from statistics import NormalDist

import numpy as np
from numpy.typing import ArrayLike, NDArray

Array = NDArray[np.float64]

#: level of confidence that belongs to k = 2 of a normal distribution
TWO_SIGMA = 0.9545

#: half-width of a rectangular distribution by its standard uncertainty (JCGM 100:2008, 4.3.7)
RECTANGULAR = 3.0**0.5

_EXACT_TO = 40  # beyond, the expansion of Student's t is good to better than 1e-7
_BISECTIONS = 60


@dataclass(frozen=True, slots=True)
class Combined:
    """A combined uncertainty; every array has shape (n,).

    Attributes:
        standard: combined standard uncertainty, in the unit of the contributions.
        freedom: effective degrees of freedom, as computed (not truncated); infinite where all are.
        coverage: coverage factor k for the level of confidence asked.
        expanded: coverage times standard.
    """

    standard: Array
    freedom: Array
    coverage: Array
    expanded: Array


def combine(
    relative: ArrayLike,
    freedom: ArrayLike,
    *,
    correlation: ArrayLike | None = None,
    level: float = TWO_SIGMA,
) -> Combined:
    """Combine k contributions at n conditions.

    Args:
        relative: standard uncertainties of the result, shape (k, n); relative [-] or all of one
            unit. A sign matters only with a correlation.
        freedom: degrees of freedom of each, shape (k,), at least 1, infinite where not limited.
        correlation: correlation coefficients, shape (k, k); None for independent contributions.
        level: level of confidence [-]; 0.9545 gives k = 2 for infinite degrees of freedom.

    Returns:
        The combined uncertainty, shape (n,).

    Raises:
        ValueError: shapes do not match, a freedom below 1, or a correlation together with finite
            degrees of freedom (the formula of Welch and Satterthwaite holds for independent ones).

    Source: JCGM 100:2008, 5.1.2 (10), 5.2.2 (16), G.4.1 (G.2b), 6.2.1.
    """
    parts = np.atleast_2d(np.asarray(relative, dtype=np.float64))
    degrees = np.atleast_1d(np.asarray(freedom, dtype=np.float64))
    if degrees.shape != parts.shape[:1]:
        raise ValueError(f"{parts.shape[0]} contributions but {degrees.size} degrees of freedom")
    if (degrees < 1.0).any():
        raise ValueError("degrees of freedom must be at least 1")
    if correlation is None:
        standard = np.sqrt((parts**2).sum(axis=0))
        effective = effective_freedom(parts, degrees)
    else:
        if np.any(np.isfinite(degrees)):
            raise ValueError("a correlation needs infinite degrees of freedom")
        standard = _correlated(parts, np.asarray(correlation, dtype=np.float64))
        effective = np.full_like(standard, np.inf)
    coverage = coverage_factor(effective, level=level)
    return Combined(standard, effective, coverage, coverage * standard)


def _correlated(parts: Array, correlation: Array) -> Array:
    if correlation.shape != (parts.shape[0], parts.shape[0]):
        raise ValueError(f"a correlation of shape {correlation.shape} for {parts.shape[0]} parts")
    variance = np.einsum("in,ij,jn->n", parts, correlation, parts)
    combined: Array = np.sqrt(np.maximum(variance, 0.0))
    return combined


def effective_freedom(parts: Array, freedom: Array) -> Array:
    """Return the effective degrees of freedom of Welch and Satterthwaite, shape (n,).

    Infinite where no contribution with finite degrees of freedom takes part.

    Source: JCGM 100:2008, G.4.1 (G.2b).
    """
    if np.isinf(freedom).all():
        return np.full(parts.shape[1], np.inf)
    fourth = np.sum(parts**4 / freedom[:, np.newaxis], axis=0)
    total = np.sum(parts**2, axis=0) ** 2
    unlimited = np.full_like(total, np.inf)
    freedoms: Array = np.divide(total, fourth, out=unlimited, where=fourth > 0.0)
    return freedoms


def coverage_factor(freedom: ArrayLike, *, level: float = TWO_SIGMA) -> Array:
    """Return the two-sided Student coverage factor for degrees of freedom, shape as given.

    A freedom is rounded to one decimal and then truncated to the next lower whole number, as the
    examples of JCGM 100:2008, G.4.1 and H.1 do (18.98 is 19, 16.7 is 16).

    Raises:
        ValueError: the level is not between 0 and 1, or a freedom is below 1.
    """
    degrees = np.asarray(freedom, dtype=np.float64)
    if not 0.0 < level < 1.0:
        raise ValueError(f"a level of confidence between 0 and 1 was wanted, {level} came")
    if (degrees < 1.0).any():
        raise ValueError("degrees of freedom must be at least 1")
    if np.isinf(degrees).all():
        return np.full(degrees.shape, _student(math.inf, level))
    whole = np.floor(degrees + 0.05)
    distinct, inverse = np.unique(whole, return_inverse=True)
    factors = np.array([_student(float(value), level) for value in distinct])
    return factors[inverse].reshape(degrees.shape)


@cache
def _student(freedom: float, level: float) -> float:
    """Two-sided quantile of Student's t for a whole number of degrees of freedom, or infinity."""
    normal = NormalDist().inv_cdf(0.5 * (1.0 + level))
    if math.isinf(freedom):
        return normal
    if freedom > _EXACT_TO:
        return _student_expansion(normal, freedom)
    low, high = 0.0, 0.5 * math.pi
    for _ in range(_BISECTIONS):
        middle = 0.5 * (low + high)
        if _student_probability(middle, int(freedom)) < level:
            low = middle
        else:
            high = middle
    return math.sqrt(freedom) * math.tan(0.5 * (low + high))


def _student_probability(angle: float, freedom: int) -> float:
    """Probability within +-t of Student's t, angle = atan(t / sqrt(freedom)).

    Source: Abramowitz and Stegun (1964), 26.7.3 and 26.7.4 (from memory).
    """
    sine, cosine = math.sin(angle), math.cos(angle)
    if freedom == 1:
        return 2.0 * angle / math.pi
    odd = freedom % 2
    term = cosine if odd else 1.0
    total = term
    for index in range(2 + odd, freedom - 1, 2):
        term *= cosine**2 * (index - 1) / index
        total += term
    return 2.0 / math.pi * (angle + sine * total) if odd else sine * total


def _student_expansion(normal: float, freedom: float) -> float:
    """Student quantile from the normal one. Abramowitz and Stegun 26.7.5 (from memory)."""
    x = normal
    first = (x**3 + x) / 4.0
    second = (5.0 * x**5 + 16.0 * x**3 + 3.0 * x) / 96.0
    third = (3.0 * x**7 + 19.0 * x**5 + 17.0 * x**3 - 15.0 * x) / 384.0
    fourth = (79.0 * x**9 + 776.0 * x**7 + 1482.0 * x**5 - 1920.0 * x**3 - 945.0 * x) / 92160.0
    return x + first / freedom + second / freedom**2 + third / freedom**3 + fourth / freedom**4
