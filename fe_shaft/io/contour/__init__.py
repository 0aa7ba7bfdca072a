"""Contours out of files: a table of points, or a drawing of the half contour (the only door to ezdxf)."""
