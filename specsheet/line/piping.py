"""The pipe of a tag: bore, wall, thermal expansion and roughness, each with its origin."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass

from specsheet.findings import Finding, Given, Level, Origin
from specsheet.line.bore import bore_of, is_lined
from specsheet.line.material import Material, find_material, materials
from specsheet.line.pipe import Pipe
from specsheet.tag import Tag

_AMBIENT = 293.15
_ASSUMED_MATERIAL = "carbon steel"


@dataclass(frozen=True, slots=True)
class PipeResult:
    """The pipe of a tag.

    Attributes:
        pipe: None where no inside diameter can be had; a finding says why.
        values: glossary key -> value to print.
        findings: what is wrong or must be decided.
    """

    pipe: Pipe | None
    values: Mapping[str, Given]
    findings: tuple[Finding, ...] = ()


def pipe_of(tag: Tag) -> PipeResult:
    """Return the pipe of a tag.

    A given inside diameter wins over size and schedule. The coefficient of expansion is the mean
    one from 20 °C to the temperature of the normal point.
    """
    bore = bore_of(tag)
    findings = [*bore.findings]
    values = {
        key: value
        for key, value in (
            ("inside_diameter", bore.inside),
            ("outside_diameter", bore.outside),
            ("wall_thickness", bore.thickness),
        )
        if value is not None
    }
    material, remarks = _material(tag)
    findings.extend(remarks)
    expansion, remarks = _expansion(tag, material)
    findings.extend(remarks)
    values["pipe_expansion"] = expansion
    roughness = _roughness(tag, material)
    if roughness is not None:
        values["roughness"] = roughness
    if bore.inside is None:
        return PipeResult(None, values, tuple(findings))
    pipe = Pipe(
        inside_diameter=_number(bore.inside),
        wall=_number(bore.thickness),
        expansion=_number(expansion),
        roughness=_number(roughness),
        size=tag.text("line.size"),
        nominal=bore.nominal,
        material=material.name if material else tag.text("line.material"),
    )
    return PipeResult(pipe, values, tuple(findings))


def _number(given: Given | None) -> float:
    return math.nan if given is None else float(given.value)


def _material(tag: Tag) -> tuple[Material | None, tuple[Finding, ...]]:
    text = tag.text("line.material") or _ASSUMED_MATERIAL
    found = find_material(text)
    if found is not None:
        return found, ()
    names = ", ".join(material.name for material in materials())
    message = (
        f'"{text}" is not in the table of materials ({names}): the thermal expansion of '
        f"{_ASSUMED_MATERIAL} is assumed, and the roughness and flange group are not known."
    )
    return None, (Finding(Level.CAUTION, "material-unknown", "line.material", message),)


def _normal_temperature(tag: Tag) -> float:
    stated = {
        point.name: quantity.value
        for point in tag.points
        if (quantity := point.quantity("temperature")) is not None
    }
    return stated.get("normal", next(iter(stated.values()), _AMBIENT))


def _expansion(tag: Tag, material: Material | None) -> tuple[Given, tuple[Finding, ...]]:
    temperature = _normal_temperature(tag)
    if material is None:
        other = find_material(_ASSUMED_MATERIAL)
        assert other is not None, "the pack of materials lacks carbon steel"
        return Given(other.expansion(temperature), Origin.ASSUMED, other.expansion_source), ()
    origin = Origin.DERIVED if "line.material" in tag.given else Origin.ASSUMED
    given = Given(material.expansion(temperature), origin, material.expansion_source)
    if temperature <= material.highest:
        return given, ()
    message = (
        f"{material.name} has no coefficient of expansion above {material.highest - 273.15:.0f} "
        f"°C in the table; the last one is used at {temperature - 273.15:.0f} °C. Check that "
        "the material may be used there."
    )
    code = "expansion-out-of-table"
    source = material.expansion_source
    return given, (Finding(Level.CAUTION, code, "line.material", message, source=source),)


def _roughness(tag: Tag, material: Material | None) -> Given | None:
    stated = tag.si("line.roughness")
    if stated is not None:
        return Given(stated, Origin.GIVEN)
    if material is None or is_lined(tag):
        return None
    return Given(material.roughness, Origin.TYPICAL, material.roughness_source)
