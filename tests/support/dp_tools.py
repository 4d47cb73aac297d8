"""Requests for differential-pressure families, with the defaults of the profile assumed."""

from __future__ import annotations

import bore_tools
import numpy as np

from specsheet import packs, quantity
from specsheet.fields import PLAIN_KINDS
from specsheet.meters.family import Element, Request, Stream
from specsheet.quantity.value import Refusal
from specsheet.tag import Tag

water, steam, stream = bore_tools.water, bore_tools.steam, bore_tools.stream


def value(text: str, kind: str) -> object:
    """Return a text as the tag holds it: a quantity, a number or a word."""
    if kind in PLAIN_KINDS:
        return text
    if kind == "dimensionless":
        return quantity.parse(text, kind) if not isinstance(text, float) else text
    read = quantity.parse(text, kind)
    return text if isinstance(read, Refusal) else read


def request(
    family: str,
    flows: list[float],
    fluid: dict[str, np.ndarray],
    **given: str,
) -> Request:
    """Return a request; entries of [meter] are texts ("bore" for "meter.bore").

    Keyword arguments ``phase``, ``diameter`` and ``nominal`` go to the pipe and the tag; entries of
    other sections have "__" for the dot.
    """
    plain = {key: given.pop(key) for key in ("phase", "diameter", "nominal") if key in given}
    kinds = {entry.key: entry for entry in packs.profile(family).entries}
    outside = {key: text for key, text in given.items() if "__" in key}
    typed = {
        f"meter__{key}": value(text, kinds[key].kind)
        for key, text in given.items()
        if "__" not in key
    }
    made = bore_tools.request(family, flows, fluid, **plain, **typed, **outside)
    assumed = {
        entry.path: value(entry.default, entry.kind) for entry in kinds.values() if entry.default
    }
    tag = Tag(given=made.tag.given, assumed=assumed, points=made.tag.points)
    return Request(tag, made.profile, made.pipe, made.names, made.stream, 1, 2, 0)


def without_errors(element: Element, **numbers: float) -> Element:
    """Return the element with other numbers."""
    return Element(
        {**element.numbers, **numbers},
        element.values,
        element.notes,
        element.findings,
        element.choices,
    )


def alone(of: Stream, index: int, count: int) -> Stream:
    """Return one condition of a stream, repeated."""
    return of.take(np.full(count, index))
