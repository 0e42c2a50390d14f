"""The server: threads over one application, on this machine only until there are accounts."""

from __future__ import annotations

import logging
import signal
import sys
from types import FrameType

from service.settings import Settings, SettingsError, from_environment


class OpenToOthers(SettingsError):
    """The address is reached from other machines, and nobody is asked who they are."""


def serve(settings: Settings) -> None:
    """Serve until stopped by a signal; then end the reading processes.

    Raises ``OpenToOthers`` for an address beyond loopback, ``OSError`` when it cannot be had.
    """
    if not settings.is_loopback:
        raise OpenToOthers(
            f"The service does not listen on '{settings.host}': other machines would reach it, and "
            "it has no accounts yet, so anyone could send and read sheets. "
            "Use 127.0.0.1 (or ::1), and reach it from elsewhere through a tunnel."
        )
    from waitress.server import create_server

    from service.app import create_app
    from service.checking import desk

    logging.basicConfig(level=logging.INFO, format="%(asctime)s %(levelname)s %(message)s")
    app = create_app(settings)
    server = create_server(
        app,
        host=settings.host.strip("[]"),
        port=settings.port,
        threads=settings.threads,
        # The application answers 413 itself, with words; the server only stops what is far beyond.
        max_request_body_size=2 * max(settings.form_bytes, settings.sheet_bytes) + 1_000_000,
        channel_timeout=60,
        connection_limit=1000,
        ident=None,
    )
    signal.signal(signal.SIGTERM, _stop)
    print(f"Beamproof listens on {settings.address}", file=sys.stderr, flush=True)
    try:
        server.run()
    finally:
        server.close()
        desk(app).close()


def _stop(_signal: int, _frame: FrameType | None) -> None:
    raise SystemExit(0)


def main() -> int:
    """Serve by the settings of the environment; the exit code."""
    try:
        serve(from_environment())
    except SettingsError as error:
        print(error, file=sys.stderr)
        return 64
    except OSError as error:
        print(f"The address cannot be had: {error.strerror}.", file=sys.stderr)
        return 1
    return 0


if __name__ == "__main__":
    sys.exit(main())
