"""Evaluations made by hand for the tests of sheet and render: an invented site, invented figures.

The figures only have to look like the real thing: what is tested is how they are printed.
"""

from __future__ import annotations

from dataclasses import replace
from datetime import date

from specsheet.evaluate.result import Band, BudgetLine, Check, Evaluation, PointResult, Result
from specsheet.fields import Entry
from specsheet.findings import Finding, Level, Origin, Reserve
from specsheet.meters.family import Derivation
from specsheet.packs import Profile
from specsheet.quantity.value import Quantity
from specsheet.tag import Point, Revision, Tag, Value

PLATES = "ISO 5167-2:2003, 5.3.2.1"
STEAM = "IAPWS-IF97, region 2"
PRACTICE = "common practice, no source"

NAMES = ("minimum", "normal", "maximum")
FLOWS = (0.31, 0.86111, 1.16667)


def quantity(value: float, kind: str, text: str) -> Quantity:
    """A quantity with the unit that its text names."""
    return Quantity(value, kind, text.partition(" ")[2], text)


def derived(value: float | str, source: str = "", method: str = "") -> Result:
    return Result(value, Origin.DERIVED, source, method)


def _tag(names: tuple[str, ...], flows: tuple[float, ...], given: dict[str, Value]) -> Tag:
    points = tuple(
        Point(
            name,
            {
                "flow": quantity(flow, "mass_flow", f"{3.6 * flow:.4g} t/h"),
                "pressure": quantity(7e5, "pressure_gauge", "7.0 bar(g)"),
                "temperature": quantity(458.15, "temperature", "185 degC"),
            },
        )
        for name, flow in zip(names, flows, strict=True)
    )
    stated: dict[str, Value] = {
        "schema": 1,
        "tag": "FT-2104",
        "service": "Steam to digester heating header",
        "family": "orifice_concentric",
        "status": "for inquiry",
        "document": "TI-DS-2104",
        "diagram": "TI-PD-0021",
        "location": "Boiler house, level 1",
        "remarks": "Impulse lines are in the scope of the buyer.",
        "fluid.kind": "substance",
        "fluid.substance": "water",
        "fluid.phase": "gas",
        "fluid.hazards": ("hot surface",),
        "line.size": "DN 150",
        "line.schedule": "40",
        "line.upstream_length": "22 D",
        "design.pressure": quantity(12e5, "pressure_gauge", "12 bar(g)"),
        "design.temperature": quantity(493.15, "temperature", "220 degC"),
        "meter.taps": "flange",
        "meter.bore": "size it",
        "meter.differential_pressure_range": quantity(25e3, "pressure_difference", "250 mbar"),
        "require.uncertainty": quantity(0.015, "ratio", "1.5 %"),
        "require.certificates": ("material certificate 3.1", "pressure test"),
        "require.custody_transfer": False,
        "job.client": "Tidal Island Works",
        "job.site": "North quay",
        "job.title": "Heat station renewal",
        "job.number": "J-118",
        "job.atmospheric_pressure": quantity(1.0e5, "pressure_absolute", "1.00 bar(a)"),
    }
    assumed: dict[str, Value] = {
        "line.material": "carbon steel",
        "line.upstream_fitting": "single bend",
        "require.end_connection": "flanged",
        "job.paper": "A4",
        "job.base.temperature": quantity(288.15, "temperature", "15 degC"),
        "job.base.pressure": quantity(101325.0, "pressure_absolute", "101.325 kPa(a)"),
    }
    stated.update(given)
    return Tag(
        given=stated,
        assumed={path: value for path, value in assumed.items() if path not in stated},
        points=points,
        revisions=(
            Revision("A", date(2031, 3, 4), "Issued for inquiry", "KL", "MT", "OR"),
            Revision("B", date(2031, 4, 17), "Maximum flow raised after heat balance", "KL", "MT"),
        ),
    )


def _point(name: str, flow: float) -> PointResult:
    dp = 25e3 * (flow / 1.16667) ** 2
    values = {
        "mass_flow": Result(flow, Origin.GIVEN, text=f"{3.6 * flow:.4g} t/h"),
        "pressure": derived(8.0e5),
        "pressure_gauge": Result(7e5, Origin.GIVEN, text="7.0 bar(g)"),
        "temperature": Result(458.15, Origin.GIVEN, text="185 degC"),
        "volume_flow": derived(flow / 3.9817, "", "mass flow by density"),
        "density": derived(3.98171, STEAM, "IAPWS-IF97"),
        "viscosity": derived(1.52034e-5, "IAPWS R12-08", "IAPWS formulation 2008"),
        "isentropic_exponent": derived(1.30456, STEAM, "IAPWS-IF97"),
        "saturation_margin": derived(14.587, "IAPWS-IF97, region 4", "t - ts(p)"),
        "phase": derived("gas", STEAM),
        "velocity": derived(flow / 3.9817 / 0.018646),
        "reynolds_number": derived(4.0 * flow / (3.14159265 * 0.15408 * 1.52e-5)),
        "differential_pressure": derived(dp, PLATES),
        "expansibility": derived(1.0 - 0.31 * dp / 8e5, "ISO 5167-2:2003, 5.3.2.2"),
        "discharge_coefficient": derived(0.605432 + 1e-4 / flow, PLATES),
        "pressure_loss": derived(0.6234 * dp, "ISO 5167-2:2003, 5.4"),
        "signal_current": derived(0.004 + 0.016 * dp / 25e3),
        "uncertainty": derived(0.0061 + 0.001 / flow, "ISO 5168:2005 (from memory)"),
    }
    return PointResult(name, values)


_CHECKS = (
    Check(
        "reynolds_number", "minimum", 168_520.0, 5000.0, None, True, Level.STOP,
        "below this Reynolds number the coefficient does not hold", "ISO 5167-2:2003, 5.3.1",
        Reserve("mass_flow", 0.0092, -0.9703),
    ),
    Check(
        "velocity", "maximum", 15.714, None, 14.0, False, Level.CAUTION,
        "the house limit of velocity is exceeded: take a larger line or a smaller flow", PRACTICE,
        Reserve("mass_flow", 1.0394, -0.1091),
    ),
    Check(
        "saturation_margin", "normal", 14.587, 5.0, None, True, Level.CAUTION,
        "the steam is close to saturation", PRACTICE, Reserve("temperature", 448.563, -0.020926),
    ),
    Check(
        "diameter_ratio", "normal", 0.552031, 0.1, 0.75, True, Level.STOP,
        "the diameter ratio is outside the standard", "ISO 5167-2:2003, 5.3.1",
    ),
)  # fmt: skip

_BANDS = (
    Band("signal_fraction", 0.05, 1.0, 0.35, 1.16667, Level.CAUTION),
    Band("velocity", None, 14.0, None, 1.0394, Level.CAUTION),
    Band("reynolds_number", 5000.0, None, 0.0092, None, Level.STOP),
)

_DERIVATIONS = (
    Derivation(
        "differential_pressure",
        "qm = C/√(1 − β⁴) · ε · π/4 · d² · √(2 Δp ρ), solved for Δp",
        "ISO 5167-1:2003, 3.3 (from memory)",
        ("mass_flow", "discharge_coefficient", "expansibility", "bore_diameter_hot", "density"),
    ),
    Derivation(
        "discharge_coefficient",
        "Reader-Harris/Gallagher equation in β, ReD and the tapping spacings L1, L2",
        PLATES,
        ("diameter_ratio", "reynolds_number"),
    ),
    Derivation("diameter_ratio", "β = d / D", "", ("bore_diameter_hot", "inside_diameter_hot")),
    Derivation(
        "reynolds_number", "ReD = 4 qm / (π D μ)", "ISO 5167-1:2003, 3.3 (from memory)",
        ("mass_flow", "inside_diameter_hot", "viscosity"),
    ),
)  # fmt: skip

_FINDINGS = (
    Finding(
        Level.CAUTION, "velocity-high", "points.maximum.flow",
        "velocity 15.7 m/s is above the house limit of 14 m/s: take a larger line.", "maximum",
        PRACTICE, Reserve("mass_flow", 1.0394, -0.1091),
    ),
    Finding(
        Level.CAUTION, "signal-low", "points.minimum.flow",
        "the differential pressure at minimum is 1.8 mbar: below a tenth of the range.", "minimum",
    ),
    Finding(Level.NOTE, "fitting-assumed", "line.upstream_fitting", "a single bend is assumed."),
)  # fmt: skip

PROFILE = Profile(
    key="orifice_concentric",
    title="Orifice plate, concentric square-edged",
    group="differential pressure",
    principle="A sharp-edged plate throttles the flow; the pressure drop rises with its square.",
    phases=("liquid", "gas"),
    entries=(
        Entry("meter.taps", "Tappings", "choice", "Where the pressure is taken."),
        Entry("meter.bore", "Bore", "length", "Bore at 20 °C."),
        Entry("meter.differential_pressure_range", "Upper range value, Δp", "pressure_difference",
              "Upper range value of the transmitter.", symbol="Δpmax"),
    ),
    reply=(
        Entry("reply.uncertainty", "Uncertainty, k = 2", "ratio", "At all points."),
        Entry("reply.pressure_loss", "Pressure loss at maximum", "pressure_difference", "Loss."),
        Entry("reply.material", "Material of the plate", "text", "By standard designation."),
        Entry("reply.weight", "Weight", "mass", "Of the assembly."),
        Entry("reply.deviations", "Deviations from this sheet", "text", "None, or which."),
    ),
)  # fmt: skip


def evaluation(
    names: tuple[str, ...] = NAMES,
    flows: tuple[float, ...] = FLOWS,
    given: dict[str, Value] | None = None,
    **changes: object,
) -> Evaluation:
    """A steam orifice. ``given`` goes into the tag, ``changes`` replace fields of the result."""
    n = len(names)
    made = Evaluation(
        tag=_tag(names, flows, given or {}),
        profile=PROFILE,
        fluid_name="Steam (water)",
        points=tuple(_point(name, flow) for name, flow in zip(names, flows, strict=True)),
        element={
            "bore_diameter": derived(0.0848731, PLATES),
            "bore_diameter_hot": derived(0.0850432),
            "diameter_ratio": derived(0.552031),
            "plate_thickness": Result(0.0045, Origin.TYPICAL, "ISO 5167-2:2003, 5.1.5"),
        },
        base={"base_density": derived(999.1026, "IAPWS-IF97, region 1", "IAPWS-IF97")},
        fluid={"molar_mass": derived(0.018015268, "IAPWS R6-95")},
        line={
            "inside_diameter": derived(0.15408, "ASME B36.10M-2018 (from memory)"),
            "inside_diameter_hot": derived(0.154389),
            "upstream_length": derived(2.619, "ISO 5167-2:2003, table 3"),
        },
        summary={
            "turndown": derived(3.7634),
            "lost_power": derived(1824.6),
            "yearly_energy": derived(5.2549e10),
        },
        notes={
            "element": ("The upstream edge is sharp: its radius is at most 0.0004 d.",),
            "installation": (
                "Keep 17 D of straight pipe upstream and 7 D downstream of the plate.",
                "In a horizontal line of steam the tappings lie in the horizontal plane, with "
                "condensate pots at equal height.",
            ),
            "calibration": ("The plate is measured at four bore diameters; report each.",),
            "output": ("4-20 mA, linear in differential pressure; square root in the control "
                       "system.",),
            "materials": ("Plate: stainless steel 316L, for the bidder to confirm.",),
            "cautions": ("Hot surface: insulate and mark the meter run.",),
        },
        checks=_CHECKS,
        budget=(
            BudgetLine("discharge_coefficient", "discharge coefficient", (0.0025,) * n,
                       Origin.DERIVED, "ISO 5167-2:2003, 5.3.3.1"),
            BudgetLine("density", "density", (0.0005,) * n, Origin.DERIVED, STEAM),
            BudgetLine("differential_pressure", "differential pressure",
                       tuple(0.00061 / flow**2 for flow in flows), Origin.TYPICAL, PRACTICE),
        ),
        bands=_BANDS,
        derivations=_DERIVATIONS,
        findings=_FINDINGS,
    )  # fmt: skip
    return replace(made, **changes)  # type: ignore[arg-type]


def nine_points() -> Evaluation:
    """The same tag with nine operating points."""
    names = tuple(f"case {letter}" for letter in "ABCDEFGHI")
    return evaluation(names, tuple(0.3 + 0.11 * at for at in range(9)))


def one_point() -> Evaluation:
    """The same tag with the normal point only."""
    return evaluation(("normal",), (0.86111,))
