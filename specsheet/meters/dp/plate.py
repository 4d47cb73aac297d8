"""What every plate with a hole shares: thickness, bending, engraving, roughness of the pipe."""

from __future__ import annotations

from collections.abc import Callable, Mapping

from specsheet.findings import Finding, Level, Origin
from specsheet.line.material import find_material
from specsheet.meters.dp import adapters
from specsheet.meters.dp.device import Bounds, Described, Device, Lanes, Prepared, Shape
from specsheet.meters.family import Array, Derivation, Element, Given, Limit, Request
from specsheet.methods import orifice_plate as steel
from specsheet.sources import PRACTICE, cite

#: elastic modulus and permissible bending stress of austenitic steel at 20 °C [Pa] (from memory)
ELASTIC_MODULUS = 1.93e11
PERMISSIBLE_STRESS = 1.15e8

#: smallest pipe in which a drain or vent hole is made [m] (from memory)
SMALLEST_HOLED_PIPE = 0.1

_BENDING = cite("isotr9464")

STRENGTH: tuple[Derivation, ...] = (
    Derivation(
        "plate_thickness",
        "thinnest usual sheet up to 0.05 D that the largest Δp does not bend",
        PRACTICE,
        ("inside_diameter_hot", "differential_pressure_range"),
    ),
    Derivation(
        "plate_stress",
        "σ = Δpmax (0.681 - 0.651 β) (D/E)²",
        _BENDING,
        ("differential_pressure_range", "diameter_ratio", "inside_diameter_hot", "plate_thickness"),
    ),
    Derivation(
        "bending_error",
        "-(Δpmax/Ey) (D/E)² (a D/E - b) %, a = β (13.5 - 15.5 β), b = 117 - 106 β^1.3",
        _BENDING,
        ("differential_pressure_range", "diameter_ratio", "inside_diameter_hot", "plate_thickness"),
    ),
)


DERIVATIONS: tuple[Derivation, ...] = (adapters.BORE_HOT, *STRENGTH)

#: what a plate takes over from the square-edged one
SHARP: tuple[Derivation, ...] = (
    adapters.PLATE_EXPANSIBILITY,
    adapters.PLATE_LOSS,
    adapters.BORE,
)


def prepare(request: Request) -> Prepared:
    """Read material and drain or vent hole; the hole is refused where no rule covers it."""
    tag = request.tag
    name = tag.text("meter.plate_material") or "stainless steel 316L"
    material = find_material(name)
    temperature = float(request.stream.temperature[request.normal])
    expansion = 16.5e-6 if material is None else material.expansion(temperature)
    findings: list[Finding] = []
    if material is None:
        findings.append(
            Finding(
                Level.NOTE,
                "plate-material-unknown",
                "meter.plate_material",
                f'"{name}" is not in the table of materials: the expansion of austenitic steel is '
                "taken for the bore",
            )
        )
    hole = tag.si("meter.drain_hole") or 0.0
    values: dict[str, Given] = {}
    if hole:
        values["drain_hole_diameter"] = Given(hole, tag.origin("meter.drain_hole"))
    if hole and request.pipe.inside_diameter < SMALLEST_HOLED_PIPE:
        findings.append(
            Finding(
                Level.CAUTION,
                "drain-hole-small-pipe",
                "meter.drain_hole",
                "no drain or vent hole below D = 100 mm: leave it out, or use an eccentric plate",
                source=cite("isotr15377"),
            )
        )
    return Prepared(
        numbers={"element_expansion": expansion, "hole": hole},
        values=values,
        findings=tuple(findings),
    )


def with_hole(size: float, numbers: Mapping[str, float]) -> float:
    """Return the bore that counts of a machined one [m]."""
    return float(steel.effective_bore(bore=size, hole=numbers.get("hole", 0.0)))


def without_hole(size: float, numbers: Mapping[str, float]) -> float:
    """Return the bore to machine for one that counts [m]."""
    return float(steel.measured_bore(effective=size, hole=numbers.get("hole", 0.0)))


#: a round bore with a drain or vent hole beside it
HOLED = Shape(effective=with_hole, machined=without_hole)


def sharp(
    *,
    key: str,
    source: str,
    coefficient: Callable[[Lanes], Array],
    coefficient_uncertainty: Callable[[Lanes], Array],
    bounds: Callable[[Request, Prepared], Bounds],
    limits: Callable[[Element, Request], tuple[Limit, ...]],
    describe: Callable[[Request, Element], Described],
    derivations: tuple[Derivation, ...],
    prepare: Callable[[Request], Prepared],
) -> Device:
    """Return a plate with a round bore that expands and loses as a square-edged one.

    The arguments are those of the device.
    """
    return Device(
        key=key,
        source=source,
        coefficient=coefficient,
        coefficient_uncertainty=coefficient_uncertainty,
        expansibility=adapters.plate_expansibility,
        expansibility_uncertainty=adapters.plate_expansibility_uncertainty,
        loss=adapters.plate_loss,
        bounds=bounds,
        limits=limits,
        describe=describe,
        derivations=derivations,
        prepare=prepare,
        shape=HOLED,
    )


def thickness(request: Request, element: Element) -> Given:
    """Return the plate's thickness [m]: as stated, else the thinnest usual one that holds."""
    stated = request.tag.si("meter.plate_thickness")
    if stated is not None:
        return Given(stated, request.tag.origin("meter.plate_thickness"))
    inside = float(element.values["inside_diameter_hot"].value)
    largest = steel.largest_thickness(inside_diameter=inside)
    usual = [step for step in steel.THICKNESSES if step <= largest * 1.0001]
    for step in usual:
        if _stress(element, step) <= PERMISSIBLE_STRESS and abs(_error(element, step)) <= 1e-3:
            return Given(step, Origin.DERIVED, PRACTICE)
    return Given(usual[-1] if usual else steel.THICKNESSES[0], Origin.DERIVED, PRACTICE)


def _loaded(element: Element, step: float) -> dict[str, float]:
    return {
        "differential_pressure": element.numbers["range"],
        "diameter_ratio": float(element.values["diameter_ratio"].value),
        "support_diameter": float(element.values["inside_diameter_hot"].value),
        "thickness": step,
    }


def _stress(element: Element, step: float) -> float:
    return float(steel.bending_stress(**_loaded(element, step)))


def _error(element: Element, step: float) -> float:
    loaded = _loaded(element, step)
    return float(steel.bending_error(**loaded, elastic_modulus=ELASTIC_MODULUS))


def describe(request: Request, element: Element) -> Described:
    """Return thickness, bending, hole and engraving of a plate held in a round pipe."""
    chosen = thickness(request, element)
    step = float(chosen.value)
    values = {
        "plate_thickness": chosen,
        "plate_stress": Given(_stress(element, step), Origin.DERIVED, _BENDING),
        "bending_error": Given(_error(element, step), Origin.DERIVED, _BENDING),
    }
    return Described(values, {"element": (engraving(request, element),)}, _hole(element))


def engraving(request: Request, element: Element) -> str:
    """Return the text for the tab of the plate."""
    tag = request.tag
    parts = [
        f"tag {tag.name}",
        f"D {request.pipe.inside_diameter * 1e3:.2f} mm",
        f"d {element.numbers['machined'] * 1e3:.2f} mm",
        tag.text("meter.plate_material") or "stainless steel 316L",
    ]
    if size := request.pipe.size:
        parts.insert(1, size)
    if rating := tag.text("line.rating"):
        parts.append(rating)
    return f"Engrave on the tab, upstream side: {', '.join(parts)}, UPSTREAM."


def _hole(element: Element) -> tuple[Finding, ...]:
    hole, bore = element.numbers.get("hole", 0.0), element.numbers["machined"]
    if hole <= steel.LARGEST_HOLE * bore:
        return ()
    return (
        Finding(
            Level.CAUTION,
            "drain-hole-large",
            "meter.drain_hole",
            f"the hole is {hole / bore * 100.0:.3g} % of the bore; the correction holds up to "
            "10 %. Make it smaller",
            source=cite("isotr15377"),
        ),
    )


def bending_limits(level: Level = Level.CAUTION) -> tuple[Limit, ...]:
    """Return the limits on the plate as a beam; a note where its rule is for round holes only."""
    return (
        Limit(
            "plate_stress",
            None,
            PERMISSIBLE_STRESS,
            level,
            "plate-bends",
            "the largest differential pressure may bend the plate for good; make it thicker or "
            "lower the range",
            _BENDING,
            driver="",
        ),
        Limit(
            "bending_error",
            -1e-3,
            1e-3,
            level,
            "plate-deflects",
            "the plate deflects enough to shift the flow by more than 0.1 %; make it thicker",
            _BENDING,
            driver="",
        ),
    )
