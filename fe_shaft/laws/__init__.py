"""Force laws of rolling bearings: displacement in; energy, force and exact tangent out.

Arrays in, arrays out. Nothing here knows a shaft, a unit or a file.
"""
