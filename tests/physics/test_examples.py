"""The example in every docstring is true, and every public function has one."""

from __future__ import annotations

import doctest
import importlib
import inspect
import pkgutil
from types import ModuleType

import pytest

import specs.physics

MODULES = [
    importlib.import_module(f"specs.physics.{found.name}")
    for found in pkgutil.iter_modules(specs.physics.__path__)
]


@pytest.mark.parametrize("module", MODULES, ids=lambda m: m.__name__)
def test_examples_are_true(module: ModuleType) -> None:
    assert doctest.testmod(module, extraglobs={"__name__": module.__name__}).failed == 0


@pytest.mark.parametrize("module", MODULES, ids=lambda m: m.__name__)
def test_every_public_function_has_an_example(module: ModuleType) -> None:
    without = [
        name
        for name, function in inspect.getmembers(module, inspect.isfunction)
        if not name.startswith("_")
        and function.__module__ == module.__name__
        and ">>>" not in (function.__doc__ or "")
    ]
    assert without == []
