"""The worker and its line: a real process, crashes, stale answers."""

from __future__ import annotations

import asyncio
import io
import os
import subprocess
import sys
from pathlib import Path

import pytest

from specsheet.tui.evaluator import COMMAND, WorkerEvaluator
from specsheet.tui.protocol import (
    Answer,
    Derive,
    Derived,
    Failed,
    Print,
    Printed,
    frame,
    receive,
)
from specsheet.tui.worker import answer, serve
from tests.tui.conftest import TAG, run

#: a worker that crashes on the text "crash", hangs on "hang" and else answers with the number
_FAKE = """
import os, sys, time
from specsheet.tui.protocol import Derived, Trouble, frame, receive
out = os.fdopen(os.dup(1), "wb")
while (request := receive(sys.stdin.buffer)) is not None:
    if request.text == "crash":
        os._exit(1)
    if request.text == "hang":
        time.sleep(60)
    if request.text == "slow":
        time.sleep(0.3)
    out.write(frame(Derived(request.number, None, (Trouble(request.text, str(os.getpid())),))))
    out.flush()
"""
FAKE = (sys.executable, "-c", _FAKE)


def test_a_message_survives_its_frame() -> None:
    message = Derive(7, "text", "path")
    assert receive(io.BytesIO(frame(message))) == message


@pytest.mark.parametrize("cut", [0, 2, 10])
def test_a_line_that_ends_early_is_the_end(cut: int) -> None:
    assert receive(io.BytesIO(frame(Derive(7, "text", "path"))[:cut])) is None


def test_requests_are_answered_in_order(tag_file: Path) -> None:
    source = io.BytesIO(frame(Derive(1, TAG, str(tag_file))) + frame(Derive(2, "a = ", "")))
    sink = io.BytesIO()
    serve(source, sink)
    sink.seek(0)
    first, second = receive(sink), receive(sink)
    assert isinstance(first, Derived)
    assert first.sheet is not None
    assert first.sheet.tag == "FT-1001"
    assert isinstance(second, Derived)
    assert second.sheet is None
    assert second.troubles


def test_a_mistake_of_ours_is_a_message(monkeypatch: pytest.MonkeyPatch) -> None:
    from specsheet import tagfile

    def broken(*_: object) -> None:
        raise ZeroDivisionError("division by zero")

    monkeypatch.setattr(tagfile, "loads", broken)
    assert answer(Derive(3, TAG, "")) == Failed(3, "ZeroDivisionError: division by zero")


def test_printing_writes_the_pdf(tag_file: Path) -> None:
    folder = tag_file.parent / "output"
    found = answer(Print(4, TAG, str(tag_file), str(folder)))
    assert found == Printed(4, str(folder / "FT-1001.pdf"))
    assert (folder / "FT-1001.pdf").read_bytes().startswith(b"%PDF")


def test_printing_where_nothing_can_be_written_says_so(tag_file: Path) -> None:
    found = answer(Print(4, TAG, str(tag_file), str(tag_file / "output")))
    assert isinstance(found, Failed)
    assert "not saved" in found.message


def test_the_real_process_derives_and_ends_with_its_input(tag_file: Path) -> None:
    done = subprocess.run(
        COMMAND, input=frame(Derive(1, TAG, str(tag_file))), capture_output=True, timeout=60
    )
    found = receive(io.BytesIO(done.stdout))
    assert isinstance(found, Derived)
    assert found.sheet is not None
    assert done.returncode == 0


async def collect(evaluator: WorkerEvaluator, count: int) -> list[Answer]:
    """Wait for so many answers."""
    found: list[Answer] = []
    arrived = asyncio.Event()

    def take(given: Answer) -> None:
        found.append(given)
        arrived.set()

    evaluator.listen(take)
    async with asyncio.timeout(30):
        while len(found) < count:
            await arrived.wait()
            arrived.clear()
    return found


def told(found: Answer) -> tuple[str, str]:
    assert isinstance(found, Derived)
    return found.troubles[0].field, found.troubles[0].message


def test_only_the_newest_text_is_answered() -> None:
    async def main() -> None:
        evaluator = WorkerEvaluator(FAKE)
        evaluator.derive("slow", "")
        await asyncio.sleep(0.2)
        for text in ("one", "two", "three"):
            evaluator.derive(text, "")
        found = await collect(evaluator, 1)
        await asyncio.sleep(0.2)
        await evaluator.close()
        assert [told(item)[0] for item in found] == ["three"]

    run(main)


def test_one_process_serves_all_requests() -> None:
    async def main() -> None:
        evaluator = WorkerEvaluator(FAKE)
        evaluator.derive("one", "")
        first = await collect(evaluator, 1)
        evaluator.derive("two", "")
        second = await collect(evaluator, 1)
        await evaluator.close()
        assert told(first[0])[1] == told(second[0])[1]

    run(main)


def test_a_crash_is_told_and_the_next_text_is_derived_again() -> None:
    async def main() -> None:
        evaluator = WorkerEvaluator(FAKE)
        evaluator.derive("crash", "")
        (first,) = await collect(evaluator, 1)
        assert isinstance(first, Failed)
        assert "edits are safe" in first.message
        evaluator.derive("one", "")
        (second,) = await collect(evaluator, 1)
        assert told(second)[0] == "one"
        await evaluator.close()

    run(main)


def test_a_crash_once_is_not_even_seen(tmp_path: Path) -> None:
    mark = tmp_path / "crashed"
    code = (
        f"import os, pathlib\nmark = pathlib.Path({str(mark)!r})\n"
        "if not mark.exists():\n    mark.write_text('')\n    os._exit(1)\n"
    )

    async def main() -> None:
        evaluator = WorkerEvaluator((sys.executable, "-c", code + _FAKE))
        evaluator.derive("one", "")
        (found,) = await collect(evaluator, 1)
        await evaluator.close()
        assert told(found)[0] == "one"

    run(main)


def test_a_worker_that_hangs_counts_as_crashed() -> None:
    async def main() -> None:
        evaluator = WorkerEvaluator(FAKE, patience=0.5)
        evaluator.derive("hang", "")
        (found,) = await collect(evaluator, 1)
        await evaluator.close()
        assert isinstance(found, Failed)

    run(main)


def test_a_worker_that_cannot_start_is_told_of() -> None:
    async def main() -> None:
        evaluator = WorkerEvaluator(("/nonexistent/python",))
        evaluator.derive("one", "")
        (found,) = await collect(evaluator, 1)
        await evaluator.close()
        assert isinstance(found, Failed)

    run(main)


def test_closing_ends_the_process() -> None:
    async def main() -> None:
        evaluator = WorkerEvaluator(FAKE)
        evaluator.derive("one", "")
        (found,) = await collect(evaluator, 1)
        await evaluator.close()
        with pytest.raises(ProcessLookupError):
            os.kill(int(told(found)[1]), 0)

    run(main)


#: a worker that leaves every phase open at first, and says with what patience it was asked
_OPEN = """
import os, sys
from specsheet.tui.protocol import Derived, Trouble, frame, receive
out = os.fdopen(os.dup(1), "wb")
while (request := receive(sys.stdin.buffer)) is not None:
    asked = (Trouble(request.text, str(request.settle)),)
    out.write(frame(Derived(request.number, None, asked, unsettled=not request.settle)))
    out.flush()
"""


def test_an_open_phase_is_asked_for_again_with_patience() -> None:
    answers: list[Answer] = []

    async def scene() -> None:
        evaluator = WorkerEvaluator((sys.executable, "-c", _OPEN))
        evaluator.listen(answers.append)
        evaluator.derive("text", "")
        while len(answers) < 2:
            await asyncio.sleep(0.01)
        await evaluator.close()

    run(scene)
    patience = [item.troubles[0].message for item in answers if isinstance(item, Derived)]
    assert patience == ["False", "True"]
