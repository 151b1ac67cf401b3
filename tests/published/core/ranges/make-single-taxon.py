"""Writes single-taxon.json beside itself: python3 make-single-taxon.py (a few minutes)"""
import json, os, platform
import numpy, scipy
from single_taxon import *

COMPUTED = 'independent computation: make-single-taxon.py, Python %s, numpy %s, scipy %s' % (
    platform.python_version(), numpy.__version__, scipy.__version__)
rows = []
def add(case, quantity, inputs, expected, tolerance=1e-9, source=COMPUTED):
    rows.append(dict(case=case, quantity=quantity, inputs=inputs, expected=expected, tolerance=tolerance, source=source))

for n in (3, 5, 10, 20):
    add(f'flat-n{n}', 'flat-extension', dict(n=n, C=.95), flat_extension(n, .95), 1e-10)
    add(f'flat-both-n{n}', 'flat-both', dict(n=n, C=.95), flat_two_ended(n, .95))
    add(f'flat-covers-n{n}', 'flat-coverage', dict(n=n, C=.95), flat_coverage(n, .95), 1e-12)
for U, e in ((26, 4), (26, 9), (40, 9)):
    add(f'share-U{U}-e{e}', 'share-above', dict(b=2, M=20, U=U, e=e), share_above(2, 20, U, e), 1e-12)
for e in (1, 4, 9):
    add(f'within-e{e}', 'truncated-quantile', dict(b=2, M=20, U=26, e=e, p=.95), truncated_quantile(2, 20, 26, e, .95), 1e-10)

SEAL = 'sightings 1915, 1922, 1932, 1948, 1952, window to 1992, as in Solow 1993, Ecology 74:962-964 (data from memory); number: ' + COMPUTED
records = dict(
    plain=([4, 9, 15, 22, 30, 37], 60), falling=([1, 2, 3, 5, 8, 13, 21], 30),
    rising12=([31.16, 54.5, 59.06, 73.65, 83.66, 85.14, 86.72, 86.83, 93.97, 95.38, 98.67, 99.55], 100),
    rising20=([45.47, 45.75, 55.04, 61.16, 67.66, 74.25, 76.82, 79.39, 82.84, 87.23, 88.77, 89.89, 90.03, 90.83, 90.92, 92.11, 92.78, 93.36, 96.57, 98.26], 100),
    rising25=([15.3, 15.42, 19.98, 38.0, 38.36, 40.5, 44.93, 50.2, 56.26, 70.97, 72.04, 76.15, 78.96, 80.07, 80.92, 84.46, 84.55, 86.29, 87.59, 88.59, 89.64, 90.59, 91.86, 95.19, 99.94], 100),
    uniform25=([2.79, 9.26, 12.03, 15.8, 21.51, 21.97, 22.59, 29.32, 31.95, 34.6, 38.96, 39.12, 41.28, 42.58, 50.21, 51.94, 61.0, 61.73, 67.94, 68.69, 74.79, 81.07, 82.13, 83.31, 94.63], 100),
    falling25=([1.29, 3.77, 7.42, 8.05, 9.6, 10.64, 13.52, 22.9, 24.02, 24.5, 25.91, 26.53, 28.91, 33.34, 35.74, 36.67, 36.75, 39.73, 41.89, 43.44, 43.76, 49.4, 53.28, 53.76, 65.73], 100))
for name, (t, T) in records.items(): add(f'trend-{name}', 'trend', dict(t=t, T=T), trend_p(t, T), 1e-10)
add('trend-seal', 'trend', dict(t=[7, 17, 33, 37], T=77), trend_p([7, 17, 33, 37], 77), 1e-10, SEAL)
rng = numpy.random.default_rng(8)
for n in (60, 200):  # far beyond what doubles allow the alternating sum
    for name, draw in (('uniform', rng.random), ('falling', lambda s: 1 - numpy.sqrt(rng.random(s))), ('rising', lambda s: numpy.sqrt(rng.random(s)))):
        t = sorted(float('%.2f' % v) for v in 100 * draw(n)); T = float('%.2f' % (max(t) + 100 / n))
        add(f'trend-{name}{n}', 'trend', dict(t=t, T=T), trend_p(t, T), 1e-10)

gaps = [0.3, 1.1, 0.4, 0.9, 2.2, 0.2, 0.7, 1.5, 0.6, 0.35, 0.8, 1.9, 0.5, 1.2, 0.25, 3.1]
for C in (.5, .8, .95): add(f'gaps-C{C}', 'gaps', dict(gaps=gaps, C=C, gamma=.95), gap_ranks(gaps, C, .95), 1e-12)
h, base = [3.1, 4.0, 6.2, 6.6, 9.0], 2.0
add('gaps-base', 'gaps-base', dict(h=h, base=base, C=.8, gamma=.8), gap_ranks([b - a for a, b in zip([base] + h, h)], .8, .8), 1e-12)
for gamma in (.95, .975):
    for C in (.5, .8, .9, .95, .99): add(f'gaps-needed-C{C}-g{gamma}', 'gaps-needed', dict(C=C, gamma=gamma), gaps_needed(C, gamma), 0)
for C, N in ((.5, 1), (.8, 4), (.9, 9), (.95, 19), (.99, 99)):
    add(f'gaps-needed-rank-C{C}', 'gaps-needed-rank', dict(C=C), N, 0, 'C / (1 - C) by hand')
levels = [[.5, 24], [.8, 16], [.95, 19], [.9, 30]]
add('rank-level', 'rank-levels', dict(C_N=levels), [math.ceil(C * (N + 1) - 1e-12) / (N + 1) for C, N in levels], 1e-12)

DODO = [1598, 1601, 1602, 1607, 1611, 1628, 1628, 1631, 1638, 1662]
add('dodo-estimate', 'tail-point', dict(t=DODO), 1690, .5 / 1690, 'published: Roberts & Solow 2003, Nature 426:245, doi 10.1038/426245a (1690 read in the source; sightings from memory and a secondary page)')
add('dodo-upper', 'tail-two-sided', dict(t=DODO), 1797, 2.5 / 1797, 'Roberts & Solow 2003 (1797 from memory, not read in the source; the formulas give 1798.88)')
S1T4 = [0.76, 1.42, 1.84, 4.04, 4.67, 8.81, 19.48, 19.85, 20.26, 23.49, 27.04, 27.23]
for name, t, k in (('dodo', DODO, 10), ('dodo-k5', DODO, 5), ('dodo-k7', DODO, 7), ('heights', S1T4, 12)):
    add(f'tail-{name}', 'tail', dict(t=t, k=k, alpha=.05), tail(t, .05, k), 1e-7)
WOODPECKER = [*range(1897, 1903), *range(1904, 1911), 1913, 1914, 1917, 1924, 1925, 1932, 1935, 1938, 1939]
for k, estimate in ((22, 1944.0), (10, 1942.1), (5, 1941.1)):
    add(f'woodpecker-k{k}', 'tail-point', dict(t=WOODPECKER[-k:]), estimate, .06 / 1940, 'years with physical evidence from memory of Roberts et al. 2010, Conservation Biology 24:189-196; number: independent computation in Python')
for name, t in (('below', [10, 5, 5, 5, 5]), ('top', [10, 10, 8, 5, 3])):
    add(f'tail-tied-{name}', 'tail', dict(t=t, k=5, alpha=.05), None, 0, 'v = 0 with a singular matrix, or v without limit')

EVEN, DECLINING, RISING = list(range(1, 10)), [0.5, 1, 1.2, 2, 2.4, 3, 3.3, 4.8, 6.5, 9], [2, 4.5, 6, 7, 7.8, 8.1, 8.6, 8.8, 9]
for name, x, s, U in (('even', EVEN, 2., None), ('declining', DECLINING, 2., None), ('rising', RISING, 2., None), ('even-s1', EVEN, 1., None), ('even-U30', EVEN, 2., 30.)):
    add(f'slope-{name}', 'declining', dict(x=x, s=s, U=U), declining(x, s, math.inf if U is None else U), 1e-6)

add('steps-seal', 'stepped-p', dict(n=4, tn=37, T=77), stepped_p(4, 37, 77), 1e-12)
add('steps-bound', 'stepped-bound', dict(n=4, tn=37, alpha=.05), stepped_bound(4, 37, .05))
add('steps-dodo', 'stepped-p', dict(n=9, tn=64, T=102), stepped_p(9, 64, 102), 1e-12)

for C in (.5, .9, .95):
    for beta in (1, 1.5, 2, 3): add(f'two-highest-C{C}-beta{beta}', 'two-highest', dict(C=C, beta=beta), two_highest(C, beta), 1e-10)
H = [1.5, 4, 9, 11, 12.5, 14, 15.2, 17, 18.4, 19.5]
add('two-highest-levels', 'two-highest-levels', dict(h=H), [2 * H[-1] - H[-2], *(H[-1] + two_highest(.95, b) * (H[-1] - H[-2]) for b in (1, 2))])
for k in (2, 5, 10):
    for beta in (1, 2):
        for C in (.5, .95): add(f'top-k{k}-beta{beta}-C{C}', 'top-k', dict(h=H, k=k, beta=beta, C=C), top_k(H, k, beta, C))
small = [[1001, 1, .001], [200, 2, .5], [50, 1, .01]]
add('omega', 'omega', dict(k_beta_C=small), [omega(*row) for row in small], 1e-14)

with open(os.path.join(os.path.dirname(os.path.abspath(__file__)), 'single-taxon.json'), 'w') as f:
    json.dump(rows, f, indent=1); f.write('\n')
