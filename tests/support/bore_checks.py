"""Checks that every family of meters with a bore of its own must pass."""

from __future__ import annotations

import warnings

import bore_tools as tools
import numpy as np

from specsheet.fields import TERMS
from specsheet.meters.family import Family, Request

EXTREMES = (0.0, 1e-300, 1e300, np.inf, np.nan, -1.0)


def check_glossary(family: Family, *requests: Request) -> None:
    """Every key is a term of the glossary, and every value of ``at`` has a derivation."""
    told = {item.key for item in family.derivations}
    for request in requests:
        element = family.size(request)
        assert set(family.at(element, request.stream)) <= set(TERMS) & told
        assert set(element.values) <= set(TERMS)
    for item in family.derivations:
        assert set(item.inputs) <= set(TERMS), item.key


def check_extremes(family: Family, request: Request) -> None:
    """No flow and no fluid, however odd, raises or warns."""
    element = family.size(request)
    odd = tools.water(
        len(EXTREMES), density=1e-9, viscosity=1e-12, pressure=1.0, vapour_pressure=np.nan
    )
    stream = tools.stream(list(EXTREMES), odd)
    with warnings.catch_warnings():
        warnings.simplefilter("error")
        values = family.at(element, stream)
        parts = family.budget(element, stream, values)
    assert all(value.shape == (len(EXTREMES),) for value in values.values())
    assert all(part.relative.shape == (len(EXTREMES),) for part in parts)


def check_rising(family: Family, request: Request, keys: tuple[str, ...]) -> None:
    """The signal and the other keys rise with the flow."""
    element = family.size(request)
    one = request.stream.take(np.zeros(60, dtype=np.intp))
    stream = one.with_flow(np.geomspace(1e-4, 1e3, 60) * one.mass_flow[0])
    values = family.at(element, stream)
    for key in (family.signal, *keys):
        assert (np.diff(values[key]) > 0).all(), key
