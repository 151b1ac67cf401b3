"""Writes pooled.json beside itself: python3 make-pooled.py. Adaptive quadrature and fine grids, independent of the product."""
import json, math, os, platform
import numpy as np, scipy
from scipy import integrate, optimize, stats
HERE = os.path.dirname(os.path.abspath(__file__))
COMPUTED = 'independent computation: make-pooled.py, Python %s, numpy %s, scipy %s' % (
    platform.python_version(), np.__version__, scipy.__version__)
HOGG = '; chi-square with 2(S-1) degrees of freedom after Hogg 1956, Annals of Mathematical Statistics 27:529-532'
rows = []
def add(case, quantity, inputs, expected, tolerance, source=COMPUTED):
    rows.append(dict(case=case, quantity=quantity, inputs=inputs, expected=expected, tolerance=tolerance, source=source))

A = dict(taxa=[[-20, -1.2, 12], [-18, -.5, 9], [-20, -3, 5]], pick=dict(shape='normal', size=.4))
B = dict(taxa=[[-9, .1, 7], [-10, -.8, 14]], pick=dict(shape='normal', size=.25))
C = dict(taxa=[[-30, -2.5, 20], [-28, -4, 6], [-30, -1.9, 8]], pick=dict(shape='normal', size=1))
FLAT = dict(taxa=B['taxa'], pick=dict(shape='uniform', size=.6))
LOW, TOP = -10., 15.

def product(h, taxa):
    h = np.asarray(h, float); out = np.ones_like(h)
    for b, m, n in taxa: out = np.where(h >= m, out * ((m - b) / np.maximum(h - b, m - b)) ** n, 0)
    return out
def likelihood(d, s):
    last = max(m for _, m, _ in s['taxa']); size = s['pick']['size']
    low = last - d
    if s['pick']['shape'] == 'uniform':
        a, b = max(low, -size), size
        return 0. if a >= b else integrate.quad(lambda e: product(d + e, s['taxa']) / (2 * size), a, b, epsabs=0, epsrel=1e-11)[0]
    a = max(low, -9 * size); b = max(9 * size, a + 9 * size)
    at = [x for x in (-3 * size, 0, 3 * size) if a < x < b] or None
    return integrate.quad(lambda e: stats.norm.pdf(e, 0, size) * product(d + e, s['taxa']), a, b, points=at, epsabs=0, epsrel=1e-11, limit=300)[0]

GRID = np.concatenate([np.linspace(LOW, -6, 161), np.linspace(-6, 6, 4801)[1:], np.linspace(6, TOP, 361)[1:]])
def curve(s): return np.array([likelihood(d, s) for d in GRID])
def simpson(y): return np.concatenate([[0], integrate.cumulative_trapezoid(y, GRID)])
def summary(y):
    cum = simpson(y); z = cum[-1]; q = lambda p: float(np.interp(p, cum / z, GRID))
    density = y / z
    def held(t): return float(integrate.trapezoid(np.where(density >= t, density, 0), GRID))
    t = optimize.brentq(lambda t: held(t) - .95, 0, density.max())
    inside = GRID[density >= t]
    return dict(q025=q(.025), q50=q(.5), q975=q(.975), after=float(1 - np.interp(0, GRID, cum) / z), logZ=math.log(z / (TOP - LOW)),
                densest=[float(inside[0]), float(inside[-1])])
curves = {'A': curve(A), 'B': curve(B), 'C': curve(C), 'flat': curve(FLAT)}
def posterior(name, sections, keys, shared=0.):
    y = np.prod([curves[k] for k in keys], axis=0)
    if shared:
        f = lambda x: np.interp(x, GRID, y, left=0, right=0)
        z = np.linspace(-8, 8, 1601); w = stats.norm.pdf(z); w /= w.sum()
        y = sum(wi * f(GRID + shared * zi) for zi, wi in zip(z, w))
    add(name, 'posterior', dict(sections=sections, window=[LOW, TOP], sharedSd=shared), summary(y), 2e-3)
for key, s in (('A', A), ('B', B), ('C', C)): posterior('section-' + key, [s], [key])
posterior('three-sections', [A, B, C], ['A', 'B', 'C'])
posterior('three-sections-shared-error', [A, B, C], ['A', 'B', 'C'], .5)
posterior('uniform-pick', [A, FLAT], ['A', 'flat'])
free = sum(math.log(integrate.trapezoid(curves[k], GRID) / (TOP - LOW)) for k in 'ABC')
add('three-sections-free', 'free', dict(sections=[A, B, C], window=[LOW, TOP], sharedSd=0), free, 2e-4)
at = [-1.5, -1, -.5, 0, .5, 1, 2]
add('likelihood-A', 'likelihood', dict(sections=[A], levels=at), [likelihood(d, A) for d in at], 1e-7)
add('likelihood-flat', 'likelihood', dict(sections=[FLAT], levels=[-.3, 0, .2, .9, 2]), [likelihood(d, FLAT) for d in (-.3, 0, .2, .9, 2)], 1e-7)
far = [-6, -4.5, 9]
add('likelihood-far', 'log-likelihood', dict(sections=[A], levels=far), [math.log(likelihood(d, A)) for d in far], 1e-7)

# Rate lognormal about 0.05 m per ka: the mean over ln a, by adaptive quadrature; the pick has a normal error.
def in_time(d, s, rate, spread):
    return integrate.quad(lambda z: stats.norm.pdf(z) * likelihood(d * rate * math.exp(spread * z), s), -7, 7, epsabs=0, epsrel=1e-9, limit=200)[0]
ka = [-10, 0, 8, 30]
add('rate-likelihood', 'rate-likelihood', dict(sections=[A], levels=ka, rate=.05, spread=.3), [in_time(d, A, .05, .3) for d in ka], 1e-5)

def between(sections):
    M = max(m for s in sections for _, m, _ in s); T = 0
    for s in sections:
        own = max(m for _, m, _ in s)
        T += 2 * sum(n * math.log((M - b) / (own - b)) for b, _, n in s)
    df = 2 * (len(sections) - 1)
    return dict(statistic=T, df=df, p=float(stats.chi2.sf(T, df)))
add('three-supertaxa', 'between', dict(ends=[[[0, 30, 40]], [[0, 29, 25]], [[0, 27, 10]]]), between([[[0, 30, 40]], [[0, 29, 25]], [[0, 27, 10]]]), 1e-9, COMPUTED + HOGG)
add('several-taxa', 'between', dict(ends=[A['taxa'], B['taxa'], C['taxa']]), between([A['taxa'], B['taxa'], C['taxa']]), 1e-9, COMPUTED + HOGG)
one = [[[0, 10.2, 12]], [[0, 11., 20]], [[0, 9.8, 8]]]
add('one-group-known-base', 'between', dict(ends=one), between(one), 1e-10, COMPUTED + HOGG)
lo = .15
unknown = [[[lo, 10.2, 12]], [[lo, 11., 19]], [[lo, 9.8, 8]]]
add('one-group-lowest-find-as-base', 'between', dict(ends=unknown), between(unknown), 1e-10,
    COMPUTED + HOGG + '; base = lowest find of all, one find fewer in the section that owns it')
for level in (.5, .95):
    add('upper-%g' % level, 'upper', dict(ends=one, level=level), 11 * (1 - level) ** (-1 / 40), 1e-12, COMPUTED + HOGG)
add('upper-lowest-find-as-base', 'upper', dict(ends=unknown, level=.95), lo + (11 - lo) * .05 ** (-1 / 39), 1e-12, COMPUTED + HOGG)

end = lambda t: 49 / 30 * (30 / t) ** 50
p = integrate.quad(lambda t: end(t) * stats.norm.cdf(t, 30.5, .3), 30, 200, points=[30.5, 31, 32], epsabs=1e-13, epsrel=1e-12, limit=300)[0]
add('end-after-marker', 'after-marker', dict(base=0, last=30, exponent=50, meanM=30.5, sdM=.3, top=200), p, 1e-9)
with open(os.path.join(HERE, 'pooled.json'), 'w') as f: json.dump(rows, f, indent=1); f.write('\n')
