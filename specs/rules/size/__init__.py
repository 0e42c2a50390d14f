"""Rules on gain against size."""
