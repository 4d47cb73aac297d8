"""Whole tags, sound and senseless: a result for every one, a reason for every gap."""

from __future__ import annotations

import math
import random

import pytest
from fluid_tags import HEAD, point, tag

from specsheet import fluid, tagfile
from specsheet.fields import entry, term
from specsheet.findings import Level
from specsheet.fluid.model import Condition
from specsheet.fluid.state import FluidResult
from specsheet.quantity.value import Quantity
from specsheet.tag import Point, Tag, Value

_NUMBERS = (0.0, -1.0, 1e-9, 0.02, 0.3, 0.5, 1.0, 1.5, 35.0, 300.0, 870.0, 1e5, 8e5, 1e7, 1e12)
_WORDS = ("water", "CO2", "methane", "caustic soda", "", "nonsense", "steam", "MEG", "air", "R134a")


def _quantity(choose: random.Random, path: str) -> Quantity:
    kind = entry(path).kind
    kinds = {"pressure": ("pressure_absolute", "pressure_gauge"), "flow": ("mass_flow",)}
    kinds["viscosity"] = ("dynamic_viscosity", "kinematic_viscosity")
    number = choose.choice((*_NUMBERS, math.nan)) if choose.random() < 0.1 else None
    if number is None:
        number = {"temperature": 300.0 + 200.0 * choose.random(), "pressure": 1e6}.get(
            kind, choose.choice(_NUMBERS)
        )
    return Quantity(number, choose.choice(kinds.get(kind, (kind,))), "", "as typed")


def _random_tag(choose: random.Random) -> Tag:
    given: dict[str, Value] = {
        "fluid.kind": choose.choice(entry("fluid.kind").choices),
        "fluid.substance": choose.choice(_WORDS),
        "fluid.solute": choose.choice(_WORDS),
        "fluid.product": choose.choice((*entry("fluid.product").choices, "tar")),
        "fluid.phase": choose.choice(("gas", "liquid", "liquid", "")),
        "fluid.basis": choose.choice(("mole", "mass", "volume")),
        "fluid.normalise": choose.random() < 0.7,
        "fluid.mixture": {
            choose.choice(_WORDS): choose.choice((0.2, 0.5, 1.0, -1.0, math.nan, "half"))
            for _ in range(choose.randint(0, 4))
        },
    }
    for path in (
        "fluid.relative_humidity",
        "fluid.water_dew_point",
        "fluid.mass_fraction",
        "fluid.volume_fraction",
        "fluid.salinity",
        "fluid.solids",
        "fluid.solids_density",
        "fluid.density_15",
        "fluid.api_gravity",
        "fluid.viscosity_1",
        "fluid.viscosity_1_temperature",
        "fluid.viscosity_2",
        "fluid.viscosity_2_temperature",
        "fluid.molar_mass",
        "fluid.base_density",
        "fluid.gross_calorific_value",
        "fluid.electrical_conductivity",
    ):
        if choose.random() < 0.35:
            given[path] = _quantity(choose, path)
    points = tuple(Point(name, _values(choose)) for name in ("minimum", "normal"))
    return Tag(given, points=points)


def _values(choose: random.Random) -> dict[str, Value]:
    values: dict[str, Value] = {}
    for key in ("flow", "pressure", "temperature"):
        if choose.random() < 0.9:
            values[key] = _quantity(choose, f"points.{key}")
    for key in ("density", "viscosity", "vapour_pressure", "compressibility", "dryness_fraction"):
        if choose.random() < 0.15:
            values[key] = _quantity(choose, f"points.{key}")
    return values


def _check(result: FluidResult, stated: Tag) -> None:
    assert len(result.points) == len(stated.points)
    if any(state is None for state in result.points):
        assert any(item.level is Level.STOP for item in result.findings)
    for state in result.points:
        for key, item in (state.properties if state else {}).items():
            assert math.isfinite(item.value), key
            assert item.method, key
            assert term(key)
    for item in result.findings:
        assert item.message
        assert item.message.rstrip()[-1] in ".?"
        for word in ("HEOS", "CoolProp", "Traceback", "None", "PropsSI", "solver"):
            assert word not in item.message


@pytest.mark.parametrize("seed", range(10))
def test_no_tag_raises_and_every_gap_has_its_reason(seed: int) -> None:
    choose = random.Random(seed)
    for _ in range(100):
        stated = _random_tag(choose)
        _check(fluid.derive(stated), stated)


def test_findings_come_worst_first_and_once() -> None:
    text = 'kind = "substance"\nsubstance = "steam"\nphase = "gas"'
    result = fluid.derive(
        tag(text, point("7 bar(g)", "185 degC"), point("7 bar(g)", "160 degC", "minimum"))
    )
    levels = [item.level for item in result.findings]
    assert levels == sorted(levels, key=[Level.STOP, Level.CAUTION, Level.NOTE].index)
    assert len(set(result.findings)) == len(result.findings)


def test_the_name_stated_is_the_name_printed() -> None:
    text = 'kind = "substance"\nsubstance = "steam"\nphase = "gas"\nname = "Heating steam"'
    assert fluid.derive(tag(text, point("7 bar(g)", "185 degC"))).name == "Heating steam"


def test_what_if_at_any_conditions() -> None:
    text = 'kind = "substance"\nsubstance = "steam"\nphase = "gas"'
    found = fluid.fluid_of(tag(text, point("7 bar(g)", "185 degC"))).fluid
    assert found is not None
    outcomes = fluid.states(found, [Condition(460.0, 8e5), Condition(-5.0, 8e5)])
    assert outcomes[0].state is not None
    assert outcomes[1].state is None
    assert outcomes[1].findings[0].code == "fluid-limit"


def test_a_channel_has_the_pressure_of_the_air() -> None:
    text = f'{HEAD.replace("vortex", "weir_vnotch")}[fluid]\nkind = "substance"\n'
    text += 'substance = "water"\nphase = "liquid"\n' + point("", "15 degC", flow="20 m3/h")
    reading = tagfile.loads(text)
    assert reading.tag is not None
    result = fluid.derive(reading.tag)
    assert result.points[0] is not None
    assert result.points[0].pressure == 101325.0
    assert result.findings == ()
