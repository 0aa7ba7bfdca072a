"""What a rolling bearing is inside: geometry in SI floats and numpy arrays, nothing of shafts, units or files."""
