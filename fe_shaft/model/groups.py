"""The groups of the model file: which table holds which noun."""

from __future__ import annotations

from fe_shaft.model.case import Case
from fe_shaft.model.gear import Gear
from fe_shaft.model.limit import Limit
from fe_shaft.model.loads import Coupling, Force, Mass, Pulley, Sprocket
from fe_shaft.model.material import Material
from fe_shaft.model.part import Part
from fe_shaft.model.shaft import Shaft
from fe_shaft.model.support import Bearing, Pin
from fe_shaft.model.words import Named

PARTS: dict[str, type[Part]] = {cls.group: cls for cls in (Pin, Bearing, Gear, Coupling, Sprocket, Pulley, Mass, Force)}
GROUPS: dict[str, type[Named]] = {
    "shafts": Shaft, **PARTS, "materials": Material, "cases": Case, "limits": Limit,
}  # fmt: skip
CARRIERS = (Gear, Coupling, Pulley, Sprocket)  # parts through which power enters and leaves


def noun(part: Named) -> str:
    """What a part is, in a sentence: ``bearing``."""
    return type(part).__name__.lower()


_GROUP_OF = {cls: group for group, cls in GROUPS.items()}


def group_of(noun_: Named) -> str:
    """The group whose tables state a noun: ``bearings``."""
    return _GROUP_OF[type(noun_)]
