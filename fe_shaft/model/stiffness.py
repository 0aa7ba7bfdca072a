"""How a bearing or its seat gives way: direction by direction, or as a symmetric 6 x 6 matrix.

Order of all six: ux uy uz rx ry rz in the shaft's frame, that is axial, up, front, spin, tilt about the 12 o'clock
axis (tilt_up), tilt about the 3 o'clock axis (tilt_front).
"""

from collections.abc import Iterator
from typing import TYPE_CHECKING, Annotated, Any, Literal, Self, Unpack

import numpy as np
from numpy.typing import NDArray
from pydantic import Field
from typing_extensions import override

from fe_shaft.model.kinds import Choice, Factor, Kind, Text, shown, thing
from fe_shaft.model.quantity import RadialStiffness, TiltStiffness
from fe_shaft.model.refusal import refuse
from fe_shaft.model.words import Fault, Words
from fe_shaft.units import FACTORS, Value, unit_factor

if TYPE_CHECKING:
    from fe_shaft.model.keywords import MatrixUnitsWords, MatrixWords, SeatWords, StiffnessWords

Array = NDArray[np.float64]
SYMMETRY = 1e-6  # relative to the diagonal: what digits of a printed matrix may differ by
LARGEST_ENTRY = 1e30


def either(noun: Words, whole: str, parts: tuple[str, str]) -> Iterator[Fault]:
    """One figure for both planes, or one for each of them."""
    given = noun.given
    if whole in given and given & set(parts):
        yield Fault(
            (whole,),
            f"{whole} stands beside {' and '.join(p for p in parts if p in given)}. Write {whole}, or {parts[0]} and "
            f"{parts[1]}.",
        )
    elif len(given & set(parts)) == 1:
        there, missing = parts if parts[0] in given else parts[::-1]
        yield Fault((missing,), f"{missing} is not written, only {there}. Write both, or {whole} for all directions.")


class Springs(Words):
    """Stiffness direction by direction."""

    radial: RadialStiffness | None = Field(
        default=None, description="Stiffness across the shaft, the same in all directions.", examples=["~93 N/um"]
    )
    up: RadialStiffness | None = Field(
        default=None, description="Stiffness towards 12 o'clock, instead of `radial`.", examples=["120 N/um"]
    )
    front: RadialStiffness | None = Field(
        default=None, description="Stiffness towards 3 o'clock, instead of `radial`.", examples=["80 N/um"]
    )
    axial: RadialStiffness | None = Field(default=None, description="Stiffness along the shaft.", examples=["~60 N/um"])
    tilt: TiltStiffness | None = Field(
        default=None, description="Stiffness against tilting, the same in all directions.", examples=["~5 N m/mrad"]
    )
    tilt_up: TiltStiffness | None = Field(
        default=None, description="Stiffness against tilting about the 12 o'clock axis.", examples=["5 N m/mrad"]
    )
    tilt_front: TiltStiffness | None = Field(
        default=None, description="Stiffness against tilting about the 3 o'clock axis.", examples=["5 N m/mrad"]
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        yield from either(self, "radial", ("up", "front"))
        yield from either(self, "tilt", ("tilt_up", "tilt_front"))

    @property
    def written_figures(self) -> set[str]:
        """Keys of the figures that were written."""
        return self.given - {"source", "range_check"}

    @property
    def values(self) -> tuple[Value | None, ...]:
        """The six stiffnesses in the order ux uy uz rx ry rz; None where nothing is written."""
        return (
            self.axial, self.up or self.radial, self.front or self.radial,
            None, self.tilt_up or self.tilt, self.tilt_front or self.tilt,
        )  # fmt: skip

    def diagonal(self, missing: float) -> Array:
        """The six stiffnesses: (6,) [N/m, N m/rad], `missing` where nothing is written."""
        return np.array([missing if value is None else value.si for value in self.values])

    @property
    def estimated(self) -> bool:
        """Whether any of the figures is an estimate."""
        return any(value is not None and value.estimated for value in self.values)

    def at_end(self, which: Literal["low", "high"]) -> Self:
        """The same with every estimate at one end of its band."""
        ends = {key: getattr(self, key) for key in self.given}
        changed = {key: each.end(which) if isinstance(each, Value) else each for key, each in ends.items()}
        return type(self).model_construct(set(self.given), **{**dict(self.__dict__), **changed})


class Stiffness(Springs):
    """How a bearing gives way; directions that are not written have no stiffness."""

    if TYPE_CHECKING:

        def __init__(self, **words: Unpack[StiffnessWords]) -> None: ...

    @override
    def faults_together(self) -> Iterator[Fault]:
        yield from super().faults_together()
        if not self.written_figures:
            yield Fault((), 'the table is empty. Write { radial = "93 N/um" }.')


class MatrixUnits(Words):
    """Units in which a matrix is written."""

    if TYPE_CHECKING:

        def __init__(self, **words: Unpack[MatrixUnitsWords]) -> None: ...

    force: Annotated[str, Choice(*FACTORS["force"])] = Field(description="Unit of force.", examples=["N"])
    length: Annotated[str, Choice(*FACTORS["length"])] = Field(description="Unit of length.", examples=["mm"])
    angle: Annotated[str, Choice(*FACTORS["angle"])] = Field(description="Unit of rotations.", examples=["rad"])


class Rows(Kind):
    """Six rows of six numbers."""

    caption = "six rows of six numbers"
    _number = Factor(-LARGEST_ENTRY, LARGEST_ENTRY)

    @override
    def check(self, raw: Any) -> tuple[tuple[float, ...], ...]:
        raw = raw.tolist() if isinstance(raw, np.ndarray) else raw
        if not isinstance(raw, list | tuple):
            raise refuse(f"{shown(raw)} is {thing(raw)}, not six rows of six numbers. Write rows = [[...], ...].")
        if len(raw) != 6:
            raise refuse(f"there are {len(raw)} rows, not six (ux uy uz rx ry rz).")
        return tuple(self._row(index, row) for index, row in enumerate(raw, 1))

    def _row(self, index: int, row: Any) -> tuple[float, ...]:
        if not isinstance(row, list | tuple):
            raise refuse(f"row {index} is {thing(row)}, not a list of six numbers.")
        if len(row) != 6:
            raise refuse(f"row {index} has {len(row)} numbers, not six (ux uy uz rx ry rz).")
        try:
            return tuple(self._number.check(each) for each in row)
        except ValueError as error:
            raise refuse(f"row {index}: {error}") from None

    @override
    def json(self) -> dict[str, Any]:
        row = {"type": "array", "items": {"type": "number"}, "minItems": 6, "maxItems": 6}
        return {"type": "array", "items": row, "minItems": 6, "maxItems": 6}


class Matrix(Words):
    """A symmetric 6 x 6 stiffness in the shaft's frame, order ux uy uz rx ry rz."""

    if TYPE_CHECKING:

        def __init__(self, **words: Unpack[MatrixWords]) -> None: ...

    rows: Annotated[tuple[tuple[float, ...], ...], Rows()] | None = Field(
        default=None,
        description="Six rows of six bare numbers; `units` says in which units.",
        examples=[[[60e3, 0, 0, 0, 0, 0], [0, 93e3, 0, 0, 0, 0]]],
    )
    file: Annotated[str, Text()] | None = Field(
        default=None,
        description="Model files only: file with the rows, beside the model (six lines of six numbers, or Matrix "
        "Market).",
        examples=["bearing.mtx"],
    )
    units: MatrixUnits = Field(
        description="Units of the numbers.", examples=[{"force": "N", "length": "mm", "angle": "rad"}]
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        if "file" in self.given:
            yield Fault(("file",), "only a model file reads files. In a script write rows = numpy.loadtxt(...).")
        elif "rows" not in self.given:
            yield Fault(("rows",), 'rows is not written. Write six rows of six numbers, or file = "bearing.mtx".')
        if self.rows is None or self.units is None or None in (self.units.force, self.units.length, self.units.angle):
            return
        raw = self._raw_si()
        scale = np.sqrt(np.abs(np.outer(np.diag(raw), np.diag(raw))))
        for i, j in zip(*np.triu_indices(6, 1), strict=True):
            upper, lower = self.rows[i][j], self.rows[j][i]
            if abs(raw[i, j] - raw[j, i]) > SYMMETRY * max(scale[i, j], abs(raw[i, j]), abs(raw[j, i])):
                yield Fault(
                    ("rows",),
                    f"row {i + 1} column {j + 1} is {upper:.6g}, row {j + 1} column {i + 1} is {lower:.6g}: not "
                    "symmetric. Make them equal.",
                )
                return
        yield from self._sign_faults()

    def _sign_faults(self) -> Iterator[Fault]:
        """A stiffness never pushes along: no negative eigenvalue beyond rounding of the printed digits."""
        matrix = self.si
        root = np.sqrt(np.abs(np.diag(matrix)))
        scaled = matrix / np.outer(np.where(root > 0, root, 1.0), np.where(root > 0, root, 1.0))
        least = np.linalg.eigvalsh(scaled)[0]
        if not matrix.any():
            yield Fault(("rows",), "all numbers are 0. Write the stiffness, or leave the bearing out.")
        elif least < -6 * SYMMETRY:
            yield Fault(
                ("rows",),
                f"the matrix pushes along in some direction (scaled eigenvalue {least:.3g}). Check signs and units.",
            )

    def _raw_si(self) -> Array:
        force = unit_factor("force", self.units.force)
        length, angle = unit_factor("length", self.units.length), unit_factor("angle", self.units.angle)
        rows = np.repeat([1.0, length], 3)  # forces, then moments = force x length
        step = np.repeat([length, angle], 3)
        matrix: Array = np.asarray(self.rows) * force * rows[:, None] / step[None, :]
        return matrix

    @property
    def si(self) -> Array:
        """The matrix in SI: (6, 6) [N/m, N, N m/rad], exactly symmetric."""
        raw = self._raw_si()
        return 0.5 * (raw + raw.T)


class Seat(Springs):
    """What a bearing stands in; directions that are not written are rigid."""

    if TYPE_CHECKING:

        def __init__(self, **words: Unpack[SeatWords]) -> None: ...

    matrix: Matrix | None = Field(
        default=None,
        description="The whole seat as a 6 x 6 matrix, instead of single directions.",
        examples=[{"file": "seat.mtx"}],
    )

    @override
    def faults_together(self) -> Iterator[Fault]:
        yield from super().faults_together()
        single = self.written_figures - {"matrix"}
        if "matrix" in self.given and single:
            yield Fault(("matrix",), f"matrix stands beside {', '.join(sorted(single))}. Write one of them.")
        if not single and "matrix" not in self.given:
            yield Fault((), 'the table is empty. Write { radial = "400 N/um" }.')

    @property
    def matrix_si(self) -> Array | None:
        """The 6 x 6 matrix in SI, None if the seat is written direction by direction."""
        return None if self.matrix is None else self.matrix.si
