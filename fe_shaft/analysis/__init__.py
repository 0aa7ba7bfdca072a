"""The arrows of the data's path: model to grid, grid to system, system to results.

This is the only layer that knows both the engineer's words and the matrices.
"""
