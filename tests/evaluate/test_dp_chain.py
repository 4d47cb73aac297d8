"""The whole chain from tag file to Δp, Reynolds number, loss and choked flow, worked by others.

Each demo tag of a differential-pressure family is evaluated from its file; from the flow, the fluid
and the bore as printed, `fluids` (or the textbook law where that library has no such device) works
out the same chain.
"""

from __future__ import annotations

from math import pi, sqrt

import pytest
from cli_process import DEMO

from specsheet import tagfile
from specsheet.evaluate import Evaluation, evaluate

flow_meter = pytest.importorskip("fluids.flow_meter")

JOB = tagfile.load_job(DEMO / "job.toml")

#: tag, glossary key of its dimension, the library's name of the device, its tappings
DEVICES = [
    ("FT-2101", "throat_diameter", "long radius nozzle", None),
    ("FT-2102", "throat_diameter", "ISA 1932 nozzle", None),
    ("FT-2104", "bore_diameter", "ISO 5167 orifice", "flange"),
    ("FT-2420", "bore_diameter", "ISO 15377 quarter-circle orifice", None),
    ("FT-3201", "throat_diameter", "machined convergent venturi tube", None),
    ("FT-3205", "bore_diameter", "ISO 15377 eccentric orifice", None),
    ("FT-3420", "cone_diameter", "cone meter", None),
    ("FT-4130", "bore_diameter", "ISO 15377 conical orifice", None),
    ("FT-5105", "wedge_height", "wedge meter", None),
    ("FT-6105", "throat_diameter", "venturi nozzle", None),
]
#: devices of which the library has the loss of the same standard
WITH_LOSS = ("ISO 5167 orifice", "ISA 1932 nozzle", "long radius nozzle", "cone meter")


def evaluated(name: str) -> Evaluation:
    tag = tagfile.load(DEMO / "tags" / f"{name}.toml", JOB).tag
    assert tag is not None
    return evaluate(tag)


def number(values, key: str) -> float:
    return float(values[key].value)


def hot(found: Evaluation, values, dimension: str) -> tuple[float, float]:
    """Return inside diameter and dimension at the temperature of a point: L (1 + α (t - 20 °C))."""
    rise = number(values, "temperature") - 293.15
    inside = number(found.line, "inside_diameter")
    size = number(found.element, dimension)
    return (
        inside * (1.0 + number(found.line, "pipe_expansion") * rise),
        size * (1.0 + number(found.element, "element_expansion") * rise),
    )


@pytest.mark.parametrize(("name", "dimension", "device", "taps"), DEVICES)
def test_flow_from_the_printed_differential_pressure(name, dimension, device, taps):
    """`fluids`: the Δp, sizes and fluid as printed give back the flow typed."""
    found = evaluated(name)
    for point in found.points:
        values = point.values
        inside, size = hot(found, values, dimension)
        upstream = number(values, "pressure")
        flow = flow_meter.differential_pressure_meter_solver(
            D=inside,
            D2=size,
            rho=number(values, "density"),
            mu=number(values, "viscosity"),
            k=number(values, "isentropic_exponent") if found.tag.phase == "gas" else 1e9,
            P1=upstream,
            P2=upstream - number(values, "differential_pressure"),
            meter_type=device,
            taps=taps,
        )
        assert flow == pytest.approx(number(values, "mass_flow"), rel=2e-6)
        reynolds = 4.0 * flow / (pi * inside * number(values, "viscosity"))
        assert number(values, "reynolds_number") == pytest.approx(reynolds, rel=2e-6)


@pytest.mark.parametrize(
    ("name", "dimension", "device"),
    [item[:3] for item in DEVICES if item[2] in WITH_LOSS],
)
def test_permanent_loss(name, dimension, device):
    """`fluids`: the loss of plate, nozzles and cone from Δp and C as printed."""
    found = evaluated(name)
    for point in found.points:
        values = point.values
        inside, size = hot(found, values, dimension)
        upstream = number(values, "pressure")
        loss = flow_meter.differential_pressure_meter_dP(
            D=inside,
            D2=size,
            P1=upstream,
            P2=upstream - number(values, "differential_pressure"),
            C=number(values, "discharge_coefficient"),
            meter_type=device,
        )
        assert number(values, "pressure_loss") == pytest.approx(loss, rel=1e-5)


def by_equation(values, inside: float) -> float:
    """Return qm = C ε (π/4) d² sqrt(2 Δp ρ / (1 - β⁴)) with the printed values (ISO 5167-1)."""
    beta = number(values, "diameter_ratio")
    return (
        number(values, "discharge_coefficient")
        * number(values, "expansibility")
        * pi
        / 4.0
        * (beta * inside) ** 2
        * sqrt(
            2.0
            * number(values, "differential_pressure")
            * number(values, "density")
            / (1.0 - beta**4)
        )
    )


@pytest.mark.parametrize("name", ["FT-5110", "FT-6110"])
def test_segmental_plate_and_dall_tube_by_the_flow_equation(name):
    found = evaluated(name)
    inside = number(found.element, "inside_diameter_hot")
    for point in found.points:
        flow = by_equation(point.values, inside)
        assert flow == pytest.approx(number(point.values, "mass_flow"), rel=1e-5)


def test_opening_of_the_segmental_plate_is_the_segment_of_its_height():
    """β² is the area of a circular segment by that of the circle (plane geometry, `fluids`)."""
    geometry = pytest.importorskip("fluids.geometry")
    found = evaluated("FT-5110")
    inside = number(found.element, "inside_diameter_hot")
    share = number(found.element, "segment_height") / number(found.line, "inside_diameter")
    area = geometry.A_partial_circle(D=inside, h=share * inside)
    beta = sqrt(area / (pi / 4.0 * inside**2))
    assert number(found.element, "diameter_ratio") == pytest.approx(beta, rel=1e-4)


def test_critical_nozzle_chokes_where_gas_dynamics_say():
    """qm = C A p sqrt(κ/(Rs T)) (2/(κ+1))^((κ+1)/(2(κ-1))); p* from `fluids`."""
    compressible = pytest.importorskip("fluids.compressible")
    found = evaluated("FT-7110")
    throat = number(found.element, "throat_diameter_hot")
    for point in found.points:
        values = point.values
        kappa, pressure = number(values, "isentropic_exponent"), number(values, "pressure")
        ideal = sqrt(kappa * pressure * number(values, "density")) * (2.0 / (kappa + 1.0)) ** (
            (kappa + 1.0) / (2.0 * (kappa - 1.0))
        )
        flow = number(values, "discharge_coefficient") * pi / 4.0 * throat**2 * ideal
        assert number(values, "choked_flow") == pytest.approx(flow, rel=1e-6)
        ratio = compressible.P_critical_flow(P=1.0, k=kappa)
        assert number(values, "critical_pressure_ratio") == pytest.approx(ratio, rel=1e-9)


def test_pitot_tube_sees_the_dynamic_pressure_of_its_traverse():
    """Foul air of 22 °C at about 10 m/s: ρ v²/2 by hand at each point."""
    found = evaluated("FT-8101")
    for point in found.points:
        values = point.values
        head = 0.5 * number(values, "density") * number(values, "velocity") ** 2
        assert number(values, "differential_pressure") == pytest.approx(head, rel=2e-3)
        duct = number(values, "volume_flow") / (pi / 4.0 * 0.8**2)
        assert number(values, "velocity") == pytest.approx(duct, rel=1e-3)


def test_averaging_bar_by_its_coefficient():
    """v = K ε sqrt(2 Δp / ρ) with the K printed; ε stays within 0.1 % of 1 at this Δp/p."""
    found = evaluated("FT-7104")
    coefficient = number(found.element, "flow_coefficient")
    for point in found.points:
        values = point.values
        velocity = coefficient * sqrt(
            2.0 * number(values, "differential_pressure") / number(values, "density")
        )
        assert number(values, "velocity") == pytest.approx(velocity, rel=2e-3)


def test_laminar_bundle_beside_the_friction_of_a_pipe():
    """`fluids`: f = 64/Re over each capillary, plus 1.16 ρ v² (from memory)."""
    friction = pytest.importorskip("fluids.friction")
    found = evaluated("FT-9101")
    bore, length = (number(found.element, key) for key in ("capillary_bore", "capillary_length"))
    count = number(found.element, "capillary_count")
    for point in found.points:
        values = point.values
        velocity = number(values, "volume_flow") / (count * pi / 4.0 * bore**2)
        density = number(values, "density")
        reynolds = density * velocity * bore / number(values, "viscosity")
        factor = friction.friction_factor(Re=reynolds)
        stiff = factor * length / bore * density * velocity**2 / 2.0
        inertial = 1.16 * density * velocity**2
        drop = number(values, "differential_pressure")
        expanded = drop * (1.0 - drop / (2.0 * number(values, "pressure")))
        assert expanded == pytest.approx(stiff + inertial, rel=1e-6)


def test_float_counts_in_equivalent_water():
    """Water in a scale for water: nothing to convert but the density of 14 °C (VDI/VDE 3513)."""
    found = evaluated("FT-9105")
    for point in found.points:
        values = point.values
        density, float_density = number(values, "density"), 7850.0
        share = sqrt(density * (float_density - 998.2) / (998.2 * (float_density - density)))
        flow = number(values, "volume_flow") * share
        assert number(values, "equivalent_flow") == pytest.approx(flow, rel=1e-6)


def test_spring_element_is_an_orifice_of_changing_size():
    """The loss rises with flow, but slower than its square, and reaches its figure at the top."""
    found = evaluated("FT-4110")
    points = [point.values for point in found.points]
    drops = [number(values, "pressure_loss") for values in points]
    flows = [number(values, "volume_flow") for values in points]
    assert drops == sorted(drops)
    assert drops[2] / drops[0] < (flows[2] / flows[0]) ** 2
