"""Which entries stand in front for the fluid at hand. The others are one key away, never lost."""

from __future__ import annotations

from collections.abc import Mapping
from types import MappingProxyType

from specsheet.fields import Entry

_ALL_FLUIDS = frozenset({"kind", "name", "phase", "hazards"})

_BY_KIND: Mapping[str, frozenset[str]] = MappingProxyType(
    {
        "substance": frozenset({"substance"}),
        "mixture": frozenset({"mixture", "basis", "normalise", "relative_humidity"}),
        "solution": frozenset({"solute", "mass_fraction", "volume_fraction"}),
        "humid_air": frozenset({"relative_humidity", "water_dew_point"}),
        "petroleum": frozenset(
            {
                "product",
                "density_15",
                "api_gravity",
                "viscosity_1",
                "viscosity_1_temperature",
                "viscosity_2",
                "viscosity_2_temperature",
            }
        ),
        "seawater": frozenset({"salinity"}),
        "slurry": frozenset(
            {"substance", "solids", "solids_mass_fraction", "solids_density", "abrasive"}
        ),
        "given": frozenset({"molar_mass", "base_density"}),
    }
)

_BY_PHASE: Mapping[str, frozenset[str]] = MappingProxyType(
    {"liquid": frozenset({"electrical_conductivity"}), "gas": frozenset()}
)

_ALL_POINTS = frozenset({"name", "flow", "pressure", "temperature"})
_GIVEN_POINTS: Mapping[str, frozenset[str]] = MappingProxyType(
    {
        "liquid": frozenset({"density", "viscosity", "vapour_pressure"}),
        "gas": frozenset({"density", "viscosity", "isentropic_exponent", "compressibility"}),
    }
)


def in_front(entry: Entry, kind: str, phase: str, substance: str) -> bool:
    """Tell whether an entry stands in front.

    Args:
        entry: the entry.
        kind: ``fluid.kind`` as stated; anything unknown counts as no kind.
        phase: ``fluid.phase`` as stated.
        substance: ``fluid.substance`` as stated.
    """
    if entry.section == "fluid":
        stated = _BY_KIND.get(kind, frozenset()) | _BY_PHASE.get(phase, frozenset())
        return entry.key in _ALL_FLUIDS or entry.key in stated
    if entry.section == "points":
        wanted = _ALL_POINTS
        if kind == "given":
            wanted |= _GIVEN_POINTS.get(phase, frozenset({"density", "viscosity"}))
        if kind == "slurry":
            wanted |= {"viscosity"}
        if kind == "substance" and phase == "gas" and substance.casefold() in ("water", "steam"):
            wanted |= {"dryness_fraction"}
        return entry.key in wanted
    return entry.path != "schema"


def is_needed(entry: Entry, kind: str) -> bool:
    """Tell whether an entry must be stated, as far as the kind of fluid alone decides it."""
    return entry.needed == "always" or (
        bool(kind) and entry.needed.startswith(f"when fluid.kind is {kind}")
    )
