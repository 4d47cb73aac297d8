"""The pipeline: a tag in, its evaluation out. Every front end calls :func:`evaluate`.

* :mod:`specsheet.evaluate.prepare`  what every family shares on one tag
* :mod:`specsheet.evaluate.judge`    the findings, with all that they rest on as arrays
* :mod:`specsheet.evaluate.service`  what the service rules out, whatever the size
* :mod:`specsheet.evaluate.remarks`  what usual practice says of a family in a service
* :mod:`specsheet.evaluate.state`    where phase and flange rating flip
* :mod:`specsheet.evaluate.by_limits` a family of which only the profile is known
* :mod:`specsheet.evaluate.flows`    the stated flow as mass flow
* :mod:`specsheet.evaluate.stream`   operating points as arrays
* :mod:`specsheet.evaluate.model`    the meter as one function of the stream
* :mod:`specsheet.evaluate.limits`   which limits apply
* :mod:`specsheet.evaluate.grid`     flows to look at, and crossings read off them
* :mod:`specsheet.evaluate.reserve`  where a verdict flips
* :mod:`specsheet.evaluate.checks`   checks, findings and bands
* :mod:`specsheet.evaluate.summary`  turndown and cost
* :mod:`specsheet.evaluate.candidates` families held against one tag
* :mod:`specsheet.evaluate.shortlist` every family held against one tag, ranked
* :mod:`specsheet.evaluate.whatif`   the verdict against one figure
* :mod:`specsheet.evaluate.measured` the flow from a measured signal
* :mod:`specsheet.evaluate.signals`  which signal a measured figure is
* :mod:`specsheet.evaluate.settled`  the same with patience for an undecided phase
* :mod:`specsheet.evaluate.assemble` arrays to results with origin and source
"""

from specsheet.evaluate.pipeline import evaluate
from specsheet.evaluate.result import Evaluation
from specsheet.evaluate.settled import evaluate_settled, findings_settled, unsettled

__all__ = ["Evaluation", "evaluate", "evaluate_settled", "findings_settled", "unsettled"]
