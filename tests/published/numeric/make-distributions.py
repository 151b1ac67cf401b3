"""Distribution functions and quantiles far into the tails, by mpmath with 60 digits; exact rationals where they exist.

Run: python3 make-distributions.py   (Python 3.11.7, mpmath 1.3.0, scipy 1.17.1); writes distributions.json
beside itself. Every row ends in the expected value; the names of the arguments stand in "columns".
"""
import json
from fractions import Fraction
from math import comb, factorial, floor
from pathlib import Path
import mpmath, scipy
from mpmath import mp, mpf
from scipy import stats

mp.dps = 60


def beta_below(x, a, b):
    """I_x(a, b) as a series of positive terms: x^a (1-x)^b / (a B(a, b)) 2F1(a+b, 1; a+1; x)."""
    x, a, b = mpf(x), mpf(a), mpf(b)
    if x > (a + 1) / (a + b + 2):
        return 1 - x_series(1 - x, b, a)
    return x_series(x, a, b)


def x_series(x, a, b):
    front = mp.exp(a * mp.log(x) + b * mp.log1p(-x) + mp.loggamma(a + b) - mp.loggamma(a) - mp.loggamma(b)) / a
    total = term = mpf(1)
    n = 0
    while term > total * mpf(10) ** -55:
        term *= (a + b + n) / (a + 1 + n) * x
        total += term
        n += 1
    return front * total


def student_tail(t, v):
    t, v = mpf(t), mpf(v)
    return beta_below(v / (v + t * t), v / 2, mpf(1) / 2) / 2


def normal_tail(x):
    return mp.erfc(mpf(x) / mp.sqrt(2)) / 2


def chi_square_tail(x, v):
    """Finite sums of positive terms for whole v; the incomplete gamma function with 120 digits otherwise."""
    half = mpf(x) / 2
    if v != floor(v):
        with mp.workdps(120):
            return mp.gammainc(mpf(v) / 2, half, mp.inf, regularized=True)
    power = mpf(0) if v % 2 == 0 else mpf(1) / 2
    total = mpf(0) if v % 2 == 0 else mp.erfc(mp.sqrt(half))
    term = mp.exp(-half) * half**power / mp.gamma(power + 1)
    while power < mpf(v) / 2:
        total += term
        power += 1
        term *= half / power
    return total


def binomial_tail(k, n, p):
    p = Fraction(p)
    return sum(comb(n, i) * p**i * (1 - p) ** (n - i) for i in range(k, n + 1))


def irwin_hall(mean, n):
    x = Fraction(mean) * n
    return sum((-1) ** k * comb(n, k) * (x - k) ** n for k in range(floor(x) + 1)) / factorial(n)


def kolmogorov_tail(d, n):
    """P(D_n >= d), the matrix power of Marsaglia, Tsang & Wang with 300 digits."""
    with mp.workdps(300):
        return 1 - kolmogorov_below(mpf(d), n)


def kolmogorov_below(d, n):
    k = int(floor(n * d)) + 1
    m = 2 * k - 1
    h = k - n * d
    H = [[mpf(1 if i - j + 1 >= 0 else 0) for j in range(m)] for i in range(m)]
    for i in range(m):
        H[i][0] -= h ** (i + 1)
        H[m - 1][i] -= h ** (m - i)
    if 2 * h > 1:
        H[m - 1][0] += (2 * h - 1) ** m
    for i in range(m):
        for j in range(m):
            if i - j + 1 > 0:
                H[i][j] /= factorial(i - j + 1)
    row = [mpf(int(i == k - 1)) for i in range(m)]
    for _ in range(n):
        row = [sum(row[i] * H[i][j] for i in range(m)) for j in range(m)]
    return row[k - 1] * factorial(n) / mpf(n) ** n


def root(f, guess):
    return mp.findroot(f, (mpf(guess), mpf(guess) * mpf("1.0001")), tol=1e-80)


def normal_quantile(p):
    p = mpf(p)
    if p == 0.5:
        return mpf(0)
    side = -1 if p < 0.5 else 1
    q = p if p < 0.5 else 1 - p
    return side * root(lambda x: mp.log(normal_tail(x)) - mp.log(q), abs(stats.norm.ppf(float(q))))


def student_quantile(p, v):
    p = mpf(p)
    side, q = (-1, p) if p < 0.5 else (1, 1 - p)
    return side * root(lambda t: mp.log(student_tail(t, v)) - mp.log(q), abs(stats.t.ppf(float(q), v)))


def chi_square_quantile(q, v):
    return root(lambda x: mp.log(chi_square_tail(x, v)) - mp.log(mpf(q)), stats.chi2.isf(q, v))


def rows(function, arguments):
    def number(value):
        return float(value) if not isinstance(value, Fraction) else value.numerator / value.denominator
    return [[*a, number(function(*a))] for a in arguments]


z = [-38, -20, -8.3, -3, -1.8, -1, -0.5, -0.1, 0, 1e-9, 0.3, 0.8, 1.19, 1.2, 1.5, 1.77, 1.79, 1.8, 2.33, 3.7, 4.04, 4.05, 7.1, 12.34, 20.001, 29.99, 30.01, 35.7, 37.4]
tails = [1e-300, 3e-200, 1e-100, 1e-40, 2e-17, 1e-10, 1e-5, 0.001, 0.025, 0.0749, 0.0751, 0.2, 0.4999, 0.5, 0.6, 0.9, 0.975, 0.999, 1 - 2.0**-40]
gamma_x = [1e-300, 1e-10, 0.01, 0.2, 0.2317, 0.5, 0.7315, 0.7317, 0.89, 0.91, 0.999999, 1.000001, 1.1, 1.2316, 1.2317, 1.4616, 1.5, 1.7315, 1.74, 1.99999, 2.00001, 2.5, 3, 5.5, 7.999, 8, 8.001, 12.25, 100, 171.6, 1234.5, 1e6, 1e10, 1e20, 1e300]
ks = [(0.4, 5), (0.3, 10), (0.2, 20), (0.15, 50), (0.1, 20), (0.05, 20), (0.5, 7), (0.7, 7), (0.49, 12), (0.35, 30), (0.9, 25), (0.6, 40), (0.25, 60), (0.28, 64), (0.3, 55), (0.99, 3), (0.2, 3), (1 / 3, 2), (0.8, 1), (0.05, 200), (0.08, 500), (0.03, 1000)]

values = {
    "source": f"mpmath {mpmath.__version__} with 60 digits, exact rationals (scipy {scipy.__version__} only for starting points); make-distributions.py",
    "erfc": rows(lambda x: mp.erfc(mpf(x)), [(x,) for x in [-3, -0.9, -0.5, 0, 1e-20, 0.1, 0.24, 0.26, 0.5, 0.84, 0.85, 1, 1.24, 1.26, 2, 2.85, 2.86, 5, 10, 20, 26]]),
    "normalSurvival": rows(normal_tail, [(x,) for x in z]),
    "logNormalCdf": rows(lambda x: mp.log(normal_tail(-mpf(x))), [(x,) for x in [8, 2, 0.5, 0, -0.5, -1.79, -1.81, -5, -29.9, -30.1, -50, -1234.5, -1e8]]),
    "normalQuantile": rows(normal_quantile, [(p,) for p in tails]),
    "logGamma": rows(mp.loggamma, [(x,) for x in gamma_x]),
    "logGammaDifference": rows(lambda x, d: mp.loggamma(mpf(x) + mpf(d)) - mp.loggamma(mpf(x)), [(1.5, 0.25), (3, 9), (12, 0.001), (40, -20), (1e4, 0.5), (1e8, 3.25), (1e12, -7), (25, 1e6)]),
    "logBeta": rows(lambda a, b: mp.log(mp.beta(mpf(a), mpf(b))), [(0.5, 0.5), (3, 40), (0.1, 1000), (50, 60), (1e4, 2e4), (1e8, 2.5), (11, 1e7), (1e-3, 1e-3)]),
    "regularisedGammaP": rows(lambda a, x: mp.gammainc(mpf(a), 0, mpf(x), regularized=True), [(0.5, 0.1), (1, 1e-5), (2.5, 2), (10, 0.01), (50, 20), (100, 1), (100, 99.5), (1000, 900), (30, 1e-8), (1e-3, 0.5), (0.3, 4)]),
    "regularisedGammaQ": rows(lambda a, x: chi_square_tail(2 * x, 2 * a), [(0.5, 0.1), (0.5, 600), (1, 5), (2.5, 30), (3, 700), (10, 14), (50, 80), (100, 400), (1000, 1100), (1000.5, 2300), (0.01, 3)]),
    "regularisedBeta": rows(beta_below, [(0.3, 2, 5), (0.5, 0.5, 0.5), (1e-30, 10, 3), (0.01, 150, 2), (0.9, 2, 5), (0.001, 0.1, 40), (0.48, 1000, 1000), (0.2, 300, 400), (0.999, 200, 0.5), (0.5, 1e5, 1.01e5), (1e-5, 3, 2e4)]),
    "studentUpperTail": rows(student_tail, [(0, 5), (0.1, 3), (2, 5), (12.706, 1), (1e6, 1), (40, 2.5), (5, 7.3), (30, 29), (100, 200), (25, 1e4), (1e30, 9.9), (1.96, 1e4), (3, 0.4)]),
    "studentQuantile": rows(student_quantile, [(0.975, 1), (0.975, 10), (0.6, 3), (1e-10, 4.5), (1e-100, 3), (0.25, 0.7), (0.999, 200), (0.05, 30), (1e-300, 50)]),
    "chiSquareUpperTail": rows(chi_square_tail, [(3, 4), (0.001, 2), (1e-9, 6), (700, 2), (1300, 4), (1400, 60), (999, 300), (1001, 300), (1500, 800), (2000, 1000), (600, 598), (600, 602), (100, 602), (10000, 9000), (3, 3), (0.2, 1), (900, 5), (1350, 1)]),
    "chiSquareQuantile": rows(chi_square_quantile, [(0.05, 2), (0.95, 4), (0.01, 20), (1e-300, 6), (0.5, 100), (1e-12, 800), (0.999, 40), (0.025, 1), (0.975, 5)]),
    "binomialUpperTail": rows(binomial_tail, [(3, 10, 0.2), (1, 10, 0.001), (0, 4, 0.3), (10, 10, 0.125), (60, 100, 0.5), (100, 100, 0.001), (250, 300, 0.3), (20, 59, 0.95), (59, 59, 0.95), (995, 1000, 0.01), (2, 3, 0.999)]),
    "irwinHallMeanCdf": rows(irwin_hall, [(0.3, 1), (0.25, 2), (0.4, 3), (0.1, 5), (0.5, 7), (0.45, 12), (0.02, 12), (0.35, 25), (0.2, 40), (0.6, 9), (0.01, 60), (0.95, 4)]),
    "kolmogorovUpperTail": rows(kolmogorov_tail, ks),
}
Path(__file__).with_name("distributions.json").write_text(json.dumps(values).replace("]], ", "]],\n") + "\n")
