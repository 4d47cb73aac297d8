"""The flange rating of a meter: proposed or checked against design and operating conditions."""

from __future__ import annotations

from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass

from specsheet.findings import Finding, Given, Level, Origin, Reserve
from specsheet.fluid.state import FluidResult
from specsheet.line.demand import Demand, Demands, demands_of
from specsheet.line.flange import (
    CLASS,
    TOUGH,
    Allowed,
    Rating,
    allowed,
    classes,
    hottest,
    lowest_temperature,
    parse_rating,
    pressure_numbers,
    proposals,
    shell_test,
    standard,
)
from specsheet.line.material import Material, find_material
from specsheet.sources import cite
from specsheet.tag import Tag

_WANTED = "require.rating"
_LINE = "line.rating"
_PROPOSE = "propose"
_FLANGED = ("flanged", "wafer")
#: largest DN that ASME B16.5 covers, and that it covers in Class 2500 (the latter from memory)
_LARGEST_DN, _LARGEST_DN_2500 = 600, 300
#: temperature above which the graphite note is printed [K]
_NEAR_GRAPHITE = 673.15


@dataclass(frozen=True, slots=True)
class Margin:
    """How near a demand comes to what the rating allows.

    Attributes:
        rating: the rating in words.
        demand: pressure and temperature that must be borne together.
        pressure: gauge pressure allowed at that temperature [Pa]
        temperature: temperature up to which that pressure is allowed [K]; None where the rating
            allows it at none.
        source: citation of the table.
    """

    rating: str
    demand: Demand
    pressure: float
    temperature: float | None
    source: str


@dataclass(frozen=True, slots=True)
class RatingResult:
    """The flange rating of a tag.

    Attributes:
        values: flange_rating, and allowable_pressure (gauge) at the design temperature.
        notes: what the rating rests on and what it does not cover.
        findings: what does not hold or must be decided.
        margin: of the demand that comes nearest to what is allowed; None where nothing is known.
    """

    values: Mapping[str, Given]
    notes: tuple[str, ...]
    findings: tuple[Finding, ...] = ()
    margin: Margin | None = None


def rate(tag: Tag, fluid: FluidResult | None = None, *, nominal: int = 0) -> RatingResult:
    """Propose or check the flange rating of a tag.

    Args:
        tag: the tag; the flange is of ``require.body_material``, else of the line's material.
        fluid: states at the operating points, where saturation decides pressure or temperature.
        nominal: DN number of the flange, 0 where it is not known.
    """
    demands = demands_of(tag, fluid)
    material, material_text = _material(tag)
    findings = list(demands.findings)
    line = _read(tag, _LINE, findings)
    wanted = _read(tag, _WANTED, findings)
    chosen, origin = wanted, Origin.GIVEN
    refused = chosen is None and tag.text(_WANTED).lower() not in ("", _PROPOSE)
    if chosen is None and not refused:
        chosen, origin = _propose(demands, material, line, findings), Origin.DERIVED
    if chosen is None:
        return RatingResult({}, _general_notes(tag, material_text, None, demands), tuple(findings))
    source = "line.rating" if wanted is None and line is not None else standard(chosen.system)
    values = {"flange_rating": Given(str(chosen), origin, source)}
    decisive = _decisive(demands)
    if decisive is not None:
        found = allowed(chosen, material, decisive.temperature)
        if found.pressure is not None:
            values["allowable_pressure"] = Given(found.pressure, Origin.DERIVED, found.source)
    answers = [(demand, allowed(chosen, material, demand.temperature)) for demand in demands.every]
    for demand, found in answers:
        findings.extend(_check(chosen, demand, found))
    findings.extend(_mating(chosen, line))
    findings.extend(_size(chosen, nominal))
    findings.extend(_cold(tag, chosen, material, demands))
    findings.extend(_test(tag, chosen, material, demands))
    notes = (*_general_notes(tag, material_text, material, demands), *_test_notes(chosen, material))
    nearest = _margin(chosen, material, answers)
    return RatingResult(values, notes, tuple(dict.fromkeys(findings)), nearest)


def _margin(
    rating: Rating, material: Material | None, answers: Sequence[tuple[Demand, Allowed]]
) -> Margin | None:
    """Return the margin of the demand that uses most of what is allowed."""
    known = [(demand, found.pressure, found.source) for demand, found in answers if found.pressure]
    if not known:
        return None
    demand, pressure, source = max(known, key=lambda item: item[0].pressure / item[1])
    flips = hottest(rating, material, demand.pressure)
    return Margin(str(rating), demand, pressure, flips, source)


def _material(tag: Tag) -> tuple[Material | None, str]:
    text = tag.text("require.body_material")
    if text:
        return find_material(text), f"{text} (body material)"
    text = tag.text("line.material") or "carbon steel"
    return find_material(text), f"{text} (material of the line, as no body material is stated)"


def _read(tag: Tag, entry: str, findings: list[Finding]) -> Rating | None:
    text = tag.text(entry)
    if not text or text.lower() == _PROPOSE:
        return None
    rating = parse_rating(text)
    if rating is None:
        names = ", ".join(str(number) for number in classes())
        numbers = ", ".join(f"{number:g}" for number in pressure_numbers())
        message = (
            f'"{text}" is no flange rating known here. Write "Class" with one of {names}, or "PN" '
            f"with one of {numbers}."
        )
        findings.append(Finding(Level.CAUTION, "rating-unknown", entry, message))
    return rating


def _decisive(demands: Demands) -> Demand | None:
    """Return the design condition, else the hottest operating point."""
    if demands.design is not None:
        return demands.design
    return max(demands.points, key=lambda point: point.temperature, default=None)


def _propose(
    demands: Demands,
    material: Material | None,
    line: Rating | None,
    findings: list[Finding],
) -> Rating | None:
    """Return the line's own rating, else the lowest one that bears every demand."""
    if line is not None:
        return line
    if not demands.every:
        message = "A rating cannot be proposed: neither design nor operating conditions are known."
        findings.append(Finding(Level.NOTE, "rating-not-proposed", _WANTED, message))
        return None
    reasons: list[Allowed] = []
    for rating in proposals():
        answers = [allowed(rating, material, demand.temperature) for demand in demands.every]
        unknown = [answer for answer in answers if answer.pressure is None]
        reasons.extend(unknown)
        if not unknown and all(
            answer.pressure is not None and answer.pressure >= demand.pressure
            for answer, demand in zip(answers, demands.every, strict=True)
        ):
            return rating
    reason = f": {reasons[-1].reason}" if reasons else ""
    source = reasons[-1].source if reasons else standard(CLASS)
    message = (
        f"No class of {standard(CLASS)} can be proposed for {material.name if material else 'it'}"
        f"{reason or ': the pressure is above every class'}. State the rating, or another body "
        "material."
    )
    findings.append(Finding(Level.CAUTION, "rating-not-proposed", _WANTED, message, source=source))
    return None


def _check(rating: Rating, demand: Demand, found: Allowed) -> Iterator[Finding]:
    point = "" if demand.name == "design" else demand.name
    if found.pressure is None:
        level = Level.STOP if found.forbidden else Level.CAUTION
        code = "rating-temperature" if found.forbidden else "rating-not-known"
        message = (
            f"The pressure that {rating} allows for {demand.words} is not known: {found.reason}. "
            "Nothing is extrapolated; the maker states the allowable pressure in writing."
        )
        yield Finding(level, code, demand.field, message, point, found.source)
    elif demand.pressure > found.pressure * (1.0 + 1e-9):
        message = (
            f"{rating} allows {found.pressure / 1e5:.4g} bar(g) there, {demand.words} is wanted: "
            "choose a higher rating, another material, or lower the condition."
        )
        fraction = found.pressure / demand.pressure - 1.0
        reserve = Reserve("pressure_gauge", found.pressure, fraction)
        yield Finding(
            Level.STOP, "rating-exceeded", demand.field, message, point, found.source, reserve
        )


def _mating(rating: Rating, line: Rating | None) -> Iterator[Finding]:
    if line is not None and line != rating:
        message = (
            f"The meter is wanted in {rating}, the flanges of the line are {line}: they do not "
            "mate. State one rating for both, or where the change of rating is."
        )
        yield Finding(Level.CAUTION, "rating-mismatch", _WANTED, message)


def _size(rating: Rating, nominal: int) -> Iterator[Finding]:
    if rating.system != CLASS:
        return
    if nominal > _LARGEST_DN:
        message = (
            f"{standard(CLASS)} covers flanges to NPS 24 (DN 600); for DN {nominal} state ASME "
            "B16.47 series A or B, or the drawing of the flange."
        )
        yield Finding(Level.CAUTION, "rating-size", _WANTED, message, source=cite("asme-b16.47"))
    elif rating.number == 2500 and nominal > _LARGEST_DN_2500:
        message = "Class 2500 ends at NPS 12 (DN 300): state another rating or a flange by drawing."
        source = f"{standard(CLASS)} (from memory)"
        yield Finding(Level.CAUTION, "rating-size", _WANTED, message, source=source)


def _cold(
    tag: Tag, rating: Rating, material: Material | None, demands: Demands
) -> Iterator[Finding]:
    """Yield one finding where the metal can get colder than the ratings reach."""
    floor = lowest_temperature(rating.system)
    stated = {
        entry: value
        for entry in ("design.minimum_temperature", "design.ambient_minimum")
        if (value := tag.si(entry)) is not None
    }
    stated |= {f"points.{point.name}.temperature": point.temperature for point in demands.points}
    entry = min(stated, key=lambda name: stated[name], default="")
    if not entry or stated[entry] >= floor:
        return
    tough = material is not None and material.kind in TOUGH
    message = (
        f"{stated[entry] - 273.15:.4g} °C is below {floor - 273.15:.0f} °C, down to which the "
        f"ratings of {standard(rating.system)} hold: the material must be qualified for it (impact "
        "tests, low-temperature grade) by the piping code."
    )
    level = Level.NOTE if tough else Level.CAUTION
    yield Finding(level, "rating-cold", entry, message, source=standard(rating.system))


def _test(
    tag: Tag, rating: Rating, material: Material | None, demands: Demands
) -> Iterator[Finding]:
    stated = tag.si("design.test_pressure")
    if stated is None:
        return
    gauge = stated - tag.atmospheric_pressure
    entry = "design.test_pressure"
    most = shell_test(rating, material)
    if most is not None and gauge > most:
        message = (
            f"The test pressure, {gauge / 1e5:.4g} bar(g), is above the {most / 1e5:.4g} bar(g) "
            f"that a flange of {rating} is tested with: lower it, or choose a higher rating."
        )
        source = f"{standard(CLASS)}, 2.6 (from memory)"
        yield Finding(Level.STOP, "test-pressure-high", entry, message, source=source)
    if demands.design is not None and gauge < demands.design.pressure:
        message = "The test pressure is below the design pressure: correct one of the two."
        yield Finding(Level.CAUTION, "test-pressure-low", entry, message)


def _test_notes(rating: Rating, material: Material | None) -> tuple[str, ...]:
    most = shell_test(rating, material)
    if most is None:
        return ()
    return (
        f"Hydrostatic test of a flange of {rating}: {most / 1e5:.4g} bar(g), 1.5 times its rating "
        f"at 38 °C ({standard(CLASS)}, 2.6, from memory); the code of the line decides.",
    )


def _general_notes(
    tag: Tag, material_text: str, material: Material | None, demands: Demands
) -> tuple[str, ...]:
    notes = [f"The rating is that of flanges of {material_text}."]
    warmest = max((demand.temperature for demand in demands.every), default=0.0)
    if material is not None and material.group == "1.1" and warmest > _NEAR_GRAPHITE:
        notes.append(
            "Carbon steel turns to graphite in long service above 425 °C (ASME B16.5, note 1 to "
            "table 2-1.1)."
        )
    connection = tag.text("require.end_connection") or "flanged"
    if connection not in _FLANGED:
        notes.append(
            f"End connection {connection}: a flange rating does not apply; the bidder states the "
            "allowable pressure at the design temperature."
        )
    lowest = tag.si("design.minimum_pressure")
    if lowest is not None and lowest < tag.atmospheric_pressure * 0.999:
        notes.append(
            "Vacuum is possible: the bidder confirms that body, liner and seals bear it; flange "
            "ratings say nothing of it."
        )
    notes.append(
        "Bolting, gaskets, piping loads and the meter's own parts are not covered: the bidder "
        "states the pressure and temperature limits of the whole meter; the code of the line and "
        "local law come first."
    )
    return tuple(notes)
