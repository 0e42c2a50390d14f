"""Antenna physics: pure functions on floats and numpy arrays.

One convention throughout, and the names carry it: levels in dB (``_db``, ``_dbi``), angles and
beamwidths in degrees (``_deg``; full half-power widths), lengths in wavelengths (``_wl``) and
areas in square wavelengths (``_wl2``) unless the name says ``_m`` or ``_mm``, frequencies in MHz.
Every function takes floats (a float comes back) or arrays that broadcast (an array comes back),
raises nothing on odd numbers, and answers nan where the question has no answer and inf where
there is no limit. Sources are named with each function; "from memory" marks a value that was
recalled and could not be looked up.
"""
