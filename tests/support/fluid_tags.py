"""Tags for the tests of the fluid room, written as a user writes them, and random gases."""

from __future__ import annotations

import random
from collections.abc import Sequence

from specsheet import tagfile
from specsheet.findings import Finding, Level
from specsheet.fluid.calorific import Composition
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


def random_gases(
    pool: Sequence[str], exponents: tuple[float, float], count: int, seed: int
) -> list[tuple[Composition, float]]:
    """Return gases of two to five components of a pool, each at a random pressure [Pa].

    Args:
        pool: keys of the components.
        exponents: of the least and the largest pressure, as powers of ten.
        count: how many.
        seed: of the random numbers.
    """
    choose = random.Random(seed)
    found = []
    for _ in range(count):
        keys = choose.sample(pool, choose.randint(2, 5))
        weights = [choose.random() ** 3 + 1e-3 for _ in keys]
        total = sum(weights)
        gas = tuple((key, weight / total) for key, weight in zip(keys, weights, strict=True))
        found.append((gas, 10 ** choose.uniform(*exponents)))
    return found
