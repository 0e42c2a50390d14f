"""Floats in, float out; arrays in, array out."""

from __future__ import annotations

import functools
from collections.abc import Callable
from typing import Any, TypeVar, cast

import numpy as np
from numpy.typing import NDArray

Floats = NDArray[np.float64]
"""An array of floats of any shape."""

Real = TypeVar("Real", float, Floats)
"""A float, or an array: the result has the kind of the arguments."""

_Function = TypeVar("_Function", bound=Callable[..., Any])


def elementwise(function: _Function) -> _Function:
    """Lets a function written for numpy answer floats with plain floats, and keep silent.

    Numbers and lists (words stay) become numpy's own before the call, for Python's floats raise
    where numpy's answer: division by zero and invalid values give inf and nan without a warning
    (the return loss of a perfect match is infinite). Single results become Python's floats after
    it, for reports and JSON. Modules that use it switch mypy's warn_return_any off, because numpy
    types its functions of a float as Any.

    >>> @elementwise
    ... def inverse(x: float) -> float:
    ...     return 1.0 / x
    >>> inverse(4.0), inverse(0.0)
    (0.25, inf)
    """

    @functools.wraps(function)
    def answer(*arguments: Any, **named: Any) -> Any:
        with np.errstate(divide="ignore", invalid="ignore", over="ignore"):
            result = function(
                *(_number(value) for value in arguments),
                **{name: _number(value) for name, value in named.items()},
            )
        return float(result) if isinstance(result, np.generic) else result

    return cast("_Function", answer)


def _number(value: Any) -> Any:
    if isinstance(value, float | int):
        return np.float64(value)
    if isinstance(value, str):
        return value
    return np.asarray(value, dtype=np.float64)
