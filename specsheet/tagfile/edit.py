"""Edits of a TOML text that leave every other character as it is.

Each function takes a text and returns a text. Nothing is rendered anew: a value is replaced
between its own first and last character, a new line goes below its neighbours, a removed line
takes nothing but itself along. (A document model that re-renders tables moves comments and blank
lines; a scan and a splice cannot.)
"""

from __future__ import annotations

import re
from collections.abc import Sequence

from specsheet.tagfile.literal import key_text, value_text
from specsheet.tagfile.spans import Place, Span, Spans, Statement, scan

_COMMENT_LINES = re.compile(r"(?:[ \t]*\#[^\n]*(?:\n|$))*")
_LINE_END = re.compile(r"[ \t]*(?:\r?\n)?")


def replace_value(text: str, place: Place, value: object) -> str:
    """Return the text with the value at ``place``, which must be there, replaced."""
    start, end = scan(text).values[place]
    return text[:start] + value_text(value, text[start:end]) + text[end:]


def rename_key(text: str, place: Place, key: str) -> str:
    """Return the text with the last key of the statement at ``place`` renamed."""
    statement = next(item for item in scan(text).statements if item.place == place)
    start, end = statement.key
    return text[:start] + key_text(key) + text[end:]


def insert_value(text: str, place: Place, value: object, order: Sequence[str]) -> str:
    """Return the text with a new entry at ``place``, where there is none yet.

    It goes into the inline table it belongs to, else below a comment that shows it
    (``# key = ...``), else below the last entry of its section; a section that is missing is
    added behind those that come before it in ``order``.
    """
    spans = scan(text)
    table, key = place[:-1], str(place[-1])
    if table in spans.values:
        return _into_inline(text, spans, table, f"{key_text(key)} = {value_text(value)}")
    siblings = [item for item in spans.statements if item.place[:-1] == table and not item.header]
    header = next((item for item in spans.statements if item.header and item.place == table), None)
    if siblings:
        dotted = (*table[len(siblings[-1].table) :], key)
        line = ".".join(key_text(str(part)) for part in dotted) + f" = {value_text(value)}"
        above = _shown_below(text, spans, siblings[-1].table, key) or siblings[-1].end
        return _insert_line(text, above, _indent(text, siblings[-1]) + line)
    line = f"{key_text(key)} = {value_text(value)}"
    if header or not table:
        top = header.end if header else sections(text, spans)[0][1][1]
        above = _shown_below(text, spans, table, key) or top
        return _insert_line(text, above, (_indent(text, header) if header else "") + line)
    if len(table) > 1:
        return insert_value(text, table, {key: value}, order)
    return insert_block(text, str(table[0]), f"[{key_text(str(table[0]))}]\n{line}\n", order)


def remove(text: str, place: Place) -> str:
    """Return the text without the entry at ``place``; a comment behind it stays, on its own."""
    spans = scan(text)
    statement = next((s for s in spans.statements if s.place == place and not s.header), None)
    if statement is None:
        return _out_of_inline(text, spans, place)
    comment = text[slice(*statement.comment)]
    start = text.rfind("\n", 0, statement.start) + 1
    kept = text[start : statement.start] + comment + _line_end(text, statement) if comment else ""
    return text[:start] + kept + text[statement.end :]


def insert_block(text: str, section: str, block: str, order: Sequence[str]) -> str:
    """Return the text with a whole section added, behind what comes before it in ``order``.

    A section that is there already (``[[points]]``) is followed by the new one; one that is not
    in ``order`` goes to the end.
    """
    later = order[order.index(section) + 1 :] if section in order else ()
    blocks = sections(text, scan(text))
    before = [span for place, span in blocks if not place or place[0] not in later]
    head = text[: before[-1][1]]
    if head and not head.endswith("\n"):
        head += "\n"
    return head + ("\n" if head else "") + block + text[before[-1][1] :]


def sections(text: str, spans: Spans) -> list[tuple[Place, Span]]:
    """Return the characters of each header's block, with the comment lines right above it.

    The blank lines between two blocks belong to neither. The first is the top of the file, with
    the place (); it may be empty.
    """
    headers = [item for item in spans.statements if item.header]
    starts = [_block_start(text, spans, header) for header in headers]
    places: list[Place] = [(), *(header.place for header in headers)]
    begins, ends = [0, *starts], [*starts, len(text)]
    return [
        (place, (begin, _last_line(text, begin, end)))
        for place, begin, end in zip(places, begins, ends, strict=True)
    ]


def block(text: str, place: Place) -> Span:
    """Return the characters of one header and all that stands under it.

    The comment lines right above and right below belong to it, a comment between blank lines
    behind it does not.
    """
    spans = scan(text)
    own = [item for item in spans.statements if item.table[: len(place)] == place]
    comments = _COMMENT_LINES.match(text, own[-1].end)
    return _block_start(text, spans, own[0]), comments.end() if comments else own[-1].end


def _last_line(text: str, begin: int, end: int) -> int:
    """Return the end of the last line of a block that is not blank."""
    stop = begin + len(text[begin:end].rstrip())
    rest = _LINE_END.match(text, stop, end)
    return rest.end() if rest and stop > begin else begin


def _block_start(text: str, spans: Spans, header: Statement) -> int:
    """Return the start of a header's line, or of the comment lines right above it.

    Comment lines that follow an entry without a blank line between belong to that entry.
    """
    floor = max((item.end for item in spans.statements if item.end <= header.start), default=0)
    line = text.rfind("\n", 0, header.start) + 1
    start = line
    while start > floor:
        above = text.rfind("\n", 0, start - 1) + 1
        if not text[above:start].lstrip().startswith("#"):
            return start
        start = max(above, floor)
    return start if floor == 0 else line


def _shown_below(text: str, spans: Spans, table: Place, key: str) -> int:
    """Return the end of the comment line that shows an entry in a section, or 0."""
    begin, end = next((span for place, span in sections(text, spans) if place == table), (0, 0))
    shown = re.compile(rf"^[ \t]*#[ \t]*{re.escape(key)}[ \t]*=.*(?:\n|$)", re.MULTILINE)
    match = shown.search(text, begin, end)
    return match.end() if match and _in_comment(spans, match.start()) else 0


def _in_comment(spans: Spans, position: int) -> bool:
    return not any(item.value[0] <= position < item.value[1] for item in spans.statements)


def _insert_line(text: str, position: int, line: str) -> str:
    head, tail = text[:position], text[position:]
    if head and not head.endswith("\n"):
        return f"{head}\n{line}{tail}"
    return f"{head}{line}\n{tail}"


def _indent(text: str, statement: Statement) -> str:
    return text[text.rfind("\n", 0, statement.start) + 1 : statement.start]


def _line_end(text: str, statement: Statement) -> str:
    line = text[statement.start : statement.end]
    return line[len(line.rstrip("\r\n")) :]


def _into_inline(text: str, spans: Spans, table: Place, pair: str) -> str:
    start, end = spans.values[table]
    if text[start] != "{":
        raise KeyError(table)
    inside = text[start + 1 : end - 1].rstrip()
    opened = f"{inside.rstrip(',')}, {pair}" if inside.strip() else f" {pair}"
    return f"{text[: start + 1]}{opened} {text[end - 1 :]}"


def _out_of_inline(text: str, spans: Spans, place: Place) -> str:
    """Return the text without one pair of an inline table; a table left empty goes as well."""
    table = next(place[:n] for n in range(len(place) - 1, 0, -1) if place[:n] in spans.values)
    start, end = spans.values[table]
    if text[start] != "{":
        raise KeyError(place)
    inner = [p for p in spans.values if p[: len(table)] == table and len(p) > len(table)]
    pairs = [p for p in inner if not any(p[:n] in inner for n in range(len(table) + 1, len(p)))]
    if pairs == [place]:
        return remove(text, table)
    index = pairs.index(place)
    if index:
        cut = (spans.values[pairs[index - 1]][1], spans.values[place][1])
        return text[: cut[0]] + text[cut[1] :]
    following = spans.values[place][1]
    comma = text.index(",", following)
    return text[: start + 1] + " " + text[comma + 1 : end].lstrip() + text[end:]
