"""How the values that every differential-pressure device puts out come about."""

from __future__ import annotations

from specsheet.meters.family import Derivation
from specsheet.sources import PRACTICE, cite

_PART1 = cite("iso5167-1")

#: derivations shared by the group
COMMON: tuple[Derivation, ...] = (
    Derivation(
        "element_expansion",
        "mean coefficient of the material to the temperature of the normal point",
        "table of materials",
        ("temperature",),
    ),
    Derivation(
        "inside_diameter_hot",
        "D = D20 (1 + αD (t - 20 °C))",
        _PART1,
        ("inside_diameter", "pipe_expansion", "temperature"),
    ),
    Derivation("velocity", "v = qm / (ρ π D²/4)", "continuity", ("mass_flow", "density")),
    Derivation(
        "reynolds_number",
        "ReD = 4 qm / (π μ D)",
        cite("iso5167-1", "3.3.2"),
        ("mass_flow", "viscosity", "inside_diameter_hot"),
    ),
    Derivation("throat_velocity", "vd = v / β²", "continuity", ("velocity", "diameter_ratio")),
    Derivation(
        "throat_reynolds_number",
        "Red = ReD / β",
        cite("iso5167-1", "3.3.2"),
        ("reynolds_number", "diameter_ratio"),
    ),
    Derivation(
        "differential_pressure",
        "qm = C ε (π/4) β² D² sqrt(2 Δp ρ / (1 - β⁴)), solved for Δp with ε of Δp",
        cite("iso5167-1", "5.1 and annex A"),
        (
            "mass_flow",
            "discharge_coefficient",
            "expansibility",
            "diameter_ratio",
            "inside_diameter_hot",
            "density",
        ),
    ),
    Derivation("pressure_ratio", "p2/p1 = 1 - Δp/p", _PART1, ("differential_pressure", "pressure")),
    Derivation(
        "pressure_loss_coefficient",
        "K = ϖ / (ρ v²/2)",
        "definition",
        ("pressure_loss", "density", "velocity"),
    ),
    Derivation("dynamic_pressure", "ρ v²", "definition", ("density", "velocity")),
    Derivation(
        "back_pressure_margin",
        "p - Δp - pv",
        "definition",
        ("pressure", "differential_pressure", "vapour_pressure"),
    ),
    Derivation(
        "signal_fraction",
        "Δp / Δpmax",
        "definition",
        ("differential_pressure", "differential_pressure_range"),
    ),
    Derivation("signal_current", "I = 4 mA + 16 mA Δp/Δpmax", "definition", ("signal_fraction",)),
    Derivation(
        "signal_current_root",
        "I = 4 mA + 16 mA sqrt(Δp/Δpmax)",
        "definition",
        ("signal_fraction",),
    ),
    Derivation(
        "differential_pressure_range",
        "next of 1, 1.6, 2.5, 4, 6, 10 × 10ⁿ at or above the largest Δp",
        PRACTICE,
        ("differential_pressure",),
    ),
    Derivation(
        "upper_range_flow",
        "mass-flow equation at Δpmax, conditions of the leading point",
        _PART1,
        ("differential_pressure_range", "diameter_ratio", "density"),
    ),
    Derivation(
        "second_range",
        "preferred value at or above the geometric mean of the smallest Δp and the range",
        PRACTICE,
        ("differential_pressure", "differential_pressure_range"),
    ),
    Derivation(
        "calibrated_range_low", "(ρ - ρleg) g Δz, upwards positive", "hydrostatics", ("density",)
    ),
    Derivation(
        "calibrated_range_high",
        "Δpmax + (ρ - ρleg) g Δz",
        "hydrostatics",
        ("differential_pressure_range", "density"),
    ),
)
