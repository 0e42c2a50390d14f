"""Printed numerals: digits, decimal marks and thousands groups to a number and its step."""

from __future__ import annotations

import re
from dataclasses import dataclass

NUMERAL = re.compile(
    r"\d{1,3}(?:,\d{3})+\.\d+(?![.,]?\d)"  # 1,234.5
    r"|\d{1,3}(?:\.\d{3})+,\d+(?![.,]?\d)"  # 1.234,5
    r"|\d{1,3}(?:,\d{3}){2,}(?![.,]?\d)|\d{1,3}(?:\.\d{3}){2,}(?![.,]?\d)"  # 1,234,567
    r"|\d+,\d+(?![.,]\d)"  # 17,5 or 1,575
    r"|\d+\.\d+"  # 17.5
    r"|\d+"
    r"|[.,]\d+"  # .5
)


@dataclass(frozen=True, slots=True)
class Numeral:
    """A number as printed.

    ``half_step`` is half of the step of its last digit: 17.5 stands for 17.45 to 17.55.
    ``decimal`` is the other reading when a comma stands before exactly three digits
    (1,575 is 1575 or 1.575); None when there is only one.
    """

    value: float
    half_step: float
    decimal: Numeral | None = None


def numeral(text: str) -> Numeral:
    """The number that a match of ``NUMERAL`` prints.

    >>> numeral("17,5").value, numeral("1.234,5").value, numeral("1,575").decimal.value
    (17.5, 1234.5, 1.575)
    """
    comma, point = text.count(","), text.count(".")
    if comma and point:
        decimal_mark = max(text.rfind(","), text.rfind("."))
        grouped = text[:decimal_mark].replace(",", "").replace(".", "")
        return _plain(grouped + "." + text[decimal_mark + 1 :])
    if comma + point > 1:
        return _plain(text.replace(",", "").replace(".", ""))
    if comma:
        whole, fraction = text.split(",")
        decimal = _plain(f"{whole or '0'}.{fraction}")
        if len(fraction) == 3 and 1 <= len(whole) <= 3 and whole.strip("0"):
            grouped_value = _plain(whole + fraction)
            return Numeral(grouped_value.value, grouped_value.half_step, decimal)
        return decimal
    return _plain(text)


def _plain(text: str) -> Numeral:
    decimals = len(text.partition(".")[2])
    return Numeral(float(text), 0.5 * 10.0**-decimals)
