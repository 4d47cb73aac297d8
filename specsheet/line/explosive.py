"""Explosive atmospheres: area, gas group and temperature class against the fluid's own properties.

The classification of the area is the site's; here its statements are only held against the fluid.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from specsheet.findings import Finding, Level
from specsheet.line.service import Service, hazards
from specsheet.packs import table
from specsheet.tag import Tag

_CELSIUS = 273.15
_GROUPS = ("IIA", "IIB", "IIC")
#: components with less than this mole fraction are left out
_SHARE = 0.01
_AREA, _GROUP, _CLASS = "require.area", "require.gas_group", "require.temperature_class"


@dataclass(frozen=True, slots=True)
class Ignition:
    """What the fluid asks of apparatus: that of its worst component.

    Attributes:
        temperature: lowest auto-ignition temperature of a component [degC].
        substance: the component it belongs to.
        group: most demanding gas group ("IIA", "IIB", "IIC").
        group_substance: the component it belongs to.
    """

    temperature: float
    substance: str
    group: str
    group_substance: str

    @property
    def temperature_class(self) -> str:
        """Lowest class whose surfaces stay below the ignition temperature, "" if none does."""
        for name, limit in class_limits().items():
            if limit < self.temperature:
                return name
        return ""


def class_limits() -> dict[str, float]:
    """Return the highest surface temperature of each temperature class [degC], T1 first."""
    return dict(table("ignition")["classes"]["limits"])


def ignition(service: Service) -> Ignition | None:
    """Return what the flammable components ask for, None where no known one is in the fluid."""
    rows = {
        key: hazards()[key]
        for key, fraction in service.fractions.items()
        if hazards().get(key, {}).get("ignition") and not fraction < _SHARE
    }
    if not rows:
        return None
    coolest = min(rows, key=lambda key: rows[key]["ignition"])
    hardest = max(rows, key=lambda key: _GROUPS.index(rows[key]["group"]))
    return Ignition(
        float(rows[coolest]["ignition"]),
        coolest.replace("_", " "),
        rows[hardest]["group"],
        hardest.replace("_", " "),
    )


def explosive_notes(tag: Tag, service: Service, dangers: frozenset[str]) -> Iterator[str]:
    """Yield the notes on explosive atmospheres."""
    area = tag.text(_AREA)
    if area:
        stated = ", ".join(text for text in (tag.text(_GROUP), tag.text(_CLASS)) if text)
        yield (
            f"Explosive atmosphere: {area}{', ' if stated else ''}{stated}, as classified by the "
            "site. Certified apparatus, installed and inspected by licensed staff to the local "
            "code (IEC 60079 series)."
        )
    elif "flammable" in dangers:
        yield (
            "Flammable fluid: the site states whether the meter stands in an explosive atmosphere, "
            "with gas group and temperature class."
        )
    found = ignition(service)
    if found is not None:
        yield (
            f"Of the fluid itself: ignition at {found.temperature:.0f} °C ({found.substance}), "
            f"{found.temperature_class or 'no temperature class'}, gas group {found.group} "
            f"({found.group_substance}); components under 1 % left out "
            f"({table('ignition')['source']})."
        )


def explosive_findings(tag: Tag, service: Service, dangers: frozenset[str]) -> Iterator[Finding]:
    """Yield what is missing or does not fit in the statements on explosive atmospheres."""
    if "flammable" in dangers and not tag.text(_AREA):
        message = (
            "The fluid is flammable and no area is stated: state the zone, or that the area is "
            "not hazardous."
        )
        yield Finding(Level.NOTE, "area-not-stated", _AREA, message)
    if tag.text(_AREA) and not _is_safe(tag.text(_AREA)):
        yield from _missing(tag)
    found = ignition(service)
    if found is not None:
        yield from _group(tag, found)
        yield from _surface(tag, found)
    yield from _process(tag, service)


def _is_safe(area: str) -> bool:
    words = area.lower().replace("-", " ")
    return any(
        text in words for text in ("non hazardous", "not hazardous", "safe", "none", "unclass")
    )


def _missing(tag: Tag) -> Iterator[Finding]:
    for entry, words in ((_GROUP, "gas group"), (_CLASS, "temperature class")):
        if not tag.text(entry):
            message = f"The area is stated but not its {words}: no bidder can offer the apparatus."
            yield Finding(Level.CAUTION, f"{words.replace(' ', '-')}-missing", entry, message)


def _group(tag: Tag, found: Ignition) -> Iterator[Finding]:
    stated = tag.text(_GROUP)
    if stated in _GROUPS and _GROUPS.index(stated) < _GROUPS.index(found.group):
        message = (
            f"Gas group {stated} is stated, but {found.group_substance} in the fluid is of group "
            f"{found.group}: confirm it with the classification of the area."
        )
        source = str(table("ignition")["source"])
        yield Finding(Level.CAUTION, "gas-group-low", _GROUP, message, source=source)


def _surface(tag: Tag, found: Ignition) -> Iterator[Finding]:
    limit = class_limits().get(tag.text(_CLASS))
    if limit is not None and limit >= found.temperature:
        message = (
            f"{tag.text(_CLASS)} allows surfaces of {limit:.0f} °C, but {found.substance} in the "
            f"fluid ignites at {found.temperature:.0f} °C: "
            f"{found.temperature_class or 'a lower limit'} is wanted. Confirm it with the "
            "classification of the area."
        )
        source = str(table("ignition")["source"])
        yield Finding(Level.CAUTION, "temperature-class-low", _CLASS, message, source=source)


def _process(tag: Tag, service: Service) -> Iterator[Finding]:
    """A pipe hotter than the class is a hot surface whatever the apparatus does."""
    limit = class_limits().get(tag.text(_CLASS))
    if limit is None or service.hottest is None or service.hottest - _CELSIUS <= limit:
        return
    message = (
        f"The line reaches {service.hottest - _CELSIUS:.0f} °C, above the {limit:.0f} °C of "
        f"{tag.text(_CLASS)}: pipe and meter body are hot surfaces themselves. Insulate or confirm "
        "the class; the bidder states the class at this process temperature."
    )
    source = str(table("ignition")["classes"]["source"])
    yield Finding(Level.CAUTION, "surface-hotter-than-class", _CLASS, message, source=source)
