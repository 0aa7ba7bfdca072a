"""What the engineer describes: shafts, supports, gears, loads, cases, limits, and the whole model."""

from fe_shaft.model.body import Body
from fe_shaft.model.case import Case
from fe_shaft.model.frame import Frame
from fe_shaft.model.gear import Gear
from fe_shaft.model.heading import Heading
from fe_shaft.model.helix import Helix
from fe_shaft.model.housing import Estimates, Housing, OutputUnits
from fe_shaft.model.inside import Geometry, Groove
from fe_shaft.model.limit import Limit
from fe_shaft.model.loads import BeltPull, Couple, Coupling, Force, Mass, Pulley, Sprocket
from fe_shaft.model.material import Material
from fe_shaft.model.notes import Note
from fe_shaft.model.position import Place, Position
from fe_shaft.model.segment import Segment
from fe_shaft.model.segment_arrays import SegmentArrays
from fe_shaft.model.shaft import Shaft
from fe_shaft.model.stiffness import Matrix, MatrixUnits, Seat, Stiffness
from fe_shaft.model.support import Bearing, Pin, Support
from fe_shaft.model.system import Model
from fe_shaft.model.weakening import Keyway, Spline

__all__ = [
    "Bearing", "BeltPull", "Body", "Case", "Couple", "Coupling", "Estimates", "Force", "Frame", "Gear", "Geometry",
    "Groove", "Heading", "Helix", "Housing", "Keyway", "Limit", "Mass", "Material", "Matrix", "MatrixUnits", "Model",
    "Note", "OutputUnits", "Pin", "Place", "Position", "Pulley", "Seat", "Segment", "SegmentArrays", "Shaft", "Spline",
    "Sprocket", "Stiffness", "Support",
]  # fmt: skip
