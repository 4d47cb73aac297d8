"""Speed of the reader against a general units library, as a ratio in one run."""

from __future__ import annotations

import timeit

import pint
import pytest

from specsheet.quantity import parse


@pytest.mark.benchmark
def test_reading_is_faster_than_a_general_parser() -> None:
    """The form reads on every key pressed; pint's parser takes tens of microseconds a text."""
    quantity = pint.UnitRegistry().Quantity

    def seconds(call: object) -> float:
        return min(timeit.repeat(call, number=500, repeat=5))

    ours = seconds(lambda: parse("3.1 kg/h", "flow"))
    general = seconds(lambda: quantity("3.1 kg/hour"))
    print(f"read in {ours * 2000:.2f} us, {general / ours:.0f} times faster than pint")
    assert general > 10.0 * ours
