"""Another meter family for the same tag: in the typed tag, and in the text of its file."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, replace

from specsheet import packs
from specsheet.quantity.value import Refusal
from specsheet.tag import Tag, Value
from specsheet.tagfile.document import Document, EditError
from specsheet.tagfile.known import family_entries, tag_defaults
from specsheet.tagfile.source import BOM
from specsheet.tagfile.spans import Place, scan
from specsheet.tagfile.syntax import parse
from specsheet.tagfile.values import from_toml

_METER = "meter"
_PREFIX = "meter."


@dataclass(frozen=True, slots=True)
class Adoption:
    """A tag file with another family.

    Attributes:
        text: the file; what the new family does not know stands behind a "#".
        dropped: the lines put behind a "#", as they stood ("bore = ...").
    """

    text: str
    dropped: tuple[str, ...]


def with_family(tag: Tag, key: str) -> Tag:
    """Return the tag as one of another family: its process data, and nothing of the old meter.

    Raises:
        KeyError: there is no such family.
    """
    defaults = tag_defaults(packs.profile(key).key).values
    own = {path: value for path, value in defaults.items() if path.startswith(_PREFIX)}
    return replace(
        tag,
        given={**_without_meter(tag.given), "family": key},
        assumed={**_without_meter(tag.assumed), **own},
    )


def _without_meter(values: Mapping[str, Value]) -> dict[str, Value]:
    return {path: value for path, value in values.items() if not path.startswith(_PREFIX)}


def adopt(text: str, key: str) -> Adoption:
    """Return the text of a tag file with another family.

    What stands under ``[meter]`` and the new family does not know, or does not take, is put behind
    a "#" and named; every other line stays as it is.

    Raises:
        KeyError: there is no such family.
        EditError: the text is no TOML, or ``meter`` is written as one line in braces.
    """
    packs.profile(key)
    document = Document(text)
    commented, dropped = _commented(document.text(), key)
    document = Document(commented)
    document.set("family", key)
    return Adoption(document.text(), dropped)


def _commented(text: str, key: str) -> tuple[str, tuple[str, ...]]:
    data = parse(text.removeprefix(BOM), "")
    meter = data.get(_METER, {}) if isinstance(data, dict) else {}
    entries = {entry.key: entry for entry in family_entries(key)}
    unknown = [
        name
        for name, value in meter.items()
        if name not in entries or isinstance(from_toml(entries[name], value), Refusal)
    ]
    dropped: list[str] = []
    for name in unknown:
        text, line = _behind_hash(text, (_METER, name))
        dropped.append(line)
    return text, tuple(dropped)


def _behind_hash(text: str, place: Place) -> tuple[str, str]:
    """Return the text with one statement behind a "#", and the statement as it stood."""
    mark = BOM if text.startswith(BOM) else ""
    body = text.removeprefix(mark)
    statement = next(
        (item for item in scan(body).statements if item.place == place and not item.header), None
    )
    if statement is None:
        raise EditError(
            "meter is written as one line in braces; write it as a section [meter] first, one "
            "entry a line"
        )
    lines = body[statement.start : statement.end].splitlines(keepends=True)
    behind = "".join(f"# {line}" for line in lines)
    return mark + body[: statement.start] + behind + body[statement.end :], "".join(lines).strip()
