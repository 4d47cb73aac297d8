"""What every meter family shares on one tag: fluid, operating points and pipe, derived once."""

from __future__ import annotations

from dataclasses import dataclass
from math import nan

from specsheet import fluid, line
from specsheet.evaluate.remarks import service_words
from specsheet.evaluate.sanity import check_statements
from specsheet.evaluate.stream import Points, points_of
from specsheet.findings import Finding
from specsheet.fluid.state import FluidResult
from specsheet.line import Pipe, PipeResult
from specsheet.line.service import Service as ServiceFacts
from specsheet.line.service import service_facts
from specsheet.meters.family import Request
from specsheet.packs import Profile
from specsheet.tag import Tag

CHANNEL = "open channel"
#: stands in for the pipe where the water has a free surface: nothing is known of a section
NO_PIPE = Pipe(nan, nan, nan, nan, "", 0, "")
#: gauge pressure above which there is no free surface [Pa]: half a metre of water
_NO_SURFACE = 5000.0
_LINE_ENTRIES = ("line.size", "line.inside_diameter", "line.outside_diameter")


@dataclass(frozen=True)
class Prepared:
    """One tag without a meter.

    Attributes:
        tag: the tag.
        fluid: its fluid at every point.
        points: the operating points that can be evaluated.
        pipe: the pipe; its ``pipe`` is None where it cannot be had.
        statements: what is wrong with the statements as such.
        facts: the facts of the service.
        avoided: rules by which a material is to be avoided in the service.
        words: what it is, in words ("steam", "oxygen_enriched", "solids", "viscous").
    """

    tag: Tag
    fluid: FluidResult
    points: Points
    pipe: PipeResult
    statements: tuple[Finding, ...]
    facts: ServiceFacts
    avoided: frozenset[int]
    words: frozenset[str]

    def findings(self, profile: Profile | None) -> tuple[Finding, ...]:
        """Return what is wrong before a meter is looked at.

        A family for open channels misses no pipe where none is stated.
        """
        missing_pipe = in_channel(self, profile) and self.pipe.pipe is None
        of_pipe = () if missing_pipe else self.pipe.findings
        return (*self.fluid.findings, *self.points.findings, *of_pipe, *self.statements)


def prepare(tag: Tag) -> Prepared:
    """Derive fluid, operating points and pipe of one tag. Never raises on user data."""
    state = fluid.derive(tag)
    points = points_of(tag, state)
    facts = service_facts(tag, state)
    words = service_words(tag, facts, points)
    return Prepared(
        tag,
        state,
        points,
        line.pipe_of(tag),
        check_statements(tag, points),
        facts,
        line.avoided_rules(facts, words),
        words,
    )


def in_channel(prepared: Prepared, profile: Profile | None) -> bool:
    """Tell whether a family is used with a free surface on this tag.

    So it is where it knows nothing else; or where it can, no pipe is stated, and the liquid can
    have a free surface.
    """
    if profile is None or CHANNEL not in profile.applies_to:
        return False
    if profile.applies_to == (CHANNEL,):
        return True
    stated = any(path in prepared.tag.given for path in _LINE_ENTRIES)
    return not stated and prepared.tag.phase == "liquid" and not has_pressure(prepared)


def overpressure(prepared: Prepared) -> float:
    """Return the highest gauge pressure of the operating points [Pa]; 0 where none is known."""
    known = [state.pressure for state in prepared.fluid.points if state is not None]
    atmosphere = prepared.tag.atmospheric_pressure
    return max((pressure - atmosphere for pressure in known), default=0.0)


def has_pressure(prepared: Prepared) -> bool:
    """Tell whether the line stands under more pressure than a free surface allows."""
    return overpressure(prepared) > _NO_SURFACE


def request(prepared: Prepared, profile: Profile, tag: Tag | None = None) -> Request | None:
    """Return what a family is asked; None where no point or no pipe can be evaluated.

    Args:
        prepared: the tag without a meter.
        profile: profile of the family.
        tag: the tag with the entries of that family, where it is not the tag's own.
    """
    pipe = NO_PIPE if in_channel(prepared, profile) else prepared.pipe.pipe
    names, stream = prepared.points.names, prepared.points.stream
    if pipe is None or not names:
        return None
    flows = stream.mass_flow
    normal = names.index("normal") if "normal" in names else int(flows.argsort()[flows.size // 2])
    return Request(
        tag=prepared.tag if tag is None else tag,
        profile=profile,
        pipe=pipe,
        names=names,
        stream=stream,
        normal=normal,
        maximum=int(flows.argmax()),
        minimum=int(flows.argmin()),
    )
