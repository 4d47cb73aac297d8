"""Many items on many processes: the same results in the same order, whatever happens to one."""

from __future__ import annotations

import multiprocessing
import os
import threading
from collections.abc import Callable
from itertools import islice

import pool_work
import pytest

from specsheet.cli import pool
from specsheet.cli.spread import FIRST, WORTHWHILE, Lost, cores, spread

ITEMS = tuple(range(150))
DOUBLED = [2 * item for item in ITEMS]


@pytest.mark.parametrize("processes", [1, 2, 5])
@pytest.mark.parametrize("work", [pool_work.doubled, pool_work.slow_at_first])
def test_results_come_in_the_order_of_the_items(work: Callable[[int], int], processes: int) -> None:
    assert list(spread(work, ITEMS, processes)) == DOUBLED
    assert multiprocessing.active_children() == []


def test_a_process_with_threads_is_not_forked(monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(threading, "active_count", lambda: 2)
    assert list(spread(pool_work.doubled, ITEMS, 2)) == DOUBLED


@pytest.mark.parametrize("count", [0, 1, FIRST, FIRST + WORTHWHILE - 1])
def test_few_items_need_no_other_process(count: int) -> None:
    assert set(spread(pool_work.process, range(count), 2)) <= {os.getpid()}


def test_the_first_items_are_done_here_and_the_rest_by_others() -> None:
    done = list(spread(pool_work.process, ITEMS, 2))
    assert set(done[:FIRST]) == {os.getpid()}
    assert len(set(done[FIRST:])) == 2
    assert os.getpid() not in done[FIRST:]


def test_one_core_makes_no_other_process(monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr("specsheet.cli.spread.cores", lambda: 1)
    assert set(spread(pool_work.process, ITEMS)) == {os.getpid()}


def test_cores_are_counted() -> None:
    assert 1 <= cores() <= (os.cpu_count() or 1)


@pytest.mark.parametrize(
    ("work", "lost"),
    [
        (pool_work.killed_at_seventy, {70}),
        (pool_work.left_at_sixty_and_seventy, {60, 70}),
        (pool_work.left_at_the_last, {ITEMS[-1]}),
    ],
)
@pytest.mark.skipif(os.name != "posix", reason="signals of POSIX")
def test_an_item_that_ends_its_process_loses_no_other(
    work: Callable[[int], int], lost: set[int]
) -> None:
    wanted = [Lost() if item in lost else 2 * item for item in ITEMS]
    assert list(spread(work, ITEMS, 2)) == wanted
    assert multiprocessing.active_children() == []


def test_a_mistake_is_raised_after_what_stands_before_it() -> None:
    results = spread(pool_work.mistaken_at_seventy, ITEMS, 2)
    assert list(islice(results, 70)) == DOUBLED[:70]
    with pytest.raises(ZeroDivisionError, match="at 70"):
        next(results)
    assert multiprocessing.active_children() == []


def test_whoever_stops_early_leaves_no_process() -> None:
    results = spread(pool_work.doubled, ITEMS, 3)
    assert list(islice(results, FIRST + 2)) == DOUBLED[: FIRST + 2]
    assert multiprocessing.active_children() != []
    results.close()  # type: ignore[attr-defined]
    assert multiprocessing.active_children() == []


def test_a_system_that_gives_no_process_leaves_the_work_to_this_one(
    monkeypatch: pytest.MonkeyPatch,
) -> None:
    def refused(*_: object, **__: object) -> None:
        raise BlockingIOError(11, "Resource temporarily unavailable")

    monkeypatch.setattr(pool.ProcessPoolExecutor, "submit", refused)
    assert set(spread(pool_work.process, ITEMS, 2)) == {os.getpid()}
