"""What one differential-pressure device is: its equations, its limits and how it is drawn."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass, field

from specsheet.findings import Finding
from specsheet.meters.family import Array, Derivation, Element, Given, Limit, Request


@dataclass(frozen=True)
class Lanes:
    """The flow in the device at n conditions, as its equations want it; arrays of shape (n,).

    Attributes:
        diameter_ratio: β at operating temperature [-]
        inside_diameter: D at operating temperature [m]
        reynolds_number: ReD [-]
        mass_flow: [kg/s]
        density: upstream [kg/m3]
        numbers, choices: those of the element.
    """

    diameter_ratio: Array
    inside_diameter: Array
    reynolds_number: Array
    mass_flow: Array
    density: Array
    numbers: Mapping[str, float]
    choices: Mapping[str, str]

    def with_ratio(self, diameter_ratio: Array) -> Lanes:
        """Return the same lanes with another diameter ratio."""
        return Lanes(
            diameter_ratio,
            self.inside_diameter,
            self.reynolds_number,
            self.mass_flow,
            self.density,
            self.numbers,
            self.choices,
        )

    def with_flow(self, mass_flow: Array) -> Lanes:
        """Return the same lanes with another flow; the Reynolds number follows."""
        return Lanes(
            self.diameter_ratio,
            self.inside_diameter,
            self.reynolds_number * (mass_flow / self.mass_flow),
            mass_flow,
            self.density,
            self.numbers,
            self.choices,
        )


#: ε of β, Δp/p1 and κ
Expansibility = Callable[[Array, Array, Array], Array]


def same_share(diameter_ratio: Array) -> Array:
    """Return the throat by D of a device whose throat is a round bore: β itself."""
    return diameter_ratio


def as_machined(size: float, numbers: Mapping[str, float]) -> float:  # noqa: ARG001
    """Return the dimension itself: nothing else lets fluid pass."""
    return size


@dataclass(frozen=True)
class Shape:
    """How β is cut into steel: the dimension that is machined, against the inside diameter.

    Attributes:
        entry: key of its entry under [meter] ("bore").
        term: glossary key of it at 20 °C ("bore_diameter").
        hot_term: glossary key of it at operating temperature, or "".
        label: words for it in a message ("bore").
        equation: how β follows from it.
        share: dimension by D, from β; arrays.
        ratio: β, from dimension by D; arrays.
        effective: dimension that counts, from the one machined [m] and the element's numbers.
        machined: the inverse of ``effective``.
        widens: whether a larger dimension opens the pipe; rounding goes that way.
    """

    entry: str = "bore"
    term: str = "bore_diameter"
    hot_term: str = "bore_diameter_hot"
    label: str = "bore"
    equation: str = "β = d / D"
    share: Callable[[Array], Array] = same_share
    ratio: Callable[[Array], Array] = same_share
    effective: Callable[[float, Mapping[str, float]], float] = as_machined
    machined: Callable[[float, Mapping[str, float]], float] = as_machined
    widens: bool = True


@dataclass(frozen=True)
class Described:
    """What a device adds to its element once the size is known."""

    values: Mapping[str, Given] = field(default_factory=dict)
    notes: Mapping[str, tuple[str, ...]] = field(default_factory=dict)
    findings: tuple[Finding, ...] = ()


@dataclass(frozen=True)
class Bounds:
    """Within what the sizing may move.

    Attributes:
        smallest, largest: diameter ratio [-].
        target: diameter ratio aimed at when bore and range are both free [-].
        smallest_bore: smallest dimension [m].
        largest_differential: highest upper range value [Pa].
        largest_drop: largest Δp/p1 of a gas [-].
    """

    smallest: float
    largest: float
    target: float = 0.6
    smallest_bore: float = 0.0
    largest_differential: float = 2.5e5
    largest_drop: float = 0.25


@dataclass(frozen=True)
class Prepared:
    """What a device reads from its own entries before it is sized.

    Attributes:
        numbers, choices: join those of the element.
        values: what the sheet prints of them.
        findings: what is wrong with them.
    """

    numbers: Mapping[str, float] = field(default_factory=dict)
    choices: Mapping[str, str] = field(default_factory=dict)
    values: Mapping[str, Given] = field(default_factory=dict)
    findings: tuple[Finding, ...] = ()


def no_over_reading(lanes: Lanes) -> float:  # noqa: ARG001 - the signature is the protocol
    """Return the over-reading of a dry gas or a liquid: 1."""
    return 1.0


def nothing_beside(lanes: Lanes) -> Mapping[str, Array]:  # noqa: ARG001 - the protocol
    """Return nothing: the device has no further values."""
    return {}


def nothing_more(request: Request) -> Prepared:  # noqa: ARG001 - the signature is the protocol
    """Return nothing: the device has no entries of its own."""
    return Prepared()


@dataclass(frozen=True)
class Device:
    """One differential-pressure device.

    Attributes:
        key: of the family.
        source: citation of the discharge coefficient.
        coefficient: C of the lanes.
        coefficient_uncertainty: relative expanded (k = 2) of C of the lanes.
        expansibility: ε of β, Δp/p1 and κ.
        expansibility_uncertainty: relative expanded (k = 2) of ε, of β, Δp/p1 and κ.
        loss: permanent loss by Δp, of the lanes and C.
        bounds: within what the sizing may move, of the pipe and the prepared choices.
        limits: limits of use of the element as sized.
        describe: make of it: thickness, edge, tappings.
        derivations: how C, ε and the loss come about.
        prepare: reads the device's own entries.
        over_reading: by what factor the flow reads high (wet gas), of the lanes.
        more: further values of the lanes to put out, by glossary key.
        assumed_expansion: where no published uncertainty of ε was seen: whose is taken instead.
        shape: which dimension is machined.
    """

    key: str
    source: str
    coefficient: Callable[[Lanes], Array]
    coefficient_uncertainty: Callable[[Lanes], Array]
    expansibility: Expansibility
    expansibility_uncertainty: Expansibility
    loss: Callable[[Lanes, Array], Array]
    bounds: Callable[[Request, Prepared], Bounds]
    limits: Callable[[Element, Request], tuple[Limit, ...]]
    describe: Callable[[Request, Element], Described]
    derivations: tuple[Derivation, ...]
    prepare: Callable[[Request], Prepared] = nothing_more
    over_reading: Callable[[Lanes], Array | float] = no_over_reading
    more: Callable[[Lanes], Mapping[str, Array]] = nothing_beside
    shape: Shape = Shape()
    assumed_expansion: str = ""
