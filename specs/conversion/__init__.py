"""One figure in another unit or as another quantity, with its interval, formula and source.

::

    scales.py     what can be stated: a quantity in a unit, with its valid range and its names
    relations.py  the table of relations between scales: function, formula, source, what it needs
    request.py    the text of a request: figure, quantity, conditions such as "at 450 MHz"
    convert.py    the shortest way through the relations, walked with intervals
"""

from specs.conversion.convert import Conversion, convert, equivalents

__all__ = ["Conversion", "convert", "equivalents"]
