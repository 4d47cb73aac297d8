"""How the values of a meter that turns come about."""

from __future__ import annotations

from specsheet.meters.family import Derivation
from specsheet.meters.shared import output, response
from specsheet.sources import PRACTICE, cite

DERIVATIONS = (
    *response.DERIVATIONS,
    Derivation("frequency", "f = K qv", "definition", ("k_factor", "volume_flow")),
    Derivation("rotation", "n = qv / V", "definition", ("volume_flow", "swept_volume")),
    Derivation("load", "qv / qmax", "definition", ("volume_flow", "largest_volume_flow")),
    Derivation(
        "flow_by_smallest",
        "qv / qmin; turbine in gas qmin √(ρref / ρ), in liquid qmin max(1, ν / νref)",
        f"{cite('iso9951')}; {PRACTICE}",
        ("volume_flow", "smallest_volume_flow", "density", "kinematic_viscosity"),
    ),
    Derivation(
        "pressure_loss",
        "K ρ vm² / 2 + V μ vm / Dm + p0 + loss of the reducers; V and p0 usual figures, 0 for a "
        "turbine",
        PRACTICE,
        ("pressure_loss_coefficient", "density", "viscosity", "meter_velocity", "meter_bore"),
    ),
    Derivation(
        "slip",
        "S Δp Dm / (μ vm), laminar leakage; S a usual figure",
        PRACTICE,
        ("pressure_loss", "meter_bore", "viscosity", "meter_velocity"),
    ),
    Derivation(
        "error_limit",
        "error of the reading, times qmin / qv below the range, plus the slip",
        PRACTICE,
        ("flow_by_smallest",),
    ),
    Derivation(
        "minimum_back_pressure",
        "pmin = 2 ϖ + 1.25 pv, ϖ without the reducers",
        cite("mpms5.3"),
        ("pressure_loss", "reducer_loss", "vapour_pressure"),
    ),
    response.BACK_PRESSURE_MARGIN,
    *output.DERIVATIONS,
)
