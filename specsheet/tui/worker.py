"""The worker: one process beside the form that derives and prints, so that no key ever waits.

``python -m specsheet.tui.worker`` reads requests on standard input and answers on standard output
(:mod:`specsheet.tui.protocol`) until its input ends.
"""

from __future__ import annotations

import os
import signal
import sys
from pathlib import Path
from typing import Any, BinaryIO

from specsheet.tui.protocol import (
    Answer,
    Compare,
    Derive,
    Derived,
    Failed,
    Print,
    Printed,
    Suppose,
    Trouble,
    frame,
)
from specsheet.tui.protocol import receive as receive_from


def answer(request: Any) -> Answer:
    """Answer one request; a mistake of ours becomes a message and never ends the worker."""
    try:
        if isinstance(request, Derive):
            return _sheet(request, settle=request.settle)
        if isinstance(request, Compare | Suppose):
            from specsheet.tui import questions

            return questions.answer(request)
        return _print(request)
    except Exception as error:
        return Failed(request.number, f"{type(error).__name__}: {error}")


def _sheet(request: Derive | Print, *, settle: bool) -> Derived:
    from specsheet import evaluate, sheet, tagfile

    job = tagfile.find_job(request.path)
    reading = tagfile.loads(request.text, request.path, job)
    problems = (*reading.problems, *job.problems)
    if reading.tag is not None:  # what is in the file and unusable is among the sheet's findings
        problems = tuple(problem for problem in problems if problem.lacking)
    troubles = tuple(Trouble(problem.field, problem.message) for problem in problems)
    if reading.tag is None:
        return Derived(request.number, None, troubles)
    run = evaluate.evaluate_settled if settle else evaluate.evaluate
    evaluation = run(reading.tag)
    unsettled = not settle and evaluate.unsettled(evaluation)
    made = sheet.build(evaluation, annexed=isinstance(request, Print))
    return Derived(request.number, made, troubles, unsettled)


def _print(request: Print) -> Answer:
    from specsheet.render import pdf

    derived = _sheet(request, settle=True)
    if derived.sheet is None:
        reasons = "; ".join(f"{item.field}: {item.message}" for item in derived.troubles)
        return Failed(request.number, f"nothing to print: {reasons}")
    target = Path(request.folder) / pdf.file_name(derived.sheet.tag)
    try:
        pdf.write(derived.sheet, target)
    except pdf.WriteError as problem:
        return Failed(request.number, str(problem))
    return Printed(request.number, str(target))


def serve(source: BinaryIO, sink: BinaryIO) -> None:
    """Answer requests until the source ends."""
    while (request := receive_from(source)) is not None:
        sink.write(frame(answer(request)))
        sink.flush()


def main() -> None:
    """Run the worker on the process's own streams."""
    signal.signal(signal.SIGINT, signal.SIG_IGN)  # ctrl+c in the terminal is for the form
    sink = os.fdopen(os.dup(1), "wb")
    os.dup2(2, 1)  # whatever a library prints must not fall into the answers
    try:
        serve(sys.stdin.buffer, sink)
    except BrokenPipeError:
        os._exit(0)  # the form is gone


if __name__ == "__main__":
    main()
