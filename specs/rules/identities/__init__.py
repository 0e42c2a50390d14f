"""Rules on identities: figures that physics ties to each other."""
