"""Correctly rounded values of the elementary functions: mpmath at 200 decimal digits, rounded once to a double.

Run: python3 make-elementary.py   (Python 3.11.7, mpmath 1.3.0); writes elementary.json beside itself.
"""
import json, math, random, struct
from fractions import Fraction
from pathlib import Path
import mpmath
from mpmath import mp, mpf

mp.dps = 1300  # enough to place an argument of 1e308 on the circle
random.seed(20240611)


def rounded(value):
    """The double nearest to an mpf, subnormals included."""
    sign, man, exponent, _ = value._mpf_
    if man == 0:
        return 0.0
    exact = Fraction(man) * (Fraction(2) ** exponent)
    try:
        size = exact.numerator / exact.denominator
    except OverflowError:
        return None
    return -size if sign else size


def log_uniform(low, high):
    return math.exp(random.uniform(math.log(low), math.log(high)))


def signed(value):
    return value if random.random() < 0.5 else -value


def any_double():
    while True:
        x = struct.unpack("<d", struct.pack("<Q", random.getrandbits(64)))[0]
        if math.isfinite(x) and x != 0:
            return x


TINY = [5e-324, 2.5e-310, 2.2250738585072014e-308, 1e-300, 1e-30, 1e-17, 1.2e-16, 1e-8]
near_one = [1 + k * 2.0**-52 for k in (-3, -2, -1, 1, 2, 3, 1000)] + [1 + signed(log_uniform(1e-15, 0.4)) for _ in range(100)]
positive = TINY + near_one + [abs(any_double()) for _ in range(150)] + [log_uniform(1e-3, 1e3) for _ in range(150)]
exponents = TINY + [-x for x in TINY] + [signed(log_uniform(1e-10, 740)) for _ in range(250)]
exponents += [709.7, 709.78271289338, -744.9, -745.1, -708.4, -720.25, -740.5, 38.5, -38.5, 56.1, 0.34657359, -0.34657359, 1.0397, -1.0397]
angles = TINY + [signed(log_uniform(1e-4, 1e6)) for _ in range(200)] + [any_double() for _ in range(100)]
angles += [rounded(k * mp.pi / 2) for k in (1, 2, 3, 4, 5, 100, 12345, 1000001)] + [1e22, 6381956970095103 * 2.0**797, 1.7976931348623157e308, 0.7853981633974483, 0.7853981633974484, 1647099.5]

powers = []
while len(powers) < 500:
    kind = len(powers) % 5
    if kind == 0:
        x, y = log_uniform(1e-3, 1e3), signed(log_uniform(1e-3, 100))
    elif kind == 1:
        x, y = abs(any_double()), signed(log_uniform(1e-6, 3))
    elif kind == 2:
        x, y = 1 + signed(log_uniform(1e-15, 1e-3)), signed(log_uniform(1e3, 1e17))
    elif kind == 3:
        x, y = random.uniform(0.5, 2), signed(float(random.randint(1, 1000)))
    else:
        x, y = -log_uniform(1e-2, 1e2), float(random.randint(-60, 60))
    with mp.workdps(200):
        exact = mpf(x) ** int(y) if x < 0 else mp.exp(mpf(y) * mp.log(mpf(x)))
    result = rounded(exact) if abs(mp.log(abs(exact))) < 760 else None
    if result is not None:
        powers.append([x, y, result])


def table(function, arguments):
    return [[x, rounded(function(mpf(x)))] for x in arguments]


values = {
    "source": f"mpmath {mpmath.__version__}, 1300 decimal digits, rounded once; make-elementary.py",
    "exp": table(mp.exp, exponents),
    "expm1": table(lambda x: mp.exp(x) - 1, exponents),
    "log": table(mp.log, positive),
    "log10": table(mp.log10, positive),
    "log1p": table(lambda x: mp.log(1 + x), TINY + [-x for x in TINY] + [signed(log_uniform(1e-18, 0.99)) for _ in range(200)] + [log_uniform(0.5, 1e300) for _ in range(100)]),
    "sin": table(mp.sin, angles),
    "cos": table(mp.cos, angles),
    "pow": powers,
}
Path(__file__).with_name("elementary.json").write_text(json.dumps(values).replace("]], ", "]],\n") + "\n")
