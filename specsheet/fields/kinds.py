"""Kinds of quantity. A kind is more than a dimension: gauge and absolute pressure are two kinds."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Kind:
    """One kind of quantity.

    Attributes:
        key: name used in code, profiles and the schema.
        label: the words for it in a message ("a pressure, gauge or absolute").
        si: unit of the value held inside the program.
        shown: unit used on screens and sheets unless the job says otherwise.
        members: for a union ("flow"), the kinds that an entry of this kind accepts.
    """

    key: str
    label: str
    si: str
    shown: str
    members: tuple[str, ...] = ()


_KINDS = (
    Kind("length", "a length", "m", "mm"),
    Kind("roughness", "a roughness", "m", "mm"),
    Kind("elevation", "an elevation", "m", "m"),
    Kind("area", "an area", "m2", "mm2"),
    Kind("volume", "a volume", "m3", "m3"),
    Kind("angle", "an angle", "rad", "deg"),
    Kind("time", "a time", "s", "s"),
    Kind("temperature", "a temperature", "K", "degC"),
    Kind("temperature_difference", "a difference of temperature", "K", "K"),
    Kind("pressure_absolute", "an absolute pressure", "Pa", "bar(a)"),
    Kind("pressure_gauge", "a gauge pressure", "Pa", "bar(g)"),
    Kind(
        "pressure",
        "a pressure, gauge or absolute",
        "Pa",
        "bar(g)",
        ("pressure_gauge", "pressure_absolute"),
    ),
    Kind("pressure_difference", "a difference of pressure", "Pa", "mbar"),
    Kind("mass_flow", "a mass flow", "kg/s", "kg/h"),
    Kind("volume_flow", "a volume flow at operating conditions", "m3/s", "m3/h"),
    Kind("base_volume_flow", "a volume flow at base conditions", "m3/s", "m3/h(base)"),
    Kind("energy_flow", "an energy flow", "W", "MW"),
    Kind(
        "flow",
        "a flow: mass, volume at operating conditions, volume at base conditions, or energy",
        "",
        "",
        ("mass_flow", "volume_flow", "base_volume_flow", "energy_flow"),
    ),
    Kind("velocity", "a velocity", "m/s", "m/s"),
    Kind("density", "a density", "kg/m3", "kg/m3"),
    Kind("dynamic_viscosity", "a dynamic viscosity", "Pa s", "mPa s"),
    Kind("kinematic_viscosity", "a kinematic viscosity", "m2/s", "mm2/s"),
    Kind(
        "viscosity",
        "a viscosity, dynamic or kinematic",
        "",
        "",
        ("dynamic_viscosity", "kinematic_viscosity"),
    ),
    Kind("ratio", "a ratio or a percentage", "1", "%"),
    Kind("dimensionless", "a plain number", "1", "1"),
    Kind("frequency", "a frequency", "Hz", "Hz"),
    Kind("current", "an electric current", "A", "mA"),
    Kind("voltage", "a voltage", "V", "mV"),
    Kind("conductivity", "an electrical conductivity", "S/m", "uS/cm"),
    Kind("mass", "a mass", "kg", "kg"),
    Kind("force", "a force", "N", "N"),
    Kind("power", "a power", "W", "kW"),
    Kind("energy", "an energy", "J", "MWh"),
    Kind("specific_energy", "an energy by mass", "J/kg", "MJ/kg"),
    Kind("volume_energy", "an energy by base volume", "J/m3", "MJ/m3"),
    Kind("heat_capacity", "a heat capacity", "J/kg/K", "kJ/kg/K"),
    Kind("thermal_conductivity", "a thermal conductivity", "W/m/K", "W/m/K"),
    Kind("molar_mass", "a molar mass", "kg/mol", "g/mol"),
    Kind("expansion", "a coefficient of thermal expansion", "1/K", "1/K"),
    Kind("pulse_factor", "a pulse factor", "1/m3", "1/L"),
    Kind("rotation", "a speed of rotation", "1/s", "1/min"),
    Kind("money_rate", "a price of energy", "1/J", "1/kWh"),
)

KINDS: dict[str, Kind] = {kind.key: kind for kind in _KINDS}
