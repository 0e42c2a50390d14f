"""Rules on the sheet as a whole."""
