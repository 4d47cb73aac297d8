"""Entries of ``[line]``, ``[[points]]`` and ``[design]``."""

from __future__ import annotations

from specsheet.fields.entry import Entry

_ALWAYS = "always"

LINE: tuple[Entry, ...] = (
    Entry("line.size", "Nominal size", "nominal_size", "Of the pipe.", "DN 150"),
    Entry(
        "line.schedule",
        "Schedule",
        "text",
        "Wall of the pipe by ASME B36.10M or B36.19M.",
        "40",
        default="STD",
    ),
    Entry(
        "line.inside_diameter",
        "Inside diameter",
        "length",
        "At 20 °C; instead of size and schedule, or where it was measured.",
        "154.1 mm",
        symbol="D",
    ),
    Entry(
        "line.outside_diameter",
        "Outside diameter",
        "length",
        "Where the pipe is of no listed schedule.",
        "168.3 mm",
    ),
    Entry(
        "line.material",
        "Pipe material",
        "text",
        "Name in the table of materials (thermal expansion, flange group).",
        "carbon steel",
        default="carbon steel",
    ),
    Entry(
        "line.roughness",
        "Roughness",
        "roughness",
        "Uniform equivalent roughness of the inner wall.",
        "0.05 mm",
    ),
    Entry("line.lining", "Lining of the pipe", "text", "If the pipe is lined or plastic.", ""),
    Entry(
        "line.rating",
        "Flange rating of the line",
        "text",
        "Pressure class or PN of the line's flanges.",
        "Class 150",
    ),
    Entry(
        "line.orientation",
        "Orientation",
        "choice",
        "Of the pipe where the meter goes.",
        "horizontal",
        choices=("horizontal", "vertical up", "vertical down", "inclined"),
        default="horizontal",
    ),
    Entry(
        "line.upstream_length",
        "Straight length upstream",
        "straight_length",
        "That the line has between the last fitting and the meter.",
        "22 D",
    ),
    Entry(
        "line.downstream_length",
        "Straight length downstream",
        "straight_length",
        "That the line has after the meter.",
        "6 D",
    ),
    Entry(
        "line.upstream_fitting",
        "Fitting upstream",
        "choice",
        "The nearest fitting before the straight length.",
        "single bend",
        choices=(
            "none",
            "single bend",
            "two bends in plane",
            "two bends out of plane",
            "tee",
            "reducer",
            "expander",
            "ball valve full open",
            "gate valve full open",
            "control valve",
            "swirl",
        ),
        default="single bend",
    ),
)

POINTS: tuple[Entry, ...] = (
    Entry(
        "points.name",
        "Point",
        "text",
        "minimum, normal and maximum are known; others are yours.",
        "normal",
        needed=_ALWAYS,
    ),
    Entry(
        "points.flow",
        "Flow",
        "flow",
        "Mass, volume, base volume or energy flow.",
        "3.1 t/h",
        needed=_ALWAYS,
        symbol="q",
    ),
    Entry(
        "points.pressure",
        "Pressure",
        "pressure",
        "At the inlet of the meter.",
        "7 bar(g)",
        needed="unless the steam is saturated and its temperature is stated",
        symbol="p",
    ),
    Entry(
        "points.temperature",
        "Temperature",
        "temperature",
        "Of the fluid.",
        "185 degC",
        needed="unless the steam is saturated and its pressure is stated",
        symbol="t",
    ),
    Entry(
        "points.dryness_fraction",
        "Dryness fraction",
        "ratio",
        "Of wet or just saturated steam: 100 % is dry saturated steam.",
        "98 %",
        symbol="x",
    ),
    Entry(
        "points.density",
        "Density",
        "density",
        "Where it is known; it wins and is cross-checked.",
        "4.1 kg/m3",
        symbol="ρ",
    ),
    Entry(
        "points.viscosity",
        "Viscosity",
        "viscosity",
        "Where it is known; it wins and is cross-checked.",
        "0.0151 mPa s",
        symbol="μ",
    ),
    Entry(
        "points.vapour_pressure",
        "Vapour pressure",
        "pressure",
        "Of a liquid, where it is known.",
        "0.7 bar(a)",
        symbol="pv",
    ),
    Entry(
        "points.isentropic_exponent",
        "Isentropic exponent",
        "dimensionless",
        "Of a gas, where it is known.",
        "1.31",
        symbol="κ",
    ),
    Entry(
        "points.compressibility",
        "Compressibility factor",
        "dimensionless",
        "Of a gas, where it is known.",
        "0.98",
        symbol="Z",
    ),
    Entry(
        "points.sound_speed",
        "Speed of sound",
        "velocity",
        "Where it is known.",
        "410 m/s",
        symbol="c",
    ),
    Entry(
        "points.heat_capacity",
        "Heat capacity",
        "heat_capacity",
        "Where it is known.",
        "2.1 kJ/kg/K",
        symbol="cp",
    ),
)

DESIGN: tuple[Entry, ...] = (
    Entry("design.pressure", "Design pressure", "pressure", "Of the line.", "12 bar(g)"),
    Entry("design.temperature", "Design temperature", "temperature", "Highest.", "220 degC"),
    Entry(
        "design.minimum_temperature",
        "Minimum design temperature",
        "temperature",
        "Lowest metal temperature.",
        "-10 degC",
    ),
    Entry(
        "design.minimum_pressure",
        "Minimum design pressure",
        "pressure",
        "Where the line can see a vacuum.",
        "0 bar(a)",
    ),
    Entry(
        "design.test_pressure", "Test pressure", "pressure", "Of the pressure test.", "18 bar(g)"
    ),
    Entry(
        "design.ambient_minimum", "Ambient, lowest", "temperature", "Around the meter.", "-15 degC"
    ),
    Entry(
        "design.ambient_maximum", "Ambient, highest", "temperature", "Around the meter.", "40 degC"
    ),
    Entry("design.corrosion_allowance", "Corrosion allowance", "length", "Of the line.", "1 mm"),
)
