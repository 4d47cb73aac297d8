"""Phase envelopes, found in a process of their own with a limit on time.

Building the envelope of a natural gas takes from a tenth of a second to some seconds and holds up
everything else in its process, so no state ever waits for it: a front end that wants a phase
settled asks :func:`settle`, and states asked for afterwards use what was found.

Run as a module, this file is the process: composition in, envelope out, as JSON.
"""

from __future__ import annotations

import itertools
import json
import subprocess
import sys
from dataclasses import dataclass

from specsheet.fluid import library, names
from specsheet.fluid.calorific import Composition


@dataclass(frozen=True, slots=True)
class Envelope:
    """The line between one phase and two: temperatures [K], pressures [Pa], in their order."""

    temperatures: tuple[float, ...]
    pressures: tuple[float, ...]

    def crossings(self, pressure: float) -> tuple[float, ...]:
        """Return the temperatures [K] at which the line crosses a pressure [Pa], rising."""
        found = []
        rows = list(zip(self.temperatures, self.pressures, strict=True))
        for (first, low), (last, high) in itertools.pairwise(rows):
            if (low - pressure) * (high - pressure) <= 0.0 and low != high:
                found.append(first + (last - first) * (pressure - low) / (high - low))
        return tuple(sorted(found))


_known: dict[Composition, Envelope | None] = {}
#: envelopes kept at most, the latest ones
_KEPT = 64


def known(composition: Composition) -> Envelope | None:
    """Return the envelope of a composition where one was found, else None."""
    return _known.get(composition)


def settle(composition: Composition, seconds: float) -> bool:
    """Find the envelope of a composition; tell whether there is one now.

    Args:
        composition: components and mole fractions, without water.
        seconds: after which the search is given up, for good.
    """
    if composition not in _known:
        while len(_known) >= _KEPT:
            del _known[next(iter(_known))]
        _known[composition] = _search(composition, seconds)
    return _known[composition] is not None


def _search(composition: Composition, seconds: float) -> Envelope | None:
    command = [sys.executable, "-m", "specsheet.fluid.envelope"]
    try:
        done = subprocess.run(
            command,
            input=json.dumps(composition),
            capture_output=True,
            text=True,
            timeout=seconds,
            check=True,
        )
        found = json.loads(done.stdout)
    except (OSError, subprocess.SubprocessError, ValueError):
        return None
    return Envelope(tuple(found["temperatures"]), tuple(found["pressures"]))


def build(composition: Composition) -> Envelope:
    """Return the envelope of a composition; takes its time.

    Raises:
        library.ERRORS: the library finds none.
        ValueError: what it finds does not end at low pressure on both sides.
    """
    table = names.substances()
    state = library.fluids().AbstractState(
        "HEOS", "&".join(table[key].equation for key, _ in composition)
    )
    state.set_mole_fractions([fraction for _, fraction in composition])
    state.build_phase_envelope("none")
    data = state.get_phase_envelope_data()
    temperatures, pressures = tuple(map(float, data.T)), tuple(map(float, data.p))
    if len(temperatures) < 10 or pressures[-1] > 0.5 * max(pressures):
        raise ValueError("the envelope is not complete")
    return Envelope(temperatures, pressures)


if __name__ == "__main__":
    asked = tuple((key, float(fraction)) for key, fraction in json.load(sys.stdin))
    envelope = build(asked)
    json.dump({"temperatures": envelope.temperatures, "pressures": envelope.pressures}, sys.stdout)
