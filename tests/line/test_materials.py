"""Notes on wetted materials: every rule, and that it stays silent where it does not hold."""

from dataclasses import replace

import pytest
from line_tags import line_tag

from specsheet import packs
from specsheet.findings import Level
from specsheet.line import materials
from specsheet.line.compatibility import _touches
from specsheet.line.service import SOUR, service_facts

GAS = 'kind = "mixture"\nphase = "gas"\nmixture = {{ {} }}'
WATER = 'kind = "substance"\nsubstance = "water"\nphase = "liquid"\n'
CLOSING = "materials engineer"


def _notes(fluid, material, celsius=40.0, bar=7.0, design="", require=""):
    point = f'pressure = "{bar} bar(a)"\ntemperature = "{celsius} degC"'
    tag = line_tag(
        fluid=fluid,
        point=point,
        design=design,
        require=require,
        line='size = "DN 100"\nschedule = "40"',
    )
    profile = replace(packs.profile("vortex"), wetted={"part": (material,)})
    found = materials(tag, profile)
    return [note for note in found.notes if "part)" in note]


def _substance(name, phase="liquid"):
    return f'kind = "substance"\nsubstance = "{name}"\nphase = "{phase}"'


def _solution(solute):
    return f'kind = "solution"\nsolute = "{solute}"\nmass_fraction = "30 %"\nphase = "liquid"'


@pytest.mark.parametrize(
    ("fraction", "bar", "kilopascal", "sour"),
    [
        # partial pressure = mole fraction times absolute pressure; ISO 15156-2, 7.1.2: 0.3 kPa
        (0.0001, 70.0, 0.7, True), (0.001, 5.0, 0.5, True), (0.00005, 40.0, 0.2, False),
        (0.0003, 10.0, 0.3, True), (0.000299, 10.0, 0.299, False),
    ],
)  # fmt: skip
def test_sour_service(fraction, bar, kilopascal, sour):
    mixture = f"methane = {1 - fraction}, hydrogen_sulfide = {fraction}"
    point = f'pressure = "{bar} bar(a)"\ntemperature = "40 degC"'
    tag = line_tag(fluid=GAS.format(mixture), point=point)
    service = service_facts(tag)
    assert service.sulfide_pressure == pytest.approx(kilopascal * 1000)
    assert ("sour" in service.words) is sour
    assert SOUR == 300.0
    notes = " ".join(_notes(GAS.format(mixture), "carbon steel", bar=bar))
    assert ("22 HRC" in notes) is sour
    assert ("ISO 15156-2" in notes) is sour


def test_sour_service_from_the_entry_and_from_masses():
    stated = GAS.format("methane = 1.0") + '\nhydrogen_sulfide = "1500 ppm"'
    point = 'pressure = "2 bar(a)"\ntemperature = "40 degC"'
    assert service_facts(line_tag(fluid=stated, point=point)).sulfide_pressure == pytest.approx(300)
    # by mass: 34.08 g/mol of H2S against 16.04 g/mol of methane
    masses = GAS.format("methane = 0.99, hydrogen_sulfide = 0.01") + '\nbasis = "mass"'
    moles = (0.01 / 34.081) / (0.01 / 34.081 + 0.99 / 16.0425)
    found = service_facts(line_tag(fluid=masses, point=point)).sulfide_pressure
    assert found == pytest.approx(moles * 2e5, rel=1e-4)


LIQUID, GASEOUS = "liquid", "gas"

# fluid, material, temperature [degC], verdict, a word of the note; common practice unless the pack
# names a source
RULES = [
    # Demineralised and boiler water, by name or by conductivity: common practice, no source
    (WATER + 'name = "Demineralised water"', "carbon steel", 20, "avoid", "nothing that protects"),
    (WATER + 'electrical_conductivity = "2 uS/cm"', "carbon steel", 20, "avoid", "takes up iron"),
    (WATER + 'name = "Deionised water"', "brass", 20, "conditional", "gives off copper"),
    (WATER + 'name = "DI water, permeate"', "galvanised steel", 20, "avoid", "zinc"),
    (WATER + 'name = "Demin water"', "stainless steel 316L", 20, "suited", "low-carbon"),
    (WATER + 'name = "Condensate"', "carbon steel", 90, "conditional", "water treatment"),
    (WATER + 'name = "Boiler feed water"', "brass", 90, "conditional", "ammonia and amines"),
    (WATER + 'name = "Boiler feedwater"', "aluminium", 90, "avoid", "alkaline boiler water"),
    (WATER + 'name = "Condensate"', "galvanised steel", 90, "avoid", "zinc"),
    (_substance("hydrogen sulfide", GASEOUS), "brass", 20, "avoid", "eats copper alloys"),
    (_substance("ammonia", GASEOUS), "brass", 20, "avoid", "copper alloys"),
    (_substance("ammonia"), "carbon steel", 20, "conditional", "stress relief"),
    (_substance("ammonia", GASEOUS), "FKM", 20, "avoid", "fluoroelastomers"),
    (_substance("acetylene", GASEOUS), "copper", 20, "avoid", "acetylides"),
    (_substance("ethylene oxide", GASEOUS), "brass", 20, "avoid", "polymerise"),
    (_substance("oxygen", GASEOUS), "titanium", 20, "avoid", "burns in oxygen"),
    (_substance("oxygen", GASEOUS), "aluminium", 20, "avoid", "burns in oxygen"),
    (_substance("oxygen", GASEOUS), "carbon steel", 20, "conditional", "impingement"),
    (_substance("oxygen", GASEOUS), "stainless steel 316L", 20, "conditional", "cleaned"),
    (_substance("oxygen", GASEOUS), "nickel-copper alloy 400", 20, "suited", "exempt"),
    (_substance("oxygen", GASEOUS), "PTFE", 20, "conditional", "proven for oxygen"),
    (_substance("hydrogen", GASEOUS), "carbon steel", 250, "conditional", "API RP 941"),
    (_substance("hydrogen", GASEOUS), "titanium", 100, "avoid", "brittle"),
    (_substance("hydrogen", GASEOUS), "alloy 625", 20, "conditional", "brittle"),
    (_substance("hydrogen", GASEOUS), "stainless steel 316L", 20, "suited", "gold"),
    (WATER + 'chlorides = "50 ppm"', "stainless steel 316L", 70, "avoid", "crack austenitic"),
    (WATER + 'chlorides = "250 ppm"', "stainless steel 304", 20, "conditional", "200 mg/kg"),
    (WATER + 'chlorides = "1500 ppm"', "stainless steel 316L", 20, "conditional", "1000 mg/kg"),
    (WATER + 'chlorides = "1500 ppm"', "titanium", 20, "suited", "pitting"),
    ('kind = "seawater"\nsalinity = "3.5 %"\nphase = "liquid"', "316L", 20, "avoid", "crevices"),
    ('kind = "seawater"\nsalinity = "3.5 %"\nphase = "liquid"', "A105", 20, "avoid", "rusts"),
    ('kind = "seawater"\nsalinity = "3.5 %"\nphase = "liquid"', "2205", 20, "conditional", "cold"),
    (
        'kind = "seawater"\nsalinity = "3.5 %"\nphase = "liquid"',
        "super duplex",
        20,
        "suited",
        "pit",
    ),
    (
        'kind = "seawater"\nsalinity = "3.5 %"\nphase = "liquid"',
        "cupronickel",
        20,
        "suited",
        "3 m/s",
    ),
    ('kind = "seawater"\nsalinity = "3.5 %"\nphase = "liquid"', "brass", 20, "conditional", "zinc"),
    ('kind = "seawater"\nsalinity = "3.5 %"\nphase = "liquid"', "aluminium", 20, "avoid", "pits"),
    (_solution("sodium hydroxide"), "carbon steel", 60, "conditional", "SP0403"),
    (_solution("caustic soda"), "stainless steel 316L", 110, "avoid", "hot caustic"),
    (_solution("NaOH"), "aluminium", 20, "avoid", "dissolves"),
    (_solution("potassium hydroxide"), "tantalum", 20, "avoid", "dissolves"),
    (_solution("sodium hydroxide"), "alloy 400", 20, "suited", "caustic"),
    (_solution("HF"), "titanium", 20, "avoid", "hydrofluoric"),
    (_solution("hydrogen fluoride"), "glass lining", 20, "avoid", "hydrofluoric"),
    (_solution("hydrogen fluoride"), "alloy 400", 20, "conditional", "oxidisers"),
    (_solution("hydrochloric acid"), "stainless steel 316L", 20, "avoid", "dissolves"),
    (_solution("hydrochloric acid"), "PTFE", 20, "suited", "resists"),
    (_solution("sulfuric acid"), "C-276", 20, "conditional", "chart"),
    (_solution("sulphuric acid"), "carbon steel", 20, "conditional", "90 %"),
    (_solution("nitric acid"), "copper", 20, "avoid", "dissolves"),
    (_solution("nitric acid"), "stainless steel 304L", 20, "suited", "low-carbon"),
    (_solution("nitric acid"), "spiral wound, graphite", 20, "conditional", "oxidisers"),
    (WATER + 'ph = "4"', "carbon steel", 20, "avoid", "pH 5"),
    (_substance("chlorine", GASEOUS), "titanium", 20, "avoid", "dry chlorine"),
    (_substance("chlorine", GASEOUS), "carbon steel", 20, "conditional", "120"),
    (_solution("bleach"), "316L", 20, "avoid", "hypochlorite"),
    (_solution("bleach"), "titanium", 20, "suited", "hypochlorite"),
    (_substance("carbon dioxide", GASEOUS), "carbon steel", 20, "conditional", "wet"),
    (_substance("carbon monoxide", GASEOUS), "alloy 625", 100, "conditional", "carbonyl"),
    (_substance("methanol"), "titanium", 20, "avoid", "dry methanol"),
    (_substance("mercury"), "aluminium", 20, "avoid", "mercury"),
    (_substance("toluene"), "EPDM", 20, "avoid", "hydrocarbons"),
    (_substance("acetone"), "FKM", 20, "avoid", "ketones"),
    (WATER + "abrasive = true", "PTFE", 20, "avoid", "solids"),
    (WATER + "abrasive = true", "soft rubber", 20, "suited", "wears little"),
    (WATER + "abrasive = true", "stainless steel 316L", 20, "conditional", "hard facing"),
    # Seals
    (_substance("water", GASEOUS), "FKM", 150, "avoid", "steam hardens"),
    (_substance("water", GASEOUS), "PTFE", 150, "conditional", "hot steam"),
    ('kind = "given"\nname = "Rich amine"\nphase = "liquid"', "FKM", 40, "avoid", "amines"),
    (_solution("caustic soda"), "silicone rubber", 20, "avoid", "EPDM or PTFE"),
    (_substance("toluene"), "NBR", 20, "avoid", "aromatics"),
    (_substance("methanol"), "FKM", 20, "conditional", "usual grades swell"),
    (_solution("bleach"), "NBR", 20, "avoid", "strong oxidisers destroy"),
    (
        GAS.format("methane = 0.99, hydrogen_sulfide = 0.01"),
        "NBR",
        40,
        "conditional",
        "hardens nitrile",
    ),
    (WATER, "FKM", 210, "avoid", "200 °C"),
    (WATER, "hard rubber", 90, "avoid", "80 °C"),
    (WATER, "NBR", 110, "avoid", "100 °C"),
    (WATER, "EPDM", 140, "avoid", "130 °C"),
    (WATER, "PFA", 190, "avoid", "180 °C"),
    (WATER, "PVC", 60, "avoid", "50 °C"),
    (WATER, "polypropylene", 90, "avoid", "80 °C"),
    (_substance("nitrogen", GASEOUS), "carbon steel", -40, "conditional", "impact"),
    (_substance("nitrogen", GASEOUS), "EPDM", -30, "conditional", "stiffens"),
    (_substance("nitrogen", GASEOUS), "stainless steel 304L", -150, "suited", "tough"),
    (_substance("methane", GASEOUS), "cast iron", 20, "avoid", "brittle iron"),
]


@pytest.mark.parametrize(("fluid", "material", "celsius", "verdict", "words"), RULES)
def test_every_rule_speaks(fluid, material, celsius, verdict, words):
    notes = _notes(fluid, material, celsius)
    assert any(f": {verdict};" in note and words in note for note in notes), notes
    assert all(note.endswith(").") for note in notes)  # each names its source


SILENT = [
    (_substance("water"), "stainless steel 316L", 20),
    # neither demineralised nor boiler water
    (WATER, "carbon steel", 20),
    (WATER + 'name = "Feeding water"', "carbon steel", 20),
    (WATER + 'electrical_conductivity = "450 uS/cm"', "carbon steel", 20),
    (_substance("n-pentane") + '\nname = "Gas condensate"', "carbon steel", 20),
    (_substance("water", GASEOUS) + '\nname = "Condensate flash"', "galvanised steel", 150),
    (_substance("hydrogen", GASEOUS), "carbon steel", 150),
    (_substance("hydrogen", GASEOUS), "titanium", 70),
    (WATER + 'chlorides = "50 ppm"', "stainless steel 316L", 20),
    (WATER + 'chlorides = "500 ppm"', "stainless steel 316L", 20),
    (_substance("air", GASEOUS), "titanium", 20),
    (GAS.format("oxygen = 0.2, nitrogen = 0.8"), "titanium", 20),
    (_solution("sodium hydroxide"), "carbon steel", 40),
    (_solution("sodium hydroxide"), "stainless steel 316L", 90),
    (_substance("hydrogen chloride", GASEOUS), "stainless steel 316L", 20),
    (WATER, "hard rubber", 70),
    (WATER, "PTFE", 170),
    (WATER + 'ph = "6"', "carbon steel", 20),
    (_substance("nitrogen", GASEOUS), "carbon steel", -20),
    ('kind = "seawater"\nsalinity = "3.5 %"\nphase = "liquid"', "carbon steel, rubber lined", 20),
]


@pytest.mark.parametrize(("fluid", "material", "celsius"), SILENT)
def test_no_rule_speaks_out_of_turn(fluid, material, celsius):
    assert _notes(fluid, material, celsius) == []


def test_every_rule_of_the_pack_is_complete_and_tested():
    spoken = {words for *_, words in RULES} | {
        "22 HRC",
        "corrosion-resistant",
        "lead-free",
        "gas taken up",
    }
    for rule in packs.table("compatibility")["rule"]:
        assert rule["verdict"] in ("avoid", "conditional", "suited")
        assert rule["source"]
        told = f"{rule['text']} ({rule['source']})"
        assert any(words in told for words in spoken), told


def test_a_stated_material_to_avoid_is_a_finding():
    tag = line_tag(
        fluid=_substance("oxygen", GASEOUS),
        point='pressure = "7 bar(a)"\ntemperature = "20 degC"',
        require='body_material = "titanium"',
    )
    (finding,) = materials(tag, None).findings
    assert finding.level is Level.CAUTION
    assert finding.field == "require.body_material"
    assert finding.source


def test_a_typical_material_to_avoid_is_only_a_note():
    assert _notes(_substance("oxygen", GASEOUS), "titanium")
    tag = line_tag(fluid=_substance("oxygen", GASEOUS), line='size = "DN 50"\nschedule = "40"')
    profile = replace(packs.profile("vortex"), wetted={"part": ("titanium",)})
    assert materials(tag, profile).findings == ()


def test_notes_are_grouped_worst_first_and_closed():
    tag = line_tag(fluid=_substance("oxygen", GASEOUS))
    wetted = {"body": ("stainless steel 316L",), "plate": ("stainless steel 316L", "titanium")}
    notes = materials(tag, replace(packs.profile("vortex"), wetted=wetted)).notes
    assert notes[0].startswith("Titanium (plate): avoid")
    assert any("Stainless steel 316L (body, plate): conditional" in note for note in notes)
    assert CLOSING in notes[-1]
    assert "no guarantee" in notes[-1]


def test_as_the_line_means_the_line():
    tag = line_tag(fluid=_substance("oxygen", GASEOUS))
    notes = materials(
        tag, replace(packs.profile("vortex"), wetted={"ring": ("as the line",)})
    ).notes
    assert any("carbon steel (pipe, ring)" in note.lower() for note in notes)


def test_words_match_whole():
    rule = {"materials": ["pe"]}
    assert _touches(rule, "PE lining")
    assert not _touches(rule, "peek")


@pytest.mark.parametrize(
    ("material", "require", "words"),
    [("brass", "potable_water = true", "lead-free"), ("brass", "", None)],
)
def test_drinking_water(material, require, words):
    notes = _notes(WATER, material, require=require)
    assert [words in note for note in notes] == ([True] if words else [])


def test_rubber_in_gas_under_pressure():
    notes = _notes(_substance("nitrogen", GASEOUS), "FKM", bar=150)
    assert any("ISO 23936-2" in note for note in notes)
    assert _notes(_substance("nitrogen", GASEOUS), "FKM", bar=50) == []


def test_alloys_in_sour_service():
    fluid = GAS.format("methane = 0.99, hydrogen_sulfide = 0.01")
    assert any("ISO 15156-3" in note for note in _notes(fluid, "stainless steel 316L", bar=10))
