"""Questions that the worker answers beside deriving: which family fits, and what if.

Neither touches the file: both work on the text as it stands in the form.
"""

from __future__ import annotations

from collections.abc import Iterator
from itertools import chain

from specsheet import evaluate, sheet, tagfile
from specsheet.evaluate import whatif
from specsheet.evaluate.shortlist import shortlist
from specsheet.render import shortlist as families
from specsheet.render import whatif as table
from specsheet.sheet.difference import Change, diff
from specsheet.tui.protocol import Answer, Compare, Compared, Failed, Fit, Suppose, Supposed

_STEPS = 9
_WIDTHS = (34, 30)


def answer(request: Compare | Suppose) -> Answer:
    """Answer a question about a tag file's text."""
    try:
        return _compare(request) if isinstance(request, Compare) else _suppose(request)
    except tagfile.EditError as error:
        return Failed(request.number, str(error))


def _compare(request: Compare) -> Answer:
    reading = tagfile.loads(request.text, request.path, tagfile.find_job(request.path))
    if reading.tag is None:
        return Failed(request.number, "the tag cannot be read")
    found = shortlist(reading.tag)
    fits = tuple(
        Fit(item.profile.key, row, families.details(item))
        for item, row in zip(found.candidates, families.rows(found), strict=True)
    )
    return Compared(request.number, fits)


def _suppose(request: Suppose) -> Supposed:
    job = tagfile.find_job(request.path)
    if request.last:
        return Supposed(request.number, _trials(request, job))
    pair = []
    for changes in ((), ((request.entry, request.first),)):
        tag = tagfile.suppose(request.text, changes, request.path, job).tag
        assert tag is not None  # a text that parses gives a tag
        pair.append(sheet.build(evaluate.evaluate(tag), annexed=False))
    before, after = pair
    lines = [f"Verdict now:     {before.verdict}", f"Verdict what-if: {after.verdict}", ""]
    return Supposed(request.number, (*lines, *_changes(diff(before, after))))


def _trials(request: Suppose, job: tagfile.Job) -> tuple[str, ...]:
    reading = tagfile.loads(request.text, request.path, job)
    assert reading.tag is not None
    family, entry = reading.tag.family, request.entry
    values = whatif.values_between(family, entry, request.first, request.last, _STEPS)
    trials = whatif.vary(request.text, entry, values, file=request.path, job=job)
    return tuple(table.text(reading.tag, entry, trials).splitlines())


def _changes(found: tuple[Change, ...]) -> Iterator[str]:
    """Yield findings that come and go, then the values that change, one a line."""
    said = [item for item in found if item.section == "Findings"]
    come = (f"comes  {item.after}" for item in said if item.after and not item.before)
    gone = (f"goes   {item.before}" for item in said if item.before and not item.after)
    other = (f"now    {item.after}" for item in said if item.before and item.after)
    yield from chain(come, gone, other)
    yield ""
    for item in found:
        if item.section in ("Findings", "Head", "Cautions", "Remarks"):
            continue
        label = f"{item.label}, {item.column}" if item.column else item.label
        yield f"{label:<{_WIDTHS[0]}} {item.before or '-':>{_WIDTHS[1]}}  ->  {item.after or '-'}"
    if not found:
        yield "Nothing changes."
