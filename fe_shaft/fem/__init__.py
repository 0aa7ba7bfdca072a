"""How beams are computed: DOF names, rigid offsets, the Timoshenko span, assembly, constraints, solution.

Arrays in, arrays out. Nothing here knows a shaft, a bearing, a unit or a file.
"""
