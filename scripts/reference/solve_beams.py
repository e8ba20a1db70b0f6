"""Solves the beams of beams.py as exact rationals and writes data/published/exact-beams.json.

    apt-get install --no-install-recommends python3-sympy
    /usr/bin/python3 -B scripts/reference/solve_beams.py
"""

import json
from pathlib import Path

import sympy
from beams import BEAMS
from boundary_value import points_of, solve
from sympy import Rational

TARGET = Path(__file__).parents[2] / "data" / "published" / "exact-beams.json"
ABOUT = (
    "Exact answers by sympy {version} (scripts/reference/solve_beams.py), as rationals: integration of the beam's "
    "differential equations between its points, constants from the conditions there. Signs: the engine's. Stations are "
    "the points and the middles between them, [left, right] where the two sides differ; V and M in N and N m, theta in "
    "rad, v in m. Reactions are [vertical, moment] in the order of the supports."
)


def stations(beam, intervals):
    points = points_of(beam)
    middles = [(a + b) / 2 for a, b in zip(points, points[1:])]
    for x in sorted([*points, *middles]):
        left = next((i for i in reversed(intervals) if i.start < x <= i.end), None)
        right = next((i for i in intervals if i.start <= x < i.end), None)
        sides = [left or right, right or left]
        state = {q: [side.at(q, x) for side in sides] for q in ("V", "M", "theta")}
        pairs = {q: values if values[0] != values[1] else values[0] for q, values in state.items()}
        yield {"x": x, **pairs, "v": sides[0].at("v", x)}


def answer(beam):
    intervals, reactions = solve(beam)
    return {"beam": beam, "reactions": reactions, "stations": list(stations(beam, intervals))}


def text(value):
    if isinstance(value, (Rational, int)):
        return str(value)
    raise TypeError(f"{value!r} is not rational")


def main():
    lines = [json.dumps(answer(beam), default=text, separators=(",", ":")) for beam in BEAMS]
    about = json.dumps(ABOUT.format(version=sympy.__version__))
    TARGET.write_text('{"about":' + about + ',"beams":[\n' + ",\n".join(lines) + "\n]}\n")
    print(f"{len(BEAMS)} beams, {TARGET.stat().st_size // 1000} kB")


main()
