"""The command line: check sheets, convert figures, read the rules, serve.

Heavy imports stand inside the commands, so that ``beamproof --help`` answers at once.
"""

from __future__ import annotations

import sys
from collections.abc import Iterator
from pathlib import Path
from typing import TYPE_CHECKING, Any

import click

if TYPE_CHECKING:
    from specs.errors import BeamproofError
    from specs.report.model import Report

RELEASE, QUERY, HOLD, UNREADABLE, USAGE, BROKEN = 0, 1, 2, 3, 64, 70

_SUFFIXES = frozenset({".pdf", ".txt", ".md", ".markdown", ".htm", ".html", ".json"})
_FORMATS = ("text", "json", "html", "csv")


class _Group(click.Group):
    """Usage errors exit with 64, for 2 means hold; our own failures with 70, for 1 means query."""

    def main(self, *args: Any, **kwargs: Any) -> Any:
        kwargs["standalone_mode"] = False
        try:
            result = super().main(*args, **kwargs)
        except click.ClickException as error:
            error.show()
            sys.exit(USAGE)
        except (click.Abort, KeyboardInterrupt):
            click.echo("Stopped.", err=True)
            sys.exit(130)
        except BrokenPipeError:
            sys.exit(BROKEN)
        except Exception as error:
            # Python would exit with 1, which a purchasing gate reads as a verdict.
            kind = type(error).__name__
            click.echo(_printable(f"Beamproof failed ({kind}: {error}). No verdict."), err=True)
            sys.exit(BROKEN)
        sys.exit(result if isinstance(result, int) else RELEASE)


@click.group(cls=_Group, context_settings={"help_option_names": ["-h", "--help"]})
@click.version_option(package_name="beamproof", prog_name="beamproof")
def main() -> None:
    """Find the claims on antenna sheets that cannot be true."""


@main.command()
@click.argument("sources", nargs=-1, required=True, metavar="SOURCE...")
@click.option("--format", "form", type=click.Choice(_FORMATS), default="text", show_default=True)
@click.option("--output", type=click.Path(path_type=Path), help="Write here; a folder for several.")
@click.option("--jobs", type=click.IntRange(1, 64), default=2, show_default=True,
              help="Sheets read at once.")  # fmt: skip
def check(sources: tuple[str, ...], form: str, output: Path | None, jobs: int) -> int:
    """Check sheets: files, folders, claims as JSON, or '-' for text from standard input.

    \b
    Exit code, the worst over all sheets:
      0  release   checked, nothing above a note
      1  query     ask the vendor first
      2  hold      do not order on these figures
      3  a sheet could not be read
      64 the command was not understood, or its output could not be written
      70 Beamproof itself failed; there is no verdict
    """
    from specs.pipeline import Checker

    items = list(_items(sources))
    if not items:
        raise click.UsageError("No sheet was found in the folders given.")
    many = len(items) > 1
    if output is not None and many and form != "csv":
        _folder(output)
    worst = RELEASE
    done: list[tuple[str, Report | BeamproofError]] = []
    taken: set[Path] = set()
    with Checker(workers=min(jobs, len(items))) as checker:
        results = checker.check_many(items, _progress(len(items)) if many else None)
        for (data, name), (_, result) in zip(items, results, strict=True):
            worst = max(worst, _exit_code(result))
            if form == "csv" or (form == "json" and many and output is None):
                done.append((name, result))
                continue
            path = _path(output, name, form, many, taken)
            _write(_rendered(form, result, name, data, checker, output), path)
    if done:
        _write(_together(form, done), _path(output, "report", form, False, taken))
    return worst


def _items(sources: tuple[str, ...]) -> Iterator[tuple[bytes | Path, str]]:
    for source in sources:
        if source == "-":
            yield sys.stdin.buffer.read(), "standard-input.txt"
            continue
        path = Path(source)
        if path.is_dir():
            found = sorted(p for p in path.rglob("*") if p.suffix.lower() in _SUFFIXES)
            yield from ((p, p.name) for p in found if p.is_file())
        elif path.exists():
            yield path, path.name
        else:
            raise click.UsageError(f"There is no file or folder '{source}'.")


def _progress(total: int) -> Any:
    def told(done: int) -> None:
        if sys.stderr.isatty():
            end = "\n" if done == total else ""
            click.echo(f"\rread {done} of {total}", nl=False, err=True)
            click.echo(end, nl=False, err=True)

    return told


def _exit_code(result: Report | BeamproofError) -> int:
    verdict = getattr(result, "verdict", None)
    if verdict is None:
        return UNREADABLE
    return {"release": RELEASE, "query": QUERY, "hold": HOLD}[verdict.value]


def _rendered(
    form: str,
    result: Report | BeamproofError,
    name: str,
    data: bytes | Path,
    checker: Any,
    output: Path | None,
) -> str:
    from specs.errors import BeamproofError

    if isinstance(result, BeamproofError):
        return _failure(form, result, name)
    if form == "json":
        return result.model_dump_json(by_alias=True, indent=2)
    if form == "html":
        from specs.report.html import render_html

        body = data.read_bytes() if isinstance(data, Path) else data
        pages, sizes = checker.page_images(body, result)
        return render_html(result, pages, sizes)
    from specs.report.text import render_text

    colour = output is None and _colour_wanted()
    return render_text(result, colour=colour)


def _colour_wanted() -> bool:
    import os

    return sys.stdout.isatty() and not os.environ.get("NO_COLOR")


def _failure(form: str, error: BeamproofError, name: str) -> str:
    click.echo(_printable(f"{name}: could not be read. {error}"), err=True)
    if form != "json":
        return ""
    import json

    fields = {"code": error.code, "message": error.message, "advice": error.advice}
    return json.dumps({"sheet": {"name": name}, "error": fields}, ensure_ascii=False, indent=2)


def _together(form: str, done: list[tuple[str, Report | BeamproofError]]) -> str:
    """Many results in one text: a JSON list, or one CSV table."""
    import json

    from specs.errors import BeamproofError

    reports = [r for _, r in done if not isinstance(r, BeamproofError)]
    if form == "json":
        texts = [
            _failure("json", r, n) if isinstance(r, BeamproofError)
            else r.model_dump_json(by_alias=True)
            for n, r in done
        ]  # fmt: skip
        return json.dumps([json.loads(t) for t in texts], ensure_ascii=False, indent=2)
    for name, result in done:
        if isinstance(result, BeamproofError):
            _failure("csv", result, name)
    from specs.report.table import report_csv

    return report_csv(reports)


def _folder(path: Path) -> None:
    try:
        path.mkdir(parents=True, exist_ok=True)
    except OSError as error:
        raise click.ClickException(
            f"'{path}' cannot be made a folder: {error.strerror}."
        ) from error


def _path(output: Path | None, name: str, form: str, many: bool, taken: set[Path]) -> Path | None:
    """Where a result is written: no two results of one run share a file."""
    if output is None:
        return None
    if not many and not output.is_dir():
        return output
    suffix = {"text": "txt"}.get(form, form)
    stem = Path(name).name
    path = output / f"{stem}.{suffix}"
    count = 1
    while path in taken:
        count += 1
        path = output / f"{stem}-{count}.{suffix}"
    taken.add(path)
    return path


def _write(text: str, path: Path | None) -> None:
    if not text:
        return
    if path is None:
        click.echo(text.rstrip("\n"))
        return
    try:
        path.write_text(text if text.endswith("\n") else text + "\n", encoding="utf-8")
    except OSError as error:
        raise click.ClickException(f"'{path}' cannot be written: {error.strerror}.") from error
    click.echo(_printable(f"wrote {path}"), err=True)


def _printable(text: str) -> str:
    from specs.report.phrases import printable

    return printable(text)


@main.command()
@click.argument("text")
@click.option("--to", "unit", help="The unit or quantity wanted; without it, every equivalent.")
@click.option("--at", "frequency", help="The frequency, where the conversion needs one.")
def convert(text: str, unit: str | None, frequency: str | None) -> int:
    """Convert a printed figure: beamproof convert "7.5 dBd" --to dBi."""
    from specs.conversion import convert as converted
    from specs.conversion import equivalents
    from specs.errors import BeamproofError

    try:
        if unit is not None:
            results: tuple[Any, ...] = (converted(text, unit, frequency=frequency),)
        else:
            results = equivalents(text, frequency=frequency)
    except BeamproofError as error:
        raise click.UsageError(str(error)) from error
    for result in results:
        click.echo(_conversion(result))
    return RELEASE


def _conversion(result: Any) -> str:
    nominal = f"{result.nominal:.5g} {result.unit}".strip()
    spread = ""
    if result.low != result.high:
        spread = f"   ({result.low:.5g} to {result.high:.5g})"
    lines = [f"{nominal}{spread}", f"    {result.formula}", f"    source: {result.source}"]
    lines += [f"    assumes: {note}" for note in result.assumptions]
    return "\n".join(lines)


@main.command()
@click.argument("rule_id", required=False)
def rules(rule_id: str | None) -> int:
    """List the rules, or show one with its formula, source and examples."""
    from specs.rules import RULES
    from specs.rules.page import as_text

    if rule_id is None:
        for rule in RULES:
            click.echo(f"{rule.id:40} {rule.title}")
        return RELEASE
    found = next((r for r in RULES if r.id == rule_id), None)
    if found is None:
        import difflib

        near = difflib.get_close_matches(rule_id, [r.id for r in RULES], n=1)
        hint = f" Did you mean {near[0]}?" if near else ""
        raise click.UsageError(f"There is no rule '{rule_id}'.{hint}")
    click.echo(as_text(found))
    return RELEASE


@main.command()
@click.argument("name", type=click.Choice(["report", "claims"]))
def schema(name: str) -> int:
    """Print the JSON Schema of the report, or of claims given as JSON."""
    import json

    from specs.report.schemas import claims_schema, report_schema

    made = report_schema() if name == "report" else claims_schema()
    click.echo(json.dumps(made, indent=2, ensure_ascii=False))
    return RELEASE


@main.command()
@click.option("--host", help="Loopback address to listen on; by default that of the settings.")
@click.option("--port", type=click.IntRange(1, 65535), help="By default that of the settings.")
def serve(host: str | None, port: int | None) -> int:
    """Serve the pages and the API on this machine."""
    from service.server import serve as served
    from service.settings import SettingsError, from_environment

    try:
        served(from_environment(host=host, port=port))
    except SettingsError as error:
        raise click.UsageError(str(error)) from error
    except OSError as error:
        raise click.ClickException(f"The address cannot be had: {error.strerror}.") from error
    return RELEASE


if __name__ == "__main__":
    main()
