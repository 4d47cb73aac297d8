"""The one bibliography: every standard, release, book or practice that a number can cite.

``basis`` is honest about how the project knows it:

* ``published values``: figures of the source, or of public material quoting it, are in the tests;
* ``read``: the passage used was read in public material;
* ``memory``: written from memory; the citation then says so wherever it is printed.
"""

from __future__ import annotations

from dataclasses import dataclass

PRACTICE = "common practice, no source"
MEMORY = "from memory"


@dataclass(frozen=True, slots=True)
class Source:
    """One entry of the bibliography.

    Attributes:
        key: short name used in code and profiles.
        name: standard or author with edition ("ISO 5167-2:2003").
        title: what it is about.
        basis: "published values", "read" or "memory" (see the module text).
    """

    key: str
    name: str
    title: str
    basis: str = "memory"


_SOURCES = (
    # Differential-pressure metering
    Source("iso5167-1", "ISO 5167-1:2003", "differential-pressure devices: general principles"),
    Source("iso5167-2", "ISO 5167-2:2003", "orifice plates", "published values"),
    Source("iso5167-4", "ISO 5167-4:2003", "Venturi tubes", "published values"),
    # Uncertainty
    Source("iso5168", "ISO 5168:2005", "flow measurement: evaluation of uncertainties"),
    Source("gum", "JCGM 100:2008", "guide to the expression of uncertainty", "published values"),
    # Base conditions
    Source("din1343", "DIN 1343:1990", "reference condition 0 degC, 101.325 kPa"),
    Source("iso13443", "ISO 13443:1996", "natural gas: reference conditions 15 degC, 101.325 kPa"),
)

SOURCES: dict[str, Source] = {source.key: source for source in _SOURCES}


def cite(key: str, clause: str = "") -> str:
    """Return the printed citation of a source, with its clause.

    Raises:
        KeyError: the bibliography has no such key (a mistake of ours, not of the user).
    """
    source = SOURCES[key]
    text = f"{source.name}, {clause}" if clause else source.name
    return f"{text} ({MEMORY})" if source.basis == "memory" else text
