"""Floats come back as floats, arrays as arrays, and odd numbers without a warning or an error."""

from __future__ import annotations

import math

import numpy as np
import pytest

from specs.physics import antenna_factor, aperture, beamwidth, mismatch
from specs.physics.constants import wavelength_m
from specs.physics.elementwise import Floats


def test_floats_give_pythons_float() -> None:
    assert type(beamwidth.beam_metric(16.0, 65.0, 12.0)) is float
    assert type(beamwidth.convex_limit_dbi(65.0, 12.0)) is float
    assert type(antenna_factor.antenna_factor_db(8.0, 450.0)) is float


def test_arrays_give_arrays_equal_to_the_floats() -> None:
    gains = np.array([[5.0, 12.0, 16.0], [18.0, 20.0, 38.0]])
    widths = np.array([[120.0, 65.0, 65.0], [33.0, 200.0, 2.2]])
    metric: Floats = beamwidth.beam_metric(gains, widths, widths / 2)
    limit: Floats = beamwidth.convex_limit_dbi(widths, widths / 2)
    assert metric.shape == limit.shape == gains.shape
    for index in np.ndindex(gains.shape):
        g, w = float(gains[index]), float(widths[index])
        assert metric[index] == pytest.approx(beamwidth.beam_metric(g, w, w / 2))
        assert limit[index] == beamwidth.convex_limit_dbi(w, w / 2)


def test_arrays_and_floats_broadcast() -> None:
    widths = np.array([30.0, 60.0])
    assert beamwidth.elliptical_limit_dbi(widths, 10.0).shape == (2,)  # type: ignore[type-var]


def test_extremes_answer_and_do_not_raise() -> None:
    assert mismatch.return_loss_from_vswr(1.0) == math.inf
    assert mismatch.mismatch_loss_from_vswr(math.inf) == math.inf
    assert mismatch.vswr_from_return_loss(0.0) == math.inf
    assert wavelength_m(0.0) == math.inf
    assert beamwidth.elliptical_limit_dbi(0.0, 10.0) == math.inf
    assert beamwidth.convex_limit_dbi(0.0, 10.0) == math.inf
    assert beamwidth.convex_limit_dbi(200.0, 10.0) == math.inf
    assert aperture.effective_area_m2(-math.inf, 450.0) == 0.0
    assert math.isnan(aperture.gain_from_effective_area_dbi(-1.0, 450.0))
