"""Published equations in the form that a device wants them."""

from __future__ import annotations

from collections.abc import Callable
from typing import Any

import numpy as np

from specsheet.meters.dp.device import Lanes
from specsheet.meters.family import Array, Derivation
from specsheet.methods import iso5167_1, iso5167_2, iso5167_3, iso5167_4
from specsheet.sources import cite


def constant(value: float) -> Callable[[Lanes], Array]:
    """Return a coefficient, or an uncertainty, that does not depend on the lanes."""

    def same(lanes: Lanes) -> Array:
        return np.full(lanes.mass_flow.shape, value)

    return same


def of_ratio(published: Callable[..., Any]) -> Callable[[Lanes], Array]:
    """Return a published coefficient, or uncertainty, that depends on β alone."""

    def found(lanes: Lanes) -> Array:
        value: Array = published(diameter_ratio=lanes.diameter_ratio)
        return value

    return found


def of_ratio_and_reynolds(published: Callable[..., Any]) -> Callable[[Lanes], Array]:
    """Return a published coefficient that depends on β and ReD."""

    def found(lanes: Lanes) -> Array:
        value: Array = published(
            diameter_ratio=lanes.diameter_ratio, reynolds_number=lanes.reynolds_number
        )
        return value

    return found


def loss_of_ratio(published: Callable[..., Any]) -> Callable[[Lanes, Array], Array]:
    """Return a published permanent loss by Δp that depends on β alone, not on C."""

    def found(lanes: Lanes, coefficient: Array) -> Array:  # noqa: ARG001 - the protocol
        value: Array = published(diameter_ratio=lanes.diameter_ratio)
        return value

    return found


def plate_expansibility(ratio: Array, drop: Array, exponent: Array) -> Array:
    """Return ε of a sharp plate (ISO 5167-2:2003, 5.3.2.2)."""
    found: Array = iso5167_2.expansibility(
        diameter_ratio=ratio, pressure_drop_ratio=drop, isentropic_exponent=exponent
    )
    return found


def plate_expansibility_uncertainty(ratio: Array, drop: Array, exponent: Array) -> Array:  # noqa: ARG001
    """Return the uncertainty of ε of a sharp plate (ISO 5167-2:2003, 5.3.3.2)."""
    found: Array = iso5167_2.expansibility_uncertainty(
        pressure_drop_ratio=drop, isentropic_exponent=exponent
    )
    return found


def nozzle_expansibility(ratio: Array, drop: Array, exponent: Array) -> Array:
    """Return ε of a contraction without separation (ISO 5167-3:2003, 5.1.6.3)."""
    found: Array = iso5167_3.expansibility(
        diameter_ratio=ratio, pressure_drop_ratio=drop, isentropic_exponent=exponent
    )
    return found


def nozzle_expansibility_uncertainty(ratio: Array, drop: Array, exponent: Array) -> Array:  # noqa: ARG001
    """Return the uncertainty of ε of a nozzle: 2 Δp/p1 % (ISO 5167-3:2003)."""
    found: Array = iso5167_3.expansibility_uncertainty(pressure_drop_ratio=drop)
    return found


def venturi_expansibility_uncertainty(ratio: Array, drop: Array, exponent: Array) -> Array:  # noqa: ARG001
    """Return the uncertainty of ε of a Venturi (nozzle): (4 + 100 β⁸) Δp/p1 %."""
    found: Array = iso5167_3.venturi_nozzle_expansibility_uncertainty(
        diameter_ratio=ratio, pressure_drop_ratio=drop
    )
    return found


def plate_loss(lanes: Lanes, coefficient: Array) -> Array:
    """Return the permanent loss by Δp of a plate or a nozzle (ISO 5167-2:2003, 5.4.1)."""
    found: Array = iso5167_1.loss_ratio(
        discharge_coefficient=coefficient, diameter_ratio=lanes.diameter_ratio
    )
    return found


def venturi_loss(lanes: Lanes, coefficient: Array) -> Array:  # noqa: ARG001 - does not depend on it
    """Return the permanent loss by Δp behind a divergent of ``divergent_angle``."""
    found: Array = iso5167_4.loss_ratio(
        diameter_ratio=lanes.diameter_ratio, divergent_angle=lanes.numbers["divergent_angle"]
    )
    return found


PLATE_EXPANSIBILITY = Derivation(
    "expansibility",
    "ε = 1 - (0.351 + 0.256 β⁴ + 0.93 β⁸) (1 - (p2/p1)^(1/κ))",
    cite("iso5167-2", "5.3.2.2"),
    ("diameter_ratio", "pressure_ratio", "isentropic_exponent"),
)
NOZZLE_EXPANSIBILITY = Derivation(
    "expansibility",
    "ε² = κ τ^(2/κ)/(κ - 1) · (1 - β⁴)/(1 - β⁴ τ^(2/κ)) · (1 - τ^((κ-1)/κ))/(1 - τ), τ = p2/p1",
    cite("iso5167-3", "5.1.6.3"),
    ("diameter_ratio", "pressure_ratio", "isentropic_exponent"),
)
PLATE_LOSS = Derivation(
    "pressure_loss",
    "ϖ = Δp (sqrt(1 - β⁴(1 - C²)) - C β²) / (sqrt(1 - β⁴(1 - C²)) + C β²)",
    cite("iso5167-2", "5.4.1"),
    ("differential_pressure", "discharge_coefficient", "diameter_ratio"),
)
VENTURI_LOSS = Derivation(
    "pressure_loss",
    "ϖ = Δp (0.218 - 0.42 β + 0.38 β²) at 7°, Δp (0.436 - 0.86 β + 0.59 β²) at 15°, linear between",
    "handbook fit (from memory)",
    ("differential_pressure", "diameter_ratio", "divergent_angle"),
)
BORE = Derivation(
    "bore_diameter",
    "mass-flow equation solved for β, d20 = β D / (1 + αd (t - 20 °C)), rounded up to 0.01 mm; "
    "with a drain hole d = dm (1 + 0.55 (dk/dm)²)",
    cite("iso5167-1", "annex A"),
    ("mass_flow", "differential_pressure_range", "inside_diameter_hot", "density"),
)
BORE_HOT = Derivation(
    "bore_diameter_hot",
    "d = d20 (1 + αd (t - 20 °C))",
    cite("iso5167-1"),
    ("bore_diameter", "element_expansion", "temperature"),
)
THROAT = Derivation(
    "throat_diameter",
    "mass-flow equation solved for β, d20 = β D / (1 + αd (t - 20 °C)), rounded up to 0.01 mm",
    cite("iso5167-1", "annex A"),
    ("mass_flow", "differential_pressure_range", "inside_diameter_hot", "density"),
)
THROAT_HOT = Derivation(
    "throat_diameter_hot",
    "d = d20 (1 + αd (t - 20 °C))",
    cite("iso5167-1"),
    ("throat_diameter", "element_expansion", "temperature"),
)
