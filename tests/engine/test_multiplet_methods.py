"""Spins, traces and multiplets through the engine's door."""

from __future__ import annotations

import pytest

from hoodside.engine import call
from hoodside.errors import InvalidInputError


def test_trace_of_a_para_pair_at_two_fields() -> None:
    """The same ring looks first order at 400 MHz and not at 60: more lines at the low field (AA'BB')."""
    high = call("trace", {"smiles": "CCOc1ccc(cc1)C(=O)CC", "mhz": 400})
    low = call("trace", {"smiles": "CCOc1ccc(cc1)C(=O)CC", "mhz": 60})
    assert len(high["heights"]) == 1600
    assert max(high["heights"]) == 1
    assert sum(h["n"] for h in high["h1"]) == 14
    assert sorted(h["mult"] for h in high["h1"]) == ["d", "d", "q", "q", "t", "t"]  # common practice
    total = sum(line["intensity"] for system in low["systems"] for line in system["lines"])
    assert total == pytest.approx(14, abs=0.3)


@pytest.mark.parametrize("points", [50, 400, 1600, 20_000])
def test_trace_runs_on_between_its_points(points: int) -> None:
    """However many points are asked for: a line of 1 Hz over a window of 24 Hz never falls to nothing."""
    found = call("trace", {"smiles": "CC(C)=O", "mhz": 60, "from_ppm": 2.0, "to_ppm": 2.4, "points": points})
    heights = found["heights"]
    assert len(heights) == points
    assert min(heights) > 0
    top = heights.index(max(heights))
    assert heights[: top + 1] == sorted(heights[: top + 1])
    assert heights[top:] == sorted(heights[top:], reverse=True)


def test_trace_window_holds_its_line() -> None:
    found = call("trace", {"smiles": "CC(C)=O", "from_ppm": 2.0, "to_ppm": 2.4, "points": 400})
    top = found["heights"].index(1)
    assert found["from_ppm"] + top * found["step_ppm"] == pytest.approx(2.17, abs=0.06)  # Gottlieb 1997


def test_lines_of_an_ethyl_quartet() -> None:
    """A quartet of 7.1 Hz at 400 MHz: four lines 1:3:3:1, common practice."""
    lines = [4.12 + k * 7.1 / 400 for k in (-1.5, -0.5, 0.5, 1.5)]
    found = call("multiplet", {"lines": lines, "heights": [1, 3, 3, 1], "mhz": 400})
    assert found["readings"][0]["pattern"] == "q"
    assert found["readings"][0]["j"][0] == pytest.approx(7.1, abs=0.05)
    assert found["readings"][0]["centre_ppm"] == pytest.approx(4.12, abs=1e-6)


def test_isopropyl_partners() -> None:
    found = call(
        "partners",
        {
            "h1": [
                {"ppm": 2.98, "mult": "sept", "j": [6.9], "n": 1},
                {"ppm": 1.28, "mult": "d", "j": [6.9], "n": 6},
            ]
        },
    )
    assert found["shared"] == [{"a": 0, "b": 1, "hz": 6.9, "counts_fit": True}]
    assert found["lone"] == []


def test_spins_contract() -> None:
    """AB quartet, J 10 Hz, 6 Hz apart at 60 MHz: four lines (Pople, Schneider and Bernstein 1959)."""
    found = call(
        "spins",
        {"mhz": 60, "nuclei": [{"ppm": 7.1, "count": 1}, {"ppm": 7.0, "count": 1}], "j": [[0, 1, 10]]},
    )
    assert found["method"] == "exact"
    assert len(found["lines"]) == 4


def test_a_field_out_of_reach_is_refused() -> None:
    with pytest.raises(InvalidInputError) as caught:
        call("trace", {"smiles": "CCO", "mhz": 5})
    assert caught.value.field == "mhz"


def test_an_ab_quartet_is_fitted_back() -> None:
    """Lines of a known AB system give its shifts and J again (closed form, Pople et al. 1959)."""
    system = {"mhz": 60, "nuclei": [{"ppm": 7.1}, {"ppm": 7.0}], "j": [[0, 1, 10]]}
    lines = [{"hz": line["hz"], "height": line["intensity"]} for line in call("spins", dict(system))["lines"]]
    start = {"mhz": 60, "nuclei": [{"ppm": 7.12}, {"ppm": 6.99}], "j": [[0, 1, 8.5]], "lines": lines}
    found = call("fit", start)
    assert found["rms_hz"] < 0.05
    assert found["system"]["j"][0][2] == pytest.approx(10, abs=0.1)
