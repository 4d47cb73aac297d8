"""Tags for the tests of the fluid room, written as a user writes them."""

from __future__ import annotations

from specsheet import tagfile
from specsheet.findings import Finding, Level
from specsheet.fluid.state import FluidResult
from specsheet.tag import Tag

HEAD = 'schema = 1\ntag = "FT-1"\nfamily = "vortex"\n'


def point(pressure: str = "", temperature: str = "", name: str = "normal", **more: str) -> str:
    """Return one operating point as text; an empty text leaves an entry out."""
    entries = {"name": name, "flow": "3 t/h", "pressure": pressure, "temperature": temperature}
    entries.update(more)
    lines = [f'{key} = "{value}"' for key, value in entries.items() if value]
    return "\n".join(["[[points]]", *lines, ""])


def tag(fluid: str, *points: str, job: tagfile.Job | None = None) -> Tag:
    """Return the tag of a fluid section (its lines) and points; the text must be sound."""
    reading = tagfile.loads(f"{HEAD}[fluid]\n{fluid}\n{''.join(points)}", job=job)
    assert reading.tag is not None, reading.problems
    return reading.tag


def codes(result: FluidResult) -> list[str]:
    """Return the codes of all findings."""
    return [finding.code for finding in result.findings]


def finding(result: FluidResult, code: str) -> Finding:
    """Return the first finding of a code."""
    found = [item for item in result.findings if item.code == code]
    assert found, f"no {code} among {codes(result)}"
    return found[0]


def stops(result: FluidResult) -> list[str]:
    """Return the codes of all stop findings."""
    return [item.code for item in result.findings if item.level is Level.STOP]
