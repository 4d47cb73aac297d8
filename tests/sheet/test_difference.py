"""What differs between two sheets."""

from __future__ import annotations

from specsheet import sheet
from tests.sheet import samples


def test_equal_sheets_do_not_differ() -> None:
    assert sheet.diff(sheet.build(samples.evaluation()), sheet.build(samples.evaluation())) == ()


def test_a_changed_entry_is_one_change() -> None:
    old = sheet.build(samples.evaluation())
    new = sheet.build(samples.evaluation(given={"line.schedule": "80"}))
    (change,) = sheet.diff(old, new)
    assert (change.section, change.label, change.before, change.after) == (
        "Line",
        "Schedule",
        "40",
        "80",
    )


def test_a_changed_flow_names_its_point() -> None:
    old = sheet.build(samples.evaluation())
    new = sheet.build(samples.evaluation(flows=(0.31, 0.9, 1.16667)))
    changes = [change for change in sheet.diff(old, new) if change.label == "Flow"]
    assert [(change.column, change.before, change.after) for change in changes] == [
        ("normal", "3.1 t/h", "3.24 t/h")
    ]


def test_rows_that_come_and_go() -> None:
    old = sheet.build(samples.evaluation())
    new = sheet.build(samples.evaluation(findings=()))
    gone = [change for change in sheet.diff(old, new) if change.section == "Findings"]
    assert len(gone) == 3
    assert all(change.after == "" for change in gone)
    back = [change for change in sheet.diff(new, old) if change.section == "Findings"]
    assert all(change.before == "" for change in back)
