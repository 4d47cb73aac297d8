"""Everything the line has to say about a tag, for the evaluation, in one call."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

from specsheet.findings import Finding, Given
from specsheet.fluid.state import FluidResult
from specsheet.line.cautions import cautions
from specsheet.line.compatibility import materials
from specsheet.line.pipe import Pipe
from specsheet.line.rating import Margin, rate
from specsheet.line.seals import seals
from specsheet.line.service import Service
from specsheet.line.straight import straight
from specsheet.packs import Profile
from specsheet.tag import Tag


@dataclass(frozen=True)
class LineResult:
    """What the line has to say.

    Attributes:
        values: glossary key -> value: straight lengths, flange rating, allowable pressure, seals.
        notes: heading -> sentences, in the order of printing.
        findings: what does not hold or must be decided.
        additional_uncertainty: of the flow, by reduced straight lengths, to be added
            arithmetically to the expanded uncertainty [-].
        margin: how near the hardest demand comes to what the flange rating allows.
    """

    values: Mapping[str, Given]
    notes: Mapping[str, tuple[str, ...]]
    findings: tuple[Finding, ...]
    additional_uncertainty: float = 0.0
    margin: Margin | None = None


def assess(
    tag: Tag,
    profile: Profile | None,
    pipe: Pipe | None,
    fluid: FluidResult | None = None,
    *,
    beta: float | None = None,
    meter_diameter: float | None = None,
    service: Service | None = None,
) -> LineResult:
    """Judge straight lengths, flange rating, seals, materials and cautions of one tag.

    Args:
        tag: the tag.
        profile: profile of the family; None where it is unknown: then no straight lengths.
        pipe: the pipe; None where it is unknown: then no straight lengths.
        fluid: states at the operating points.
        beta: diameter ratio, where the family has one [-].
        meter_diameter: bore of the meter, where straight lengths count in it [m].
        service: facts of the service, where the caller has them already.
    """
    rating = rate(tag, fluid, nominal=pipe.nominal if pipe else 0)
    wetted = materials(tag, profile, fluid, service=service)
    sealed = seals(tag, profile, fluid, service=service)
    warned = cautions(tag, fluid, service=service)
    values: dict[str, Given] = {**rating.values, **sealed.values}
    notes = {
        "Flange rating": rating.notes,
        "Seals": sealed.notes,
        "Materials": wetted.notes,
        "Cautions": warned.notes,
    }
    findings = (*rating.findings, *sealed.findings, *wetted.findings, *warned.findings)
    if profile is None or pipe is None:
        return LineResult(values, notes, findings, margin=rating.margin)
    runs = straight(
        tag,
        profile,
        beta,
        pipe_diameter=pipe.inside_diameter,
        meter_diameter=meter_diameter,
    )
    return LineResult(
        {**runs.values, **values},
        {"Straight lengths": runs.notes, **notes},
        (*runs.findings, *findings),
        runs.additional_uncertainty,
        rating.margin,
    )
