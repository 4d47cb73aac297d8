"""Contributions of meters with a bore of their own, out of the error limits usual for them.

An error limit is taken as rectangular (JCGM 100:2008, 4.3.7).
"""

from __future__ import annotations

from collections.abc import Mapping

from specsheet.findings import Origin
from specsheet.meters.family import Array, Contribution
from specsheet.methods import signal
from specsheet.methods.gum import RECTANGULAR
from specsheet.sources import PRACTICE, cite


def of_limit(
    key: str,
    label: str,
    limit: Array,
    *,
    origin: Origin = Origin.TYPICAL,
    source: str = PRACTICE,
) -> Contribution:
    """Return what an error adds that stays within plus or minus ``limit``, relative, shape (n,)."""
    return Contribution(key, label, limit / RECTANGULAR, origin, source)


def counting(values: Mapping[str, Array], of: Mapping[str, float], what: str) -> Contribution:
    """Return what counting adds; ``what`` is counted ("pulses") for the averaging time."""
    return Contribution(
        "counting",
        f"counting {what} for {of['averaging_time']:g} s",
        signal.counting_uncertainty(rate=values["frequency"], time=of["averaging_time"]),
        Origin.DERIVED,
        cite("gum", "4.3.7"),
    )


def free_gas(of: Mapping[str, float], same: Array) -> tuple[Contribution, ...]:
    """Return what free gas adds, which counts as liquid; none where there is none.

    Args:
        of: numbers of the element, with the share of gas by volume, ``free_gas`` [-].
        same: ones, shape (n,).
    """
    if not of["free_gas"] > 0.0:
        return ()
    return (of_limit("free_gas", "free gas", of["free_gas"] * same, origin=Origin.GIVEN),)
