"""How the values that every family shares come about, for the calculation annex."""

from specsheet.meters.family import Derivation
from specsheet.sources import cite

_DEFINITION = "definition"

COMMON_DERIVATIONS = (
    Derivation(
        "mass_flow", "qm = qv ρ = qb ρb = qe / Hs,m", _DEFINITION, ("volume_flow", "density")
    ),
    Derivation("volume_flow", "qv = qm / ρ", _DEFINITION, ("mass_flow", "density")),
    Derivation("base_volume_flow", "qb = qm / ρb", _DEFINITION, ("mass_flow", "base_density")),
    Derivation(
        "energy_flow",
        "qe = qm Hs,m",
        _DEFINITION,
        ("mass_flow", "gross_calorific_value_mass"),
    ),
    Derivation("kinematic_viscosity", "ν = μ / ρ", _DEFINITION, ("viscosity", "density")),
    Derivation("mach_number", "Ma = v / c", _DEFINITION, ("velocity", "sound_speed")),
    Derivation(
        "lost_power",
        "liquid: P = ϖ qv / η; gas: P = p qv ln(p / (p − ϖ)) / η",
        "first principles",
        ("pressure_loss", "volume_flow", "pressure"),
    ),
    Derivation(
        "uncertainty",
        "U = k √Σ(cᵢ uᵢ)², k for 95 %",
        cite("iso5168"),
    ),
)
