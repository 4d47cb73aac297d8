"""What every device with a body of its own shares: material, calibration demanded, notes."""

from __future__ import annotations

from specsheet.findings import Finding, Level, Origin
from specsheet.line.material import find_material
from specsheet.meters.dp.device import Prepared
from specsheet.meters.family import Given, Request
from specsheet.sources import PRACTICE


def prepare(
    request: Request,
    *,
    tapping_share: float,
    choices: dict[str, str] | None = None,
    values: dict[str, Given] | None = None,
    numbers: dict[str, float] | None = None,
    findings: tuple[Finding, ...] = (),
) -> Prepared:
    """Read the material of the element; its expansion is that of the pipe where it is not known.

    Args:
        request: the tag.
        tapping_share: usual distance of the tappings along the pipe, by D [-].
        choices, values, numbers, findings: what the device adds.
    """
    found = {
        "tapping_distance": tapping_share * request.pipe.inside_diameter,
        **(numbers or {}),
        **expansion(request),
    }
    return Prepared(found, choices or {}, values or {}, findings)


def expansion(request: Request, entry: str = "meter.element_material") -> dict[str, float]:
    """Return the element's expansion by its name [1/K]; nothing for an unknown material."""
    material = find_material(request.tag.text(entry))
    if material is None:
        return {}
    temperature = float(request.stream.temperature[request.normal])
    return {"element_expansion": material.expansion(temperature)}


def calibration_wanted(
    request: Request,
    why: str,
    level: Level = Level.CAUTION,
    entry: str = "meter.discharge_coefficient",
) -> Finding | None:
    """Return the finding that the device must be calibrated, unless it is."""
    if entry in request.tag.given and request.tag.quantity(entry) is not None:
        return None
    return Finding(
        level,
        "calibration-wanted",
        entry,
        f"{why}; ask for a flow calibration over the Reynolds numbers of the range and state the "
        "coefficient found",
        source=PRACTICE,
    )


def typical(request: Request, name: str) -> Given:
    """Return a figure usual for the family, from its profile."""
    figure = request.profile.typical[name]
    return Given(figure.value, Origin.TYPICAL, figure.source)


def figure(request: Request, name: str) -> float:
    """Return the value of such a figure (SI)."""
    return request.profile.typical[name].value
