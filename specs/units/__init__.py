"""Printed numbers and units: numerals, spellings, levels and linear units."""
