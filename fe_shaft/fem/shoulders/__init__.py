"""Shoulders: what a step of a shaft adds to the flexibility of its beam, from the contour alone."""

from fe_shaft.fem.shoulders.contour import Contour
from fe_shaft.fem.shoulders.lumps import ShoulderLumps, shoulder_lumps
from fe_shaft.fem.shoulders.range import OutOfRange, hollow_shoulders, out_of_range

__all__ = ["Contour", "OutOfRange", "ShoulderLumps", "hollow_shoulders", "out_of_range", "shoulder_lumps"]
