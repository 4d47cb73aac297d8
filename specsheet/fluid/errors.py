"""What the fluid library says when it finds no state, put into words of our own."""

from __future__ import annotations

import re

from specsheet.findings import Finding
from specsheet.fluid.model import celsius, stop

_MELTING = re.compile(r"below Tmelt\(p\) \[([0-9.eE+-]+) K\]")


def translate(error: Exception, what: str, temperature: float, pressure: float) -> Finding:
    """Return the finding for an exception of the library.

    Args:
        error: what the library raised; its text never reaches the user.
        what: name of the fluid.
        temperature: [K]
        pressure: [Pa]
    """
    text = str(error)
    where = f"at {celsius(temperature)} and {pressure / 1e5:.4g} bar(a)"
    melting = _MELTING.search(text)
    if melting:
        return stop(
            "frozen",
            "temperature",
            f"{what} freezes at {celsius(float(melting.group(1)))} at this pressure; "
            f"{celsius(temperature)} came. Check the temperature.",
        )
    if "ptriple" in text or "Ttriple" in text:
        return stop(
            "frozen",
            "temperature",
            f"{what} is solid {where}, below its triple point. Check temperature and pressure.",
        )
    if "Saturation pressure" in text or "Two-phase inputs" in text:
        return stop(
            "on-saturation",
            "pressure",
            f"{what} boils {where}: liquid and gas exist side by side and the state is not "
            "settled. State a temperature or pressure off the saturation line.",
        )
    if "binary pair" in text:
        return stop(
            "mixture-pair",
            "fluid.mixture",
            f"No mixing parameters are known for a pair of the components of {what}. State "
            "density and viscosity yourself (fluid.kind given).",
        )
    return stop(
        "fluid-no-state",
        "pressure",
        f"No state of {what} could be found {where}. Check temperature and pressure, or state "
        "density and viscosity yourself.",
    )
