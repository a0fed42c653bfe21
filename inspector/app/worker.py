"""Long work beside the screen: one thread, results as values, late answers dropped."""

from __future__ import annotations

from collections import Counter
from collections.abc import Callable
from concurrent.futures import ThreadPoolExecutor
from dataclasses import dataclass
from typing import Protocol, TypeVar

from inspector.cli.faults import keep_fault
from models.errors import InspectorError

Result = TypeVar("Result")
Deliver = Callable[[Callable[[], None]], None]


@dataclass(frozen=True, slots=True)
class Failure:
    """A job came to nothing. ``text`` says why, for the person at the screen."""

    text: str


class Work(Protocol):
    """What presenters need of a worker."""

    def ask(self, job: Callable[[], Result], then: Callable[[Result | Failure], None], topic: str = "") -> None:
        """Do a job; see `Worker.ask`."""
        ...

    def forget(self, topic: str) -> None:
        """No answer on this topic is wanted any more."""
        ...


class Worker:
    """One thread that does jobs in the order in which they were asked for.

    Parameters
    ----------
    deliver : brings a call to the thread of the screen (the clock of the app).
    """

    def __init__(self, deliver: Deliver) -> None:
        self._deliver = deliver
        self._pool = ThreadPoolExecutor(max_workers=1, thread_name_prefix="worker")
        self._asked: Counter[str] = Counter()
        self._closed = False

    def ask(self, job: Callable[[], Result], then: Callable[[Result | Failure], None], topic: str = "") -> None:
        """Do a job, then call ``then`` with its result, or with a `Failure`.

        Parameters
        ----------
        topic : of several jobs on one topic only the last one's answer is wanted: older ones are not begun any
            more, and what comes late is dropped. Without a topic (everything that stores) every job is done
            and every answer delivered.
        """
        self._asked[topic] += 1
        token = self._asked[topic]

        def late() -> bool:
            return bool(topic) and self._asked[topic] != token

        def hand_over(found: Result | Failure) -> None:
            if not late() and not self._closed:
                then(found)

        def work() -> None:
            if not late():
                found = outcome_of(job)
                self._deliver(lambda: hand_over(found))

        self._pool.submit(work)

    def forget(self, topic: str) -> None:
        """No answer on this topic is wanted any more."""
        self._asked[topic] += 1

    def close(self) -> None:
        """Finish what was asked for, then end the thread. No answer arrives any more: nobody is there."""
        self._pool.shutdown(wait=True)
        self._closed = True


def outcome_of(job: Callable[[], Result]) -> Result | Failure:
    """What a job gives, or why it gave nothing."""
    try:
        return job()
    except InspectorError as error:
        return Failure(str(error))
    except OSError as error:
        return Failure(f"{error.strerror or error}: {error.filename or 'no file name is known'}.")
    except Exception as error:  # noqa: BLE001 (the edge of the thread: a fault of ours must reach the screen as words)
        return Failure(keep_fault(error))
