"""From a tag to its fluid: which backend, with which data; what is missing is a finding."""

from __future__ import annotations

import math
from collections.abc import Callable

from specsheet import packs
from specsheet.findings import Finding
from specsheet.fluid import build_liquids, composition, humidity, job_substances, names, solutes
from specsheet.fluid.backends import given as given_backend
from specsheet.fluid.backends.given import Given
from specsheet.fluid.backends.mixture import AIR, Mixture
from specsheet.fluid.backends.pure import Pure
from specsheet.fluid.backends.water import Water
from specsheet.fluid.build_liquids import Built
from specsheet.fluid.model import caution, stop
from specsheet.quantity.value import Quantity
from specsheet.tag import Point, Tag


def fluid_of(tag: Tag) -> Built:
    """Return the fluid a tag states."""
    kind = tag.text("fluid.kind")
    builder = _BUILDERS.get(kind)
    if builder is None:
        wanted = ", ".join(_BUILDERS)
        came = f"{kind!r} came" if kind else "none came"
        text = f"A kind of fluid was wanted ({wanted}), {came}."
        return Built(None, (stop("fluid-kind", "fluid.kind", text),))
    if not tag.phase and kind in _EITHER_PHASE:
        text = "Liquid or gas was wanted, nothing came: state fluid.phase."
        return Built(None, (stop("phase-missing", "fluid.phase", text),))
    return builder(tag)


#: kinds that may flow in either phase
_EITHER_PHASE = ("substance", "mixture", "given")


def _combustion(tag: Tag) -> float:
    stated = tag.si("job.combustion_temperature")
    return 288.15 if stated is None else stated


def _substance(tag: Tag) -> Built:
    text = tag.text("fluid.substance")
    if not text:
        message = "A substance was wanted, none came: state fluid.substance."
        return Built(None, (stop("substance-missing", "fluid.substance", message),))
    own = job_substances.find(tag.folder, text, tag.phase)
    if own.fluid is not None or own.findings:
        return Built(own.fluid, own.findings)
    item = names.find(text)
    if item is None:
        return Built(None, (unknown("fluid.substance", text),))
    if humidity.stated(tag):
        wet = humidity.add(tag, AIR if item.key == "air" else ((item.key, 1.0),))
        return Built(wet.fluid, wet.findings)
    if item.key == "water":
        return Built(Water(tag.phase))
    return Built(Pure(item.key, tag.phase, _combustion(tag)))


_ADVICE = {
    "mixture": "state its composition with fluid.kind mixture",
    "petroleum": "state fluid.kind petroleum with its density at 15 °C",
    "humid_air": "state fluid.kind humid_air with its humidity",
    "seawater": "state fluid.kind seawater with its salinity",
    "slurry": "state fluid.kind slurry with its carrying liquid and solids",
    "given": "state fluid.kind given with density and viscosity at each point",
    "solution": "state fluid.kind solution with how much of it is in the water",
}


def unknown(field: str, text: str) -> Finding:
    """Return the finding for a name that names no substance: the kind it belongs to, or near names.

    Args:
        field: path of the entry.
        text: the name.
    """
    kind = _kind_of(text)
    if kind:
        message = f"{text} is no pure substance here: {_ADVICE[kind]}."
        return stop("substance-unknown", field, message)
    near = names.nearest(text)
    hint = f" Did you mean {' or '.join(near)}?" if near else ""
    return stop(
        "substance-unknown",
        field,
        f"No substance is called {text!r}.{hint} Otherwise state density and viscosity at each "
        "point with fluid.kind given, or add the substance to the folder fluids of the job.",
    )


def _kind_of(text: str) -> str:
    """Return the kind that a fluid of this name is stated as, or ""."""
    wanted = names.normal(text)
    for kind, listed in packs.table("fluids/hints").items():
        if any(names.normal(name) == wanted for name in listed):
            return str(kind)
    return "solution" if solutes.find(text) is not None else ""


def _mixture(tag: Tag) -> Built:
    read = composition.read(
        tag.table("fluid.mixture"),
        tag.text("fluid.basis") or "mole",
        tag.flag("fluid.normalise"),
        tag.phase,
    )
    if read.composition is None:
        return Built(None, read.findings)
    found = read.composition
    if humidity.stated(tag):
        wet = humidity.add(tag, found)
        return Built(wet.fluid, (*read.findings, *wet.findings))
    if len(found) == 1:
        key = found[0][0]
        lone = Water(tag.phase) if key == "water" else Pure(key, tag.phase, _combustion(tag))
        return Built(lone, read.findings)
    return Built(Mixture(found, tag.phase, combustion_temperature=_combustion(tag)), read.findings)


def _given(tag: Tag) -> Built:
    rows = tuple(row for point in tag.points if (row := _row(tag, point)) is not None)
    return Built(Given(tag.phase, rows, _usable(tag, tag.quantity("fluid.molar_mass"))))


def _row(tag: Tag, point: Point) -> given_backend.Row | None:
    """Return what a point states; None where pressure or temperature is missing."""
    temperature, pressure, density, factor = (
        _usable(tag, point.quantity(key))
        for key in ("temperature", "pressure", "density", "compressibility")
    )
    if pressure is None or temperature is None:
        return None
    stated = point.quantity("viscosity")
    viscosity = _usable(tag, stated)
    if stated is not None and stated.kind == "kinematic_viscosity" and viscosity is not None:
        viscosity = None if density is None else viscosity * density
    return given_backend.Row(temperature, pressure, density, viscosity, factor)


def _usable(tag: Tag, quantity: Quantity | None) -> float | None:
    """Return the SI value of a quantity; None where it is missing or not above zero."""
    value = math.nan if quantity is None else tag.absolute(quantity)
    return value if math.isfinite(value) and value > 0.0 else None


def _humid_air(tag: Tag) -> Built:
    if humidity.stated(tag):
        wet = humidity.add(tag, AIR)
        return Built(wet.fluid, wet.findings)
    text = (
        "Humid air is stated without its humidity: it is taken as dry. State "
        "fluid.relative_humidity or fluid.water_dew_point."
    )
    return Built(
        Pure("air", tag.phase, _combustion(tag)),
        (caution("humidity-missing", "fluid.relative_humidity", text),),
    )


def _slurry(tag: Tag) -> Built:
    return build_liquids.slurry(tag, lambda stated: _substance(stated).fluid)


_BUILDERS: dict[str, Callable[[Tag], Built]] = {
    "substance": _substance,
    "mixture": _mixture,
    "humid_air": _humid_air,
    "solution": build_liquids.solution,
    "petroleum": build_liquids.petroleum,
    "seawater": build_liquids.seawater,
    "slurry": _slurry,
    "given": _given,
}
