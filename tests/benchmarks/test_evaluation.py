"""One edit, evaluated anew: text -> tag -> evaluation -> sheet, as the form's worker does it."""

from __future__ import annotations

import re

import pytest
from cli_process import DEMO_TAGS, demo_text
from measure import calls, report

from specsheet import sheet, tagfile
from specsheet.evaluate import evaluate

pytestmark = pytest.mark.benchmark

STEAM = demo_text("FT-2104")
FLUID = STEAM[STEAM.index("[fluid]") : STEAM.index("[line]")]


def _with_fluid(fluid: str) -> str:
    return STEAM.replace(FLUID, f"[fluid]\n{fluid}\n\n")


PURE = 'kind = "substance"\nsubstance = "{}"\nphase = "gas"'
MIXTURE = """\
kind = "mixture"
phase = "gas"
mixture = { methane = 0.80, ethane = 0.06, propane = 0.03, nitrogen = 0.03, carbon_dioxide = 0.03, \
isobutane = 0.01, butane = 0.01, hydrogen = 0.01, oxygen = 0.01, carbon_monoxide = 0.01 }"""

SERVICES = {
    "water": (demo_text("FT-6101"), 16.0),
    "steam": (STEAM, 16.0),
    "nitrogen": (_with_fluid(PURE.format("nitrogen")), 16.0),
    "methane": (_with_fluid(PURE.format("methane")), 16.0),
    "carbon dioxide": (_with_fluid(PURE.format("carbon_dioxide")), 16.0),
    "gas of ten components": (_with_fluid(MIXTURE), 30.0),
}


#: a demo tag of every family: its edit, whatever fluid it carries; a gas of components takes longer
FAMILIES = {
    match[1]: (text, 30.0 if '"mixture"' in text else 16.0)
    for text in map(demo_text, DEMO_TAGS)
    if (match := re.search(r'^family +?= "(\w+)"', text, re.MULTILINE))
}
EDITS = SERVICES | FAMILIES


@pytest.mark.parametrize("name", EDITS)
def test_edit_of_the_process_data(name: str) -> None:
    text, budget = EDITS[name]
    first = text.index("temperature = ") + len('temperature = "')
    stated = text[first : text.index(" ", first)]

    def edit(place: int) -> object:
        # another temperature each time, so that nothing can be remembered
        changed = text.replace(f'"{stated} degC"', f'"{float(stated) + 0.01 * place:.2f} degC"')
        reading = tagfile.loads(changed)
        assert reading.tag is not None
        assert reading.problems == ()
        return sheet.build(evaluate(reading.tag), annexed=False)  # as the form asks

    edit(0)  # loads the libraries
    spent = calls(edit, 60) * 1e3
    report(f"edit, {name}", spent, "ms", budget)
    assert spent <= budget
