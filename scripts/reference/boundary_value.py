"""Beams as exact rationals, by the boundary-value problem of their differential equations.

Independent of the engine: no released beam, no unit state, no stiffness matrix. Between two neighbouring points the
equations

    V' = -w        M' = V        psi' = M / EI + kappa        v' = psi - V / GA

are integrated by sympy with four constants of integration, and the constants follow from what the points and the ends
of the beam demand. Signs: x to the right, loads down, reactions and deflections up, couples and rotations
anticlockwise, moments sagging. psi is the rotation of the section, theta = v' the slope of the axis.
"""

from sympy import Rational, Symbol, integrate, linsolve, symbols

S = Symbol("s")  # from the left end of an interval
HOLDS = {
    "fixed": (True, True),
    "pin": (True, False),
    "roller": (True, False),
    "guided": (False, True),
    "free": (False, False),
}


class Interval:
    """V, M, psi, theta and v between two neighbouring points, with the constants of integration in them."""

    def __init__(self, number, start, end, beam):
        self.start, self.end = start, end
        self.constants = symbols(f"V{number} M{number} psi{number} v{number}")
        segment = next(g for g in beam["segments"] if g["from"] <= start and end <= g["to"])
        load, curvature = acting(beam["loads"], start, end)
        shear_0, moment_0, rotation_0, deflection_0 = self.constants
        shear = shear_0 - antiderivative(load)
        moment = moment_0 + antiderivative(shear)
        rotation = rotation_0 + antiderivative(moment / segment["ei"] + curvature)
        slope = rotation - (shear / segment["ga"] if segment.get("ga") else 0)
        self.states = {
            "V": shear,
            "M": moment,
            "psi": rotation,
            "theta": slope,
            "v": deflection_0 + antiderivative(slope),
        }

    def at(self, quantity, x):
        return self.states[quantity].subs(S, x - self.start)


def antiderivative(expression):
    return integrate(expression, (S, 0, S))


def acting(loads, start, end):
    """Downward load and free curvature between two points."""
    load, curvature = Rational(0), Rational(0)
    for one in loads:
        if "from" not in one or one["from"] > start or one["to"] < end:
            continue
        if one["kind"] == "curvature":
            curvature += one["kappa"]
        else:
            rate = (one["w1"] - one["w0"]) / (one["to"] - one["from"])
            load += one["w0"] + rate * (start - one["from"] + S)
    return load, curvature


def points_of(beam):
    points = {Rational(0), beam["length"], *beam["hinges"]}
    points |= {support["at"] for support in beam["supports"]}
    for one in [*beam["segments"], *beam["loads"]]:
        points |= {one[key] for key in ("at", "from", "to") if key in one}
    return sorted(points)


def held(support, vertical, v, reaction):
    """One equation of a support: it stays where it is put, yields as a spring, or does nothing."""
    spring, movement = ("kv", "rise") if vertical else ("kr", "rotation")
    if HOLDS[support["kind"]][0 if vertical else 1]:
        return v - support.get(movement, 0)
    return reaction + support.get(spring, 0) * (v - support.get(movement, 0))


def solve(beam):
    """The intervals with numbers for their constants, and [vertical, moment] of every support."""
    points = points_of(beam)
    intervals = [Interval(k, *pair, beam) for k, pair in enumerate(zip(points, points[1:]))]
    reactions = [symbols(f"R{k} C{k}") for k in range(len(beam["supports"]))]
    equations = []
    for k, x in enumerate(points):
        equations += conditions_at(x, intervals[k - 1] if k else None, intervals[k : k + 1], beam, reactions)
    unknowns = [u for interval in intervals for u in interval.constants] + [u for pair in reactions for u in pair]
    solutions = linsolve(equations, unknowns)
    if len(solutions) != 1 or any(value.free_symbols for value in next(iter(solutions))):
        raise ValueError(f"{beam['name']}: not one solution")
    values = dict(zip(unknowns, next(iter(solutions))))
    for interval in intervals:
        interval.states = {name: state.subs(values) for name, state in interval.states.items()}
    return intervals, [[values[force], values[couple]] for force, couple in reactions]


def conditions_at(x, left, right, beam, reactions):
    """Jumps of V and M by what acts at x, continuity of v, and of psi but in a hinge; zero beyond the ends."""
    right = right[0] if right else None
    value = lambda interval, quantity: interval.at(quantity, x) if interval else 0
    force = couple = 0
    equations = []
    for support, (vertical, moment) in zip(beam["supports"], reactions):
        if support["at"] != x:
            continue
        force, couple = force + vertical, couple + moment
        equations.append(held(support, True, value(left or right, "v"), vertical))
        equations.append(held(support, False, value(left or right, "psi"), moment))
    for load in beam["loads"]:
        if load.get("at") == x:
            force, couple = force - load.get("p", 0), couple + load.get("m", 0)
    equations.append(value(right, "V") - value(left, "V") - force)
    equations.append(value(right, "M") - value(left, "M") + couple)
    if left and right:
        equations.append(value(right, "v") - value(left, "v"))
        hinged = x in beam["hinges"]
        equations.append(value(left, "M") if hinged else value(right, "psi") - value(left, "psi"))
    return equations
