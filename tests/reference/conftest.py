"""Reference tables as lists of rows, and the catalogue of true antennas."""

from __future__ import annotations

import csv
import importlib.util
import sys
from collections.abc import Callable
from pathlib import Path
from types import ModuleType

import pytest

HERE = Path(__file__).parent
Rows = list[dict[str, str]]


@pytest.fixture(scope="session")
def table() -> Callable[[str], Rows]:
    """Reads ``data/NAME.csv``."""

    def read(name: str) -> Rows:
        with (HERE / "data" / f"{name}.csv").open(encoding="utf-8", newline="") as file:
            return list(csv.DictReader(file))

    return read


@pytest.fixture(scope="session")
def catalogue() -> ModuleType:
    """The module ``true_antennas``, loaded once in a session."""
    name = "true_antennas"
    if name not in sys.modules:
        found = importlib.util.spec_from_file_location(name, HERE / f"{name}.py")
        assert found is not None
        assert found.loader is not None
        module = importlib.util.module_from_spec(found)
        sys.modules[name] = module
        found.loader.exec_module(module)
    return sys.modules[name]
