"""Rules on gain against beamwidth."""
