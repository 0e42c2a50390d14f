"""The reading process: takes one job after another, within its limits.

Started by ``sandbox`` as ``python -m specs.reading.worker FD``. It gets jobs (trusted, pickled)
over a socket and answers with plain bytes: a result or an error as JSON. Nothing that it sends is
unpickled by its parent, so a document that took the process over could still not reach out of it.
"""

from __future__ import annotations

import contextlib
import json
import os
import resource
import signal
import sys
from collections.abc import Callable
from multiprocessing.connection import Connection
from typing import Any

from specs.errors import BeamproofError, ReaderFailed
from specs.reading.limits import Limits

RESULT, ERROR = b"R", b"E"


def main(descriptor: int) -> None:
    """Serve jobs until the parent closes the socket."""
    signal.signal(signal.SIGINT, signal.SIG_IGN)
    connection = Connection(descriptor)
    work, limits = connection.recv()
    _limit_memory(limits)
    connection.send_bytes(RESULT)
    while True:
        try:
            arguments = connection.recv()
        except (EOFError, OSError):
            return
        _limit_time(limits)
        connection.send_bytes(_answer(work, arguments))


def _answer(work: Callable[..., bytes], arguments: tuple[Any, ...]) -> bytes:
    try:
        return RESULT + work(*arguments)
    except BeamproofError as error:
        return ERROR + _described(error)
    except MemoryError:
        return ERROR + _described(ReaderFailed("Reading ran out of memory."))
    except RecursionError:
        return ERROR + _described(ReaderFailed("The document nests too deep to be read."))
    except Exception as error:  # any other failure is ours: it is reported, not raised blindly
        kind = type(error).__name__
        return ERROR + _described(ReaderFailed(f"Reading failed ({kind}: {str(error)[:200]})."))


def _described(error: BeamproofError) -> bytes:
    fields = {"code": error.code, "message": error.message, "advice": error.advice}
    return json.dumps(fields).encode()


def _limit_memory(limits: Limits) -> None:
    with contextlib.suppress(ValueError, OSError):
        resource.setrlimit(resource.RLIMIT_AS, (limits.memory_bytes, limits.memory_bytes))
    resource.setrlimit(resource.RLIMIT_CORE, (0, 0))


def _limit_time(limits: Limits) -> None:
    """Allow this job its seconds of processor time on top of what is used."""
    usage = resource.getrusage(resource.RUSAGE_SELF)
    allowed = int(usage.ru_utime + usage.ru_stime + limits.seconds) + 2
    _, hard = resource.getrlimit(resource.RLIMIT_CPU)
    with contextlib.suppress(ValueError, OSError):
        resource.setrlimit(resource.RLIMIT_CPU, (allowed, hard))


if __name__ == "__main__":
    os.environ.pop("PYTHONPATH", None)
    main(int(sys.argv[1]))
