"""What was understood of a model, before anything is believed: parts, forces in words, thrust and torque, defaults.

The model is solved once on the way, without bands and verdicts, because the supports that hold a thrust are known from
the reactions alone and because a free motion must show here already.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import asdict, dataclass
from typing import TYPE_CHECKING, Any

from fe_shaft.errors import FreeMotionError, LoadError, SolutionError, UsageError, nearest
from fe_shaft.version import VERSION as PROGRAM

if TYPE_CHECKING:
    from fe_shaft.model.notes import Note
    from fe_shaft.model.system import Model

VERSION = 1  # of the record
#: Units of the record; all numbers in it are SI.
SI_UNITS = {"length": "m", "mass": "kg", "force": "N", "moment": "N m"}


@dataclass(frozen=True)
class PartCheck:
    """A part on a shaft, as understood.

    Attributes
    ----------
    x : [m], its middle from the shaft's left end
    words : what it is, phrase by phrase
    """

    name: str
    kind: str
    x: float
    words: tuple[str, ...]


@dataclass(frozen=True)
class ShaftCheck:
    """A shaft, as understood.

    Attributes
    ----------
    length, thinnest, thickest : [m]; the last two are outer diameters
    mass : [kg], 0 where a material has no density
    parts : from left to right
    """

    name: str
    length: float
    thinnest: float
    thickest: float
    widest_bore: float
    segments: int
    materials: tuple[str, ...]
    mass: float
    parts: tuple[PartCheck, ...]


@dataclass(frozen=True)
class LoadCheck:
    """What a part does to its shaft in one case.

    Attributes
    ----------
    role : "driven" where power enters, "drives" where it leaves, else empty
    what : "tooth force", "pull", "torque", "force"
    axial, up, front : [N], to the right, towards 12 o'clock, towards 3 o'clock
    torque : [N m], clockwise from left
    words : the same in words
    """

    part: str
    role: str
    what: str
    axial: float
    up: float
    front: float
    torque: float
    words: tuple[str, ...]


@dataclass(frozen=True)
class BalanceCheck:
    """Thrust and torque of one shaft in one case.

    Attributes
    ----------
    thrust : [N], sum of all axial loads, + to the right
    thrust_held_by : axial force [N] on the shaft by support; empty where nothing holds it or nothing was solved
    torque_in, torque_out : [N m], sums of the torques with and against the larger of the two
    torque_held_by : torque [N m] on the shaft by what holds its spin or takes out what is left over
    words : the same in words
    """

    shaft: str
    thrust: float
    thrust_held_by: dict[str, float]
    torque_in: float
    torque_out: float
    torque_held_by: dict[str, float]
    words: tuple[str, str]


@dataclass(frozen=True)
class CaseCheck:
    """One load case, as understood.

    Attributes
    ----------
    power : power, speed and turning in words
    torque : [N m] where power enters, torque_factor included, clockwise from left
    like, factor : earlier case with the same loads (weights aside), and how many times they are as large
    """

    name: str
    power: str
    torque: float
    loads: tuple[LoadCheck, ...]
    balances: tuple[BalanceCheck, ...]
    like: str = ""
    factor: float = 1.0


@dataclass(frozen=True)
class Check:
    """A valid model, as understood; ``print`` shows it.

    Attributes
    ----------
    title : of the model
    counts : how many of each kind, in words
    shafts, cases : as understood
    limits : one line each
    taken : what is not written and so taken, each with the key that changes it
    notes : doubts, each with the key that changes it
    estimates : what is only estimated, with its band, in words
    sources : what the model says of its sources, by address
    obstacle : why it cannot be solved; empty if it can
    exit_code : 0, or that of the obstacle
    along : unit of lengths along the shaft in the text
    """

    title: str
    counts: tuple[str, ...]
    shafts: tuple[ShaftCheck, ...]
    cases: tuple[CaseCheck, ...]
    limits: tuple[str, ...]
    taken: tuple[Note, ...]
    notes: tuple[Note, ...]
    estimates: tuple[str, ...]
    sources: dict[str, str]
    obstacle: str = ""
    exit_code: int = 0
    along: str = "mm"

    @property
    def ok(self) -> bool:
        """Whether it can be solved."""
        return not self.exit_code

    def text(self, name: str = "", *, cases: Sequence[str] | None = None, sources: bool = False) -> str:
        """The printed text, plain ASCII, at most 100 columns.

        Parameters
        ----------
        name : str
            What to call the model in the first line; its title if empty.
        cases : sequence of str or None
            Names of the cases shown in full; the first one if None.
        sources : bool
            Whether the sources are listed.

        Raises
        ------
        UsageError
            No such case.
        """
        from fe_shaft.analysis.checking.text import check_text

        known = [case.name for case in self.cases]
        for case in cases or ():
            if case not in known:
                raise UsageError(f'no case is called "{case}". {nearest(case, known)}'.rstrip())
        return check_text(self, name or self.title or "The model", known[:1] if cases is None else cases, sources)

    def __str__(self) -> str:
        return self.text()

    def to_record(self) -> dict[str, Any]:
        """Everything as plain data, SI; its head is that of all records."""
        head = {"format": "fe_shaft check", "version": VERSION, "program": f"fe_shaft {PROGRAM}", "units": SI_UNITS}
        return head | {"ok": self.ok} | {key: value for key, value in asdict(self).items() if key != "along"}

    def to_json(self) -> str:
        """Everything as JSON text, SI."""
        from fe_shaft.results.record import to_json

        return to_json(self.to_record())

    def _repr_html_(self) -> str:
        from fe_shaft.results.html import preformatted

        return preformatted(str(self))


def check(model: Model) -> Check:
    """Say what was understood of a model, and whether it can be solved.

    Parameters
    ----------
    model : Model
        Valid by construction.

    Returns
    -------
    Check
        A free motion or a load that cannot be carried is a finding in it (`Check.obstacle`), not an exception.
    """
    from fe_shaft.analysis.checking.cases import check_cases
    from fe_shaft.analysis.checking.parts import check_shafts, counts
    from fe_shaft.analysis.checking.taken import estimates_in_words, limits_in_words, sources_of, taken_and_notes
    from fe_shaft.analysis.recovery import solve_once
    from fe_shaft.results.shown import Shown

    results, obstacle, code = None, "", 0
    try:
        results = solve_once(model)
    except (FreeMotionError, LoadError, SolutionError) as error:
        obstacle, code = str(error), error.exit_code
    taken, notes = taken_and_notes(model, () if results is None else results.balances)
    return Check(
        title=model.title,
        counts=counts(model),
        shafts=check_shafts(model),
        cases=check_cases(model, results),
        limits=limits_in_words(model),
        taken=taken,
        notes=notes,
        estimates=estimates_in_words(model),
        sources=sources_of(model),
        obstacle=obstacle,
        exit_code=code,
        along=Shown.of(model).along,
    )
