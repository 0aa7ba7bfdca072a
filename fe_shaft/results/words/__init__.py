"""Results in words and fixed-width tables: names, layout, then one file a block of the printed page."""
