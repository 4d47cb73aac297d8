"""Tags for the tests of the line, read from the text that a user would write."""

from specsheet import tagfile
from specsheet.tag import Tag

_HEAD = """
schema = 1
tag = "FT-1"
family = "{family}"
"""
_POINT = """
[[points]]
name = "normal"
flow = "10 t/h"
"""


def line_tag(
    *,
    line: str = 'size = "DN 150"\nschedule = "40"\nmaterial = "carbon steel"',
    fluid: str = 'kind = "substance"\nsubstance = "water"\nphase = "liquid"',
    point: str = 'pressure = "7 bar(g)"\ntemperature = "60 degC"',
    design: str = "",
    require: str = "",
    family: str = "vortex",
) -> Tag:
    """Return a tag with one operating point; each part is the TOML text of its section."""
    text = (
        _HEAD.format(family=family)
        + f"[fluid]\n{fluid}\n[line]\n{line}\n{_POINT}{point}\n"
        + f"[design]\n{design}\n[require]\n{require}\n"
    )
    reading = tagfile.loads(text)
    assert reading.tag is not None, [str(problem) for problem in reading.problems]
    assert not reading.problems, [str(problem) for problem in reading.problems]
    return reading.tag
