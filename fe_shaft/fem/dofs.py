"""The six displacements of a node, their names and their order: the only place that knows the number six.

Right-handed frame, x along the shaft from its left end. Rotations by the right hand, so for a slender beam
dv/dx = theta_z and dw/dx = -theta_y.
"""

from typing import Final

NDOF: Final = 6
UX, UY, UZ, RX, RY, RZ = range(NDOF)
DISPLACEMENTS: Final = ("ux", "uy", "uz", "rx", "ry", "rz")
SECTION_FORCES: Final = ("N", "V_y", "V_z", "M_x", "M_y", "M_z")
