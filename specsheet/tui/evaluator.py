"""The form's end of the worker: one process, one request at a time, the newest text wins."""

from __future__ import annotations

import asyncio
import contextlib
import sys
from collections.abc import Callable
from dataclasses import replace
from typing import TYPE_CHECKING, Protocol

from specsheet.tui.late import late

if TYPE_CHECKING:
    from specsheet.tui import protocol
else:
    protocol = late("specsheet.tui.protocol")

COMMAND = (sys.executable, "-m", "specsheet.tui.worker")

#: a request that takes longer than this [s] counts as a crash
PATIENCE = 60.0

#: how often one request is sent before the form is told that it cannot be answered
ATTEMPTS = 2


class Evaluator(Protocol):
    """What the form needs of an evaluator; tests put in their own."""

    def listen(self, listener: Callable[[protocol.Answer], None]) -> None:
        """Hand every answer that is not stale to ``listener``, in the form's own loop."""

    def derive(self, text: str, path: str) -> None:
        """Ask for the sheet of a text; an older request that waits is dropped."""

    def print(self, text: str, path: str, folder: str) -> int:
        """Ask for a PDF in a folder; return the number of the request."""

    def compare(self, text: str, path: str) -> int:
        """Ask how every family suits a text; return the number of the request."""

    def suppose(self, text: str, path: str, entry: str, first: str, last: str = "") -> int:
        """Ask what would be if an entry held another value; return the number of the request."""

    async def close(self) -> None:
        """End the worker."""


class WorkerEvaluator:
    """An evaluator in a process of its own."""

    def __init__(self, command: tuple[str, ...] = COMMAND, patience: float = PATIENCE) -> None:
        self._command = command
        self._patience = patience
        self._listener: Callable[[protocol.Answer], None] = lambda _: None
        self._number = 0
        self._newest = 0
        self._waiting: list[protocol.Request] = []
        self._process: asyncio.subprocess.Process | None = None
        self._task: asyncio.Task[None] | None = None

    def listen(self, listener: Callable[[protocol.Answer], None]) -> None:
        """Hand every answer that is not stale to ``listener``."""
        self._listener = listener

    def derive(self, text: str, path: str) -> None:
        """Ask for the sheet of a text; an older request that waits is dropped."""
        self._number += 1
        self._newest = self._number
        self._waiting = [item for item in self._waiting if not isinstance(item, protocol.Derive)]
        self._ask(protocol.Derive(self._number, text, path))

    def print(self, text: str, path: str, folder: str) -> int:
        """Ask for a PDF in a folder; whatever was asked for goes before deriving."""
        self._number += 1
        self._ask(protocol.Print(self._number, text, path, folder))
        return self._number

    def compare(self, text: str, path: str) -> int:
        """Ask how every family suits a text."""
        self._number += 1
        self._ask(protocol.Compare(self._number, text, path))
        return self._number

    def suppose(self, text: str, path: str, entry: str, first: str, last: str = "") -> int:
        """Ask what would be if an entry held another value."""
        self._number += 1
        self._ask(protocol.Suppose(self._number, text, path, entry, first, last))
        return self._number

    async def close(self) -> None:
        """End the worker."""
        if self._task is not None:
            self._task.cancel()
            with contextlib.suppress(asyncio.CancelledError):
                await self._task
        await self._stop()

    def _ask(self, request: protocol.Request) -> None:
        self._waiting.append(request)
        if self._task is None or self._task.done():
            self._task = asyncio.get_running_loop().create_task(self._work())

    async def _work(self) -> None:
        while self._waiting:
            self._waiting.sort(key=lambda item: isinstance(item, protocol.Derive))
            request = self._waiting.pop(0)
            answer = await self._answer(request)
            stale = isinstance(request, protocol.Derive) and request.number != self._newest
            if not stale:
                self._listener(answer)
                self._settle(request, answer)

    def _settle(self, request: protocol.Request, answer: protocol.Answer) -> None:
        """Ask again where the answer left a phase open and nothing newer waits."""
        if (
            isinstance(request, protocol.Derive)
            and isinstance(answer, protocol.Derived)
            and answer.unsettled
            and not self._waiting
        ):
            self._ask(replace(request, settle=True))

    async def _answer(self, request: protocol.Request) -> protocol.Answer:
        for _ in range(ATTEMPTS):
            try:
                async with asyncio.timeout(self._patience):
                    return await self._exchange(request)
            except (OSError, EOFError, asyncio.IncompleteReadError, TimeoutError):
                await self._stop()
        return protocol.Failed(
            request.number, "the calculation stopped twice on this tag; your edits are safe"
        )

    async def _exchange(self, request: protocol.Request) -> protocol.Answer:
        process = self._process
        if process is None:
            process = await asyncio.create_subprocess_exec(
                *self._command,
                stdin=asyncio.subprocess.PIPE,
                stdout=asyncio.subprocess.PIPE,
                stderr=asyncio.subprocess.DEVNULL,
            )
            self._process = process
        assert process.stdin is not None
        assert process.stdout is not None
        process.stdin.write(protocol.frame(request))
        await process.stdin.drain()
        (size,) = protocol.HEADER.unpack(await process.stdout.readexactly(protocol.HEADER.size))
        answer: protocol.Answer = protocol.unpack(await process.stdout.readexactly(size))
        return answer

    async def _stop(self) -> None:
        process, self._process = self._process, None
        if process is None:
            return
        with contextlib.suppress(ProcessLookupError):
            process.kill()
        await process.wait()
