"""Seals and gaskets: stated ones checked, suited ones proposed. Usual figures, no source."""

import pytest
from line_tags import line_tag

from specsheet import packs
from specsheet.findings import Level, Origin
from specsheet.line import materials, seals
from specsheet.line.seals import find_seal

WATER = 'kind = "substance"\nsubstance = "water"\nphase = "{}"\n'
GAS = 'kind = "substance"\nsubstance = "{}"\nphase = "gas"\n'
OIL = 'kind = "petroleum"\nproduct = "fuel oil"\ndensity_15 = "842 kg/m3"\nphase = "liquid"\n'
AMINE = 'kind = "given"\nname = "Lean MDEA"\nphase = "liquid"\n'


def _tag(fluid, celsius, *, bar="6 bar(g)", seal="", design="", family="turbine_axial"):
    point = f'pressure = "{bar}"\ntemperature = "{celsius} degC"'
    require = f'seal_material = "{seal}"' if seal else ""
    return line_tag(fluid=fluid, point=point, design=design, require=require, family=family)


def _said(tag):
    return seals(tag, packs.profile(tag.family))


STATED = [
    # service, degC, stated seal, level and code of the finding
    (WATER.format("liquid"), 90, "EPDM", None),
    (WATER.format("liquid"), 140, "EPDM", (Level.STOP, "seal-unsuitable")),
    (WATER.format("liquid"), 110, "O-ring, NBR", (Level.STOP, "seal-unsuitable")),
    (GAS.format("nitrogen"), -30, "FKM", (Level.STOP, "seal-unsuitable")),
    (GAS.format("nitrogen"), -190, "PTFE, filled", None),
    (WATER.format("gas"), 440, "spiral wound with graphite", None),
    (WATER.format("gas"), 480, "spiral wound with graphite", (Level.STOP, "seal-unsuitable")),
    (WATER.format("liquid"), 20, "wonder rubber", (Level.CAUTION, "seal-unknown")),
    (WATER.format("liquid"), 20, "none (welded)", None),
]


@pytest.mark.parametrize(("fluid", "celsius", "seal", "expected"), STATED)
def test_a_stated_seal_is_held_against_the_temperatures(fluid, celsius, seal, expected):
    result = _said(_tag(fluid, celsius, seal=seal))
    assert result.values["seal_material"].value == seal
    assert result.values["seal_material"].origin is Origin.GIVEN
    found = [(item.level, item.code) for item in result.findings]
    assert found == ([] if expected is None else [expected])
    assert all(item.field == "require.seal_material" for item in result.findings)


def test_the_design_temperature_counts():
    water = WATER.format("liquid")
    assert not _said(_tag(water, 60, seal="NBR")).findings
    (finding,) = _said(_tag(water, 60, seal="NBR", design='temperature = "120 degC"')).findings
    assert "120 °C is wanted, it bears up to 100 °C" in finding.message
    cold = 'temperature = "80 degC"\nminimum_temperature = "-40 degC"'
    (finding,) = _said(_tag(water, 60, seal="NBR", design=cold)).findings
    assert "-40 °C is wanted, it bears down to -30 °C" in finding.message


def test_vacuum_and_pressure():
    air = GAS.format("air")
    (finding,) = _said(_tag(air, 20, bar="20 mbar(a)", seal="PTFE")).findings
    assert finding.level is Level.CAUTION
    assert "0.02 bar(a)" in finding.message
    assert not _said(_tag(air, 20, bar="20 mbar(a)", seal="FKM")).findings
    (finding,) = _said(_tag(air, 20, bar="60 bar(g)", seal="fibre gasket")).findings
    assert "60 bar(g) is wanted" in finding.message


CHEMISTRY = [
    # service, degC, seal, whether the notes on materials call it one to avoid
    (WATER.format("gas"), 150, "FKM", True),
    (WATER.format("gas"), 125, "EPDM", False),
    (OIL, 40, "EPDM", True),
    (OIL, 40, "FKM", False),
    (AMINE, 40, "FKM", True),
    (AMINE, 40, "EPDM", False),
    (GAS.format("ammonia"), 20, "FKM", True),
    (GAS.format("chlorine"), 20, "NBR", True),
    (GAS.format("chlorine"), 20, "PTFE", False),
    (GAS.format("methanol").replace("gas", "liquid"), 20, "FKM", False),
]


@pytest.mark.parametrize(("fluid", "celsius", "seal", "avoid"), CHEMISTRY)
def test_a_stated_seal_is_held_against_the_fluid(fluid, celsius, seal, avoid):
    tag = _tag(fluid, celsius, seal=seal)
    found = materials(tag, packs.profile(tag.family)).findings
    hits = [item for item in found if item.field == "require.seal_material"]
    assert [item.code for item in hits] == (["material-avoid"] if avoid else [])


def test_oxygen_wants_proven_polymers():
    tag = _tag(GAS.format("oxygen"), 20, seal="NBR")
    notes = materials(tag, packs.profile(tag.family)).notes
    assert any(note.startswith("NBR (seal): conditional; only polymers") for note in notes)


def test_a_stated_seal_stands_for_the_usual_ones():
    tag = _tag(OIL, 40, seal="PTFE")
    notes = " ".join(materials(tag, packs.profile("turbine_axial")).notes)
    assert "EPDM" not in notes
    assert "EPDM (seals): avoid" in " ".join(
        materials(_tag(OIL, 40), packs.profile("turbine_axial")).notes
    )


PROPOSED = [
    # family, service, degC, what is proposed of the family's usual seals, else of the whole pack
    ("turbine_axial", WATER.format("liquid"), 20, "FKM, EPDM or PTFE"),
    ("turbine_axial", OIL, 40, "FKM or PTFE"),
    ("turbine_axial", AMINE, 40, "EPDM or PTFE"),
    ("turbine_axial", GAS.format("nitrogen"), -100, "PTFE"),
    ("gear_oval", WATER.format("liquid"), 190, "FKM or PTFE"),
    ("vortex", WATER.format("gas"), 160, "spiral wound with graphite or fibre gasket"),
    ("dall_tube", WATER.format("gas"), 120, "EPDM or fibre gasket"),  # conditional in steam
    ("rotary_gas", GAS.format("ammonia"), 20, "NBR"),
    ("orifice_concentric", WATER.format("gas"), 300, "spiral wound with graphite"),
    ("vane_sliding", GAS.format("ammonia").replace("gas", "liquid"), 20, "EPDM, NBR or HNBR"),
    ("orifice_concentric", WATER.format("gas"), 480, "metal"),
]


@pytest.mark.parametrize(("family", "fluid", "celsius", "names"), PROPOSED)
def test_suited_seals_are_proposed(family, fluid, celsius, names):
    result = _said(_tag(fluid, celsius, family=family))
    assert result.findings == ()
    assert result.values["seal_material"].value == names
    assert result.values["seal_material"].origin is Origin.DERIVED
    assert len(result.notes) == names.count(" or ") + names.count(",") + 1
    assert all(note.endswith(").") for note in result.notes)  # each names its source


def test_nothing_suits_at_600_degrees():
    (finding,) = _said(_tag(WATER.format("gas"), 600)).findings
    assert (finding.level, finding.code) == (Level.CAUTION, "no-seal")


@pytest.mark.parametrize("family", ["coriolis", "sonar_array", "weir_vnotch"])
def test_a_family_without_seals_proposes_none(family):
    result = _said(_tag(WATER.format("liquid"), 20, family=family))
    assert (result.values, result.notes, result.findings) == ({}, (), ())


def test_the_longest_name_wins():
    assert find_seal("HNBR 90 Shore").name == "HNBR"
    assert find_seal("spiral wound with PTFE filler").name == "spiral wound with graphite"
    assert find_seal("FFKM").name == "FFKM"
    assert find_seal("rubber") is None


def test_the_pack_is_complete():
    rows = packs.table("seals")["seal"]
    assert len({row["name"] for row in rows}) == len(rows) >= 10
    for row in rows:
        assert -273 < row["low"] < 0 < row["high"] <= 500
        assert row["note"]
        assert row["source"] in ("common practice, no source", "handbook value (from memory)")
