"""Words: units as printed, typed quantities taken apart, entries in words."""

from __future__ import annotations

from datetime import date

import pytest

from specsheet.fields import KINDS
from specsheet.quantity.value import Quantity
from specsheet.sheet import words


@pytest.mark.parametrize(
    ("unit", "printed"),
    [
        ("kg/m3", "kg/m³"),
        ("m3/h", "m³/h"),
        ("m3/h(base)", "m³/h (base)"),
        ("mm2/s", "mm²/s"),
        ("degC", "°C"),
        ("deg", "°"),
        ("uS/cm", "µS/cm"),
        ("kJ/kg/K", "kJ/(kg·K)"),
        ("W/m/K", "W/(m·K)"),
        ("mPa s", "mPa·s"),
        ("inH2O(4degC)", "inH₂O(4°C)"),
        ("bar(g)", "bar(g)"),
        ("1/m3", "1/m³"),
        ("1", ""),
    ],
)
def test_units_are_printed_in_their_typographic_form(unit: str, printed: str) -> None:
    assert words.unit(unit) == printed


def test_every_shown_unit_is_printed_without_plain_powers() -> None:
    for kind in KINDS.values():
        assert not any(plain in words.unit(kind.shown) for plain in ("m2", "m3", "deg"))


@pytest.mark.parametrize(
    ("typed", "number", "unit"),
    [
        ("3.1 t/h", "3.1", "t/h"),
        ("3.10 t/h", "3.10", "t/h"),
        ("1 250 kg/h", "1 250", "kg/h"),
        ("0.14 1/kWh", "0.14", "1/kWh"),
        ("185 degC", "185", "°C"),
        ("-10 degC", "-10", "°C"),
        ("1e5 Pa(a)", "1e5", "Pa(a)"),
        ("22 D", "22", "D"),
        ("10", "10", ""),
        ("size it", "size it", ""),
    ],
)
def test_typed_quantities_keep_their_digits(typed: str, number: str, unit: str) -> None:
    assert words.split(typed) == (number, unit)


@pytest.mark.parametrize(
    ("held", "text"),
    [
        (Quantity(458.15, "temperature", "degC", "185 degC"), "185 °C"),
        (True, "yes"),
        (False, "no"),
        (date(2031, 3, 4), "2031-03-04"),
        (("a", "b"), "a, b"),
        ((), "–"),
        ({"methane": 0.62, "carbon_dioxide": 0.38}, "methane 0.62, carbon dioxide 0.38"),
        (None, "–"),
        ("a [/h] b", "a [/h] b"),
        (3, "3"),
    ],
)
def test_entries_in_words(held: object, text: str) -> None:
    assert words.value(held) == text


def test_a_label_does_not_say_its_symbol_twice() -> None:
    assert words.named("Density", "ρ") == "Density  ρ"
    assert words.named("Pressure ratio p2/p1", "p2/p1") == "Pressure ratio p2/p1"
    assert words.named("Phase", "") == "Phase"
