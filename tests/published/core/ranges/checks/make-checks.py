"""Writes checks.json beside itself: python3 make-checks.py. Plain textbook formulas, exact rationals, brute force and numpy
simulation, independent of the product."""
import csv, itertools, json, math, os, platform
from fractions import Fraction
import numpy as np, scipy
from scipy import special, stats
HERE = os.path.dirname(os.path.abspath(__file__))
STACK = 'make-checks.py, Python %s, numpy %s, scipy %s' % (platform.python_version(), np.__version__, scipy.__version__)
SETS = {}
with open(os.path.join(HERE, '..', '..', 'timing', 'synthetic-sections.csv')) as f:
    for r in csv.DictReader(f): SETS.setdefault(r['set'], {}).setdefault(r['taxon'], []).append(float(r['occurrence_height_m']))
rows = []
def add(case, quantity, inputs, expected, tolerance=1e-9, source='independent computation: ' + STACK):
    rows.append(dict(case=case, quantity=quantity, inputs=inputs, expected=expected, tolerance=tolerance, source=source))

def tau_p(g):
    """One-sided p of Kendall's tau over all distinct orders of the gaps, by brute force."""
    inv = lambda s: sum(a > b for a, b in itertools.combinations(s, 2)); seen = inv(g); orders = list(itertools.permutations(g))
    return sum(inv(s) <= seen for s in orders) / len(orders)
def runs(g):
    med = np.median(g); side = [x > med for x in g if not math.isclose(x, med, rel_tol=1e-9)]; n1 = sum(side); n2 = len(side) - n1
    r = 1 + sum(a != b for a, b in zip(side, side[1:]))
    def chance(R):
        c = special.comb; k = R // 2
        if R % 2 == 0: return 2 * c(n1 - 1, k - 1) * c(n2 - 1, k - 1) / c(n1 + n2, n1)
        return (c(n1 - 1, k) * c(n2 - 1, k - 1) + c(n1 - 1, k - 1) * c(n2 - 1, k)) / c(n1 + n2, n1)
    return dict(runs=int(r), longer=int(n1), shorter=int(n2), p=float(sum(chance(R) for R in range(2, r + 1))))
def longest(share, s):
    g = Fraction(share); total = Fraction(0); i = 1
    while i <= s and i * g < 1: total += (-1) ** (i + 1) * math.comb(s, i) * (1 - i * g) ** (s - 1); i += 1
    return float(total)

for name, taxon in (('S1_sudden', 'T1'), ('S1_sudden', 'T3'), ('S3_gradual', 'T2')):
    h = np.array(sorted(SETS[name][taxon])); n = len(h); inputs = dict(set=name, taxon=taxon)
    ks = stats.kstest((h[1:-1] - h[0]) / (h[-1] - h[0]), 'uniform', method='exact')
    add(f'distance-{name}-{taxon}', 'distance', inputs, dict(statistic=float(ks.statistic), p=float(ks.pvalue)), 1e-8)
    g = np.round(np.diff(h), 9)  # heights have two decimals: equal gaps are equal
    tau = stats.kendalltau(np.arange(len(g)), g).statistic; rho = stats.spearmanr(np.arange(len(g)), g).statistic
    add(f'gap-trend-{name}-{taxon}', 'gap-trend', inputs, dict(tau=float(tau), rho=float(rho)))
    add(f'runs-{name}-{taxon}', 'runs', inputs, runs(g), 1e-10)
    add(f'largest-gap-{name}-{taxon}', 'largest-gap', inputs, dict(share=float(g.max() / g.sum()), p=longest(float(g.max() / g.sum()), n - 1)), 1e-8)
    add(f'highest-find-{name}-{taxon}', 'highest-find', inputs, float(((h[-2] - h[0]) / (h[-1] - h[0])) ** (n - 2)), 1e-10)
add('highest-find-outlier', 'highest-find', dict(levels=[1, 2, 2.5, 3.1, 4, 4.4, 5, 5.2, 12.0]), float(Fraction(42, 110) ** 7), 1e-12)
for g in ([1, 2, 3], [3, 1, 2, 5, 4], [1, 1, 2, 2, 3, 3], [2, 1, 2, 4, 4, 4, 3, 1], [5, 5, 5, 1, 2, 9, 9, 3]):
    add('tau-%s' % '-'.join(map(str, g)), 'gap-trend-p', dict(gaps=g), tau_p(g), 1e-12)
for share, s in ((.02, 100), (.03, 100), (.05, 100), (.06, 100), (.0400001, 25), (.1, 25), (.2, 25), (.5, 4), (.9, 3), (.012, 150)):
    add(f'longest-{share}-{s}', 'largest-gap-tail', dict(share=share, count=s), longest(share, s), 1e-10)
for n, D in ((5, .4), (10, .3), (20, .2), (50, .15)):
    add(f'kolmogorov-{n}-{D}', 'kolmogorov', dict(n=n, D=D), float(stats.kstwo.sf(D, n)))

rng = np.random.default_rng(2024)
def power(horizons, mu, R):
    total = np.zeros(R); finds = sum(n - 2 for n in horizons)
    for n in horizons:
        x = np.sort(1 - rng.random((R, n)) ** (1 / (1 + mu)), axis=1)
        total += ((x[:, 1:-1] - x[:, :1]) / (x[:, -1:] - x[:, :1])).sum(axis=1)
    z = (total / finds - .5) * math.sqrt(12 * finds)
    return float((z < stats.norm.ppf(.05)).mean())
for mu in (1, 2):
    for n in (6, 10, 20, 50):
        add(f'power-{mu}-{n}', 'decline-power', dict(horizons=[n], mu=mu), power([n], mu, 200000), .02, f'Monte Carlo 200000: {STACK}')
for horizons in ([25, 18, 14, 12, 10, 8, 6, 5], [5] * 20, [3, 4, 3, 5, 4, 3]):
    for mu in (.3, .8, 1.5):
        add(f'power-{mu}-{len(horizons)}-taxa-{horizons[0]}', 'decline-power', dict(horizons=horizons, mu=mu), power(horizons, mu, 100000), .012, f'Monte Carlo 100000: {STACK}')

with open(os.path.join(HERE, 'checks.json'), 'w') as f:
    json.dump(rows, f, indent=1); f.write('\n')
