"""Equivalent loads: the factors X, Y, e of ISO 281 and X0, Y0 of ISO 76 (tables from memory).

    P  = Fr + Y1 Fa          where Fa / Fr <= e,   X Fr + Y Fa beyond
    P0 = max(X0 Fr + Y0 Fa, Fr)

The tables print e to two digits and Y to three; here Y is read from them, straight between lines and angles, and
e = (1 - X) / (Y - Y1) follows, so that P has no jump at e. It rounds to the printed e.
"""

from __future__ import annotations

from typing import NamedTuple

import numpy as np
from numpy.typing import ArrayLike

from fe_shaft.rolling.arrays import Array, floats
from fe_shaft.rolling.kinds import BALLS, Kind
from fe_shaft.rolling.refusal import impossible


class LoadFactors(NamedTuple):
    """Factors of the equivalent load; `y_light` is Y1, zero for single rows."""

    e: Array
    y_light: Array
    x: Array
    y: Array


#: Contact angle [deg] of the tables' columns; 5 deg counts as a deep-groove bearing.
_ANGLES = np.array([5.0, 10.0, 15.0, 20.0, 25.0, 30.0, 35.0, 40.0, 45.0])
#: Lines of the tables: f0 i Fa / C0 of deep-groove bearings, and of the columns of 10 and 15 deg.
_LINES = np.array([
    [0.172, 0.345, 0.689, 1.03, 1.38, 2.07, 3.45, 5.17, 6.89],
    [0.175, 0.35, 0.7, 1.05, 1.4, 2.1, 3.5, 5.25, 7.0],
    [0.178, 0.357, 0.714, 1.07, 1.43, 2.14, 3.57, 5.35, 7.14],
])  # fmt: skip
_Y = np.array([
    [2.30, 1.99, 1.71, 1.55, 1.45, 1.31, 1.15, 1.04, 1.00],
    [1.88, 1.71, 1.52, 1.41, 1.34, 1.23, 1.10, 1.01, 1.00],
    [1.47, 1.40, 1.30, 1.23, 1.19, 1.12, 1.02, 1.00, 1.00],
])  # fmt: skip
_Y_STEEP = np.array([1.00, 0.87, 0.76, 0.66, 0.57, 0.50])
_X = np.array([0.56, 0.46, 0.44, 0.43, 0.41, 0.39, 0.37, 0.35, 0.33])
#: Two rows of angular-contact balls, from 20 deg on.
_TWO_X = np.array([0.70, 0.67, 0.63, 0.60, 0.57, 0.54])
_TWO_Y1 = np.array([1.09, 0.92, 0.78, 0.66, 0.55, 0.47])
_TWO_Y = np.array([1.63, 1.41, 1.24, 1.07, 0.93, 0.81])
#: Y0 of one row, 5 to 45 deg.
_Y0 = np.array([0.52, 0.50, 0.46, 0.42, 0.38, 0.33, 0.29, 0.26, 0.22])


def load_factors(
    kind: Kind, contact_angle: ArrayLike = 0.0, relative_axial_load: ArrayLike = 0.0, rows: int = 1
) -> LoadFactors:
    """X, Y, Y1 and e of a radial bearing.

    Parameters
    ----------
    kind : type
    contact_angle : [rad]; no matter for deep-groove and cylindrical bearings
    relative_axial_load : f0 i Fa / C0; matters for deep-groove bearings and contact angles below 20 deg
    rows : 1 or 2

    Raises
    ------
    ModelError
        Where there is no factor: axial load on rollers without a contact angle, balls steeper than 45 deg, two rows
        of balls flatter than 20 deg.
    """
    angle, load = np.broadcast_arrays(floats(contact_angle), floats(relative_axial_load))
    if kind is Kind.DEEP_GROOVE_BALL:
        return _one_row_of_balls(np.full(angle.shape, 5.0), load)
    if kind is Kind.ANGULAR_CONTACT_BALL:
        return _two_rows_of_balls(np.degrees(angle)) if rows == 2 else _one_row_of_balls(np.degrees(angle), load)
    if kind in (Kind.CYLINDRICAL_ROLLER, Kind.NEEDLE_ROLLER):
        raise impossible("kind", f"a {kind} bearing has no axial load to be made equivalent. Take P = Fr.")
    return _by_tangent(kind, angle, rows)


def _one_row_of_balls(degrees: Array, load: Array) -> LoadFactors:
    _angles_of_table(degrees, 5.0)
    columns = [np.interp(load, lines, values) for lines, values in zip(_LINES, _Y, strict=True)]
    stacked = np.stack([*columns, *(np.full(load.shape, value) for value in _Y_STEEP)])
    y, x = _between(stacked, degrees), np.interp(degrees, _ANGLES, _X)
    return LoadFactors((1 - x) / y, np.zeros_like(y), x, y)


def _between(columns: Array, degrees: Array) -> Array:
    """Columns (9, ...) of the angles, read straight between two of them."""
    place = np.interp(degrees, _ANGLES, np.arange(_ANGLES.size))
    left = np.minimum(place.astype(int), _ANGLES.size - 2)
    low, high = (np.take_along_axis(columns, (left + more)[None], 0)[0] for more in (0, 1))
    return np.asarray(low + (place - left) * (high - low))


def _two_rows_of_balls(degrees: Array) -> LoadFactors:
    _angles_of_table(degrees, 20.0)
    light, x, y = (np.interp(degrees, _ANGLES[3:], column) for column in (_TWO_Y1, _TWO_X, _TWO_Y))
    return LoadFactors((1 - x) / (y - light), light, x, y)


def _angles_of_table(degrees: Array, low: float) -> None:
    outside = (degrees < low - 1e-9) | (degrees > 45.0 + 1e-9)
    if outside.any():
        raise impossible(
            "contact_angle",
            f"{degrees[outside].flat[0]:g} deg is not in the table of ISO 281, {low:g} to 45 deg. "
            "Take the maker's X and Y.",
        )


def _by_tangent(kind: Kind, angle: Array, rows: int) -> LoadFactors:
    """Rollers and self-aligning balls: e = 1.5 tan a; a row 0.4 and 0.4 cot a, two rows 0.67 (0.65) and cotangents."""
    if not ((angle > 0) & (angle < np.pi / 2)).all():
        raise impossible("contact_angle", f"a {kind} bearing needs one between 0 and 90 deg. Take atan(e / 1.5).")
    cotangent = 1 / np.tan(angle)
    light, x, y = (0.0, 0.4, 0.4) if rows == 1 else (0.42, 0.65, 0.65) if kind in BALLS else (0.45, 0.67, 0.67)
    return LoadFactors((1 - x) / ((y - light) * cotangent), light * cotangent, np.full(angle.shape, x), y * cotangent)


def equivalent_load(factors: LoadFactors, radial: ArrayLike, axial: ArrayLike) -> Array:
    """Dynamic equivalent load P [N] from Fr and Fa [N], both counted positive."""
    fr, fa = np.abs(floats(radial)), np.abs(floats(axial))
    light, heavy = fr + factors.y_light * fa, factors.x * fr + factors.y * fa
    return np.asarray(np.where(fa <= factors.e * fr, light, heavy))


def static_factors(kind: Kind, contact_angle: float = 0.0, rows: int = 1) -> tuple[float, float]:
    """X0, Y0 of ISO 76."""
    if kind is Kind.DEEP_GROOVE_BALL:
        return 0.6, 0.5
    if kind is Kind.ANGULAR_CONTACT_BALL:
        _angles_of_table(np.asarray(np.degrees(contact_angle)), 5.0)
        one = float(np.interp(np.degrees(contact_angle), _ANGLES, _Y0))
        return (0.5, one) if rows == 1 else (1.0, 2 * one)
    if contact_angle <= 0:
        return 1.0, 0.0
    one = 0.22 / float(np.tan(contact_angle))
    return (0.5, one) if rows == 1 else (1.0, 2 * one)


def static_equivalent_load(factors: tuple[float, float], radial: ArrayLike, axial: ArrayLike) -> Array:
    """Static equivalent load P0 [N], not less than Fr."""
    fr, fa = np.abs(floats(radial)), np.abs(floats(axial))
    return np.asarray(np.maximum(factors[0] * fr + factors[1] * fa, fr))
