"""Cautions: what raises each, and what the statements on explosive atmospheres are held against."""

import chemicals
import pytest
from line_tags import line_tag

from specsheet import packs
from specsheet.findings import Level
from specsheet.fluid import names
from specsheet.line import cautions
from specsheet.line.cautions import _TEXTS
from specsheet.line.explosive import class_limits, ignition
from specsheet.line.service import service_facts

WATER = 'kind = "substance"\nsubstance = "water"\nphase = "{}"'
COOL = 'pressure = "7 bar(g)"\ntemperature = "20 degC"'


def _substance(name, phase="gas"):
    return f'kind = "substance"\nsubstance = "{name}"\nphase = "{phase}"'


def _mixture(text):
    return f'kind = "mixture"\nphase = "gas"\nmixture = {{ {text} }}'


def _said(fluid, point=COOL, design="", require=""):
    return cautions(line_tag(fluid=fluid, point=point, design=design, require=require))


@pytest.mark.parametrize(
    ("fluid", "words"),
    [
        (_substance("hydrogen sulfide"), "Toxic fluid (hydrogen sulfide)"),
        (_mixture("carbon_monoxide = 0.05, nitrogen = 0.95"), "Toxic fluid (carbon monoxide)"),
        (_substance("chlorine"), "Toxic"),
        (_substance("ammonia"), "Toxic"),
        (_substance("methane") + '\nhydrogen_sulfide = "100 ppm"', "Toxic"),
        (WATER.format("liquid") + '\nhazards = ["toxic"]', "Toxic fluid:"),
        (_substance("oxygen"), "clean, degrease"),
        (_mixture("oxygen = 0.3, nitrogen = 0.7"), "clean, degrease"),
        (_substance("nitrogen") + '\nhazards = ["oxygen"]', "clean, degrease"),
        (_substance("hydrogen"), "burns unseen"),
        (_substance("nitrogen"), "displaces air"),
        (_substance("carbon dioxide"), "displaces air"),
        (WATER.format("gas"), "water hammer"),
        (_substance("methane"), "Flammable"),
        (WATER.format("liquid") + '\nhazards = ["corrosive"]', "Corrosive"),
        (
            'kind = "petroleum"\nproduct = "fuel oil"\ndensity_15 = "870 kg/m3"\nphase = "liquid"',
            "Flammable",
        ),
        # a liquid that burns and hardly conducts charges itself
        (_substance("toluene").replace('"gas"', '"liquid"'), "bond and earth"),
        # told by the name alone
        (WATER.format("liquid") + '\nname = "Settled sewage"', "carry germs"),
        ('kind = "given"\nphase = "liquid"\nname = "Digestate, 5 %"', "carry germs"),
        (WATER.format("liquid") + '\nname = "Potable water"', "approval for drinking water"),
    ],
)
def test_what_the_substance_is_raises_the_caution(fluid, words):
    assert any(words in note for note in _said(fluid).notes)


@pytest.mark.parametrize(
    ("point", "design", "words"),
    [
        ('pressure = "7 bar(g)"\ntemperature = "61 degC"', "", "Hot surface, up to 61"),
        (COOL, 'temperature = "90 degC"\npressure = "10 bar(g)"', "Hot surface, up to 90"),
        ('pressure = "7 bar(g)"\ntemperature = "-50 degC"', "", "Cryogenic"),
        (COOL, 'minimum_temperature = "-46 degC"', "Cryogenic"),
        ('pressure = "110 bar(g)"\ntemperature = "20 degC"', "", "High pressure, up to 111 bar(a)"),
        (COOL, 'pressure = "150 bar(g)"\ntemperature = "40 degC"', "High pressure"),
    ],
)
def test_what_the_conditions_are_raises_the_caution(point, design, words):
    assert any(words in note for note in _said(_substance("air"), point, design).notes)


@pytest.mark.parametrize(
    ("require", "words"),
    [
        ("custody_transfer = true", "metrology law"),
        ('safety_function = "SIL 2"', "(SIL 2)"),
        ("potable_water = true", "Drinking water"),
        ('area = "zone 1"', "IEC 60079"),
    ],
)
def test_what_the_purchase_demands_raises_the_caution(require, words):
    assert any(words in note for note in _said(WATER.format("liquid"), COOL, "", require).notes)


@pytest.mark.parametrize(
    "fluid", [WATER.format("liquid"), _substance("air"), _mixture("oxygen = 0.21, nitrogen = 0.79")]
)
def test_harmless_service_has_no_caution(fluid):
    said = _said(fluid)
    assert [note for note in said.notes if "displaces" not in note] == []
    assert said.findings == ()


@pytest.mark.parametrize(
    ("fluid", "temperature_class", "group"),
    [
        # IEC 60079-20-1:2010; gas groups from memory
        (_substance("methane"), "T1", "IIA"),
        (_substance("hydrogen"), "T1", "IIC"),
        (_substance("propane"), "T2", "IIA"),
        (_substance("acetylene"), "T2", "IIC"),
        (_substance("ethylene"), "T2", "IIB"),
        (_substance("n-hexane", "liquid"), "T3", "IIA"),
        (_substance("hydrogen sulfide"), "T3", "IIB"),
        (_substance("diethyl ether", "liquid"), "T4", "IIB"),
        (_substance("carbon disulfide", "liquid"), "T6", "IIC"),
        (_mixture("methane = 0.9, hydrogen = 0.1"), "T1", "IIC"),
        (_mixture("methane = 0.95, n_hexane = 0.05"), "T3", "IIA"),
        (_mixture("methane = 0.995, n_hexane = 0.005"), "T1", "IIA"),
    ],
)
def test_what_the_fluid_asks_of_apparatus(fluid, temperature_class, group):
    found = ignition(service_facts(line_tag(fluid=fluid)))
    assert found.temperature_class == temperature_class
    assert found.group == group


def test_the_temperature_classes():
    """IEC 60079-0: 450, 300, 200, 135, 100, 85 degC (from memory)."""
    assert list(class_limits().values()) == [450, 300, 200, 135, 100, 85]


def test_ignition_temperatures_of_the_standard():
    """IEC 60079-20-1:2010, as the library ``chemicals`` compiles it."""
    method = "IEC 60079-20-1 (2010)"
    for key, row in packs.table("ignition")["substance"].items():
        if "ignition" in row:
            known = names.substances().get(key)
            number = chemicals.CAS_from_any(known.cas if known else key.replace("_", " "))
            published = chemicals.T_autoignition(number, method=method)
            assert row["ignition"] + 273.15 == pytest.approx(published, abs=0.5), key
            assert row["group"] in ("IIA", "IIB", "IIC")


ZONE = 'area = "zone 1"\ngas_group = "{}"\ntemperature_class = "{}"'


@pytest.mark.parametrize(
    ("fluid", "require", "code"),
    [
        (_substance("hydrogen"), ZONE.format("IIB", "T4"), "gas-group-low"),
        (_substance("n-hexane", "liquid"), ZONE.format("IIB", "T2"), "temperature-class-low"),
        (_substance("methane"), 'area = "zone 1"\ngas_group = "IIA"', "temperature-class-missing"),
        (_substance("methane"), 'area = "zone 1"\ntemperature_class = "T3"', "gas-group-missing"),
        (_substance("methane"), "", "area-not-stated"),
    ],
)
def test_statements_that_do_not_fit(fluid, require, code):
    assert [item.code for item in _said(fluid, COOL, "", require).findings] == [code]


@pytest.mark.parametrize(
    "require", [ZONE.format("IIC", "T4"), ZONE.format("IIA", "T1"), 'area = "not hazardous"']
)
def test_statements_that_fit(require):
    assert _said(_substance("methane"), COOL, "", require).findings == ()


def test_a_line_hotter_than_its_temperature_class():
    point = 'pressure = "7 bar(g)"\ntemperature = "210 degC"'
    said = _said(WATER.format("gas"), point, "", ZONE.format("IIA", "T3"))
    (finding,) = said.findings
    assert finding.code == "surface-hotter-than-class"
    assert finding.level is Level.CAUTION
    cooler = 'pressure = "7 bar(g)"\ntemperature = "195 degC"'
    assert _said(WATER.format("gas"), cooler, "", ZONE.format("IIA", "T3")).findings == ()


def test_every_caution_defers_to_those_who_are_licensed():
    deferring = (
        "law",
        "code",
        "licensed",
        "competent",
        "site",
        "ventilate",
        "protective",
        "guard",
        "drain",
    )
    for name, text in _TEXTS.items():
        assert any(word in text for word in deferring), name
