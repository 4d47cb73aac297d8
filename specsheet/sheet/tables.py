"""The tables of the sheet, section by section."""

from __future__ import annotations

from collections.abc import Mapping, Sequence, Set
from dataclasses import replace
from typing import TYPE_CHECKING

from specsheet.fields import COMMON, JOB, Entry
from specsheet.findings import Origin
from specsheet.quantity.value import Base, Quantity
from specsheet.sheet import rounding, rows, words
from specsheet.sheet.model import CITATION_JOINT, NOTHING, Cell, Row, Table
from specsheet.sheet.values import Values
from specsheet.tag import Tag

if TYPE_CHECKING:
    from specsheet.evaluate.result import Evaluation, Result

#: terms from this one on describe the meter's response; those before it, the fluid
_FIRST_OF_THE_METER = "inside_diameter"

_ENTRIES: dict[str, Entry] = {item.path: item for item in (*COMMON, *JOB)}

#: sections of the file that are printed as they stand, under their own heading
_SECTIONS = ("meter", "fluid", "line", "design", "require")

#: job entries printed with the base conditions; the rest of the job stands in the head
_SITE = (
    "job.altitude",
    "job.atmospheric_pressure",
    "job.base.temperature",
    "job.base.pressure",
    "job.combustion_temperature",
)

#: job entries printed where the yearly cost is
_COST = ("job.energy_price", "job.currency", "job.hours_per_year", "job.efficiency")


def points(tag: Tag) -> Table:
    """Return the operating points as stated."""
    stated = {key for point in tag.points for key in point.values if key != "name"}
    known = [item for item in COMMON if item.section == "points" and item.key in stated]
    lines = [rows.of_points(tag, item.key, item.label, item.symbol) for item in known]
    for key in sorted(stated - {item.key for item in known}):
        lines.append(rows.of_points(tag, key, words.from_key(key), ""))
    return Table(
        "points",
        "Operating points",
        tuple(point.name for point in tag.points),
        tuple(lines),
        f"Gauge pressures count from an atmosphere of {atmosphere(tag).text}.",
    )


def atmosphere(tag: Tag) -> Row:
    """Return the atmospheric pressure: stated, assumed, or derived from the altitude."""
    if "job.atmospheric_pressure" not in tag.given and tag.quantity("job.altitude") is not None:
        text = rows.number(tag.atmospheric_pressure, "pressure", "pressure_absolute", "bar(a)")
        return Row(
            "job.atmospheric_pressure",
            "Atmospheric pressure",
            "",
            (Cell(text, Origin.DERIVED),),
            "bar(a)",
            "ISO 2533:1975 (from memory)",
        )
    return rows.of_entry(tag, "job.atmospheric_pressure", "Atmospheric pressure")


def by_point(values: Values) -> list[Table]:
    """Return the values at the operating points: of the fluid, then of the meter."""
    names = tuple(point.name for point in values.evaluation.points)
    border = rows.PLACES[_FIRST_OF_THE_METER]
    stated = pressures_stated(values.evaluation.tag)
    fluid: list[Row] = []
    meter: list[Row] = []
    for key in rows.ordered(values.varying):
        results = values.results(key)
        if key in stated or all(result is None or rows.echoes(result, key) for result in results):
            continue  # stands in the table of operating points already
        row = values.row(key)
        if row is not None:
            (fluid if rows.PLACES.get(key, border) < border else meter).append(row)
    tables = (
        Table("fluid_points", "Fluid at the operating points", names, tuple(fluid)),
        Table("meter_points", "Meter at the operating points", names, tuple(meter)),
    )
    return [table for table in tables if table.rows]


def pressures_stated(tag: Tag) -> set[str]:
    """Return the kinds of pressure that every point states: they are not derived back."""
    kinds = [held.kind for point in tag.points if (held := point.quantity("pressure"))]
    return set(kinds) if len(set(kinds)) == 1 and len(kinds) == len(tag.points) else set()


def single(values: Values) -> list[Table]:
    """Return the tables whose rows have one value each."""
    evaluation = values.evaluation
    tag = evaluation.tag
    profile = evaluation.profile
    stated = _stated(tag, {item.path: item for item in (profile.entries if profile else ())})
    sections: tuple[tuple[str, str, Sequence[Row], Mapping[str, Result]], ...] = (
        ("element", "Meter", stated.get("meter", ()), evaluation.element),
        ("fluid", "Fluid", stated.get("fluid", ()), evaluation.fluid),
        ("line", "Line", stated.get("line", ()), evaluation.line),
        ("design", "Design conditions", stated.get("design", ()), {}),
        ("base", "Site and base conditions", _site(tag), evaluation.base),
        ("require", "The purchase demands", stated.get("require", ()), {}),
        ("summary", "Range and running cost", _cost(evaluation), evaluation.summary),
    )
    typed = {(held.kind, held.value) for held in tag.given.values() if isinstance(held, Quantity)}
    made = [
        Table(key, title, (), (*lines, *_results(values, found, lines, typed)))
        for key, title, lines, found in sections
    ]
    return [table for table in made if table.rows]


def _stated(tag: Tag, own: Mapping[str, Entry]) -> dict[str, list[Row]]:
    """Return what was stated or assumed in each section of the file, in the glossary's order.

    Args:
        tag: the tag.
        own: the entries of its family.
    """
    labels = {**own, **_ENTRIES}
    places = {path: place for place, path in enumerate(labels)}
    paths = [
        path for path in {**tag.given, **tag.assumed} if path in tag.given or matters(tag, path)
    ]
    lines: dict[str, list[Row]] = {}
    for path in sorted(paths, key=lambda path: places.get(path, len(places))):
        section = path.partition(".")[0]
        if section in _SECTIONS:
            lines.setdefault(section, []).append(_entry(tag, path, labels))
    return lines


def matters(tag: Tag, path: str) -> bool:
    """Tell whether a default has any effect on this tag."""
    if path == "fluid.basis":
        return tag.text("fluid.kind") == "mixture"
    if path == "fluid.energy_basis":
        flows = (point.quantity("flow") for point in tag.points)
        return any(flow is not None and flow.kind == "energy_flow" for flow in flows)
    return True


def _entry(tag: Tag, path: str, labels: Mapping[str, Entry]) -> Row:
    found = labels.get(path)
    label = found.label if found else words.from_key(path)
    return rows.of_entry(tag, path, label, found.symbol if found else "")


def _site(tag: Tag) -> tuple[Row, ...]:
    """Return the site's atmosphere and every base condition in use."""
    lines = []
    for path in _SITE:
        if path == "job.atmospheric_pressure":
            lines.append(atmosphere(tag))
        elif tag.get(path) is not None:
            lines.append(_entry(tag, path, _ENTRIES))
    for base in _bases(tag):
        text = f"{base.name}: {base.temperature - 273.15:g} °C, {base.pressure / 1000:g} kPa(a)"
        lines.append(Row("base", "Base of the flow stated", "", (Cell(text, Origin.GIVEN),)))
    return tuple(lines)


def _bases(tag: Tag) -> list[Base]:
    held = (value for point in tag.points for value in point.values.values())
    found = (value.base for value in held if isinstance(value, Quantity) and value.base)
    return [base for base in dict.fromkeys(found) if base != tag.base]


def _cost(evaluation: Evaluation) -> tuple[Row, ...]:
    if "yearly_energy" not in evaluation.summary and "yearly_cost" not in evaluation.summary:
        return ()
    tag = evaluation.tag
    currency = tag.text("job.currency")
    made = [_entry(tag, path, _ENTRIES) for path in _COST if tag.get(path) is not None]
    return tuple(
        replace(row, cells=(replace(row.cells[0], text=row.text.replace("1/", f"{currency}/")),))
        if currency and row.key == "job.energy_price"
        else row
        for row in made
        if row.key != "job.currency"
    )


def _results(
    values: Values,
    found: Mapping[str, Result],
    stated: Sequence[Row],
    typed: Set[tuple[str, float | str]],
) -> tuple[Row, ...]:
    """Return the rows of results, leaving out given values that the rows above echo already.

    Args:
        values: of the evaluation.
        found: the results.
        stated: the rows above.
        typed: kind and value of every quantity on the tag.
    """
    echoed = {*typed, *(("text", row.text) for row in stated)}
    return tuple(
        values.alone(key, found[key])
        for key in rows.ordered(found)
        if not (
            found[key].origin is Origin.GIVEN and (rows.kind_of(key), found[key].value) in echoed
        )
    )


def budget(evaluation: Evaluation) -> Table | None:
    """Return the uncertainty budget: standard uncertainty of the flow by contribution."""
    if not evaluation.budget:
        return None
    width = max(len(line.relative) for line in evaluation.budget)
    evaluated = [point for point in evaluation.points if "uncertainty" in point.values]
    columns = evaluated if len(evaluated) == width else list(evaluation.points)[:width]
    lines = [
        Row(
            line.key,
            words.capital(line.label),
            "",
            tuple(
                Cell(rounding.significant(100.0 * share, 2), line.origin) for share in line.relative
            ),
            "%",
            line.source,
        )
        for line in evaluation.budget
    ]
    total = [point.values.get("uncertainty") for point in columns]
    if any(result is not None for result in total):
        lines.append(_total(total))
    return Table(
        "budget",
        "Uncertainty of the flow",
        tuple(point.name for point in columns),
        tuple(lines),
        "Contributions are standard uncertainties of the flow (k = 1); the last row is expanded "
        "(k = 2). A figure marked typical is to be confirmed by the bidder.",
    )


def _total(results: list[Result | None]) -> Row:
    cells = tuple(
        Cell(rounding.significant(100.0 * float(result.value), 2), result.origin)
        if result is not None and not isinstance(result.value, str)
        else Cell(NOTHING)
        for result in results
    )
    sources = dict.fromkeys(result.source for result in results if result and result.source)
    source = CITATION_JOINT.join(sources)
    return Row("uncertainty", "Expanded uncertainty, k = 2", "U", cells, "%", source)
