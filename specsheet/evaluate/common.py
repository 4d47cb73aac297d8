"""How the values that every family shares come about, for the calculation annex.

Where a fluid can be had by several methods, or a dimension from several tables, the equation or the
source is left to the value itself: it names the one that was used.
"""

from specsheet.meters.family import Derivation
from specsheet.sources import PRACTICE, cite

_DEFINITION = "definition"
_STATE = ("pressure", "temperature", "dryness_fraction")

#: properties of the fluid, by the method that each value names
_OF_THE_STATE = (
    "density",
    "viscosity",
    "isentropic_exponent",
    "compressibility",
    "sound_speed",
    "heat_capacity",
    "thermal_conductivity",
    "specific_enthalpy",
)

_FLUID = (
    Derivation(
        "pressure",
        "p = pg + pamb; at saturation where only the temperature is stated",
        _DEFINITION,
        ("pressure_gauge", "job.atmospheric_pressure"),
    ),
    Derivation("pressure_gauge", "pg = p − pamb", _DEFINITION, ("pressure",)),
    Derivation("temperature", "t = ts(p)", _DEFINITION, ("pressure", "saturation_temperature")),
    Derivation("phase", "as the method of the density finds it", _DEFINITION, _STATE),
    *(Derivation(key, "", "", _STATE) for key in _OF_THE_STATE),
    Derivation("vapour_pressure", "", "", ("temperature",)),
    Derivation("saturation_temperature", "", "", ("pressure",)),
    Derivation("saturation_margin", "", "", ("pressure", "temperature")),
    Derivation("kinematic_viscosity", "ν = μ / ρ", _DEFINITION, ("viscosity", "density")),
)

_FLOWS = (
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
    Derivation("mach_number", "Ma = v / c", _DEFINITION, ("velocity", "sound_speed")),
)

#: sizes and ratings, each from the table that the value cites
_LINE = (
    Derivation("inside_diameter", "D = Do − 2 x wall", "", ("outside_diameter", "wall_thickness")),
    Derivation("outside_diameter", "of the size, by the standard", "", ("line.size",)),
    Derivation(
        "wall_thickness",
        "of size and schedule, by the standard; half of Do − D where both are stated",
        "",
        ("line.size", "line.schedule"),
    ),
    Derivation("pipe_expansion", "of the material, by the source", "", ("line.material",)),
    Derivation(
        "flange_rating",
        "that of the line, or the smallest that holds the design pressure at its temperature",
        "",
        ("design.pressure", "design.temperature"),
    ),
    Derivation(
        "allowable_pressure",
        "of rating and material group at the temperature that decides, by the standard",
        "",
        ("flange_rating", "design.temperature"),
    ),
    Derivation(
        "seal_material",
        "usual for the family, or of the table: within its bounds and not attacked by the fluid",
        "",
        ("design.temperature",),
    ),
    Derivation(
        "upstream_length",
        "the longest that any of the fittings asks for, by the source",
        "",
        ("line.upstream_fitting", "diameter_ratio", "inside_diameter"),
    ),
    Derivation("downstream_length", "by the source", "", ("diameter_ratio", "inside_diameter")),
)

_METER = (
    Derivation("meter_size", "the size listed whose range suits the flows stated", PRACTICE),
    Derivation(
        "back_pressure_margin",
        "p − ϖ less the back pressure needed; where none is known, p less the larger of ϖ and Δp, "
        "less pv",
        "first principles",
        ("pressure", "pressure_loss", "minimum_back_pressure", "vapour_pressure"),
    ),
    Derivation(
        "pulse_volume", "the decade that keeps the pulse rate within the output's highest", PRACTICE
    ),
    Derivation(
        "pulse_mass", "the decade that keeps the pulse rate within the output's highest", PRACTICE
    ),
    Derivation("rollover_time", "register by the largest flow", _DEFINITION, ("volume_flow",)),
    Derivation("tube_material", "of those that the fluid allows", ""),
    Derivation("electrode_material", "of those that the fluid allows", ""),
    Derivation("earthing", "by the pipe's lining and material", ""),
)

_SUMMARY = (
    Derivation("turndown", "largest by smallest flow stated", _DEFINITION, ("mass_flow",)),
    Derivation(
        "turndown_available",
        "largest by smallest flow at which every limit holds, at the normal point",
        _DEFINITION,
    ),
    Derivation(
        "largest_flow",
        "the smallest of the largest flows that the limits allow, at the normal point",
        _DEFINITION,
    ),
    Derivation(
        "lower_range_flow",
        "the largest of the smallest flows that the limits allow, at the normal point",
        _DEFINITION,
    ),
    Derivation(
        "lost_power",
        "liquid: P = ϖ qv / η; gas: P = p qv ln(p / (p − ϖ)) / η",
        "first principles",
        ("pressure_loss", "volume_flow", "pressure"),
    ),
    Derivation(
        "yearly_energy",
        "E = P h, P at the normal point, h hours a year",
        _DEFINITION,
        ("lost_power", "job.hours_per_year"),
    ),
    Derivation(
        "yearly_cost",
        "E by the price of energy",
        _DEFINITION,
        ("yearly_energy", "job.energy_price"),
    ),
    Derivation(
        "coverage_factor",
        "Student's factor at the effective degrees of freedom of the contributions",
        cite("gum", "G.4.1"),
    ),
    Derivation(
        "uncertainty", "U = k √Σ(cᵢ uᵢ)², k for 95 %", cite("iso5168"), ("coverage_factor",)
    ),
)

COMMON_DERIVATIONS = (*_FLUID, *_FLOWS, *_LINE, *_METER, *_SUMMARY)
