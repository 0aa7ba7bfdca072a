"""The model file reference of the README, from the model's own metadata.

`python -m tests.readme_reference` writes it between its two marks; a test holds the README against it.
"""

from __future__ import annotations

from collections import defaultdict
from pathlib import Path

from fe_shaft.model.reference import Entry, entries

README = Path(__file__).resolve().parent.parent / "README.md"
BEGIN, END = "<!-- reference: begin -->\n", "<!-- reference: end -->\n"
COMMON_IN = 4  # groups that a key must share word for word to be told once


def reference() -> str:
    """Markdown: keys that many groups share, then each group with its own."""
    groups: dict[str, list[Entry]] = defaultdict(list)
    users: dict[tuple[str, str], list[str]] = defaultdict(list)
    for entry in entries():
        groups[entry.group].append(entry)
        if entry.group:
            users[entry.key, entry.description].append(entry.group)
    common = {pair: used for pair, used in users.items() if len(used) >= COMMON_IN}
    first = {pair: next(e for e in entries() if (e.key, e.description) == pair) for pair in common}
    out = ["#### Top of the file", *_table(groups.pop("")), "", "#### Keys that many tables share", *_HEAD_IN]
    out += [_row(first[pair], ", ".join(f"`{group}`" for group in used)) for pair, used in common.items()]
    for group, rows in groups.items():
        own = [row for row in rows if (row.key, row.description) not in common]
        if own:
            title = f"[{group}]" if group in ("housing", "estimates", "units") else f"[{group}.NAME]"
            out += ["", f"#### `{title.replace('.NAME', '') if '.' in group else title}`", *_table(own)]
    return "\n".join(out) + "\n"


_HEAD = ["", "| key | holds | left out | meaning | example |", "| --- | --- | --- | --- | --- |"]
_HEAD_IN = ["", "| key | holds | left out | meaning | example | in |", "| --- | --- | --- | --- | --- | --- |"]


def _table(rows: list[Entry]) -> list[str]:
    return [*_HEAD, *(_row(row) for row in rows)]


def _row(entry: Entry, *more: str) -> str:
    left_out = "must be written" if entry.required else entry.default or "-"
    cells = (f"`{entry.key}`", entry.kind, left_out, entry.description, f"`{entry.example}`", *more)
    return "| " + " | ".join(cell.replace("|", "\\|") for cell in cells) + " |"


def split(text: str) -> tuple[str, str, str]:
    """The README before, inside and after the marks."""
    before, rest = text.split(BEGIN)
    inside, after = rest.split(END)
    return before, inside, after


if __name__ == "__main__":
    before, _, after = split(README.read_text(encoding="utf-8"))
    README.write_text(before + BEGIN + reference() + END + after, encoding="utf-8")
