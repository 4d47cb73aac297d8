"""The form in the terminal. Thin: everything it shows is derived elsewhere; its state is plain.

* :func:`run` opens it
* :mod:`specsheet.tui.session`   what is edited, without a terminal
* :mod:`specsheet.tui.evaluator` the worker process beside it
* :mod:`specsheet.tui.compat`    what is done against the grain of the terminal library
"""

from __future__ import annotations

from pathlib import Path


def run(path: str | Path | None = None) -> int:
    """Open a tag file, the folder of a job, or the list of the current folder.

    Returns:
        The exit status: 0 after an orderly end, 2 where there is no terminal for the form or
        nothing at ``path``, 128 + number after a signal, 1 after a mistake of the program.
    """
    import gc

    from specsheet.tui.terminal import objection, tell

    place = Path.cwd() if path is None else Path(path)
    trouble = objection(place)
    if trouble:
        tell(trouble)
        return 2
    gc.disable()  # nothing that a start makes is garbage; on again behind the first screen
    from specsheet.tui.app import FormApp

    app = FormApp(place)
    result = app.run()
    code = app.return_code if result is None else result
    if code:
        tell("Unsaved edits, if any, are kept: open the file again to recover them.")
    return code or 0
