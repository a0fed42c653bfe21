"""The worker: one thread, results as values, late answers dropped."""

from __future__ import annotations

import threading
from collections.abc import Callable, Iterator
from queue import Queue

import pytest

from inspector.app.worker import Failure, Worker
from models.errors import InspectorError


class Desk:
    """A worker whose answers wait until this thread takes them."""

    def __init__(self) -> None:
        self.calls: Queue[Callable[[], None]] = Queue()
        self.worker = Worker(self.calls.put)
        self.found: list[object] = []

    def take(self, count: int = 1) -> None:
        """Take answers."""
        for _ in range(count):
            self.calls.get(timeout=5)()


@pytest.fixture
def desk() -> Iterator[Desk]:
    """A desk; its worker ends with the test."""
    made = Desk()
    yield made
    made.worker.close()


def test_a_result_comes_back_where_it_was_asked_for(desk: Desk) -> None:
    """The job runs on the worker's thread, its result is taken on the asker's."""
    threads = []
    desk.worker.ask(threading.current_thread, threads.append)
    desk.take()
    assert threads[0] is not threading.current_thread()


def test_jobs_are_done_in_order_and_none_without_topic_is_dropped(desk: Desk) -> None:
    """Everything that stores is done, one after the other."""
    for number in range(5):
        desk.worker.ask(lambda number=number: number, desk.found.append)
    desk.take(5)
    assert desk.found == [0, 1, 2, 3, 4]


def test_only_the_last_answer_on_a_topic_arrives(desk: Desk) -> None:
    """A job that a newer one on its topic overtook is not begun, and a late answer is dropped."""
    gate, begun = threading.Event(), []
    desk.worker.ask(lambda: gate.wait(5), desk.found.append, "rating")
    desk.worker.ask(lambda: begun.append("second"), desk.found.append, "rating")
    desk.worker.ask(lambda: "third", desk.found.append, "rating")
    gate.set()
    desk.worker.ask(lambda: "end", desk.found.append)
    while "end" not in desk.found:
        desk.take()
    assert begun == []
    assert desk.found == ["third", "end"]


def test_a_forgotten_topic_stays_silent(desk: Desk) -> None:
    """What nobody waits for any more does not arrive."""
    desk.worker.ask(lambda: "late", desk.found.append, "figures")
    desk.worker.forget("figures")
    desk.worker.ask(lambda: "end", desk.found.append)
    while "end" not in desk.found:
        desk.take()
    assert desk.found == ["end"]


def test_what_was_asked_for_is_finished_at_the_end_and_no_answer_arrives_after(desk: Desk) -> None:
    """An entry that was tapped is stored although the app is being closed; no screen is there to hear of it."""
    done: list[str] = []
    desk.worker.ask(lambda: done.append("stored"), desk.found.append)
    desk.worker.close()
    desk.take()
    assert done == ["stored"]
    assert desk.found == []


@pytest.mark.parametrize(
    ("error", "said"),
    [
        (InspectorError("the store is full"), "the store is full"),
        (PermissionError(13, "Permission denied", "/x/y.pdf"), "Permission denied: /x/y.pdf."),
        (KeyError("oops"), "a fault of its own (KeyError"),
    ],
)
def test_an_error_comes_back_as_words(desk: Desk, error: Exception, said: str) -> None:
    """No error ends the thread; each reaches the asker as a sentence."""

    def job() -> None:
        raise error

    desk.worker.ask(job, desk.found.append)
    desk.take()
    (found,) = desk.found
    assert isinstance(found, Failure)
    assert said in found.text
    desk.worker.ask(lambda: "goes on", desk.found.append)
    desk.take()
    assert desk.found[1] == "goes on"
