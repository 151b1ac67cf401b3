"""Writes samples-and-counts.json beside itself: python3 make-samples-and-counts.py"""
import json, math, os, platform
import numpy as np, scipy
from scipy import integrate, optimize, special

COMPUTED = 'independent computation: make-samples-and-counts.py, Python %s, numpy %s, scipy %s' % (
    platform.python_version(), np.__version__, scipy.__version__)
rows = []
def add(case, quantity, inputs, expected, tolerance=1e-9):
    rows.append(dict(case=case, quantity=quantity, inputs=inputs, expected=expected, tolerance=tolerance, source=COMPUTED))

def hiatus(e, uR, ub, D, above):
    """Mass of (uR + t)^-e below a break at t = ub, in D units of time at it, and above."""
    f = lambda t: (uR + t) ** -e
    lo, ab = integrate.quad(f, 0, ub, epsrel=1e-13)[0], integrate.quad(f, ub, ub + above, epsrel=1e-13)[0]
    hi = D * f(ub); Z = lo + hi + ab
    return dict(below=lo / Z, within=hi / Z, above=ab / Z)
for e, uR, ub, D, above in ((9, 18., 1., .5, 20.), (9, 18., 1., 2, 20.), (9, 18., 1., 10, 20.), (1, 5., 2., 1., 30.)):
    add(f'hiatus-e{e}-D{D}', 'break-shares', dict(e=e, uR=uR, ub=ub, D=D, over=above), hiatus(e, uR, ub, D, above), 1e-10)

def bayes(N, n, M, prior=None):
    """Posterior of j, N' and n' already without the first find, p ~ U(0, 1)."""
    j = np.arange(M + 1)
    w = np.exp(special.betaln(1 + n, 1 + N - n + j)) * (1 if prior is None else np.asarray(prior))
    return (w / w.sum()).tolist()
for N, n, M in ((11, 4, 10), (19, 9, 10), (29, 5, 25)):
    add(f'bayes-{N}-{n}-{M}', 'barren-posterior', dict(N=N, n=n, M=M), bayes(N, n, M), 1e-10)
hs = [10.0, 10.4, 11.5, 12.0, 14.5, 15.0]
add('bayes-height', 'height-posterior', dict(N=11, n=4, edges=hs + [17.0]), bayes(11, 4, 5, np.diff(hs + [17.0])), 1e-10)

def bayes_effort(present, efforts, above):
    present, e, ab = np.asarray(present, bool), np.asarray(efforts, float), np.asarray(above, float)
    c = np.r_[e, ab].mean(); e, ab = e / c, ab / c
    f, q0, w = e[present], e[~present].sum(), []
    for j in range(len(ab) + 1):
        Q = q0 + ab[:j].sum()
        g = lambda lam: math.exp(np.log(-np.expm1(-lam * f)).sum() - lam * (Q + 1)) if lam > 0 else 0.0
        w.append(sum(integrate.quad(g, a, b, epsabs=0, epsrel=1e-12, limit=400)[0]
                     for a, b in ((0, .01), (.01, .1), (.1, .3), (.3, 1.), (1., 3.), (3., 12.), (12., 60.))))
    w = np.array(w); return (w / w.sum()).tolist()
present = [1,0,0,1,0,0,1,0,0,0,1]
add('effort-equal', 'effort-posterior', dict(present=present, efforts=[1.] * 11, above=[1.] * 10), bayes(11, 4, 10))
add('effort', 'effort-posterior', dict(present=present, efforts=[2,1,.5,3,1,1,2,.5,1,1,4], above=[1,2,.5,1,3,1]),
    bayes_effort(present, [2,1,.5,3,1,1,2,.5,1,1,4], [1,2,.5,1,3,1]))
add('effort-every-horizon', 'effort-posterior', dict(present=[1] * 6, efforts=[1,4,2,.2,1,1], above=[.1,5,5]),
    bayes_effort([1] * 6, [1,4,2,.2,1,1], [.1,5,5]))
many = [(7 * i) % 5 + .5 for i in range(60)]
some = [int((11 * i) % 7 < 3) for i in range(60)]
add('effort-many', 'effort-posterior', dict(present=some, efforts=many, above=[3, .5, 1, 1, 8]), bayes_effort(some, many, [3, .5, 1, 1, 8]), 1e-8)

def esp(w, k):
    e = [1] + [0] * k
    for x in w:
        for i in range(k, 0, -1): e[i] += e[i - 1] * x
    return e[k]
from fractions import Fraction as Fr
def odds(inside, above, k):
    """Exact in rationals."""
    inside, above = [Fr(str(x)) for x in inside], [Fr(str(x)) for x in above]
    return [float(esp(inside, k) / esp(inside + above[:j], k)) for j in range(len(above) + 1)]
inside, above = [1,2,1,.5,1,3,1,1,.5,2], [1,1,2,.5,3]
for k in (1, 4, 6, 10): add(f'odds-{k}', 'odds-chances', dict(inside=inside, above=above, n=k), odds(inside, above, k), 1e-10)
wide = [round(10 ** ((13 * i) % 9 / 2 - 2), 6) for i in range(120)]
add('odds-wide', 'odds-chances', dict(inside=wide, above=wide[:20], n=70), odds(wide, wide[:20], 70), 1e-9)
add('odds-equal', 'odds-chances', dict(inside=[3.] * 11, above=[3.] * 8, n=4),
    [math.comb(11, 4) / math.comb(11 + j, 4) for j in range(9)], 1e-10)

def nb(total, S, Sj, k):
    g = special.gammaln
    return math.exp(g(total + k * S) - g(k * S) - g(total + k * (S + Sj)) + g(k * (S + Sj)))
for total, S, Sj, k in ((40, 10, 1, 1.), (40, 10, 3, 1.), (40, 10, 3, .3), (40, 10, 3, 5.), (40, 10, 3, 1e6), (12, 20.5, 4.5, .5)):
    add(f'counts-{total}-{S}-{Sj}-{k}', 'counts-chance', dict(total=total, S=S, Sj=Sj, k=k), nb(total, S, Sj, k), 1e-8)
add('counts-poisson', 'counts-chance', dict(total=40, S=10, Sj=3, k=None), (10 / 13) ** 40, 1e-15)
def conditional(y, e, k, further):
    g, N, S = special.gammaln, sum(y), sum(e)
    return sum(g(v + k * x) - g(k * x) for v, x in zip(y, e)) + g(k * (S + further)) - g(N + k * (S + further))
grid = [2.0 ** q for q in range(-4, 5)]
def grid_posterior(y, e, above):
    A = np.array([[conditional(y, e, k, sum(above[:j])) for k in grid] for j in range(len(above) + 1)])
    P = np.exp(A - A.max()).sum(axis=1); return (P / P.sum()).tolist()
y = [3,0,7,1,12,0,4,2,9,2]
add('counts-posterior', 'counts-posterior', dict(y=y, efforts=[1.] * 10, above=[1.] * 8), grid_posterior(y, [1.] * 10, [1.] * 8))
e, a = [1,.5,2,1,3,1,.5,.5,1,1], [2, .5, 1]
add('counts-posterior-effort', 'counts-posterior', dict(y=y, efforts=e, above=a), grid_posterior(y, e, a))
for name, eff in (('shape', [1.] * 10), ('shape-effort', e)):
    r = optimize.minimize_scalar(lambda x: -conditional(y, eff, math.exp(x), 0), bounds=(-6, 9), method='bounded', options=dict(xatol=1e-11))
    add('counts-' + name, 'counts-shape', dict(y=y, efforts=eff), math.exp(r.x), 1e-4)
add('counts-shape-even', 'counts-shape', dict(y=[4, 4, 5, 4, 4, 5], efforts=[1.] * 6), 10000, 0)

with open(os.path.join(os.path.dirname(os.path.abspath(__file__)), 'samples-and-counts.json'), 'w') as f:
    json.dump(rows, f, indent=1); f.write('\n')
