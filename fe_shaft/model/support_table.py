"""Supports in numbers: where they hold, what they hold, how they give.

Order of the six displacements: ux uy uz rx ry rz in the shaft's frame.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from functools import cached_property
from typing import TYPE_CHECKING, Any

import numpy as np
from numpy.typing import NDArray

from fe_shaft.model.actions import clock
from fe_shaft.model.support import Bearing

if TYPE_CHECKING:
    from fe_shaft.model.system import Model

Array = NDArray[np.float64]
Bools = NDArray[np.bool_]

UX, UY, UZ, RX, RY, RZ = range(6)
HELD = {"radial": (UY, UZ), "axial": (UX,), "tilt": (RY, RZ), "spin": (RX,)}
STOPS = {"stops_left": -1, "stops_right": 1}


@dataclass(frozen=True)
class SupportTable:
    """All supports of a model, in its order; n of them.

    Attributes
    ----------
    names, shafts : of the supports and of the shafts they are on
    place : (n,) [m], middle of the ring on its shaft
    centre : (n,) [m], load centre to the right of the middle
    held : (n, 6), what the support holds, one-way stops left out
    one_way : (n,), -1 keeps the shaft from moving left only, +1 right only, 0 neither
    pin : (n,), whether it gives nothing
    law : (n, 6, 6), stiffness of the bearings at their load centres, 0 for pins
    gap : (n, 6), prescribed displacement of the bore at the load centre
    seats : law (6, 6) and rigid directions (6,) of the seats that give, by number of the support
    """

    names: tuple[str, ...]
    shafts: tuple[str, ...]
    place: Array
    centre: Array
    held: Bools
    one_way: NDArray[np.intp]
    pin: Bools
    law: Array
    gap: Array
    seats: Mapping[int, tuple[Array, Bools]]

    @cached_property
    def everywhere(self) -> Array:
        """The unit matrix once for each support, (n, 6, 6)."""
        return np.tile(np.eye(6), (len(self.names), 1, 1))

    @cached_property
    def links(self) -> Array:
        """Rigid links from the rings' middles to the load centres, (n, 6, 6)."""
        links = self.everywhere.copy()
        links[:, UY, RZ], links[:, UZ, RY] = self.centre, -self.centre
        return links

    @cached_property
    def motion_links(self) -> Array:
        """Rigid links from the shafts' left ends to the load centres, (n, 6, 6)."""
        links = self.everywhere.copy()
        links[:, UY, RZ], links[:, UZ, RY] = self.load_place, -self.load_place
        return links

    @cached_property
    def on_shaft(self) -> Mapping[str, NDArray[np.intp]]:
        """Numbers of the supports of each shaft."""
        names = np.array(self.shafts, dtype=object)
        return {name: np.flatnonzero(names == name) for name in dict.fromkeys(self.shafts)}

    def held_directions(self, shaft: str, shaft_sense: Mapping[str, int]) -> Array:
        """Directions in which the supports hold a shaft against its rigid motions, (k, 6).

        A row times the six displacements of the shaft's left end is a support's movement in a direction it holds.
        """
        key = (shaft, shaft_sense.get(shaft, 0) if self.stops else 0)
        if key not in self._rows:
            self._rows[key] = self._held_directions(shaft, self.holding(shaft_sense))
        return self._rows[key]

    @cached_property
    def _rows(self) -> dict[tuple[str, int], Array]:
        return {}

    def _held_directions(self, shaft: str, holding: Bools) -> Array:
        rows, laws = [np.zeros((0, 6))], self.laws(holding)
        for k, name in enumerate(self.shafts):
            if name == shaft:
                rows.append(self.own_directions(k, holding[k], laws[k]) @ self.motion_links[k])
        return np.concatenate(rows)

    def own_directions(self, k: int, holding: Bools, law: Array) -> Array:
        """Directions in which support k holds the shaft at its load centre, (r, 6), its seat included."""
        own = np.eye(6)[holding] if self.pin[k] else _stiff_directions(law)
        return _through_seat(own, *self.seats[k]) if k in self.seats else own

    @cached_property
    def load_place(self) -> Array:
        """Load centres, (n,) [m] from the left ends of their shafts."""
        return self.place + self.centre

    @cached_property
    def gaps(self) -> bool:
        """Whether any bore lies out of line."""
        return bool(self.gap.any())

    @cached_property
    def pins(self) -> bool:
        """Whether any support is a pin."""
        return bool(self.pin.any())

    @cached_property
    def bearings(self) -> NDArray[np.intp]:
        """Numbers of the supports that give."""
        return np.flatnonzero(~self.pin)

    @cached_property
    def stops(self) -> bool:
        """Whether any support holds one way only."""
        return bool(self.one_way.any())

    def holding(self, shaft_sense: Mapping[str, int]) -> Bools:
        """What is held while the shafts are pushed the given ways (-1, 0, +1), (n, 6)."""
        if not self.stops:
            return self.held
        sense = np.array([shaft_sense.get(name, 0) for name in self.shafts])
        held = self.held.copy()
        held[:, UX] |= (self.one_way != 0) & ((sense == 0) | (sense == self.one_way))
        return held

    def laws(self, holding: Bools) -> Array:
        """Stiffness of the bearings: an axial one counts only where the bearing holds the shaft axially."""
        if not self.stops:  # a bearing's own law knows already what it holds both ways
            return self.law
        loose = ~holding[:, UX]
        law = self.law.copy()
        law[loose, UX, :] = law[loose, :, UX] = 0.0
        return law


def tabulate(model: Model) -> SupportTable:
    """Read the supports of a model into arrays."""
    supports = model.supports
    n = len(supports)
    held, one_way = np.zeros((n, 6), dtype=bool), np.zeros(n, dtype=np.intp)
    law, gap = np.zeros((n, 6, 6)), np.zeros((n, 6))
    seats = {}
    for k, support in enumerate(supports):
        for word in support.holds:
            if word in HELD:
                held[k, HELD[word]] = True
            else:
                one_way[k] = STOPS[word]
        if support.offset is not None or support.bore_tilt is not None:
            gap[k] = _ground_offset(support)
        if isinstance(support, Bearing):
            law[k] = support.law
            seat = _seat(support)
            if seat is not None:
                seats[k] = seat
    places = [model.places[support.name] for support in supports]
    table = SupportTable(
        names=tuple(support.name for support in supports),
        shafts=tuple(place.shaft for place in places),
        place=np.array([place.x for place in places]),
        centre=np.array([0.0 if s.load_centre is None else s.load_centre.si for s in supports]),
        held=held,
        one_way=one_way,
        pin=np.array([not isinstance(s, Bearing) for s in supports], dtype=bool),
        law=law,
        gap=gap,
        seats=seats,
    )
    for shaft in model.shafts:
        table.held_directions(shaft.name, {})
    return table


def _ground_offset(support: Any) -> Array:
    """Prescribed displacement of the bore at the load centre: the bore turns about the ring's middle."""
    out = np.zeros(6)
    if support.offset is not None:
        out[:3] = support.offset.si * clock(support.offset_angle.si)
    if support.bore_tilt is not None:
        lean = support.bore_tilt.si * clock(support.bore_tilt_angle.si)
        out[RY], out[RZ] = -lean[2], lean[1]
    if support.load_centre is not None:
        out[UY] += support.load_centre.si * out[RZ]
        out[UZ] -= support.load_centre.si * out[RY]
    return out


def _seat(bearing: Bearing) -> tuple[Array, Bools] | None:
    """Stiffness of a seat and the directions in which it is rigid; None where all of it is rigid."""
    found = _written_seat(bearing)
    if not bearing.slides:
        return found
    k, rigid = (np.zeros((6, 6)), np.ones(6, dtype=bool)) if found is None else found
    k[UX, :] = k[:, UX] = 0.0
    return k, rigid & (np.arange(6) != UX)


def _written_seat(bearing: Bearing) -> tuple[Array, Bools] | None:
    """The same as it is written; rings that slide do not come into it."""
    if bearing.seat is None:
        return None
    if bearing.seat.matrix_si is not None:
        return np.array(bearing.seat.matrix_si), np.zeros(6, dtype=bool)
    k = bearing.seat.diagonal(0.0)
    return np.diag(k), k == 0.0


def _stiff_directions(k: Array) -> Array:
    """Directions in which a stiffness is not zero, (r, 6), scaled by its own diagonal so that units do not matter."""
    size = np.sqrt(k.diagonal().clip(min=0.0))
    used = size > 0
    if np.count_nonzero(k) == np.count_nonzero(used):
        return np.asarray(np.eye(6)[used])
    values, vectors = np.linalg.eigh(k[np.ix_(used, used)] / np.outer(size[used], size[used]))
    out = np.zeros((len(values), 6))
    out[:, used] = vectors.T * size[used]
    stiff = out[values > 1e-12]
    return np.asarray(stiff / np.linalg.norm(stiff, axis=1, keepdims=True))


def _through_seat(held: Array, seat: Array, rigid: Bools) -> Array:
    """Those of the directions that a bearing holds (k, 6) which its seat holds as well; bases of both."""
    stood = np.concatenate([_stiff_directions(seat), np.eye(6)[rigid]])
    return held if len(stood) == 6 else _null(np.concatenate([_null(held), _null(stood)]))


def _null(rows: Array) -> Array:
    """Basis of all that is perpendicular to the rows, (r, 6)."""
    _, size, v = np.linalg.svd(np.concatenate([rows, np.zeros((6, 6))]), full_matrices=False)
    return np.asarray(v[size < 1e-9])
