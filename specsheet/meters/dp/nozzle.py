"""What nozzles share: notes on the make, thermal growth, derivations."""

from __future__ import annotations

from collections.abc import Callable

from specsheet.meters.dp import adapters, body
from specsheet.meters.dp.device import Bounds, Described, Prepared, Shape
from specsheet.meters.family import Element, Request

SHAPE = Shape("throat", "throat_diameter", "throat_diameter_hot", "throat")
DERIVATIONS = (
    adapters.NOZZLE_EXPANSIBILITY,
    adapters.PLATE_LOSS,
    adapters.THROAT,
    adapters.THROAT_HOT,
)


def prepare(tapping_share: float) -> Callable[[Request], Prepared]:
    """Return the reader of a nozzle's own entries; tappings ``tapping_share`` D apart."""

    def read(request: Request) -> Prepared:
        return body.prepare(request, tapping_share=tapping_share)

    return read


def bounds(smallest: float, largest: float) -> Callable[[Request, Prepared], Bounds]:
    """Return the bounds of the sizing [-]."""

    def fixed(request: Request, prepared: Prepared) -> Bounds:  # noqa: ARG001 - the protocol
        return Bounds(smallest, largest, largest_differential=1e6)

    return fixed


def describe(*lines: str) -> Callable[[Request, Element], Described]:
    """Return a description that is the same for every size."""

    def same(request: Request, element: Element) -> Described:  # noqa: ARG001 - the protocol
        return Described({}, {"element": lines})

    return same
