"""Nominal pipe sizes and straight lengths."""

from __future__ import annotations

from fractions import Fraction

import pytest
from fluids.piping import DN_F441, NPS_F441

from specsheet.quantity import (
    SIZES,
    NominalSize,
    Refusal,
    StraightLength,
    parse_size,
    parse_straight,
)


def _inches(nps: str) -> float:
    return float(sum(Fraction(part) for part in nps.split()))


@pytest.mark.parametrize(("dn", "nps"), list(zip(DN_F441, NPS_F441, strict=True)))
def test_pair_against_published_pairs(dn: float, nps: float) -> None:
    """DN and NPS side by side in ASTM F441, as the library ``fluids`` carries them."""
    assert _inches(SIZES[int(dn)]) == nps


def test_large_sizes_follow_the_rule_of_25() -> None:
    """DN = 25 x NPS from NPS 4 (ASME B36.10M, from memory)."""
    assert all(dn == 25 * _inches(nps) for dn, nps in SIZES.items() if dn >= 100)
    assert {6, 100, 600, 1200} <= set(SIZES)


@pytest.mark.parametrize("dn", SIZES)
def test_every_size_is_read_both_ways(dn: int) -> None:
    nps = SIZES[dn]
    assert parse_size(f"DN {dn}") == NominalSize(dn, nps, f"DN {dn}")
    assert parse_size(f"NPS {nps}") == NominalSize(dn, nps, f"NPS {nps}")


@pytest.mark.parametrize(
    ("text", "dn"),
    [
        ("DN150", 150),
        ("dn 150", 150),
        ("DN\u00a0150", 150),
        ("ＤＮ １５０", 150),
        ('6"', 150),
        ("6″", 150),
        ("6 in", 150),
        ("6 inch", 150),
        ("NPS6", 150),
        ('NPS 6"', 150),
        ("NPS 1 1/2", 40),
        ("NPS 1-1/2", 40),
        ("NPS 1½", 40),
        ('1½"', 40),
        ("1.5 in", 40),
        ("NPS 1.5", 40),
        ('1/2"', 15),
        ("3/4 in", 20),
        ("NPS .5", 15),
    ],
)
def test_spelling_of_a_size_is_read(text: str, dn: int) -> None:
    read = parse_size(text)
    assert isinstance(read, NominalSize)
    assert read.dn == dn


@pytest.mark.parametrize(
    ("text", "part"),
    [
        ("DN 155", "write DN 150 or DN 200"),
        ("DN 160", "write DN 150 or DN 200"),
        ("DN 5", "write DN 6"),
        ("DN 99999", "DN 99999 is no listed size"),
        ("NPS 7", "write NPS 6 or NPS 8"),
        ('7"', "write NPS 6 or NPS 8"),
        ("6", "write DN 6 or NPS 6"),
        ("150", "write DN 150"),
        ("7", "DN or NPS is missing"),
        ("150 mm", "a name, not a length; write DN 150"),
        ("154.1 mm", "a name, not a length"),
        ("DN", 'it is read as "DN 150" or "NPS 6"'),
        ("DN 1,50", 'it is read as "DN 150" or "NPS 6"'),
        ("DN-150", "write DN 150"),
        ("", "nothing came"),
        ("NPS 1/0", "nominal size is wanted"),
        ("6 bar", "nominal size is wanted"),
    ],
)
def test_size_is_refused_with_help(text: str, part: str) -> None:
    read = parse_size(text)
    assert isinstance(read, Refusal)
    assert part in read.message
    assert all(isinstance(parse_size(offer), NominalSize) for offer in read.write)


@pytest.mark.parametrize(
    ("text", "diameters", "metres"),
    [
        ("20 D", 20.0, None),
        ("20D", 20.0, None),
        ("20 x D", 20.0, None),
        ("0 D", 0.0, None),
        ("22.5 D", 22.5, None),
        ("3.5 m", None, 3.5),
        ("3500 mm", None, 3.5),
        ("10 ft", None, 3.048),
    ],
)
def test_straight_length_is_read(text: str, diameters: float, metres: float) -> None:
    read = parse_straight(text)
    assert isinstance(read, StraightLength)
    assert (read.diameters, read.text) == (diameters, text)
    assert read.metres == (None if metres is None else pytest.approx(metres))


def test_straight_length_in_diameters() -> None:
    assert StraightLength(20.0, None, "20 D").in_diameters(0.1) == 20.0
    assert StraightLength(None, 3.5, "3.5 m").in_diameters(0.1) == pytest.approx(35.0)


@pytest.mark.parametrize(
    ("text", "part"),
    [
        ("20", "write 20 D or 20 m"),
        ("20 d", "write 20 D"),
        ("20 DN", "write 20 D"),
        ("20 diameters", "write 20 D"),
        ("1,5 D", "write 1.5 D"),
        ("5-10 D", "write 5 D or 10 D"),
        ("3,5 m", "write 3.5 m"),
        ("-3 D", "the least value is 0 D"),
        ("-3 m", "straight length is wanted"),
        ("x", 'it is read as "20 D" or "3.5 m"'),
        ("", "nothing came"),
    ],
)
def test_straight_length_is_refused_with_help(text: str, part: str) -> None:
    read = parse_straight(text)
    assert isinstance(read, Refusal)
    assert part in read.message
    assert all(isinstance(parse_straight(offer), StraightLength) for offer in read.write)
