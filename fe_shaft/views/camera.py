"""Where the eye stands: in front of the first shaft, a little above it and towards its left end. Parallel projection.

Parallel, so that lengths across the line of sight are true everywhere and one line can be the scale.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

Floats = NDArray[np.float64]

FROM_THE_LEFT, FROM_ABOVE = 0.42, 0.30  # of the distance to the front
NEARLY_ALONG = 0.9  # cosine beyond which "up" would be lost


@dataclass(frozen=True)
class Eye:
    """A parallel view.

    Parameters
    ----------
    focus : (3,) [m], the point in the middle of the picture
    right, up, towards : (3,) unit vectors of the picture, and from the drawing to the eye
    half_height : [m], half of what the picture's height shows
    """

    focus: Floats
    right: Floats
    up: Floats
    towards: Floats
    half_height: float

    def pixels(self, points: Floats, size: tuple[float, float]) -> Floats:
        """Where points (..., 3) are seen in a picture of a size, (..., 2) [px from its lower left corner]."""
        flat = (np.asarray(points) - self.focus) @ np.stack([self.right, self.up], axis=1)
        return np.asarray(flat * self.pixels_per_metre(size) + np.asarray(size) / 2)

    def pixels_per_metre(self, size: tuple[float, float]) -> float:
        """Scale of a picture of a size, across the line of sight."""
        return size[1] / (2 * self.half_height)


def looking_at(rotation: Floats) -> tuple[Floats, Floats, Floats]:
    """Right, up and towards of the first view of a shaft, whose frame's axes are the columns of ``rotation``.

    Up is the model's Y unless one would look along it; then it is the shaft's 12 o'clock.
    """
    towards = rotation @ np.array([-FROM_THE_LEFT, FROM_ABOVE, 1.0])
    towards = towards / np.linalg.norm(towards)
    upward = np.array([0.0, 1.0, 0.0])
    if abs(towards @ upward) > NEARLY_ALONG:
        upward = rotation[:, 1]
    return axes(towards, upward)


def axes(towards: Floats, upward: Floats) -> tuple[Floats, Floats, Floats]:
    """Right, up and towards, made square from a line of sight and a rough up."""
    right = np.cross(upward, towards)
    right = right / np.linalg.norm(right)
    towards = towards / np.linalg.norm(towards)
    return right, np.cross(towards, right), towards


def fit(points: Floats, rotation: Floats, size: tuple[float, float], margins: tuple[float, float, float, float]) -> Eye:
    """First view that shows all points.

    Parameters
    ----------
    points : (n, 3) [m]
        In the model's coordinates.
    rotation : (3, 3)
        Axes of the first shaft, as columns.
    size : (width, height) [px]
        Of the picture.
    margins : (left, bottom, right, top) [px]
        Kept free for what is written.
    """
    right, up, towards = looking_at(rotation)
    flat = points @ np.stack([right, up], axis=1)
    low, high = flat.min(axis=0), flat.max(axis=0)
    free = np.array([size[0] - margins[0] - margins[2], size[1] - margins[1] - margins[3]])
    extent = np.maximum(high - low, 1e-9)
    metres_per_pixel = float(np.max(extent / free))
    shift = np.array([margins[2] - margins[0], margins[3] - margins[1]]) / 2 * metres_per_pixel
    middle = (low + high) / 2 + shift
    depth = float(np.mean(points @ towards))
    focus = middle[0] * right + middle[1] * up + depth * towards
    return Eye(focus, right, up, towards, size[1] / 2 * metres_per_pixel)
