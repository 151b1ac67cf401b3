"""Writes ranges.json beside itself: python3 make-ranges.py"""
import json, math, os, platform
import numpy, scipy
from reference import *

COMPUTED = 'independent computation: make-ranges.py, Python %s, numpy %s, scipy %s' % (
    platform.python_version(), numpy.__version__, scipy.__version__)
GINGERICH = 'Gingerich & Uhen 1998, Palaeontologia Electronica 1(2), Fig. 2 caption (values read in the caption); formula Strauss & Sadler 1989'
rows = []
def bounded(x):
    """Unbounded becomes null."""
    if isinstance(x, dict): return {k: bounded(v) for k, v in x.items()}
    if isinstance(x, list): return [bounded(v) for v in x]
    return None if isinstance(x, float) and math.isinf(x) else x
def add(case, quantity, inputs, expected, tolerance=1e-9, source=COMPUTED):
    rows.append(dict(case=case, quantity=quantity, inputs=inputs, expected=bounded(expected), tolerance=tolerance, source=source))

for n, value, tol in ((2, 20.0, 1e-9), (6, 82.1, .05), (33, 9.8, .05)):
    add(f'published-n{n}', 'T/R' if n == 2 else 'extension in % of R', dict(n=n, C=.95), value, tol, GINGERICH)
for n in (2, 3, 4, 5, 6, 8, 10, 15, 20, 33, 50, 100, 1000):
    for C in (.5, .8, .9, .95, .99):
        add(f'one-ended-n{n}-C{C}', 'one-ended', dict(exponent=n - 1, C=C), one_ended(n, C), 1e-10)
for n in (1, 2, 5, 10, 30):
    for C in (.5, .95): add(f'base-n{n}-C{C}', 'one-ended', dict(exponent=n, C=C), one_ended(n, C, 'base'), 1e-10)
for n in (2, 3, 5, 6, 10, 20, 50):
    for C in (.5, .95): add(f'two-ended-n{n}-C{C}', 'two-ended', dict(n=n, C=C), two_ended(n, C))
for n, R in ((2, 10.), (5, 20.), (10, 30.)): add(f'point-n{n}', 'point', dict(n=n, R=R), R / (n - 1), 1e-12)

add('seal-p', 'persistence', dict(n=4, tn=37, T=77), persistence_p(4, 37, 77), 1e-12,
    'sightings 1915, 1922, 1932, 1948, 1952, window to 1992: Solow 1993, Ecology 74:962-964 (data from memory, 0.05 published); number: ' + COMPUTED)
add('seal-evidence', 'evidence', dict(n=4, tn=37, T=77), evidence_ratio(4, 37, 77), 1e-12,
    'formula Solow 1993 (from memory; derivation checked); number: ' + COMPUTED)
add('seal-upper', 'window-bound', dict(n=4, tn=37, C=.95), 37 * .05 ** (-1 / 4), 1e-10)
add('dodo-p1700', 'persistence', dict(n=9, tn=64, T=102), persistence_p(9, 64, 102), 1e-12)

stepped = [[0, 10, 1, 1], [10, 20, 2, 2], [20, 23, 0, 0], [23, 30, .5, .5], [30, 50, .5, .1]]
h = [1.5, 4, 9, 11, 12.5, 14, 15.2, 17, 18.4, 19.5]
for C in (.5, .9, .95, .99):
    add(f'stepped-C{C}', 'weighted-limit', dict(segments=stepped, h=h, C=C), weighted_limit(h, Recovery(stepped), C))
linear = [[0, 10, 1, 3], [10, 15, 3, 3], [15, 16, 0, 0], [16, 40, 1, .2]]
h = [2, 5, 6, 7.5, 8, 9.5, 11, 13, 14.8]
for C in (.5, .8, .95, .99):
    add(f'linear-C{C}', 'weighted-limit', dict(segments=linear, h=h, C=C), weighted_limit(h, Recovery(linear), C))
at = [0, 5, 10, 15.5, 20, 40]
add('U', 'effective', dict(segments=linear, at=at), [Recovery(linear).U(x) for x in at], 1e-12)
gap = [[0, 20, 1, 1], [20, 23, 0, 0], [23, 40, 1, 1]]
add('at-gap', 'at-gap', dict(segments=gap, h=[0, 10], C=.5),
    dict(upper=weighted_limit([0, 10], Recovery(gap), .5)['upper'], gap=list(Recovery(gap).gap(20.0))))
zero = [[0, 12, 1, 1], [12, 22, 1, 0], [22, 40, 0, 0]]
u = [15, 16.9, 16.999999999, 17]
add('to-zero', 'inverse', dict(segments=zero, u=u), [Recovery(zero).inverse(x) for x in u], 1e-6)

for N, n in ((12, 5), (20, 10), (30, 6), (8, 8), (10, 2)):
    for mode, (N1, n1) in (('first', (N - 1, n - 1)), ('base', (N, n))):
        add(f'barren-{N}-{n}-{mode}', 'barren-chances', dict(N=N1, n=n1, M=8), [barren_chance(N1, n1, j) for j in range(9)], 1e-10)
        add(f'furthest-{N}-{n}-{mode}', 'furthest', dict(N=N1, n=n1, C=.95), furthest(N1, n1), 0)
presence = [0,0,0,1,0,1,1,0,0,1,0,1,0,0,0,0,0,0,0,0,0,0]
for mode in ('first', 'base'):
    N, n, M = count(presence, mode == 'first')
    add(f'count-{mode}', 'count', dict(presence=presence, mode=mode),
        dict(N=N, n=n, M=M, p=[barren_chance(N, n, j) for j in range(M + 1)], J=furthest(N, n, '0.05', M)), 1e-10)

with open(os.path.join(os.path.dirname(os.path.abspath(__file__)), 'ranges.json'), 'w') as f:
    json.dump(rows, f, indent=1); f.write('\n')
