"""Straight lengths: the tables of a profile against what the line has."""

from dataclasses import replace

import pytest
from line_tags import line_tag
from services import service_text

from specsheet import packs, tagfile
from specsheet.findings import Level
from specsheet.line.straight import REDUCED_UNCERTAINTY, straight

# Shape of an ISO 5167-2 table (figures made up for the test, so that they are easy to follow)
RULES = {
    "source": "made up",
    "betas": [0.2, 0.4, 0.6],
    "upstream": {"single_bend": [10, 20, 40], "swirl": [50]},
    "reduced": {"single_bend": [6, 10, 20]},
    "downstream": [4, 6, 7],
    "downstream_reduced": [2, 3, 3.5],
}
D = 0.2


def _profile(rules):
    return replace(packs.profile("vortex"), straight=rules)


def _straight(line, beta=0.4, rules=RULES, **diameters):
    diameters.setdefault("pipe_diameter", D)
    tag = line_tag(line=f'inside_diameter = "200 mm"\n{line}')
    return straight(tag, _profile(rules), beta, **diameters)


@pytest.mark.parametrize(
    ("beta", "up", "down"),
    [
        (0.1, 10, 4),
        (0.2, 10, 4),
        (0.3, 15, 5),
        (0.4, 20, 6),
        (0.5, 30, 6.5),
        (0.6, 40, 7),
        (0.7, 40, 7),
        (None, 40, 7),
        (float("nan"), 40, 7),
    ],
)
def test_lengths_are_linear_between_diameter_ratios(beta, up, down):
    result = _straight('upstream_fitting = "single bend"', beta)
    assert result.values["upstream_length"].value == pytest.approx(up * D)
    assert result.values["downstream_length"].value == pytest.approx(down * D)
    assert result.values["upstream_length"].source == "made up"


@pytest.mark.parametrize(
    ("up", "code", "extra"),
    [
        ("20 D", None, 0.0),
        ("4 m", None, 0.0),
        ("19.9 D", "upstream-length-reduced", 0.005),
        ("10 D", "upstream-length-reduced", 0.005),
        ("9.9 D", "upstream-length-short", 0.0),
        ("1.9 m", "upstream-length-short", 0.0),
    ],
)
def test_enough_reduced_or_short(up, code, extra):
    """ISO 5167-2 (from memory): a reduced length adds 0.5 % to the uncertainty."""
    result = _straight(f'upstream_length = "{up}"\ndownstream_length = "6 D"')
    assert [item.code for item in result.findings] == ([code] if code else [])
    assert result.additional_uncertainty == extra
    assert REDUCED_UNCERTAINTY == 0.005


def test_one_diameter_is_missing():
    line = 'inside_diameter = "800 mm"\nupstream_length = "50 D"\ndownstream_length = "4 D"'
    tag = line_tag(line=line, family="pitot_tube")
    (finding,) = straight(tag, packs.profile("pitot_tube"), None, pipe_diameter=0.8).findings
    assert "1 D is missing" in finding.message


def test_a_short_length_names_the_remedies():
    (finding,) = _straight('upstream_length = "2 D"\ndownstream_length = "9 D"').findings
    assert finding.level is Level.CAUTION
    assert "18 D are missing" in finding.message
    assert "flow conditioner" in finding.message
    assert finding.field == "line.upstream_length"


def test_downstream_is_judged_too():
    result = _straight('upstream_length = "20 D"\ndownstream_length = "3 D"')
    assert [item.code for item in result.findings] == ["downstream-length-reduced"]


def test_what_is_not_stated_is_noted_with_what_is_wanted():
    result = _straight("")
    assert {item.level for item in result.findings} == {Level.NOTE}
    assert "20 D (4.00 m)" in result.notes[0]
    assert "(assumed)" in result.notes[0]


@pytest.mark.parametrize(
    "rules",
    [
        {},
        {"upstream": {}},
        {"betas": [0.2], "upstream": {"single_bend": [1, 2]}},
        {"upstream": {"single_bend": [-1]}},
        {"upstream": {"single_bend": "far"}},
    ],
)
def test_a_profile_without_usable_table_makes_no_statement(rules):
    result = _straight('upstream_length = "2 D"', rules=rules)
    assert "upstream_length" not in result.values
    assert "not known" in result.notes[0]
    assert result.findings == ()


@pytest.mark.parametrize("name", ["two bends in plane", "two_bends_in_plane"])
@pytest.mark.parametrize("nested", [True, False])
def test_both_spellings_and_both_places_of_a_fitting(name, nested):
    rules = {"upstream": {name: [25]}} if nested else {name: [25]}
    result = _straight('upstream_fitting = "two bends in plane"', None, rules)
    assert result.values["upstream_length"].value == pytest.approx(25 * D)


def test_a_table_by_fitting():
    rules = {
        "betas": [0.2, 0.6],
        "fittings": {"single bend": {"lengths": [10, 30], "reduced": [5, 15]}},
        "downstream": [5],
    }
    result = _straight('upstream_length = "12 D"\ndownstream_length = "5 D"', 0.4, rules)
    assert result.values["upstream_length"].value == pytest.approx(20 * D)
    assert [item.code for item in result.findings] == ["upstream-length-reduced"]


def test_the_orifice_plate_behind_a_bend():
    """ISO 5167-2:2003, table 3 (from memory): single bend, 22 D at 0.50; reduced 9 D."""
    tag = line_tag(line='inside_diameter = "200 mm"\nupstream_length = "10 D"')
    result = straight(tag, packs.profile("orifice_concentric"), 0.5, pipe_diameter=D)
    assert result.values["upstream_length"].value == pytest.approx(22 * D)
    assert result.values["downstream_length"].value == pytest.approx(6 * D)
    assert result.additional_uncertainty == 0.005


def test_lengths_in_bores_of_a_smaller_meter():
    """20 bores of 100 mm are 2 m, which are 10 diameters of the pipe."""
    line = 'upstream_length = "10 D"\ndownstream_length = "6 D"'
    result = _straight(line, meter_diameter=0.1)
    assert result.values["upstream_length"].value == pytest.approx(2.0)
    assert result.findings == ()


def test_every_profile_has_a_table_that_can_be_read():
    """The packs of the families: a list fits its betas, and grows with them."""
    for key in packs.family_keys():
        rules = packs.profile(key).straight
        tables = [value for value in rules.values() if isinstance(value, list)]
        nested = [rules.get(name, {}) for name in ("upstream", "reduced")]
        nested += rules.get("fittings", {}).values()
        tables += [value for group in nested for value in group.values()]
        for lengths in tables:
            if lengths is not rules.get("betas"):
                assert len(lengths) in (1, len(rules.get("betas", [1.0]))), (key, lengths)


@pytest.mark.parametrize("key", packs.family_keys())
@pytest.mark.parametrize(
    "fitting", ["single bend", "two bends out of plane", "control valve", "swirl"]
)
def test_every_family_names_the_remedy_where_the_run_is_too_short(key: str, fitting: str) -> None:
    """A tenth of a diameter is too short for any family that wants a length at all."""
    profile = packs.profile(key)
    phase = profile.phases[0]
    tag = tagfile.suppose(
        service_text("water" if phase == "liquid" else "compressed air", key),
        [("line.upstream_fitting", fitting), ("line.upstream_length", "0.1 D")],
    ).tag
    assert tag is not None
    found = straight(tag, profile, 0.6, pipe_diameter=0.1)
    wanted = found.values.get("upstream_length")
    if wanted is None:
        said = "upstream-length-not-listed" in {item.code for item in found.findings}
        listed = bool(profile.straight) and fitting in ("control valve", "swirl")
        assert said is listed
        assert listed or any("the bidder states it" in note for note in found.notes)
    elif float(wanted.value) > 0.0:
        messages = [i.message for i in found.findings if i.code.startswith("upstream-length")]
        assert any("flow conditioner" in text and "choose a family" in text for text in messages)
