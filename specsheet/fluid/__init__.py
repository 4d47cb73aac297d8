"""The state of the fluid at every operating point and base condition.

* :func:`derive`  tag -> :class:`~specsheet.fluid.state.FluidResult`
* :func:`fluid_of`  tag -> the fluid alone, for :func:`states`
* :func:`settle`  what was left unverified about a phase, found in a process of its own
* :func:`states`  fluid and conditions -> states (what-if)
* :mod:`specsheet.fluid.names`, :mod:`specsheet.fluid.solutes`  by name, for form and messages

Each kind of fluid is one module of ``backends``. Importing this package loads neither numpy nor
the fluid library: both wait until a state is asked for.
"""

from __future__ import annotations

from collections.abc import Sequence
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from specsheet.fluid.build_liquids import Built
    from specsheet.fluid.evaluate import Outcome
    from specsheet.fluid.model import Condition, Fluid
    from specsheet.fluid.state import FluidResult
    from specsheet.tag import Tag

__all__ = ["derive", "fluid_of", "settle", "states"]


def derive(tag: Tag) -> FluidResult:
    """Return the fluid of a tag at every point and base; what is wrong is a finding."""
    from specsheet.fluid.result import derive as run

    return run(tag)


def fluid_of(tag: Tag) -> Built:
    """Return the fluid that a tag states, or the findings that say why there is none."""
    from specsheet.fluid.build import fluid_of as run

    return run(tag)


def states(fluid: Fluid, conditions: Sequence[Condition]) -> tuple[Outcome, ...]:
    """Return the states of a fluid at any conditions, in their order."""
    from specsheet.fluid.evaluate import states as run

    return run(fluid, conditions)


def settle(tag: Tag, seconds: float = 10.0) -> bool:
    """Settle an unverified phase within a time; tell whether :func:`derive` knows more now."""
    from specsheet.fluid.result import settle as run

    return run(tag, seconds)
