"""extraction."""
