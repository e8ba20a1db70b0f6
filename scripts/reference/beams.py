"""The beams of the reference run. Every number is a rational, given as a whole number or as text like "7/2"."""

from sympy import Rational

LOADS = {"P": ("point", "at p"), "C": ("couple", "at m"), "w": ("line", "from to w0 w1"), "k": ("curvature", "from to kappa")}


def fixed(at, **moved):
    return {"at": at, "kind": "fixed", **moved}


def pin(at, **moved):
    return {"at": at, "kind": "pin", **moved}


def roller(at, **moved):
    return {"at": at, "kind": "roller", **moved}


def guided(at, **moved):
    return {"at": at, "kind": "guided", **moved}


def sprung(at, **held):
    return {"at": at, "kind": "free", **held}


def load(name, *values):
    kind, fields = LOADS[name]
    return {"kind": kind, **dict(zip(fields.split(), values, strict=True))}


def exact(value):
    if isinstance(value, dict):
        return {key: one if key in ("kind", "name") else exact(one) for key, one in value.items()}
    if isinstance(value, (list, tuple)):
        return [exact(one) for one in value]
    return None if value is None else Rational(value)


def beam(name, length, supports, loads, hinges=(), segments=None, ei=1000, ga=None):
    """`segments`: (from, to, EI, GA or None); unless given, one of `ei` and `ga`."""
    stretches = segments or [(0, length, ei, ga)]
    document = {
        "name": name,
        "length": length,
        "segments": [dict(zip(("from", "to", "ei", "ga"), stretch, strict=True)) for stretch in stretches],
        "supports": supports,
        "hinges": list(hinges),
        "loads": [load(*one) for one in loads],
    }
    return exact(document)


P, C, w, k = "P", "C", "w", "k"
STEPPED = [(0, 3, 900, None), (3, 7, 1500, None), (7, 10, 600, None)]
SHEARING = [(0, 4, 1000, 700), (4, 10, 1600, None)]

BEAMS = [
    # statically determinate
    beam("simple span, uniform", 6, [pin(0), roller(6)], [(w, 0, 6, 5, 5)]),
    beam("simple span, part uniform and a force", 7, [pin(0), roller(7)], [(w, 1, 4, 6, 6), (P, "11/2", 10)]),
    beam("simple span, triangle rising to the right", 6, [pin(0), roller(6)], [(w, 0, 6, 0, 9)]),
    beam("simple span, trapezium that changes sign", 6, [pin(0), roller(6)], [(w, 1, 5, 8, -4)]),
    beam("simple span, couples at both ends and within", 5, [pin(0), roller(5)], [(C, 0, 7), (C, 2, -12), (C, 5, 3)]),
    beam("simple span, free curvature of a part", 6, [pin(0), roller(6)], [(k, 1, 4, "1/200")]),
    beam("simple span that shears, uniform and a force", 4, [pin(0), roller(4)], [(w, 0, 4, 12, 12), (P, 1, 9)], ga=500),
    beam("simple span in three steps", 10, [pin(0), roller(10)], [(w, 0, 10, 4, 4), (P, 7, 8)], segments=STEPPED),
    beam("simple span on springs that sink", 6, [sprung(0, kv=80), sprung(6, kv=50, rise="-1/20")], [(w, 0, 6, 3, 7)]),
    beam("simple span, one support sinks", 6, [pin(0, rise="-1/100"), roller(6)], [(P, 2, 5)]),
    beam("overhangs at both ends", 9, [pin(2), roller(7)], [(w, 0, 9, 4, 4), (P, 0, 6), (P, 9, 11)]),
    beam("overhang, couple at its tip", 8, [pin(0), roller(6)], [(C, 8, -9), (w, 6, 8, 5, 0)]),
    beam("cantilever from the left, triangle and tip force", 3, [fixed(0)], [(w, 0, 3, 6, 0), (P, 3, 4)]),
    beam("cantilever from the right, couple and uniform", 4, [fixed(4)], [(C, 1, 8), (w, 0, 3, 2, 2)]),
    beam("cantilever that shears, in two steps", 10, [fixed(0)], [(w, 2, 10, 1, 3), (P, 10, 2)], segments=SHEARING),
    beam("cantilever, root turns and sinks", 3, [fixed(0, rise="-1/50", rotation="1/60")], [(P, 2, 5)]),
    beam("cantilever, free curvature", 5, [fixed(0)], [(k, 0, 5, "-1/250"), (k, 2, 4, "1/100")]),
    beam("held up in the middle by a root that both cantilevers share", 7, [fixed(3)], [(w, 0, 7, 2, 5), (P, 0, 3)]),
    beam("guided at the left, roller at the right", 6, [guided(0), roller(6)], [(w, 0, 6, 3, 3), (C, 2, 5)]),
    beam("guided at the left on a spring", 5, [guided(0, kv=60)], [(P, 4, 7), (w, 0, 5, 1, 4)]),
    beam("rotation spring and vertical spring at one place", 4, [sprung(0, kv=90, kr=400)], [(w, 0, 4, 3, 3)]),
    beam("cantilever, hinge, suspended span", 9, [fixed(0), roller(9)], [(w, 0, 9, 3, 3), (P, 6, 5)], hinges=[4]),
    beam("three spans made determinate by two hinges", 18, [pin(0), roller(6), roller(12), roller(18)], [(w, 0, 18, 4, 4), (P, 9, 20)], hinges=["15/2", "21/2"]),
    beam("force in a hinge", 8, [fixed(0), roller(8)], [(P, 5, 12)], hinges=[5]),
    # indeterminate to the first degree
    beam("propped, uniform", 6, [fixed(0), roller(6)], [(w, 0, 6, 5, 5)]),
    beam("propped, triangle falling to the prop", 6, [fixed(0), roller(6)], [(w, 0, 6, 9, 0)]),
    beam("propped, couple at the prop and within", 6, [fixed(0), roller(6)], [(C, 6, 8), (C, 2, -5)]),
    beam("propped, prop sinks and root turns", 6, [fixed(0, rotation="1/400"), roller(6, rise="-1/80")], []),
    beam("propped with overhang, uniform and tip force", "39/5", [fixed(0), roller(6)], [(w, 0, "39/5", 5, 5), (P, "39/5", 6)]),
    beam("propped with overhang, in three steps", 10, [fixed(0), roller(8)], [(w, 3, 10, 2, 6)], segments=STEPPED),
    beam("propped, prop on a spring", 6, [fixed(0), sprung(6, kv=40)], [(w, 0, 6, 5, 5)]),
    beam("propped, prop on a spring that sinks", 6, [fixed(0), sprung(6, kv=40, rise="-1/30")], [(P, 4, 9)]),
    beam("propped, free curvature", 6, [fixed(0), roller(6)], [(k, 0, 6, "1/300")]),
    beam("propped, shearing", 3, [fixed(0), roller(3)], [(w, 0, 3, 10, 2), (P, 1, 7)], ga=300),
    beam("two spans, uniform", 10, [pin(0), roller(5), roller(10)], [(w, 0, 10, 4, 4)]),
    beam("two unequal spans, triangle and force", 11, [pin(0), roller(4), roller(11)], [(w, 0, 4, 0, 6), (P, 8, 15)]),
    beam("two spans, middle support sinks", 8, [pin(0), roller(4, rise="-1/60"), roller(8)], []),
    beam("two spans, middle on a spring", 8, [pin(0), sprung(4, kv=120), roller(8)], [(w, 0, 8, 3, 3)]),
    beam("two spans and overhang, couple over the support", 10, [pin(0), roller(4), roller(8)], [(C, 4, 10), (P, 10, 3)]),
    beam("guided at the left, held at the right", 5, [guided(0), fixed(5)], [(w, 0, 5, 4, 4)]),
    beam("guided at both ends on one spring", 6, [guided(0, kv=70), guided(6)], [(P, 2, 9), (w, 3, 6, 0, 4)]),
    beam("spring against rotation at the left", 6, [pin(0, kr=250), roller(6)], [(w, 0, 6, 5, 5)]),
    beam("spring against rotation whose ground turns", 6, [pin(0, kr=250, rotation="1/90"), roller(6)], [(C, 3, 6)]),
    beam("built in at both ends with a hinge", 8, [fixed(0), fixed(8)], [(w, 0, 8, 3, 3), (P, 6, 4)], hinges=[3]),
    beam("load, hinge and step at one place", 10, [fixed(0), roller(5), roller(10)], [(P, 7, 6), (w, 3, 7, 2, 2)], hinges=[7], segments=STEPPED),
    # second degree
    beam("built in at both ends, uniform", 6, [fixed(0), fixed(6)], [(w, 0, 6, 5, 5)]),
    beam("built in at both ends, force and triangle", 6, [fixed(0), fixed(6)], [(P, 2, 9), (w, 3, 6, 0, 8)]),
    beam("built in at both ends, one sinks and turns", 6, [fixed(0), fixed(6, rise="-1/70", rotation="1/110")], []),
    beam("built in at both ends, free curvature of a part", 6, [fixed(0), fixed(6)], [(k, 0, 2, "1/150")]),
    beam("built in at both ends, shearing in two steps", 10, [fixed(0), fixed(10)], [(w, 0, 10, 6, 2), (P, 4, 12)], segments=SHEARING),
    beam("three spans, outer spans loaded", 15, [pin(0), roller(5), roller(10), roller(15)], [(w, 0, 5, 4, 4), (w, 10, 15, 4, 4)]),
    beam("three spans, one support sinks", 12, [pin(0), roller(4, rise="-1/90"), roller(8), roller(12)], [(w, 4, 8, 3, 3)]),
    beam("three spans, inner supports on springs", 12, [pin(0), sprung(4, kv=90), sprung(8, kv=60), roller(12)], [(w, 0, 12, 3, 3)]),
    beam("root, two props and an overhang", 11, [fixed(0), roller(4), roller(9)], [(w, 0, 11, 3, 6), (C, 4, 5), (P, 11, 4)]),
    beam("two rotation springs, shearing", 5, [pin(0, kr=200), roller(5, kr=500)], [(w, 0, 5, 7, 7)], ga=800),
    beam("support that holds rotation within, springs around", 9, [sprung(0, kv=50), guided(4), roller(9)], [(P, 2, 6), (w, 4, 9, 3, 3)]),
    # third degree and more
    beam("four spans, second loaded", 16, [pin(0), roller(4), roller(8), roller(12), roller(16)], [(w, 4, 8, 5, 5)]),
    beam("four spans, forces in each, steps", 16, [pin(0), roller(4), roller(8), roller(12), roller(16)], [(P, 2, 9), (P, 6, 7), (P, 10, 5), (P, 14, 3)], segments=[(0, 5, 800, None), (5, 11, 1400, None), (11, 16, 1000, None)]),
    beam("four spans on five springs", 12, [sprung(x, kv=70) for x in (0, 3, 6, 9, 12)], [(P, 3, 20), (w, 6, 12, 2, 2)]),
    beam("root, prop, root", 9, [fixed(0), roller(4), fixed(9)], [(w, 0, 9, 2, 8), (C, 6, 10)]),
    beam("fixed within the beam, spans at both sides", 12, [pin(0), fixed(5, rotation="-1/200"), roller(9)], [(w, 0, 12, 3, 3), (P, 12, 2)]),
    beam("root, spring, hinge, prop, guided", 14, [fixed(0), sprung(4, kv=100), roller(9), guided(14, kv=35)], [(w, 0, 14, 3, 3), (P, 7, 8)], hinges=[6]),
    beam("five spans, uniform on odd spans", 15, [pin(0), roller(3), roller(6), roller(9), roller(12), roller(15)], [(w, 0, 3, 5, 5), (w, 6, 9, 5, 5), (w, 12, 15, 5, 5)]),
    beam("five spans between roots", 15, [fixed(0), roller(3), roller(6), roller(9), roller(12), fixed(15)], [(w, 0, 15, 1, 6), (P, 7, 9)]),
    beam("six spans, every kind of load, one sinks", 18, [pin(0), roller(3), roller(6, rise="-1/150"), roller(9), roller(12), roller(15), roller(18)], [(w, 1, 5, 4, 0), (P, 7, 10), (C, 9, 6), (k, 10, 13, "1/400"), (w, 15, 18, 3, 3)]),
    beam("everything at once", 14, [fixed(1, rise="1/300", rotation="-1/500"), sprung(5, kv=150, kr=90), roller(8), guided(13, kv=60, rise="-1/90")], [(w, 0, 14, 2, 5), (P, 5, 7), (C, 8, 4), (k, 9, 12, "1/350"), (P, 6, 3)], hinges=[6, 10], segments=[(0, 4, 900, 1200), (4, 10, 1300, None), (10, 14, 700, 600)]),
]
