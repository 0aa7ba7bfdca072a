"""The README's shaft without shoulders, with them, and as a solid: its table and its picture.

`python -m tests.readme_shoulders` draws the picture and writes the table between its two marks; a test holds the README
against it. The shaft is K02 of tests/evidence/calculix_shafts.json, the solid CalculiX's.
"""

from __future__ import annotations

from pathlib import Path

from matplotlib.axes import Axes
from matplotlib.figure import Figure

from tests.evidence.calculix_shafts import read
from tests.evidence.whole_shafts import MEASURES, Shaft, counted, measures, solve
from tests.readme_reference import README

BEGIN, END = "<!-- shoulders: begin -->\n", "<!-- shoulders: end -->\n"
PICTURE = README.parent / "examples" / "shoulders.png"
NAME = "K02"
BLACK, BLUE = "#000000", "#0072B2"
#: Loads of the table, and what one of the file's units is then in um or mrad.
SCALE = {
    "defl_load_per_F_load": ("deflection at the load, 10 kN there", "um", 1e7),
    "slope_tip_per_F_load": ("slope of the right end, 10 kN at the load", "mrad", 1e7),
    "slope_tip_per_M_tip": ("slope of the right end, 100 N m there", "mrad", 1e8),
    "defl_tip_per_M_tip": ("deflection of the right end, 100 N m there", "um", 1e8),
    "twist_per_T": ("twist, 500 N m", "mrad", 5e8),
    "extension_per_N": ("extension, 10 kN", "um", 1e7),
}


def shaft() -> Shaft:
    """The shaft, its loads, and what the solid gave."""
    return next(each for each in read()["shafts"] if each["name"] == NAME)


def rows() -> list[tuple[str, str, float, float, float]]:
    """Measure, unit, plain beam, with shoulders, solid."""
    own = shaft()
    plain, with_them = (measures(own, solve(own, shoulders)) for shoulders in ("off", "on"))
    assert set(SCALE) <= set(counted(own)) <= set(MEASURES)
    return [
        (told, unit, *(abs(of[key]) * scale for of in (plain, with_them, own["truth"])))
        for key, (told, unit, scale) in SCALE.items()
    ]


def table() -> str:
    """Markdown."""
    head = "| of one shaft | plain beam | with shoulders | solid | plain, off by | with shoulders |"
    lines = [head, "| --- | --- | --- | --- | --- | --- |"]
    for told, unit, plain, corrected, solid in rows():
        numbers = " | ".join(f"{value:.3g} {unit}" for value in (plain, corrected, solid))
        off = " | ".join(f"{round(100 * (value / solid - 1), 1) + 0.0:+.1f} %" for value in (plain, corrected))
        lines.append(f"| {told} | {numbers} | {off} |")
    return "\n".join(lines) + "\n"


def split(text: str) -> tuple[str, str, str]:
    """The README before, inside and after the marks."""
    before, rest = text.split(BEGIN)
    inside, after = rest.split(END)
    return before, inside, after


def draw(path: Path) -> None:
    """The shaft's contour, and every measure in percent of the solid's."""
    figure = Figure(figsize=(9, 5.4), dpi=110, layout="constrained")
    top, bottom = figure.subplots(2, 1, height_ratios=(1, 1.5))
    _contour(top, shaft())
    _marks(bottom)
    figure.savefig(path, metadata={"Software": None})


def _contour(axes: Axes, own: Shaft) -> None:
    x, places, radii = 0.0, [], []
    for row in own["segments"]:
        places += [x, x + row["length"]]
        radii += [row["outer_d"] / 2] * 2
        x += row["length"]
    for side in (1, -1):
        axes.plot([0, *places, x], [0, *(side * r for r in radii), 0], color=BLACK, linewidth=1.4)
    axes.axhline(0, color=BLACK, linewidth=0.6, dashes=(12, 4, 2, 4))
    for (first, last), word in zip(
        [*own["support_slabs_z"], own["load_slab_z"]], ("held", "held", "load"), strict=True
    ):
        y = -38 if word == "held" else 34
        axes.plot([first, last], [y, y], color=BLACK, linewidth=4, solid_capstyle="butt")
        axes.text(
            (first + last) / 2, y - 5 if word == "held" else y + 3, word, ha="center", va="top" if y < 0 else "bottom"
        )
    axes.set(aspect="equal", xlim=(-6, x + 6), ylim=(-52, 46))
    axes.set_title("A gear shaft with a collar (invented), 164 mm long, steel", loc="left")
    axes.axis("off")


def _marks(axes: Axes) -> None:
    told = rows()
    heights = range(len(told), 0, -1)
    axes.axvline(100, color=BLACK, linewidth=2, label="solid (CalculiX)")
    for index, (face, label) in enumerate((("white", "plain beam"), (BLUE, "with shoulders"))):
        shares = [100 * row[2 + index] / row[4] for row in told]
        axes.plot(shares, heights, "o", markersize=9, color=BLUE, markerfacecolor=face, label=label)
        for share, height in zip(shares, heights, strict=True):
            where = (-9, 0) if index == 0 else (9, 0)
            axes.annotate(
                f"{share:.1f}", (share, height), where, textcoords="offset points", va="center",
                ha="right" if index == 0 else "left",
            )  # fmt: skip
    axes.set_yticks(heights, [row[0] for row in told])
    axes.set(xlabel="percent of what the solid gives", xlim=(84, 104), ylim=(0.4, len(told) + 0.6))
    axes.grid(axis="x", linewidth=0.4)
    axes.legend(loc="lower left", frameon=False)
    for side in ("top", "right"):
        axes.spines[side].set_visible(False)


if __name__ == "__main__":
    draw(PICTURE)
    before, _, after = split(README.read_text(encoding="utf-8"))
    README.write_text(before + BEGIN + table() + END + after, encoding="utf-8")
