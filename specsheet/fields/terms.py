"""Derived terms: the keys of the JSON, with label, symbol and kind.

The keys are the field's standard terms in full (JSON contract); a family may put out only terms
listed here, and a test holds it to that.
"""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Term:
    """One derived term.

    Attributes:
        key: name in JSON and code.
        label: words on sheet and screen.
        symbol: the standards' symbol, or "".
        kind: key of its kind of quantity, or "text".
        shown: unit shown, where it differs from the kind's own.
        of_gas: label and symbol where the fluid is a gas, if it is called otherwise there.
    """

    key: str
    label: str
    symbol: str
    kind: str
    shown: str = ""
    of_gas: tuple[str, str] | None = None


_TERMS = (
    # Operating conditions
    Term("mass_flow", "Mass flow", "qm", "mass_flow"),
    Term("volume_flow", "Volume flow, operating", "qv", "volume_flow"),
    Term("base_volume_flow", "Volume flow, base", "qb", "base_volume_flow"),
    Term("energy_flow", "Energy flow", "qe", "energy_flow"),
    Term("pressure", "Pressure, absolute", "p", "pressure_absolute"),
    Term("pressure_gauge", "Pressure, gauge", "pg", "pressure_gauge"),
    Term("temperature", "Temperature", "t", "temperature"),
    # Fluid
    Term("density", "Density", "ρ", "density"),
    Term("base_density", "Density at base conditions", "ρb", "density"),
    Term("relative_density", "Relative density (air = 1)", "d", "dimensionless"),
    Term("viscosity", "Dynamic viscosity", "μ", "dynamic_viscosity"),
    Term("kinematic_viscosity", "Kinematic viscosity", "ν", "kinematic_viscosity"),
    Term("isentropic_exponent", "Isentropic exponent", "κ", "dimensionless"),
    Term("compressibility", "Compressibility factor", "Z", "dimensionless"),
    Term("base_compressibility", "Compressibility factor, base", "Zb", "dimensionless"),
    Term("sound_speed", "Speed of sound", "c", "velocity"),
    Term(
        "vapour_pressure",
        "Vapour pressure",
        "pv",
        "pressure_absolute",
        of_gas=("Saturation pressure", "ps"),  # at its temperature
    ),
    Term("dew_temperature", "Dew point", "td", "temperature"),
    Term("saturation_temperature", "Saturation temperature", "ts", "temperature"),
    Term("saturation_margin", "Margin to saturation", "Δts", "temperature_difference"),
    Term("heat_capacity", "Heat capacity, isobaric", "cp", "heat_capacity"),
    Term("thermal_conductivity", "Thermal conductivity", "λ", "thermal_conductivity"),
    Term("specific_enthalpy", "Specific enthalpy", "h", "specific_energy", "kJ/kg"),
    Term("molar_mass", "Molar mass", "M", "molar_mass"),
    Term("gross_calorific_value", "Gross calorific value", "Hs", "volume_energy"),
    Term("net_calorific_value", "Net calorific value", "Hi", "volume_energy"),
    Term("gross_calorific_value_mass", "Gross calorific value by mass", "Hs,m", "specific_energy"),
    Term("net_calorific_value_mass", "Net calorific value by mass", "Hi,m", "specific_energy"),
    Term("wobbe_index", "Wobbe index, gross", "Ws", "volume_energy"),
    Term("dryness_fraction", "Dryness fraction", "x", "ratio"),
    Term("electrical_conductivity", "Electrical conductivity", "σ", "conductivity"),
    Term("phase", "Phase, computed", "", "text"),
    Term("solids_fraction", "Solids by volume", "", "ratio"),
    Term("bubble_fraction", "Free gas by volume", "", "ratio"),
    Term("scatterer_fraction", "Solids and free gas by volume", "", "ratio"),
    # Flow in the pipe and the meter
    Term("inside_diameter", "Inside diameter of the pipe", "D", "length"),
    Term("velocity", "Velocity in the pipe", "v", "velocity"),
    Term("meter_velocity", "Velocity in the meter", "vm", "velocity"),
    Term("throat_velocity", "Velocity in the throat", "vd", "velocity"),
    Term("reynolds_number", "Reynolds number, pipe", "ReD", "dimensionless"),
    Term("meter_reynolds_number", "Reynolds number, meter", "Rem", "dimensionless"),
    Term("throat_reynolds_number", "Reynolds number, throat", "Red", "dimensionless"),
    Term("mach_number", "Mach number", "Ma", "dimensionless"),
    Term("dynamic_pressure", "Momentum flux ρv²", "ρv²", "pressure_difference", "Pa"),
    # Differential pressure
    Term("differential_pressure", "Differential pressure", "Δp", "pressure_difference"),
    Term("pressure_ratio", "Pressure ratio p2/p1", "p2/p1", "dimensionless"),
    Term("expansibility", "Expansibility factor", "ε", "dimensionless"),
    Term("discharge_coefficient", "Discharge coefficient", "C", "dimensionless"),
    Term("pressure_loss_coefficient", "Loss coefficient", "K", "dimensionless"),
    Term("pressure_loss", "Permanent pressure loss", "ϖ", "pressure_difference"),
    Term("lost_power", "Power lost to the meter", "P", "power"),
    Term("yearly_energy", "Energy lost in a year", "E", "energy"),
    Term("yearly_cost", "Cost of the loss in a year", "", "dimensionless"),
    # Signals
    Term("signal_fraction", "Signal, share of span", "", "ratio"),
    Term("signal_current", "Signal current", "I", "current"),
    Term("signal_current_root", "Signal current, linear in flow", "I√", "current"),
    Term("frequency", "Frequency", "f", "frequency"),
    Term("pulse_rate", "Output pulses", "fp", "frequency"),
    Term("pulse_volume", "Volume of one output pulse", "", "volume"),
    Term("pulse_mass", "Mass of one output pulse", "", "mass"),
    Term("load", "Share of the largest flow", "", "ratio"),
    Term("flow_by_smallest", "Flow by the smallest flow", "", "dimensionless"),
    Term("slip", "Slip", "", "ratio"),
    Term("rotation", "Speed of rotation", "n", "rotation"),
    Term("induced_voltage", "Induced voltage", "U", "voltage"),
    Term("transit_time_difference", "Transit-time difference", "Δt", "time", "ns"),
    Term("heater_power", "Heat taken from the probe", "P", "power", "W"),
    Term("gas_factor", "Conversion factor, air to gas", "", "dimensionless"),
    Term("normal_velocity", "Velocity at 0 °C and 1 atm", "vn", "velocity"),
    Term("transit_time", "Transit time downstream", "t", "time", "us"),
    Term("profile_factor", "Profile factor", "k", "dimensionless"),
    Term("head", "Head", "h", "length"),
    Term("strouhal_number", "Strouhal number", "Sr", "dimensionless"),
    # Margins
    Term("cavitation_index", "Cavitation index", "σc", "dimensionless"),
    Term("minimum_back_pressure", "Back pressure needed", "pmin", "pressure_absolute"),
    Term("back_pressure_margin", "Margin of back pressure", "", "pressure_difference", "bar"),
    # Uncertainty
    Term("uncertainty", "Uncertainty of flow, k = 2", "U", "ratio"),
    Term("coverage_factor", "Coverage factor for 95 %", "k", "dimensionless"),
    Term("error_limit", "Expected meter error", "e", "ratio"),
    Term("turndown", "Turndown", "", "dimensionless"),
    Term("turndown_available", "Turndown available", "", "dimensionless"),
    # Element
    Term("bore_diameter", "Bore at 20 °C", "d20", "length"),
    Term("bore_diameter_hot", "Bore at operating temperature", "d", "length"),
    Term("throat_diameter", "Throat at 20 °C", "d20", "length"),
    Term("throat_diameter_hot", "Throat at operating temperature", "d", "length"),
    Term("inside_diameter_hot", "Inside diameter at operating temperature", "D", "length"),
    Term("diameter_ratio", "Diameter ratio", "β", "dimensionless"),
    Term("differential_pressure_range", "Upper range value, Δp", "Δpmax", "pressure_difference"),
    Term("upper_range_flow", "Flow at the upper range value", "qmax", "mass_flow"),
    Term("lower_range_flow", "Smallest flow within all limits", "qmin", "mass_flow"),
    Term("largest_flow", "Largest flow within all limits", "", "mass_flow"),
    Term("second_range", "Second transmitter, upper range value", "", "pressure_difference"),
    Term("calibrated_range_low", "Transmitter calibrated from", "", "pressure_difference"),
    Term("calibrated_range_high", "Transmitter calibrated to", "", "pressure_difference"),
    Term("relative_roughness", "Roughness of the pipe, Ra/D", "Ra/D", "dimensionless"),
    Term("probe_width", "Width of the probe", "b", "length"),
    Term("blockage", "Blockage of the pipe", "B", "ratio"),
    Term("flow_coefficient", "Flow coefficient", "K", "dimensionless"),
    Term("wake_frequency", "Frequency of eddies", "fw", "frequency"),
    Term("natural_frequency", "Natural frequency of the probe", "fn", "frequency"),
    Term("frequency_ratio", "Eddies by natural frequency", "", "dimensionless"),
    Term("side_hole_pressure", "Pressure of the side holes", "", "pressure_difference"),
    Term("yaw_pressure", "Difference of a pair of side holes", "", "pressure_difference"),
    Term("capillary_bore", "Bore of a capillary", "d", "length"),
    Term("capillary_count", "Capillaries", "n", "dimensionless"),
    Term("capillary_length", "Length of a capillary", "L", "length"),
    Term("entrance_length", "Entrance length", "Le", "length"),
    Term("inertial_share", "Inertial share of the signal", "", "ratio"),
    Term("permeability", "Permeability", "k", "area"),
    Term("plug_length", "Length of the plug", "L", "length"),
    Term("plug_diameter", "Diameter of the plug", "", "length"),
    Term("float_density", "Density of the float", "ρf", "density"),
    Term("equivalent_full_scale", "Full scale, equivalent flow", "", "volume_flow"),
    Term("equivalent_flow", "Equivalent flow", "qe", "volume_flow"),
    Term("equivalent_fluid", "Equivalent of", "", "text"),
    Term("reading_factor", "Factor on the scale", "", "dimensionless"),
    Term("plunger_diameter", "Plunger diameter", "", "length"),
    Term("plunger_travel", "Travel of the plunger", "", "length"),
    Term("spring_preload", "Preload of the spring", "F0", "force"),
    Term("spring_full_load", "Force of the spring at full travel", "F1", "force"),
    Term("opening_slope", "Growth of the opening with travel", "w", "length"),
    Term("displacement", "Displacement", "x", "length"),
    Term("critical_flow_function", "Critical flow function", "C*", "dimensionless"),
    Term("critical_pressure_ratio", "Critical pressure ratio", "r*", "dimensionless"),
    Term("choked_flow", "Flow at the stated pressure", "", "mass_flow"),
    Term("inlet_pressure", "Inlet pressure needed", "", "pressure_absolute"),
    Term("inlet_pressure_share", "Inlet pressure needed by stated", "", "dimensionless"),
    Term("back_pressure_ratio", "Largest back pressure ratio", "", "dimensionless"),
    Term("largest_back_pressure", "Largest back pressure", "", "pressure_absolute"),
    Term("liquid_ratio", "Liquid by gas, by mass", "ml/mg", "ratio"),
    Term("liquid_density", "Density of the liquid carried", "ρl", "density"),
    Term("lockhart_martinelli", "Lockhart-Martinelli parameter", "X", "dimensionless"),
    Term("froude_number", "Froude number of the gas", "Frg", "dimensionless"),
    Term("throat_froude_number", "Froude number, throat", "Frg,th", "dimensionless"),
    Term("over_reading", "Over-reading in wet gas", "φ", "dimensionless"),
    Term("element_expansion", "Thermal expansion of the element", "αd", "expansion"),
    Term("edge_radius", "Radius of the inlet edge", "r", "length"),
    Term("segment_height", "Height of the segment at 20 °C", "h", "length"),
    Term("cone_diameter", "Cone diameter at 20 °C", "dc", "length"),
    Term("wedge_height", "Opening below the wedge at 20 °C", "h", "length"),
    Term("drain_hole_diameter", "Drain or vent hole", "dk", "length"),
    Term("divergent_angle", "Angle of the divergent", "φ", "angle"),
    Term("bending_error", "Error by bending of the plate", "", "ratio"),
    Term("plate_thickness", "Plate thickness", "E", "length"),
    Term("edge_thickness", "Edge thickness", "e", "length"),
    Term("bevel_angle", "Bevel angle", "F", "angle"),
    Term("plate_stress", "Bending stress in the plate", "", "pressure_difference", "MPa"),
    Term("meter_size", "Meter size", "", "text"),
    Term("meter_bore", "Bore of the meter", "Dm", "length"),
    Term("bluff_width", "Width of the bluff body", "db", "length"),
    Term("path_count", "Number of paths", "", "dimensionless"),
    Term("path_angle", "Angle of the path to the axis", "φ", "angle"),
    Term("liner", "Liner", "", "text"),
    Term("electrode_material", "Electrodes", "", "text"),
    Term("earthing", "Earthing of the liquid", "", "text"),
    Term("tube_material", "Tubes", "", "text"),
    Term("tube_bore", "Bore of a tube", "d", "length"),
    Term("tube_count", "Number of tubes", "", "dimensionless"),
    Term("nominal_flow", "Nominal flow", "", "mass_flow"),
    Term("base_error", "Base error", "", "ratio"),
    Term("density_error", "Error of the density output", "", "density"),
    Term("largest_volume_flow", "Largest flow of the size", "qmax", "volume_flow"),
    Term("smallest_volume_flow", "Smallest flow of the size", "qmin", "volume_flow"),
    Term("swept_volume", "Volume of one turn", "V", "volume", "L"),
    Term("rollover_time", "Register rolls over after", "", "time", "d"),
    Term("k_factor", "K-factor", "KF", "pulse_factor"),
    Term("reducer_loss", "Loss of the reducers", "", "pressure_difference"),
    Term("zero_stability", "Zero stability", "", "mass_flow"),
    Term("upstream_length", "Straight length wanted upstream", "", "length"),
    Term("downstream_length", "Straight length wanted downstream", "", "length"),
    Term("outside_diameter", "Outside diameter of the pipe", "Do", "length"),
    Term("wall_thickness", "Wall of the pipe", "", "length"),
    Term("roughness", "Roughness of the pipe", "k", "roughness"),
    Term("pipe_expansion", "Thermal expansion of the pipe", "α", "expansion"),
    Term("flange_rating", "Flange rating", "", "text"),
    Term("allowable_pressure", "Allowable pressure of the rating", "", "pressure_gauge"),
    Term("seal_material", "Seals", "", "text"),
    Term("flange_pressure", "Flange pressure", "", "pressure_gauge"),
    Term("flange_temperature", "Flange temperature", "", "temperature"),
)

TERMS: dict[str, Term] = {term.key: term for term in _TERMS}


def term(key: str) -> Term:
    """Return the term of that key; KeyError when the glossary lacks it (a mistake of ours)."""
    return TERMS[key]


#: names of persons that begin a label and keep their capital inside a sentence
_NAMES = ("Mach", "Reynolds", "Strouhal", "Wobbe")


def in_sentence(key: str) -> str:
    """Return the label of a term as it stands inside a sentence."""
    label = TERMS[key].label
    keep = label[:2].isupper() or label.startswith(_NAMES)
    return label if keep else label[0].lower() + label[1:]
