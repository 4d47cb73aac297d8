"""Text -> TOML data, or the problem that prevents it; and which schema the data are of."""

from __future__ import annotations

import re
from collections.abc import Mapping
from typing import Any

import tomli

from specsheet.tagfile.migrate import CURRENT
from specsheet.tagfile.problem import WHOLE_FILE, Problem
from specsheet.tagfile.source import BOM
from specsheet.tagfile.words import Number

_AT_LINE = re.compile(r" \(at line (\d+), column (\d+)\)$")


def parse(text: str, path: str) -> dict[str, Any] | Problem:
    """Return the TOML data of a text, its floats remembering how they were typed."""
    try:
        return tomli.loads(text.removeprefix(BOM), parse_float=Number)
    except tomli.TOMLDecodeError as error:
        return _syntax(str(error), text, path)
    except RecursionError:
        return Problem(path, 1, WHOLE_FILE, "tables or lists stand too deep inside one another")
    except ValueError as error:  # a whole number of thousands of digits
        return Problem(path, 1, WHOLE_FILE, f"is not valid TOML: {error}")


def _syntax(message: str, text: str, path: str) -> Problem:
    place = _AT_LINE.search(message)
    line = int(place[1]) if place else text.rstrip("\r\n").count("\n") + 1
    where = f", column {place[2]}" if place else ""
    said = _AT_LINE.sub("", message).replace(" (at end of document)", "")
    return Problem(
        path,
        line,
        WHOLE_FILE,
        f"is not valid TOML{where}: {said}; "
        'texts and quantities stand in double quotes, as in flow = "3.1 t/h"',
    )


def schema_of(data: Mapping[str, Any]) -> int:
    """Return the schema a file names; the current one where it names none that can be one."""
    schema = data.get("schema")
    whole = isinstance(schema, int) and not isinstance(schema, bool)
    return schema if whole and schema >= 0 else CURRENT  # type: ignore[return-value, operator]


def newer(text: str, path: str, schema: int) -> Problem:
    """Return the problem of a file that a newer version wrote."""
    from specsheet.tagfile.collect import Collector  # parsing does without all that it needs

    collector = Collector(text, path, {})
    message = (
        f"the file is of schema {schema}, this version reads up to {CURRENT}; "
        "install a newer specsheet"
    )
    collector.add(("schema",), "schema", message)
    return collector.problems()[0]
