"""
Reference values for the formula functions, to 25 digits: value and two derivatives.

Needs mpmath (Debian: python3-mpmath). Writes values.txt beside this file:
    python3 test/formula/vectors/make.py
Definitions are those of OpenFormula 1.2 and ECMA-376 part 1, written here in mpmath's
own functions; none is taken from the project.
"""

import pathlib
import random

from mpmath import mp, mpf

mp.dps = 50
POINTS = 60
HERE = pathlib.Path(__file__).parent


def normal(x, m, s):
    return mp.exp(-(((x - m) / s) ** 2) / 2) / (s * mp.sqrt(2 * mp.pi))


def normal_below(x, m, s):
    return mp.erfc(-(x - m) / (s * mp.sqrt(2))) / 2


def gamma_density(x, a, b):
    return mp.exp((a - 1) * mp.log(x / b) - x / b - mp.loggamma(a)) / b


def gamma_below(x, a, b):
    return mp.gammainc(a, 0, x / b, regularized=True)


def gamma_above(x, a):
    return mp.gammainc(a, x, mp.inf, regularized=True)


def beta_density(x, a, b):
    log_beta = mp.loggamma(a) + mp.loggamma(b) - mp.loggamma(a + b)
    return mp.exp((a - 1) * mp.log(x) + (b - 1) * mp.log(1 - x) - log_beta)


def beta_series(x, a, b):
    """DLMF 8.17.8: all terms are positive."""
    term = x * beta_density(x, a, b) * (1 - x) / a
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


def t_density(x, n):
    size = mp.loggamma(mpf(n + 1) / 2) - mp.loggamma(mpf(n) / 2)
    return mp.exp(size) / mp.sqrt(n * mp.pi) * (1 + x * x / n) ** (-mpf(n + 1) / 2)


def t_below(x, n):
    tail = beta_below(n / (n + x * x), mpf(n) / 2, mpf(1) / 2) / 2
    return tail if x < 0 else 1 - tail


def f_density(x, n, m):
    a, b = mpf(n) / 2, mpf(m) / 2
    y = n * x / (n * x + m)
    return beta_density(y, a, b) * y * (1 - y) / x


def f_below(x, n, m):
    return beta_below(n * x / (n * x + m), mpf(n) / 2, mpf(m) / 2)


def weibull(x, a, b):
    return a / b * (x / b) ** (a - 1) * mp.exp(-((x / b) ** a))


def poisson(k, mean):
    return mp.exp(k * mp.log(mean) - mean - mp.loggamma(k + 1))


def binomial(k, n, p):
    return mp.binomial(n, k) * p**k * (1 - p) ** (n - k)


SMOOTH = {
    # formula: (function, least x, largest x)
    "ASIN(x)": (mp.asin, -1, 1),
    "ACOS(x)": (mp.acos, -1, 1),
    "ATAN2(x,1.5)": (lambda x: mp.atan2(1.5, x), -6, 6),
    "ATAN2(-0.7,x)": (lambda x: mp.atan2(x, mpf(-0.7)), 0.001, 5),
    "SINH(x)": (mp.sinh, -12, 12),
    "COSH(x)": (mp.cosh, -12, 12),
    "1/COSH(x)": (mp.sech, -300, 300),
    "ASINH(x)": (mp.asinh, -30, 30),
    "ACOSH(x)": (mp.acosh, 1.0001, 40),
    "ATANH(x)": (mp.atanh, -0.9999, 0.9999),
    "DEGREES(x)": (mp.degrees, -7, 7),
    "RADIANS(x)": (mp.radians, -400, 400),
    "SQRTPI(x)": (lambda x: mp.sqrt(x * mp.pi), 0.01, 50),
    "LOG10(x)": (mp.log10, 0.001, 2000),
    "LOG(x)": (mp.log10, 0.001, 2000),
    "GAMMA(x)": (mp.gamma, 0.02, 25),
    "GAMMALN(x)": (mp.loggamma, 0.02, 90),
    "EXP(GAMMALN(x+3)-GAMMALN(x+1))": (lambda x: (x + 1) * (x + 2), 0, 20),
    "ERF(x)": (mp.erf, -5, 5),
    "ERF(0.5,x)": (lambda x: mp.erf(x) - mp.erf(0.5), -3, 4),
    "ERFC(x)": (mp.erfc, -4, 25),
    "PHI(x)": (lambda x: normal(x, 0, 1), -30, 30),
    "SUMSQ(x,{1,2},x-1)": (lambda x: x * x + 5 + (x - 1) ** 2, -4, 4),
    "SUMPRODUCT({1,2,3},x^{0,1,2})": (lambda x: 1 + 2 * x + 3 * x * x, 0.1, 4),
    "NORM.S.DIST(x,FALSE)": (lambda x: normal(x, 0, 1), -9, 9),
    "NORM.S.DIST(x,TRUE)": (lambda x: normal_below(x, 0, 1), -35, 9),
    "NORM.DIST(x,5,2,FALSE)": (lambda x: normal(x, 5, 2), -9, 20),
    "NORM.DIST(x,5,2,TRUE)": (lambda x: normal_below(x, 5, 2), -20, 20),
    "NORM.DIST(5,x,2,FALSE)": (lambda x: normal(5, x, 2), -9, 20),
    "NORM.DIST(5,x,2,TRUE)": (lambda x: normal_below(5, x, 2), -9, 20),
    "NORM.DIST(7,5,x,FALSE)": (lambda x: normal(7, 5, x), 0.2, 30),
    "LOGNORM.DIST(x,1,0.5,FALSE)": (lambda x: normal(mp.log(x), 1, mpf(0.5)) / x, 0.05, 30),
    "LOGNORM.DIST(x,1,0.5,TRUE)": (lambda x: normal_below(mp.log(x), 1, mpf(0.5)), 0.05, 30),
    "EXPON.DIST(x,0.25,FALSE)": (lambda x: mp.exp(-x / 4) / 4, 0, 40),
    "EXPON.DIST(x,0.25,TRUE)": (lambda x: -mp.expm1(-x / 4), 0.0001, 40),
    "EXPON.DIST(2.5,x,FALSE)": (lambda x: x * mp.exp(-2.5 * x), 0.01, 12),
    "EXPON.DIST(2.5,x,TRUE)": (lambda x: -mp.expm1(-2.5 * x), 0.01, 12),
    "GAMMA.DIST(x,0.75,2,FALSE)": (lambda x: gamma_density(x, mpf(0.75), 2), 0.01, 40),
    "GAMMA.DIST(x,0.75,2,TRUE)": (lambda x: gamma_below(x, mpf(0.75), 2), 0.01, 40),
    "GAMMA.DIST(x,2.5,1,FALSE)": (lambda x: gamma_density(x, mpf(2.5), 1), 0.01, 30),
    "GAMMA.DIST(x,2.5,1,TRUE)": (lambda x: gamma_below(x, mpf(2.5), 1), 0.01, 30),
    "GAMMA.DIST(x,250,0.5,FALSE)": (lambda x: gamma_density(x, 250, mpf(0.5)), 60, 220),
    "GAMMA.DIST(x,250,0.5,TRUE)": (lambda x: gamma_below(x, 250, mpf(0.5)), 60, 220),
    "CHISQ.DIST(x,1,FALSE)": (lambda x: gamma_density(x, mpf(0.5), 2), 0.01, 30),
    "CHISQ.DIST(x,1,TRUE)": (lambda x: gamma_below(x, mpf(0.5), 2), 0.01, 30),
    "CHISQ.DIST(x,9,FALSE)": (lambda x: gamma_density(x, mpf(4.5), 2), 0.01, 60),
    "CHISQ.DIST(x,9,TRUE)": (lambda x: gamma_below(x, mpf(4.5), 2), 0.01, 60),
    "WEIBULL.DIST(x,1.5,3,FALSE)": (lambda x: weibull(x, mpf(1.5), 3), 0.01, 25),
    "WEIBULL.DIST(x,1.5,3,TRUE)": (lambda x: -mp.expm1(-((x / 3) ** mpf(1.5))), 0.01, 25),
    "BETA.DIST(x,2,5,FALSE)": (lambda x: beta_density(x, 2, 5), 0.001, 0.999),
    "BETA.DIST(x,2,5,TRUE)": (lambda x: beta_below(x, 2, 5), 0.001, 0.999),
    "BETA.DIST(x,0.5,0.75,FALSE)": (lambda x: beta_density(x, mpf(0.5), mpf(0.75)), 0.001, 0.99),
    "BETA.DIST(x,0.5,0.75,TRUE)": (lambda x: beta_below(x, mpf(0.5), mpf(0.75)), 0.001, 0.99),
    "BETA.DIST(x,400,700,FALSE)": (lambda x: beta_density(x, 400, 700), 0.25, 0.5),
    "BETA.DIST(x,400,700,TRUE)": (lambda x: beta_below(x, 400, 700), 0.25, 0.5),
    "BETA.DIST(x,3,1.5,FALSE,-2,6)": (
        lambda x: beta_density((x + 2) / 8, 3, mpf(1.5)) / 8,
        -1.9,
        5.9,
    ),
    "BETA.DIST(x,3,1.5,TRUE,-2,6)": (lambda x: beta_below((x + 2) / 8, 3, mpf(1.5)), -1.9, 5.9),
    "T.DIST(x,1,FALSE)": (lambda x: t_density(x, 1), -30, 30),
    "T.DIST(x,1,TRUE)": (lambda x: t_below(x, 1), -30, 30),
    "T.DIST(x,4,FALSE)": (lambda x: t_density(x, 4), -30, 30),
    "T.DIST(x,4,TRUE)": (lambda x: t_below(x, 4), -30, 6),
    "T.DIST(x,300,FALSE)": (lambda x: t_density(x, 300), -9, 9),
    "T.DIST(x,300,TRUE)": (lambda x: t_below(x, 300), -9, 9),
    "F.DIST(x,3,7,FALSE)": (lambda x: f_density(x, 3, 7), 0.01, 20),
    "F.DIST(x,3,7,TRUE)": (lambda x: f_below(x, 3, 7), 0.01, 20),
    "F.DIST(x,1,4,FALSE)": (lambda x: f_density(x, 1, 4), 0.01, 20),
    "F.DIST(x,1,4,TRUE)": (lambda x: f_below(x, 1, 4), 0.01, 20),
    "F.DIST(x,60,80,FALSE)": (lambda x: f_density(x, 60, 80), 0.2, 4),
    "F.DIST(x,60,80,TRUE)": (lambda x: f_below(x, 60, 80), 0.2, 4),
    "POISSON.DIST(7,x,FALSE)": (lambda x: poisson(7, x), 0.01, 40),
    "POISSON.DIST(7,x,TRUE)": (lambda x: gamma_above(x, 8), 0.01, 40),
    "POISSON.DIST(40,x,FALSE)": (lambda x: poisson(40, x), 5, 120),
    "POISSON.DIST(40,x,TRUE)": (lambda x: gamma_above(x, 41), 5, 120),
    "BINOM.DIST(3,50,x,FALSE)": (lambda x: binomial(3, 50, x), 0.001, 0.9),
    "BINOM.DIST(3,50,x,TRUE)": (lambda x: beta_below(1 - x, 47, 4), 0.001, 0.9),
    "BINOM.DIST(600,1000,x,FALSE)": (lambda x: binomial(600, 1000, x), 0.45, 0.75),
    "BINOM.DIST(600,1000,x,TRUE)": (lambda x: beta_below(1 - x, 400, 601), 0.45, 0.75),
}

STEPS = {
    "FACT(x)": (mp.factorial, 0, 170),
    "COMBIN(x,5)": (lambda n: mp.binomial(n, 5), 5, 400),
    "COMBIN(80,x)": (lambda k: mp.binomial(80, k), 0, 80),
    "POISSON.DIST(x,4.25,FALSE)": (lambda k: poisson(k, mpf(4.25)), 0, 60),
    "POISSON.DIST(x,4.25,TRUE)": (lambda k: gamma_above(mpf(4.25), k + 1), 0, 60),
    "BINOM.DIST(x,70,0.3125,FALSE)": (lambda k: binomial(k, 70, mpf(0.3125)), 0, 70),
    "BINOM.DIST(x,70,0.3125,TRUE)": (
        lambda k: beta_below(mpf(0.6875), 70 - k, k + 1) if k < 70 else mpf(1),
        0,
        70,
    ),
    "BINOM.DIST(x,4000,0.125,FALSE)": (lambda k: binomial(k, 4000, mpf(0.125)), 300, 700),
}


def digits(value):
    return mp.nstr(mp.re(value), 25, min_fixed=0, max_fixed=0)


def smooth(function, least, largest):
    chance = random.Random(17)
    rows = []
    while len(rows) < POINTS:
        x = chance.uniform(least, largest)
        if chance.random() < 0.25:  # a few near the lower end
            x = least + (largest - least) * 10 ** chance.uniform(-4, 0)
        at = mpf(x)
        # Steps of 1e-14: the third derivative then shows in the 28th digit.
        h = mpf(10) ** -14 * max(mpf("1e-3"), min(abs(at - least), abs(largest - at), 1))
        if h == 0:
            continue
        mp.dps = 80
        f0, f1, f2 = function(at), function(at + h), function(at - h)
        slope, curvature = (f1 - f2) / (2 * h), (f1 - 2 * f0 + f2) / h**2
        if abs(curvature) < abs(f0) * mpf(10) ** -30:  # what differences leave of 0
            curvature = mpf(0)
        rows.append([repr(x), digits(f0), digits(slope), digits(curvature)])
        mp.dps = 50
    return rows


def steps(function, least, largest):
    chance = random.Random(19)
    every = range(least, largest + 1)
    whole = list(every) if len(every) <= POINTS else sorted(chance.sample(every, POINTS))
    return [[repr(k + chance.choice([0.0, 0.25, 0.999])), digits(function(k))] for k in whole]


with open(HERE / "values.txt", "w") as out:
    for kind, rules, rows in [("smooth", SMOOTH, smooth), ("steps", STEPS, steps)]:
        for formula, rule in rules.items():
            print(kind, formula, file=out)
            for row in rows(*rule):
                print(*row, file=out)
