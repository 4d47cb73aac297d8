"""The meter as a function of the stream: response, margins and uncertainty in one call.

Operating points, the sweep along the range and the search for reserves all go through
:class:`Model`, so that no two parts of a sheet can disagree.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

import numpy as np

from specsheet.evaluate.budget import (
    DensityInUse,
    density_in_use,
    exponent_stream,
    with_density,
)
from specsheet.meters.family import Array, Contribution, Element, Family, Request, Stream
from specsheet.methods import energy, gum

#: properties of the stream that a limit may bound
STREAM_KEYS = ("density", "viscosity", "pressure", "temperature", "isentropic_exponent")


@dataclass(frozen=True)
class Response:
    """What the meter does at n conditions.

    Attributes:
        values: glossary key -> array of shape (n,), the stream's own keys included.
        contributions: what the uncertainty of the flow is made of.
    """

    values: Mapping[str, Array]
    contributions: tuple[Contribution, ...]


@dataclass(frozen=True)
class Model:
    """A family with its element as sized.

    Attributes:
        family, element: the meter.
        gas: whether the stream is a gas.
        efficiency: of the pump or compressor that makes up the loss [-].
        density: how well the density in use is known.
        additional: uncertainty of the flow by short straight lengths, added arithmetically to the
            expanded uncertainty as ISO 5167-1 has it [-].
    """

    family: Family
    element: Element
    gas: bool
    efficiency: float
    density: DensityInUse
    additional: float = 0.0

    def __call__(self, stream: Stream) -> Response:
        """Return the response to a stream of shape (n,). Impossible states give NaN."""
        with np.errstate(all="ignore"):
            values = dict(self.family.at(self.element, stream))
            for key in STREAM_KEYS:
                values.setdefault(key, getattr(stream, key))
            values.setdefault("kinematic_viscosity", stream.viscosity / stream.density)
            values.setdefault("mach_number", values["velocity"] / stream.sound_speed)
            if not self.gas:
                values.setdefault("back_pressure_margin", _back_pressure_margin(stream, values))
            values["lost_power"] = self._lost_power(stream, values["pressure_loss"])
            contributions = with_density(
                self.family.budget(self.element, exponent_stream(stream), values),
                stream,
                self.density,
            )
            if contributions:
                relative = np.array([item.relative for item in contributions])
                freedom = np.array([item.freedom for item in contributions])
                combined = gum.combine(relative=relative, freedom=freedom)
                values["uncertainty"] = combined.expanded + self.additional
                values["coverage_factor"] = combined.coverage
        return Response(values, contributions)

    def _lost_power(self, stream: Stream, loss: Array) -> Array:
        if self.gas:
            return energy.lost_power_gas(
                pressure=stream.pressure,
                pressure_loss=loss,
                volume_flow=stream.volume_flow,
                efficiency=self.efficiency,
            )
        return energy.lost_power_liquid(
            pressure_loss=loss, volume_flow=stream.volume_flow, efficiency=self.efficiency
        )


def model_of(request: Request, family: Family, element: Element, additional: float) -> Model:
    """Return the model of a meter on its tag; ``additional`` as in :class:`Model`."""
    tag = request.tag
    return Model(
        family,
        element,
        gas=tag.phase == "gas",
        efficiency=tag.si("job.efficiency") or 1.0,
        density=density_in_use(tag, float(request.stream.density[request.normal])),
        additional=additional,
    )


def _back_pressure_margin(stream: Stream, values: Mapping[str, Array]) -> Array:
    """Return how far the liquid stays above what it needs not to flash or cavitate [Pa].

    Where the family knows the back pressure it needs downstream, that decides; else the lowest
    pressure in the meter must stay above the vapour pressure. Gases give NaN.
    """
    needed = values.get("minimum_back_pressure")
    if needed is not None:
        return stream.pressure - values["pressure_loss"] - needed
    fall = np.fmax(values["pressure_loss"], values.get("differential_pressure", 0.0))
    return np.asarray(stream.pressure - fall - stream.vapour_pressure)
