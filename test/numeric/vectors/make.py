"""
Reference values of the special functions, to 25 digits.

Needs mpmath (Debian: python3-mpmath). Writes special.txt beside this file:
    python3 test/numeric/vectors/make.py
Points lie in ordinary and in hard places: near zeros, ends, turns and very far out.
"""

import math
import pathlib
import random

from mpmath import mp, mpf

mp.dps = 50
POINTS = 150
HERE = pathlib.Path(__file__).parent
chance = random.Random(29)


def between(a, b):
    return lambda: chance.uniform(a, b)


def sized(a, b):
    return lambda: math.exp(chance.uniform(math.log(a), math.log(b)))


def near(c, w):
    return lambda: c + chance.choice([-1, 1]) * w * 10 ** chance.uniform(-12, 0)


def either_side(place):
    return lambda: chance.choice([-1, 1]) * place()


def beta_series(x, a, b):
    """DLMF 8.17.8: all terms are positive."""
    log_beta = mp.loggamma(a) + mp.loggamma(b) - mp.loggamma(a + b)
    term = mp.exp(a * mp.log(x) + b * mp.log(1 - x) - log_beta) / a
    total, n = term, 0
    while term > total * mpf(10) ** -(mp.dps + 3):
        term *= x * (a + b + n) / (a + 1 + n)
        total += term
        n += 1
    return total


def beta_below(x, a, b):
    a, b = mpf(a), mpf(b)
    if x < (a + 1) / (a + b + 2):
        return beta_series(x, a, b)
    return 1 - beta_series(1 - x, b, a)


def hazard(x):
    return 2 / mp.sqrt(mp.pi) * mp.exp(-x * x) / mp.erfc(x)


FUNCTIONS = {
    "asin": (mp.asin, [either_side(sized(1e-8, 1)), between(-1, 1)]),
    "acos": (mp.acos, [between(-1, 1), lambda: 1 - sized(1e-12, 1)()]),
    "sinh": (mp.sinh, [either_side(sized(1e-8, 700)), between(-3, 3)]),
    "cosh": (mp.cosh, [sized(1e-8, 700), between(0, 3)]),
    "asinh": (mp.asinh, [either_side(sized(1e-8, 1e300)), between(-5, 5)]),
    "acosh": (mp.acosh, [sized(1.001, 1e300), lambda: 1 + sized(1e-14, 1)()]),
    "atanh": (mp.atanh, [either_side(sized(1e-8, 0.99)), lambda: 1 - sized(1e-12, 1)()]),
    "expm1": (mp.expm1, [either_side(sized(1e-12, 30)), between(-2, 2)]),
    "log10": (mp.log10, [sized(1e-300, 1e300), near(1, 0.5)]),
    "erf": (mp.erf, [either_side(sized(1e-8, 6)), between(-3, 3)]),
    "erfc": (mp.erfc, [between(-6, 26), between(-1, 3)]),
    "erfcx": (lambda x: mp.exp(x * x) * mp.erfc(x), [between(-5, 30), between(0, 5)]),
    "gamma": (mp.gamma, [between(0, 5), between(1, 170), sized(1e-300, 1)]),
    "gammaln": (mp.loggamma, [between(0, 5), near(1, 0.5), near(2, 0.5), sized(1e-8, 1e10)]),
    "digamma": (mp.digamma, [between(0, 5), near(1.4616321449683623, 0.4), sized(1e-6, 1e8)]),
    "trigamma": (lambda x: mp.psi(1, x), [between(0, 5), sized(1e-6, 1e8)]),
    "lncosh": (lambda x: mp.log(mp.cosh(x)), [sized(1e-8, 1e5), between(0, 3)]),
    "lnsinh": (lambda x: mp.log(mp.sinh(x)), [sized(1e-8, 1e5), between(0, 3)]),
    "lnerfc": (lambda x: mp.log(mp.erfc(x)), [between(-8, 60), between(-1, 3)]),
    "erfcHazard": (hazard, [between(-12, 60), between(-6, -4)]),
    "stirling": (
        lambda k: mp.exp(k * mp.log(k) - k - mp.loggamma(k + 1)),
        [between(0.001, 40), sized(1e-6, 1e6)],
    ),
}


def add_shares():
    for a in [0.01, 0.5, 1, 3.75, 20, 150, 1000, 10000]:
        for is_above in [False, True]:
            limits = (lambda x: (x, mp.inf)) if is_above else (lambda x: (0, x))
            FUNCTIONS[f"gamma {a} {'above' if is_above else 'below'}"] = (
                lambda x, a=a, limits=limits: mp.gammainc(a, *limits(x), regularized=True),
                [lambda a=a: abs(chance.gauss(a, 3 * math.sqrt(a))), sized(a / 20 + 1e-3, 4 * a + 9)],
            )
    for a, b in [(0.01, 0.5), (0.5, 0.5), (2, 5.5), (0.5, 4000), (40, 3), (700, 300), (5000, 10000)]:
        m = a / (a + b)
        s = math.sqrt(m * (1 - m) / (a + b + 1))
        for is_above in [False, True]:
            FUNCTIONS[f"beta {a} {b} {'above' if is_above else 'below'}"] = (
                lambda x, a=a, b=b, up=is_above: (
                    beta_below(1 - x, b, a) if up else beta_below(x, a, b)
                ),
                [lambda m=m, s=s: chance.gauss(m, 3 * s), between(0, min(1, 8 * m))],
            )


add_shares()
with open(HERE / "special.txt", "w") as out:
    for name, (function, places) in FUNCTIONS.items():
        print(f"= {name}", file=out)
        n = 0
        while n < (50 if " " in name else POINTS):
            x = chance.choice(places)()
            if name.startswith("beta") and not 0 < x < 1:
                continue
            value = function(mpf(x))
            if not mpf("1e-280") < abs(value) < mpf("1e305"):
                continue
            print(repr(x), mp.nstr(mp.re(value), 25, min_fixed=0, max_fixed=0), file=out)
            n += 1
