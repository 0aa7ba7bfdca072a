"""Free motions, decided before anything is solved: which shafts can move, and in which ways.

Free spin is normal for a drive and is not an error here; what is done about it is decided with the torques. The
sentences are in `motion_words`.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

from fe_shaft.analysis.free_space import NOISE, FreeSpace
from fe_shaft.analysis.motion_words import sentences_of
from fe_shaft.errors import FreeMotionError
from fe_shaft.fem.dofs import RX
from fe_shaft.fem.rigid_motion import free_motions

if TYPE_CHECKING:
    from fe_shaft.model.system import Model


def require_held(model: Model, push: dict[str, int], cases: NDArray[np.intp]) -> set[str]:
    """Refuse a model in which a shaft can move as a rigid body; returns the shafts that can spin.

    Parameters
    ----------
    push : sense of the axial load on each shaft
    cases : numbers of the cases concerned, for the sentence only

    Raises
    ------
    FreeMotionError
        A sentence for every motion of every shaft that can move, each with its remedy.
    """
    spinning: set[str] = set()
    sentences: list[str] = []
    for shaft in model.shafts:
        length = float(shaft.ends[-1])
        free = free_motions(model.support_table.held_directions(shaft.name, push), length)
        if not len(free):
            continue
        if len(free) == 1 and abs(free[0, RX]) * length > 1 - NOISE**2:
            spinning.add(shaft.name)
            continue
        found = FreeSpace(free * np.array([1, 1, 1, length, length, length]), length)
        sentences += sentences_of(model, shaft.name, found, push[shaft.name], cases)
    if sentences:
        raise FreeMotionError("\n".join(sentences))
    return spinning
