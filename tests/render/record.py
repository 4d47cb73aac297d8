"""Record the golden files again: ``python -m tests.render.record``. Read the difference after."""

from __future__ import annotations

from pathlib import Path

from specsheet import sheet
from specsheet.render import json, text
from tests.sheet import samples

FOLDER = Path(__file__).parent / "golden"


def main() -> None:
    """Write both golden files."""
    held = samples.evaluation()
    FOLDER.mkdir(exist_ok=True)
    (FOLDER / "sheet.json").write_text(json.text(held), encoding="utf-8")
    (FOLDER / "sheet.txt").write_text(text.text(sheet.build(held)), encoding="utf-8")


if __name__ == "__main__":
    main()
