"""Bytes to a neutral document."""
