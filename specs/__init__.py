"""Antenna sheets: claims read, normalised and held against physics."""
