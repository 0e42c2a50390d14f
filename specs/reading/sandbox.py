"""Warm child processes that read untrusted documents within limits.

PDFium is not thread-safe, and a hostile file may crash it, hang it or fill the memory; so each
document is read in a process of its own kind. Workers stay warm, one that overruns is killed and
replaced, and the next document finds a good one.
"""

from __future__ import annotations

import contextlib
import json
import os
import queue
import socket
import subprocess
import sys
import threading
from collections import deque
from collections.abc import Callable, Iterable, Iterator
from concurrent.futures import Future, ThreadPoolExecutor
from multiprocessing.connection import Connection
from types import TracebackType
from typing import Any

from specs.errors import BeamproofError, ReaderFailed, ReadingTimedOut
from specs.reading.limits import Limits
from specs.reading.worker import ERROR

MOST_OUTPUT = 100_000_000
_GRACE_SECONDS = 1.0
_START_SECONDS = 60.0
_KEPT_VARIABLES = ("PATH", "LANG", "LC_ALL", "TZ", "LD_LIBRARY_PATH", "SYSTEMROOT")


class Sandbox:
    """Runs ``work`` in child processes. Thread-safe.

    ``work`` is a top-level function that returns bytes; its arguments must pickle. Use as a context
    manager, or call ``close``.
    """

    def __init__(
        self, work: Callable[..., bytes], workers: int = 1, limits: Limits | None = None
    ) -> None:
        if workers < 1:
            raise ValueError("A sandbox needs at least one worker.")
        self._work, self._limits = work, limits or Limits()
        self._count = workers
        self._free: queue.LifoQueue[_Worker] = queue.LifoQueue()
        self._all: set[_Worker] = set()
        self._lock = threading.Lock()
        self._closed = False
        for _ in range(workers):
            worker = _Worker(work, self._limits)
            self._all.add(worker)
            self._free.put(worker)

    def run(self, *arguments: Any) -> bytes:
        """The result of one job.

        Raises the typed error of the job, ``ReadingTimedOut`` when it overran, ``ReaderFailed``
        when its process died.
        """
        worker = self._free.get()
        try:
            if self._closed:
                raise RuntimeError("The sandbox is closed.")
            return worker.run(arguments)
        finally:
            self._free.put(worker)

    def map(self, jobs: Iterable[tuple[Any, ...]]) -> Iterator[bytes | BeamproofError]:
        """Results of many jobs in order, worked on in parallel; an error stands in its place."""
        with ThreadPoolExecutor(self._count) as threads:
            waiting: deque[Future[bytes | BeamproofError]] = deque()
            for job in jobs:
                waiting.append(threads.submit(self._caught, job))
                if len(waiting) > 2 * self._count:
                    yield waiting.popleft().result()
            while waiting:
                yield waiting.popleft().result()

    def _caught(self, job: tuple[Any, ...]) -> bytes | BeamproofError:
        try:
            return self.run(*job)
        except BeamproofError as error:
            return error

    def close(self) -> None:
        """End all child processes; jobs under way are stopped."""
        with self._lock:
            self._closed = True
            for worker in self._all:
                worker.stop()

    def __enter__(self) -> Sandbox:
        return self

    def __exit__(
        self,
        kind: type[BaseException] | None,
        error: BaseException | None,
        trace: TracebackType | None,
    ) -> None:
        self.close()


class _Worker:
    """One child process, started when first needed and replaced when it fails."""

    def __init__(self, work: Callable[..., bytes], limits: Limits) -> None:
        self._work, self._limits = work, limits
        self._process: subprocess.Popen[bytes] | None = None
        self._connection: Connection | None = None
        self._served = 0

    def run(self, arguments: tuple[Any, ...]) -> bytes:
        if self._served >= self._limits.sheets_per_worker:
            self.stop()
        connection = self._connection or self._start()
        self._served += 1
        try:
            connection.send(arguments)
            if not connection.poll(self._limits.seconds + _GRACE_SECONDS):
                self.stop()
                raise ReadingTimedOut(
                    f"Reading took more than {self._limits.seconds:g} seconds and was stopped."
                )
            answer = connection.recv_bytes(MOST_OUTPUT)
        except (EOFError, OSError) as error:
            timed_out = self._ended_by_time()
            self.stop()
            if timed_out:
                raise ReadingTimedOut(
                    f"Reading took more than {self._limits.seconds:g} seconds and was stopped."
                ) from error
            raise ReaderFailed("The reading process died on this sheet.") from error
        except BaseException:
            self.stop()  # an answer may still be under way: never let the next job read it
            raise
        if answer[:1] == ERROR:
            raise _error(answer[1:])
        return answer[1:]

    def _start(self) -> Connection:
        ours, theirs = socket.socketpair()
        environment = {k: v for k, v in os.environ.items() if k in _KEPT_VARIABLES}
        environment["PYTHONPATH"] = os.pathsep.join(p or os.getcwd() for p in sys.path)  # noqa: PTH109
        with theirs:
            self._process = subprocess.Popen(
                [sys.executable, "-m", "specs.reading.worker", str(theirs.fileno())],
                pass_fds=(theirs.fileno(),),
                env=environment,
                stdin=subprocess.DEVNULL,
                stdout=subprocess.DEVNULL,
                stderr=subprocess.DEVNULL,
                start_new_session=True,
            )
        connection = Connection(ours.detach())
        self._connection, self._served = connection, 0
        try:
            connection.send((self._work, self._limits))
            if not connection.poll(_START_SECONDS):
                raise EOFError
            connection.recv_bytes(16)
        except (EOFError, OSError) as error:
            self.stop()
            raise ReaderFailed("The reading process could not be started.") from error
        return connection

    def _ended_by_time(self) -> bool:
        """Whether the process was ended by its limit on processor time."""
        if self._process is None:
            return False
        with contextlib.suppress(subprocess.TimeoutExpired):
            return self._process.wait(1.0) in (-24, -9)  # SIGXCPU, SIGKILL
        return False

    def stop(self) -> None:
        connection, process = self._connection, self._process
        self._connection = self._process = None
        if connection is not None:
            connection.close()
        if process is not None:
            process.kill()
            process.wait()


def _error(described: bytes) -> BeamproofError:
    fields = json.loads(described)
    kind = next((c for c in _tree(BeamproofError) if c.code == fields["code"]), ReaderFailed)
    return kind(fields["message"], fields["advice"])


def _tree(root: type[BeamproofError]) -> Iterator[type[BeamproofError]]:
    yield root
    for child in root.__subclasses__():
        yield from _tree(child)
