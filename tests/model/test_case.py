"""Load cases: torque, sense, shares, `like`, and what does not fit together."""

import math

import pytest

import fe_shaft.model as fs
from tests.model.small import model
from tests.model.told import only, told

FLOW = {"enters": "wheel", "leaves": "pinion"}
RUNNING = FLOW | {"power": "5.5 kW", "speed": "393.7 rpm", "turns": "clockwise from left"}


def case(name: str = "running", **words: object) -> fs.Case:
    return fs.Case(name, **(RUNNING | words))  # type: ignore[arg-type]


def test_torque_from_power_and_speed() -> None:
    """T = P / omega; the checked drawing of this layshaft says 133 N m (5.5 kW at 393.7 rpm)."""
    assert case().torque_si == pytest.approx(5500.0 / (393.7 * 2 * math.pi / 60), rel=1e-15)
    assert case().torque_si == pytest.approx(133.4, abs=0.05)
    assert case(torque_factor=2.0).torque_si == pytest.approx(2 * case().torque_si)
    assert case(power=None, torque="90 N m").torque_si == 90.0
    assert case(power="0 W").torque_si == 0.0


@pytest.mark.parametrize(
    ("turns", "sense"),
    [
        ("clockwise from left", 1),
        ("counterclockwise from left", -1),
        ("clockwise from right", -1),
        ("counterclockwise from right", 1),
    ],
)
def test_senses_of_turning_about_plus_x(turns: str, sense: int) -> None:
    assert case(turns=turns).sense == sense


def test_shares_of_power() -> None:
    made = case(leaves={"sprocket": 0.8, "pump": 0.2})
    assert made.enters_shares == {"wheel": 1.0}
    assert made.leaves_shares == {"sprocket": 0.8, "pump": 0.2}
    assert fs.Case("x").enters_shares == {}
    assert fs.Case("x").sense == 0


@pytest.mark.parametrize(
    ("forces", "factors"),
    [
        (None, (1.0, 1.0)),
        ([], (0.0, 0.0)),
        (["a"], (1.0, 0.0)),
        ({"a": 1.5, "b": -1}, (1.5, -1.0)),
        ({"b": 2}, (0.0, 2.0)),
    ],
)
def test_switched_forces(forces: object, factors: tuple[float, float]) -> None:
    made = fs.Case("x", forces=forces)  # type: ignore[arg-type]
    assert (made.force_factor("a"), made.force_factor("b")) == factors


def test_like_takes_over_what_is_not_written() -> None:
    made = model(cases=[case(), fs.Case("starting", like="running", torque_factor=2.2)]).case("starting")
    assert made.torque_si == pytest.approx(2.2 * case().torque_si)
    assert made.enters_shares == {"wheel": 1.0}
    assert (made.name, made.sense) == ("starting", 1)


def test_power_and_torque_displace_each_other() -> None:
    made = model(cases=[case(), fs.Case("jam", like="running", torque="300 N m", speed="0 rpm")]).case("jam")
    assert (made.power, made.torque_si) == (None, 300.0)
    back = model(cases=[case(power=None, torque="3 N m"), fs.Case("x", like="running", power="1 kW")]).case("x")
    assert back.torque is None
    assert back.torque_si == pytest.approx(1000.0 / (393.7 * math.pi / 30))


def test_like_may_follow_like() -> None:
    cases = [fs.Case("c", like="b"), fs.Case("b", like="a", torque_factor=2.0), case("a")]
    assert model(cases=cases).case("c").torque_si == pytest.approx(2.0 * case().torque_si)


@pytest.mark.parametrize(
    ("words", "place", "sentence"),
    [
        ({"torque": "3 N m"}, "running.torque", "torque stands beside power. Write one of them, with speed."),
        (
            {"torque_factor": "2"},
            "running.torque_factor",
            '"2" is text, not a number. Write a bare number without quotes, as in 1.15.',
        ),
        ({"torque_factor": -1}, "running.torque_factor", "-1 is not possible here. Write a number from 0 to 1000."),
        ({"power": "-5.5 kW"}, "running.power", '"-5.5 kW" is negative. Write 0 or a positive value.'),
        ({"speed": 1455}, "running.speed", '1455 has no unit. Write "1455 rpm".'),
        (
            {"states": "all"},
            "running.states",
            'states is not known yet in this version. Write each state as a case of its own, with like = "running".',
        ),
        (
            {"time_share": "98 %"},
            "running.time_share",
            "time_share is not known yet in this version. Leave it out: no life is computed.",
        ),
        (
            {"temperature": {}},
            "running.temperature",
            "temperature is not known yet in this version. Leave it out: temperatures are not computed.",
        ),
        ({"leaves": {"pinion": 0.5}}, "running.leaves", "the shares add up to 0.5, not 1. Change one of them."),
    ],
)
def test_cases_that_cannot_be(words: dict[str, object], place: str, sentence: str) -> None:
    assert only(case, **words) == (place, sentence)


@pytest.mark.parametrize(
    ("words", "place", "sentence"),
    [
        (
            {"turns": None},
            "running.turns",
            'turns is not written. Write turns = "clockwise from left" or "clockwise from right".',
        ),
        ({"speed": None}, "running.speed", 'speed is not written, but power is. Write speed = "393.7 rpm".'),
        (
            {"speed": "0 rpm"},
            "running.speed",
            '5.5 kW at 0 rpm has no finite torque. Write torque = "133 N m" instead of power.',
        ),
        (
            {"enters": None, "leaves": None},
            "running.power",
            'power is written, but not where it passes. Write enters = "wheel" and leaves = "pinion".',
        ),
        (
            {"power": None},
            "running.enters",
            'enters is written, but no power or torque. Write torque = "133 N m", or power and speed.',
        ),
        ({"like": "runing"}, "running.like", 'no case is called "runing". Nearest: running.'),
        (
            {"like": "running"},
            "running.like",
            "cases go round in a circle: running -> running. Leave like out in one of them.",
        ),
        ({"enters": "weel"}, "running.enters", 'no part is called "weel". Nearest: wheel.'),
        (
            {"enters": "layshaft"},
            "running.enters",
            '"layshaft" is a shaft. Write the gear, coupling, pulley or sprocket on it.',
        ),
        (
            {"leaves": "disc"},
            "running.leaves",
            '"disc" is a mass; power passes through gears, couplings, pulleys and sprockets. Known: wheel, pinion.',
        ),
        ({"leaves": "wheel"}, "running.leaves", "power enters and leaves at wheel. Write two parts."),
        ({"of_shaft": "layshat"}, "running.of_shaft", 'no shaft is called "layshat". Nearest: layshaft.'),
        ({"forces": ["pul"]}, "running.forces", 'no force is called "pul". Nearest: pull.'),
        (
            {"forces": {"disc": 2.0}},
            "running.forces",
            '"disc" is a mass, not a force. Leave it out: only forces are switched.',
        ),
    ],
)
def test_cases_that_do_not_fit_the_model(words: dict[str, object], place: str, sentence: str) -> None:
    assert only(lambda: model(cases=[case(**words)])) == (place, sentence)


def test_cases_in_a_circle_are_told() -> None:
    assert told(lambda: model(cases=[case("a", like="b"), fs.Case("b", like="a"), fs.Case("c", like="a")])) == {
        "a.like": "cases go round in a circle: a -> b -> a. Leave like out in one of them.",
        "b.like": "cases go round in a circle: b -> a -> b. Leave like out in one of them.",
    }


def test_two_cases_of_one_name() -> None:
    assert only(lambda: model(cases=[case(), case()])) == (
        "running",
        '"running" is the name of another case already. Choose another name.',
    )


def test_power_passes_only_where_a_mate_is_written() -> None:
    assert only(lambda: model(mate=None, cases=[case(), case("back")])) == (
        "wheel.mate",
        'mate is not written, but power passes here in case running. Write mate = "9 o\'clock".',
    )


def test_a_model_without_cases_has_one_with_all_forces() -> None:
    (made,) = model(cases=[]).cases
    assert made.name == "as_loaded"
    assert made.force_factor("pull") == 1.0
    assert made.torque_si == 0.0
