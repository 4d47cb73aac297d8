"""Entries: everything a user may state about a tag, section by section.

The entries of one meter family stand in its profile (``profiles/families/<key>.toml``, table
``entries``), read by :mod:`specsheet.packs` into the same :class:`Entry`.
"""

from __future__ import annotations

from specsheet.fields.entry import Entry, Section
from specsheet.fields.fluid_entries import FLUID
from specsheet.fields.line_entries import DESIGN, LINE, POINTS
from specsheet.fields.require_entries import REQUIRE

SECTIONS = (
    Section("", "Tag", "What the tag is called and where its documents stand."),
    Section("fluid", "Fluid", "What flows, and in which phase."),
    Section("line", "Line", "The pipe the meter goes into."),
    Section("points", "Operating points", "Flow, pressure and temperature, case by case."),
    Section("design", "Design", "The conditions that the parts under pressure must bear."),
    Section("meter", "Meter", "Choices that belong to the meter family."),
    Section("require", "Requirements", "What the purchase demands."),
    Section("revisions", "Revisions", "The history of the document."),
)

_ALWAYS = "always"

TAG: tuple[Entry, ...] = (
    Entry("schema", "Schema", "integer", "Version of the file format.", "1", needed=_ALWAYS),
    Entry("tag", "Tag", "text", "Tag number of the instrument.", "FT-2104", needed=_ALWAYS),
    Entry("service", "Service", "text", "What the line does, in a few words.", "Steam to heater"),
    Entry("family", "Family", "text", "Key of the meter family.", "vortex", needed=_ALWAYS),
    Entry(
        "status",
        "Status",
        "choice",
        "Where the document stands.",
        "for inquiry",
        choices=("draft", "for inquiry", "for purchase", "as built", "cancelled"),
        default="draft",
    ),
    Entry("document", "Document", "text", "Number of the datasheet.", "TI-DS-2104"),
    Entry("diagram", "Flow diagram", "text", "Number of the piping and instrument diagram.", ""),
    Entry("location", "Location", "text", "Where the meter stands.", "Boiler house, level 1"),
    Entry("remarks", "Remarks", "text", "Free text, printed on the sheet.", ""),
)

_SUBSTANCE = "when fluid.kind is substance"

#: entries of a tag file that every family shares, in the order of the form
COMMON: tuple[Entry, ...] = (*TAG, *FLUID, *LINE, *POINTS, *DESIGN, *REQUIRE)
