"""What a scale read by eye shares: its signal, its limits, its error as a share of the whole."""

from __future__ import annotations

from specsheet.findings import Level
from specsheet.meters.family import Array, Derivation, Limit
from specsheet.methods import signal
from specsheet.sources import PRACTICE

CURRENT = Derivation(
    "signal_current", "I = 4 mA + 16 mA × share of span", "definition", ("signal_fraction",)
)
ERROR = Derivation(
    "error_limit", "error of full scale by share of span", PRACTICE, ("signal_fraction",)
)


def signals(share: Array, error: float) -> dict[str, Array]:
    """Return share of the scale, current and error limit, shape (n,).

    Args:
        share: of full scale, shape (n,) [-].
        error: limit of error, by full scale [-].
    """
    return {
        "signal_fraction": share,
        "signal_current": signal.current(fraction=share),
        "error_limit": error / share,
    }


def limits(above: str, below: str, source: str) -> tuple[Limit, ...]:
    """Return the ends of the scale: a stop above it, a caution below a tenth of it.

    Args:
        above, below: what happens there, and what to do.
        source: why it stops above.
    """
    key = "signal_fraction"
    return (
        Limit(key, None, 1.0 + 1e-9, Level.STOP, "above-scale", above, source),
        Limit(key, 0.1, None, Level.CAUTION, "below-scale", below, PRACTICE),
    )
