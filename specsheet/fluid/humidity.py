"""Humidity added to a gas whose composition is stated dry."""

from __future__ import annotations

from dataclasses import dataclass

from specsheet.findings import Finding
from specsheet.fluid.backends.mixture import Mixture
from specsheet.fluid.backends.wet_gas import WetGas, saturated, wetted
from specsheet.fluid.calorific import Composition
from specsheet.fluid.lock import LOCK
from specsheet.fluid.model import Condition, Fluid, Refused, caution, celsius, stop
from specsheet.fluid.phases import GAS
from specsheet.tag import Point, Tag

_RELATIVE = "fluid.relative_humidity"
_DEW = "fluid.water_dew_point"


@dataclass(frozen=True, slots=True)
class Wetted:
    """The gas with its water, or the findings that say why not."""

    fluid: Fluid | None
    findings: tuple[Finding, ...] = ()


def stated(tag: Tag) -> bool:
    """Tell whether a tag states a humidity."""
    return tag.quantity(_RELATIVE) is not None or tag.quantity(_DEW) is not None


def add(tag: Tag, dry: Composition) -> Wetted:
    """Return the gas with the humidity that a tag states."""
    wrong = _conflicts(tag, dry)
    if wrong is not None:
        return Wetted(None, (wrong,))
    combustion = tag.si("job.combustion_temperature") or 288.15
    reference = reference_of(tag)
    relative, dew = tag.si(_RELATIVE), tag.si(_DEW)
    if relative is not None:
        findings = () if dew is None else (_dew_unused(),)
        return Wetted(WetGas(dry, relative, reference, combustion), findings)
    assert dew is not None  # stated() has seen to it
    if reference.pressure is None:
        text = "A water dew point needs the pressure of the normal point: state it."
        return Wetted(None, (stop("pressure-missing", _DEW, text),))
    try:
        with LOCK:
            fraction = saturated(dry, dew, reference.pressure)
            composition = wetted(dry, fraction)
    except Refused:
        text = f"No gas can have a water dew point of {celsius(dew)} at the normal point."
        return Wetted(None, (stop("humidity-range", _DEW, text),))
    return Wetted(Mixture(composition, GAS, combustion))


def reference_of(tag: Tag) -> Condition:
    """Return where the humidity counts: the normal point, else the first."""
    found = next((point for point in tag.points if point.name == "normal"), None)
    if found is None and tag.points:
        found = tag.points[0]
    return Condition(None, None) if found is None else _condition(tag, found)


def _condition(tag: Tag, point: Point) -> Condition:
    pressure, temperature = point.quantity("pressure"), point.quantity("temperature")
    return Condition(
        None if temperature is None else temperature.value,
        None if pressure is None else tag.absolute(pressure),
    )


def _conflicts(tag: Tag, dry: Composition) -> Finding | None:
    """Return the stop for a humidity that makes no sense with the rest."""
    if tag.phase != GAS:
        text = "A humidity is stated for a liquid: state gas, or leave the humidity out."
        return stop("humidity-range", "fluid.phase", text)
    if any(key == "water" for key, _ in dry):
        text = (
            "The composition has water in it and a humidity is stated too: leave out one of them."
        )
        return stop("humidity-twice", _RELATIVE if tag.quantity(_RELATIVE) else _DEW, text)
    relative = tag.si(_RELATIVE)
    if relative is not None and not 0.0 <= relative <= 1.0:
        text = f"A relative humidity from 0 % to 100 % was wanted, {100 * relative:.4g} % came."
        return stop("humidity-range", _RELATIVE, text)
    return None


def _dew_unused() -> Finding:
    text = "Relative humidity and water dew point are both stated: the relative humidity is used."
    return caution("dew-point-unused", _DEW, text)
