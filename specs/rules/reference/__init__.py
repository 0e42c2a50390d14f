"""Rules on reference and unit: can the figure be judged as stated?"""
