"""From a tag to a liquid that is no pure substance: solution, petroleum, seawater, slurry."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

from specsheet.findings import Finding
from specsheet.fluid import if97, solutes
from specsheet.fluid.backends.petroleum import Petroleum
from specsheet.fluid.backends.seawater import Seawater
from specsheet.fluid.backends.slurry import Slurry
from specsheet.fluid.backends.solution import Solution
from specsheet.fluid.lock import LOCK
from specsheet.fluid.model import Fluid, note, stop
from specsheet.methods import petroleum as method
from specsheet.tag import Tag

_LIQUID_ONLY = "liquid-only"


@dataclass(frozen=True, slots=True)
class Built:
    """The fluid of a tag, or None with the findings that say why."""

    fluid: Fluid | None
    findings: tuple[Finding, ...] = ()


def _refuse(code: str, field: str, message: str) -> Built:
    return Built(None, (stop(code, field, message),))


def _only_liquid(tag: Tag, what: str) -> Built | None:
    """Return the refusal of a gas where only the liquid is described."""
    if tag.phase != "gas":
        return None
    text = f"{what} is described as a liquid only, but gas is stated: correct fluid.phase."
    return _refuse(_LIQUID_ONLY, "fluid.phase", text)


def solution(tag: Tag) -> Built:
    """Return the solution of a tag."""
    wrong = _only_liquid(tag, "A solution")
    if wrong is not None:
        return wrong
    text = tag.text("fluid.solute")
    item = solutes.find(text) if text else None
    if item is None:
        near = solutes.nearest(text)
        hint = f" Did you mean {' or '.join(near)}?" if near else ""
        came = f"no solute is called {text!r}" if text else "none came"
        message = f"A solute was wanted, {came}.{hint} Otherwise state density and viscosity."
        return _refuse("solute-unknown", "fluid.solute", message)
    by_mass, by_volume = tag.si("fluid.mass_fraction"), tag.si("fluid.volume_fraction")
    if by_mass is None and by_volume is None:
        message = "How much is dissolved was wanted, nothing came: state fluid.mass_fraction."
        return _refuse("concentration-missing", "fluid.mass_fraction", message)
    field = "fluid.volume_fraction" if by_mass is None else "fluid.mass_fraction"
    fraction = by_mass if by_mass is not None else by_volume or 0.0
    if not 0.0 <= fraction <= 1.0:
        message = f"A fraction from 0 % to 100 % was wanted, {100 * fraction:.4g} % came."
        return _refuse("fraction-range", field, message)
    if by_mass is not None:
        return Built(Solution(item.key, fraction, tag.phase))
    return _by_volume(tag, item, fraction)


def _by_volume(tag: Tag, item: solutes.Solute, fraction: float) -> Built:
    """Return the solution of a volume fraction: volumes before mixing, at 20 degC."""
    if item.pure_density is None:
        text = f"{item.name} is sold by mass: state fluid.mass_fraction instead."
        return _refuse("fraction-basis", "fluid.volume_fraction", text)
    with LOCK:
        pure_water = if97.liquid_density(293.15, 101325.0)
    mass = fraction * item.pure_density
    by_mass = mass / (mass + (1.0 - fraction) * pure_water)
    text = (
        f"{100 * fraction:.4g} % by volume, taken as volumes before mixing at 20 °C, is "
        f"{100 * by_mass:.4g} % by mass."
    )
    said = (note("fraction-converted", "fluid.volume_fraction", text),)
    return Built(Solution(item.key, by_mass, tag.phase), said)


def petroleum(tag: Tag) -> Built:
    """Return the petroleum liquid of a tag."""
    wrong = _only_liquid(tag, "A petroleum product")
    if wrong is not None:
        return wrong
    product = tag.text("fluid.product")
    if product not in method.EXPANSION:
        wanted = ", ".join(method.EXPANSION)
        message = f"A product was wanted ({wanted}), {product!r} came: state fluid.product."
        return _refuse("product-unknown", "fluid.product", message)
    density = tag.si("fluid.density_15")
    gravity = tag.si("fluid.api_gravity")
    field = "fluid.density_15"
    if density is None and gravity is not None:
        field = "fluid.api_gravity"
        if not -10.0 <= gravity <= 105.0:
            message = f"An API gravity from -10 to 105 was wanted, {gravity:.5g} came."
            return _refuse("fluid-limit", field, message)
        density = _density_15(gravity, product)
    if density is None:
        message = "State fluid.density_15 or fluid.api_gravity: the density starts from it."
        return _refuse("density-missing", "fluid.density_15", message)
    if not 600.0 <= density <= 1164.0:
        message = (
            f"A density at 15 °C from 600 kg/m3 to 1164 kg/m3 was wanted, {density:.5g} kg/m3 came."
        )
        return _refuse("fluid-limit", field, message)
    viscosities, findings = _viscosities(tag, density, product)
    if findings:
        return Built(None, findings)
    return Built(Petroleum(product, density, viscosities, tag.phase, tag.atmospheric_pressure))


def _density_15(gravity: float, product: str) -> float:
    """Return the density at 15 degC [kg/m3] of an API gravity, which holds at 60 degF."""
    at_60 = method.density_from_api_gravity(gravity)
    density = at_60
    for _ in range(5):
        density = at_60 / method.temperature_correction(
            density_15=density, celsius=140.0 / 9.0, product=product
        )
    return density


def _viscosities(
    tag: Tag, density: float, product: str
) -> tuple[tuple[tuple[float, float], ...], tuple[Finding, ...]]:
    """Return temperature [K] and kinematic viscosity [m2/s] of each stated pair."""
    found: list[tuple[float, float]] = []
    for number in (1, 2):
        field = f"fluid.viscosity_{number}"
        stated, warmth = tag.quantity(field), tag.quantity(f"{field}_temperature")
        if stated is None:
            continue
        if warmth is None:
            text = f"The viscosity needs its temperature: state {field}_temperature."
            return (), (stop("temperature-missing", f"{field}_temperature", text),)
        value = stated.value
        if stated.kind == "dynamic_viscosity":
            value /= density * method.temperature_correction(
                density_15=density, celsius=warmth.value - 273.15, product=product
            )
        if value <= 0.31e-6:
            text = f"A kinematic viscosity above 0.31 mm2/s was wanted, {1e6 * value:.3g} came."
            return (), (stop("fluid-limit", field, text),)
        found.append((warmth.value, value))
    found.sort()
    if len(found) == 2 and (found[1][0] - found[0][0] < 1.0 or found[1][1] >= found[0][1]):
        text = (
            "Two viscosities at two temperatures were wanted, the one at the higher temperature "
            "the lower: check the pairs."
        )
        return (), (stop("viscosity-pairs", "fluid.viscosity_2", text),)
    return tuple(found), ()


def seawater(tag: Tag) -> Built:
    """Return the seawater of a tag."""
    wrong = _only_liquid(tag, "Seawater")
    if wrong is not None:
        return wrong
    salinity = tag.si("fluid.salinity")
    if salinity is None:
        message = "The salinity was wanted, none came: state fluid.salinity (ocean: 3.5 %)."
        return _refuse("concentration-missing", "fluid.salinity", message)
    return Built(Seawater(salinity, tag.phase))


def slurry(tag: Tag, carrier_of: Callable[[Tag], Fluid | None]) -> Built:
    """Return the slurry of a tag; ``carrier_of`` finds the liquid that its substance names."""
    wrong = _only_liquid(tag, "A slurry")
    if wrong is not None:
        return wrong
    carrier = carrier_of(tag)
    if carrier is None:
        message = "The carrying liquid was wanted: state fluid.substance (water, for most)."
        return _refuse("substance-missing", "fluid.substance", message)
    density = tag.si("fluid.solids_density")
    if density is None or density <= 0.0:
        message = "The density of the dry solids was wanted: state fluid.solids_density."
        return _refuse("density-missing", "fluid.solids_density", message)
    by_volume, by_mass = tag.si("fluid.solids"), tag.si("fluid.solids_mass_fraction")
    if by_volume is None and by_mass is None:
        message = "How much is solid was wanted: state fluid.solids or fluid.solids_mass_fraction."
        return _refuse("concentration-missing", "fluid.solids", message)
    share = by_volume if by_volume is not None else by_mass or 0.0
    field = "fluid.solids" if by_volume is not None else "fluid.solids_mass_fraction"
    if not 0.0 <= share < 1.0:
        message = f"A fraction from 0 % to 100 % was wanted, {100 * share:.4g} % came."
        return _refuse("fraction-range", field, message)
    mass = None if by_volume is not None else by_mass
    return Built(Slurry(carrier, density, by_volume, mass))
