"""The rules: one file each, listed here by hand in the order in which they run.

A rule is added by its file and one line in ``RULES``; a test proves the tuple complete.
"""

from __future__ import annotations

from specs.rules.beamwidth.gain_above_beamwidth_limit import gain_above_beamwidth_limit
from specs.rules.beamwidth.gain_below_beamwidth_estimate import gain_below_beamwidth_estimate
from specs.rules.beamwidth.omni_gain_above_beamwidth_limit import omni_gain_above_beamwidth_limit
from specs.rules.identities.antenna_factor_gain_disagree import antenna_factor_gain_disagree
from specs.rules.identities.average_gain_efficiency_disagree import average_gain_efficiency_disagree
from specs.rules.identities.average_gain_positive import average_gain_positive
from specs.rules.identities.band_and_bandwidth_disagree import band_and_bandwidth_disagree
from specs.rules.identities.directivity_below_isotropic import directivity_below_isotropic
from specs.rules.identities.dual_units_disagree import dual_units_disagree
from specs.rules.identities.effective_area_gain_disagree import effective_area_gain_disagree
from specs.rules.identities.efficiency_out_of_range import efficiency_out_of_range
from specs.rules.identities.front_to_back_on_omni import front_to_back_on_omni
from specs.rules.identities.gain_above_directivity import gain_above_directivity
from specs.rules.identities.gain_directivity_efficiency_disagree import (
    gain_directivity_efficiency_disagree,
)
from specs.rules.identities.implied_directivity_too_high import implied_directivity_too_high
from specs.rules.identities.same_claim_differs import same_claim_differs
from specs.rules.identities.total_efficiency_above_mismatch import total_efficiency_above_mismatch
from specs.rules.identities.vswr_out_of_range import vswr_out_of_range
from specs.rules.identities.vswr_return_loss_disagree import vswr_return_loss_disagree
from specs.rules.reference.beamwidth_level_unstated import beamwidth_level_unstated
from specs.rules.reference.circular_reference_mixed import circular_reference_mixed
from specs.rules.reference.dbi_dbd_pair_disagrees import dbi_dbd_pair_disagrees
from specs.rules.reference.gain_linear_unclear import gain_linear_unclear
from specs.rules.reference.gain_looks_like_amplifier import gain_looks_like_amplifier
from specs.rules.reference.gain_reference_unstated import gain_reference_unstated
from specs.rules.reference.gain_unit_wrong import gain_unit_wrong
from specs.rules.reference.plane_unstated import plane_unstated
from specs.rules.reference.tolerance_swallows_value import tolerance_swallows_value
from specs.rules.rule import Rule
from specs.rules.sheet.claim_not_readable import claim_not_readable
from specs.rules.sheet.gain_condition_missing import gain_condition_missing
from specs.rules.sheet.hidden_text import hidden_text
from specs.rules.sheet.nothing_to_check import nothing_to_check
from specs.rules.size.bandwidth_above_small_antenna_limit import bandwidth_above_small_antenna_limit
from specs.rules.size.beamwidth_against_aperture import beamwidth_against_aperture
from specs.rules.size.gain_above_boom_length import gain_above_boom_length
from specs.rules.size.gain_above_dish_aperture import gain_above_dish_aperture
from specs.rules.size.gain_above_helix import gain_above_helix
from specs.rules.size.gain_above_omni_length import gain_above_omni_length
from specs.rules.size.gain_above_panel_aperture import gain_above_panel_aperture
from specs.rules.size.gain_above_small_antenna_limit import gain_above_small_antenna_limit
from specs.rules.size.gain_above_yagi_elements import gain_above_yagi_elements
from specs.rules.size.gain_outside_type_range import gain_outside_type_range
from specs.rules.size.waveguide_below_cutoff import waveguide_below_cutoff

RULES_VERSION = "1"
"""Raised whenever a rule, a tier or a formula changes."""

RULES: tuple[Rule, ...] = (
    # reference and unit
    gain_reference_unstated,
    gain_unit_wrong,
    gain_linear_unclear,
    dbi_dbd_pair_disagrees,
    circular_reference_mixed,
    gain_looks_like_amplifier,
    tolerance_swallows_value,
    plane_unstated,
    beamwidth_level_unstated,
    # identities
    directivity_below_isotropic,
    gain_above_directivity,
    efficiency_out_of_range,
    gain_directivity_efficiency_disagree,
    implied_directivity_too_high,
    average_gain_positive,
    average_gain_efficiency_disagree,
    vswr_out_of_range,
    vswr_return_loss_disagree,
    total_efficiency_above_mismatch,
    band_and_bandwidth_disagree,
    effective_area_gain_disagree,
    antenna_factor_gain_disagree,
    front_to_back_on_omni,
    same_claim_differs,
    dual_units_disagree,
    # beamwidth
    gain_above_beamwidth_limit,
    omni_gain_above_beamwidth_limit,
    gain_below_beamwidth_estimate,
    # size
    gain_above_dish_aperture,
    gain_above_panel_aperture,
    gain_above_omni_length,
    gain_above_small_antenna_limit,
    bandwidth_above_small_antenna_limit,
    gain_above_yagi_elements,
    gain_above_boom_length,
    gain_above_helix,
    waveguide_below_cutoff,
    beamwidth_against_aperture,
    gain_outside_type_range,
    # sheet
    claim_not_readable,
    hidden_text,
    nothing_to_check,
    gain_condition_missing,
)

__all__ = ["RULES", "RULES_VERSION", "Rule"]
