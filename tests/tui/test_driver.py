"""The driver's file outlives its reader: Textual's writing thread must never end by an error."""

from __future__ import annotations

import os
import sys
import threading

import pytest
from textual.drivers._writer_thread import MAX_QUEUED_WRITES, WriterThread

if sys.platform == "win32":
    pytest.skip("needs a POSIX terminal", allow_module_level=True)

from specsheet.tui.driver import Outlet


def test_writing_goes_on_where_nobody_reads_any_more() -> None:
    reader, writer = os.pipe()
    os.close(reader)
    thread = WriterThread(Outlet(os.fdopen(writer, "w")))  # type: ignore[arg-type]
    thread.start()

    def draw() -> None:
        for _ in range(2 * MAX_QUEUED_WRITES):
            thread.write("a row of the screen" * 1000)
        thread.stop()

    drawing = threading.Thread(target=draw, daemon=True)
    drawing.start()
    drawing.join(20.0)
    assert not drawing.is_alive(), "the program waits for ever"
