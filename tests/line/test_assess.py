"""The whole of the line in one call, the limits of velocity, and what it costs."""

import subprocess
import sys
from time import perf_counter

import pytest
from line_tags import line_tag

from specsheet import packs
from specsheet.fields import term
from specsheet.findings import Level
from specsheet.line import assess, pipe_of, velocity_limits
from specsheet.line.piping import PipeResult
from specsheet.quantity import parse
from specsheet.sources import PRACTICE
from specsheet.tag import Tag

DESIGN = 'pressure = "12 bar(g)"\ntemperature = "220 degC"'


def _assessed(tag, **more):
    profile = packs.profile(tag.family) if tag.family in packs.family_keys() else None
    return assess(tag, profile, pipe_of(tag).pipe, **more)


def test_everything_in_one_call():
    result = _assessed(line_tag(design=DESIGN))
    assert list(result.notes) == [
        "Straight lengths",
        "Flange rating",
        "Seals",
        "Materials",
        "Cautions",
    ]
    assert set(result.values) == {
        "upstream_length",
        "downstream_length",
        "flange_rating",
        "allowable_pressure",
        "seal_material",
    }
    assert result.values["flange_rating"].value == "Class 150"
    assert result.values["seal_material"].value == "spiral wound with graphite"


def test_every_value_is_a_term_of_the_glossary():
    tag = line_tag(design=DESIGN)
    for key in {**pipe_of(tag).values, **_assessed(tag).values}:
        assert term(key).label


def test_without_pipe_or_family_the_rest_is_still_said():
    tag = line_tag(line='material = "carbon steel"', design=DESIGN)
    result = _assessed(tag)
    assert "Straight lengths" not in result.notes
    assert result.values["flange_rating"].value == "Class 150"


def test_a_reduced_length_hands_on_its_uncertainty():
    line = 'inside_diameter = "200 mm"\nupstream_length = "10 D"\ndownstream_length = "9 D"'
    tag = line_tag(line=line, family="orifice_concentric")
    assert _assessed(tag, beta=0.5).additional_uncertainty == 0.005
    assert _assessed(tag, beta=0.2).additional_uncertainty == 0.0


@pytest.mark.parametrize(
    ("fluid", "highest"),
    [
        ('kind = "substance"\nsubstance = "water"\nphase = "liquid"', 3.0),
        ('kind = "substance"\nsubstance = "air"\nphase = "gas"', 30.0),
        ('kind = "substance"\nsubstance = "water"\nphase = "gas"', 50.0),
    ],
)
def test_usual_velocities_are_marked_as_practice(fluid, highest):
    """Common practice, no source."""
    (limit,) = velocity_limits(line_tag(fluid=fluid))
    assert (limit.key, limit.low, limit.high) == ("velocity", None, highest)
    assert limit.level is Level.CAUTION
    assert limit.source == PRACTICE


def test_house_limits_win():
    tag = line_tag()
    house = Tag({**tag.given, "job.velocity_limits": {"liquid": 2.5}}, tag.assumed, tag.points)
    (limit,) = velocity_limits(house)
    assert limit.high == 2.5
    assert "job.velocity_limits" in limit.source
    unusable = Tag({**tag.given, "job.velocity_limits": {"liquid": -1.0}}, tag.assumed, tag.points)
    assert velocity_limits(unusable)[0].high == 3.0


def test_solids_must_not_settle():
    fluid = 'kind = "slurry"\nsubstance = "water"\nsolids = "10 %"\nphase = "liquid"'
    low = [limit.low for limit in velocity_limits(line_tag(fluid=fluid)) if limit.low]
    assert low == [1.0]


@pytest.mark.parametrize("text", ["", "\x00", "]" * 50, "Class", "316L" * 200, "{hottest}", "é%s"])
@pytest.mark.parametrize(
    "path",
    ["line.material", "line.schedule", "line.rating", "line.lining", "line.size", "fluid.hazards",
     "require.rating", "require.body_material", "require.safety_function", "require.area",
     "line.upstream_length", "line.upstream_fitting", "fluid.substance"],
)  # fmt: skip
def test_no_text_of_a_user_raises(path, text):
    tag = line_tag(design=DESIGN)
    value = (text,) if path == "fluid.hazards" else text
    odd = Tag({**tag.given, path: value}, tag.assumed, tag.points)
    assert isinstance(pipe_of(odd), PipeResult)
    assert _assessed(odd).notes["Materials"]


def test_the_room_imports_without_numerical_libraries():
    code = (
        "import sys, specsheet.line; "
        "print([m for m in ('numpy', 'CoolProp', 'pint', 'textual') if m in sys.modules])"
    )
    out = subprocess.run([sys.executable, "-c", code], capture_output=True, text=True, check=True)
    assert out.stdout.strip() == "[]"


@pytest.mark.benchmark
def test_a_pipe_costs_no_more_than_a_few_texts():
    """The pipe of a tag is a lookup: it stays below thirty readings of a quantity."""
    tag = line_tag(design=DESIGN)
    pipe_of(tag)

    def best(work, runs=300):
        times = []
        for _ in range(5):
            start = perf_counter()
            for _ in range(runs):
                work()
            times.append((perf_counter() - start) / runs)
        return min(times)

    assert best(lambda: pipe_of(tag)) < 30 * best(lambda: parse("7.125 bar(g)", "pressure"))
