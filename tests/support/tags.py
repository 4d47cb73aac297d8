"""Whole tags for tests, read from the text that a user would write."""

from specsheet import tagfile
from specsheet.tag import Tag

WATER = 'kind = "substance"\nsubstance = "water"\nphase = "liquid"'
STEAM = 'kind = "substance"\nsubstance = "water"\nphase = "gas"'
NITROGEN = 'kind = "substance"\nsubstance = "nitrogen"\nphase = "gas"'


def point(name: str, flow: str, pressure: str, temperature: str, more: str = "") -> str:
    """Return the TOML text of one operating point."""
    return (
        f'[[points]]\nname = "{name}"\nflow = "{flow}"\npressure = "{pressure}"\n'
        f'temperature = "{temperature}"\n{more}\n'
    )


def tag_of(
    *points: str,
    family: str = "orifice_concentric",
    fluid: str = WATER,
    line: str = 'size = "DN 150"\nschedule = "40"',
    rest: str = "",
) -> Tag:
    """Return a tag; every part is TOML text, ``rest`` whole sections."""
    text = (
        f'schema = 1\ntag = "FT-1"\nfamily = "{family}"\n'
        f"[fluid]\n{fluid}\n[line]\n{line}\n{''.join(points)}{rest}"
    )
    reading = tagfile.loads(text)
    assert reading.tag is not None
    assert not reading.problems, [str(problem) for problem in reading.problems]
    return reading.tag
