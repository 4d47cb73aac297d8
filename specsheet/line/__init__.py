"""The line: pipe, straight lengths, flange ratings, materials and cautions of the service.

Imports without numpy. Everything takes the tag as it is typed and never raises on what a user
stated: what is wrong becomes a finding.
"""

from specsheet.line.assess import LineResult, assess
from specsheet.line.cautions import CautionResult, cautions
from specsheet.line.compatibility import (
    MaterialResult,
    avoided_rules,
    materials,
    unsuited_parts,
)
from specsheet.line.pipe import Pipe
from specsheet.line.piping import PipeResult, pipe_of
from specsheet.line.rating import RatingResult, rate
from specsheet.line.seals import SealResult, seals
from specsheet.line.straight import StraightResult, straight
from specsheet.line.velocity import velocity_limits

__all__ = [
    "CautionResult",
    "LineResult",
    "MaterialResult",
    "Pipe",
    "PipeResult",
    "RatingResult",
    "SealResult",
    "StraightResult",
    "assess",
    "avoided_rules",
    "cautions",
    "materials",
    "pipe_of",
    "rate",
    "seals",
    "straight",
    "unsuited_parts",
    "velocity_limits",
]
