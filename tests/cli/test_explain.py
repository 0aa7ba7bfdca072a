"""The pages of `explain`: every word has one, every reference leads somewhere."""

import re

import pytest

from fe_shaft.cli.catalogue import COMMANDS
from fe_shaft.cli.explain import _glossary, page
from fe_shaft.errors import UsageError
from fe_shaft.model.groups import GROUPS
from fe_shaft.model.material import BUILT_IN_NAMES
from fe_shaft.model.reference import entries
from fe_shaft.results.quantity import QUANTITIES
from fe_shaft.units import FACTORS

KEYS = sorted({entry.key for entry in entries()})


def fits(text: str) -> bool:
    return text.isascii() and max(map(len, text.splitlines())) <= 100


@pytest.mark.parametrize("key", KEYS)
def test_every_key_has_its_page(key):
    text = page(key)
    assert fits(text)
    entry = next(entry for entry in entries() if entry.key == key)
    assert entry.description.replace("`", "").split()[0] in text
    assert f"{key}   key of" in text


@pytest.mark.parametrize("word", [*GROUPS, *(cls.__name__.lower() for cls in GROUPS.values())])
def test_every_group_has_its_page_by_both_names(word):
    assert "group of the model file" in page(word)


@pytest.mark.parametrize("word", QUANTITIES)
def test_every_quantity_has_its_page(word):
    text = page(word)
    assert fits(text)
    assert QUANTITIES[word].unit in text
    assert "quantity of the results" in text


@pytest.mark.parametrize("word", [*BUILT_IN_NAMES, *COMMANDS, *(name.replace("_", " ") for name in FACTORS)])
def test_materials_commands_and_dimensions(word):
    assert fits(page(word))


def test_every_word_of_the_glossary_and_every_reference_leads_somewhere():
    for entry in _glossary():
        for word in (*entry["words"], *entry.get("see", ())):
            assert fits(page(word))


@pytest.mark.parametrize("command", ["solve", "compare", "check"])
def test_table_heads_and_verdict_words_are_explained(command):
    heads = ["use", "half..twice", "worst mix", "FAIL", "pass", "unsure", "deflection", "slope", "twist", "tilt",
             "pins", "difference", "ratio", "thrust", "proof", "by hand"]  # fmt: skip
    assert all(page(head) for head in heads)


@pytest.mark.parametrize(
    ("message", "title"),
    [
        ("loose.toml:7 layshaft can slide along its axis: no support holds it axially", "Something can move freely"),
        ("layshaft can swing up and down about lay_left", "Something can move freely"),
        ('"clockwise": from which end? Write "clockwise from left"', "Sense of turning"),
        ('38 has no unit. Write "38 mm".', "Units"),
        ('"46,5 mm" has a decimal comma', "Units"),
        ('"15 deg": left-hand or right-hand?', "Hand of a helix"),
        ("133 N m turn it, and nothing takes them out", "Torque in, torque out"),
        ("the facewidth of wheel reaches over a shoulder", "A part reaches over a shoulder"),
    ],
)
def test_messages_are_explained(message, title):
    assert page(message).startswith(title)


def test_messages_that_the_program_says_are_those_of_the_glossary(run):
    """What the glossary waits for is really said somewhere in the program's own words."""
    assert "Something can move freely" in page(run("solve", "loose.toml").err)
    assert "Torque in, torque out" in page(run("solve", "unbalanced.toml").err)
    assert "Units" in page(run("solve", "slips.toml").err)


def test_addresses_are_explained():
    assert page("lay_left.stiffness.radial") == page("stiffness.radial") or "radial   key of" in page("radial")
    assert page("layshaft.wheel_seat.diameter") == page("diameter")
    assert page("wheel.deflection") == page("deflection")


def test_a_key_of_one_group():
    assert page("gears.helix").startswith("helix   key of gears")
    assert "Pitch diameter" not in page("pulleys.diameter")


def test_usual_ranges_are_printed():
    assert re.search(r"usual +1 mm to 3 m", page("diameter"))


def test_index_lists_everything(run):
    done = run("explain")
    assert done.code == 0
    assert fits(done.out)
    words = {word.strip(",") for word in done.out.split()}
    assert words >= set(KEYS) | set(GROUPS) | set(QUANTITIES) | set(COMMANDS)


def test_several_words_need_no_quotes(run):
    assert run("explain", "exit", "codes").out == run("explain", "exit codes").out


@pytest.mark.parametrize(
    ("word", "key"), [("bevel", "form"), ("clockwise from left", "turns"), ("cylindrical", "form")]
)
def test_a_value_leads_to_the_keys_that_may_hold_it(word, key):
    assert f"{key}   key of" in page(word)


@pytest.mark.parametrize("word", ["", "  "])
def test_no_word_is_refused(word):
    with pytest.raises(UsageError, match="explain which word"):
        page(word)
