"""The sample sheets and the pictures in output/sample/, made from the embedded job."""

from __future__ import annotations

import asyncio
import re
import tempfile
from pathlib import Path

from cli_process import DEMO, demo_job
from house import ROOT

from specsheet import sheet, tagfile
from specsheet.evaluate import evaluate
from specsheet.render import pdf

FOLDER = ROOT / "output" / "sample"
#: tags whose sheets are kept: steam through a plate, one not to be bought, gas through a Coriolis
SHEETS = ("FT-2104", "FT-2305", "FT-3410")
FORM = FOLDER / "form.png"
_SIZE = (152, 40)
_FONT = "JetBrains Mono"


def sheet_bytes(tag: str) -> bytes:
    """Return the printed sheet of a tag of the embedded job."""
    reading = tagfile.load(DEMO / "tags" / f"{tag}.toml", tagfile.load_job(DEMO / "job.toml"))
    assert reading.tag is not None
    return pdf.to_bytes(sheet.build(evaluate(reading.tag)))


def print_sheets() -> None:
    """Write the sample sheets."""
    FOLDER.mkdir(parents=True, exist_ok=True)
    for tag in SHEETS:
        (FOLDER / f"{tag}.pdf").write_bytes(sheet_bytes(tag))


def draw_sheets() -> None:
    """Write the first page of each sample sheet as a picture."""
    import pypdfium2

    for tag in SHEETS:
        page = pypdfium2.PdfDocument(FOLDER / f"{tag}.pdf")[0]
        page.render(scale=1.6).to_pil().quantize(64).save(FOLDER / f"{tag}.png", optimize=True)


def draw_form() -> None:
    """Write a picture of the form with a tag open."""
    import fontpkg
    import resvg_py

    with tempfile.TemporaryDirectory() as folder:
        job = demo_job(Path(folder))
        svg = asyncio.run(_screen(job / "tags" / "FT-2104.toml"))
    svg = re.sub(r"@font-face\s*\{.*?\}", "", svg, flags=re.DOTALL)
    svg = re.sub(r"font-family:[^;]+;", f"font-family: {_FONT};", svg)
    fonts = [str(fontpkg.path(_FONT))]
    FORM.write_bytes(resvg_py.svg_to_bytes(svg_string=svg, font_files=fonts, zoom=1))


async def _screen(path: Path) -> str:
    """Open a tag as a user would, wait until everything is derived, and return the screen."""
    from specsheet.tui.app import FormApp
    from specsheet.tui.form_screen import FormScreen

    app = FormApp(path)
    async with app.run_test(size=_SIZE) as pilot:
        for _ in range(600):
            await asyncio.sleep(0.05)
            if isinstance(app.screen, FormScreen) and app.screen.frame.sheet is not None:
                break
        await pilot.press("pagedown", "pagedown")  # to the operating points
        await asyncio.sleep(1.0)
        await pilot.pause()
        return app.export_screenshot(title=f"specsheet form {path.name}")
