"""Writes coverage.json beside itself: what each single-taxon bound really covers (its chance to lie at or above the true
end, 1), and how often each test rejects a taxon that lived to it, by simulation in numpy; base 0 known where a bound
needs one, unless the name says `first`. python3 make-coverage.py (some minutes)"""
import json, math, os, platform
import numpy as np

R, R_DECLINING = 400_000, 4_000
rng, rng_declining = np.random.default_rng(78), np.random.default_rng(79)
LAWS = dict(uniform=lambda u: u, falling=lambda u: 1 - np.sqrt(u), steep=lambda u: 1 - np.cbrt(u), rising=np.sqrt)
rows = []
def add(method, law, n, options, rate, replicates=R):
    rows.append(dict(method=method, law=law, n=n, **options, rate=float(rate), replicates=replicates))

def uniform_first(x, C):
    m = x.shape[1] - 1
    return x[:, -1] + (x[:, -1] - x[:, 0]) * ((1 - C) ** (-1 / m) - 1)
def flat(x, C): return x[:, -1] * (1 - C) ** (-1 / (x.shape[1] - 1))
def rate_known(x, C): return x[:, -1] * (1 - math.log(1 - C) / x.shape[1])
def gap_rank(x, C):
    g = np.sort(np.diff(x, axis=1), 1); N = g.shape[1]; j = math.ceil(C * (N + 1) - 1e-12)
    return x[:, -1] + g[:, j - 1] if j <= N else None
def gap_quantile(x, C):
    g = np.sort(np.diff(x, axis=1), 1); N = g.shape[1]
    u = next((u for u in range(1, N + 1) if sum(math.comb(N, i) * C ** i * (1 - C) ** (N - i) for i in range(u)) >= .95), None)
    return None if u is None else x[:, -1] + g[:, u - 1]
def tail(x, alpha):
    t = x[:, ::-1]; k = t.shape[1]; span = t[:, 0] - t[:, -1]
    v = np.log(span[:, None] / (t[:, :1] - t[:, 1:-1])).sum(1) / (k - 1)
    c = (-math.log(alpha) / k) ** v
    return t[:, 0] + span * c / (1 - c)
def top_k(x, k, beta, C):
    omega = (1 - (1 - C) ** (1 / (k - 1))) ** (1 / beta)
    return (x[:, -1] - omega * x[:, -k]) / (1 - omega)
def trend_p(x):
    n = x.shape[1]; S = x.sum(1)
    def W(at):
        s = np.minimum(S, n * at - S); total = np.zeros(len(S))
        for i in range(n + 1): total += np.where(i * at < s, (-1) ** i * math.comb(n, i) * np.clip(s - i * at, 0, None) ** (n - 1), 0)
        return total
    return W(x[:, -1]) / W(np.ones(len(S)))
def gl(a, b, n):
    t, w = np.polynomial.legendre.leggauss(n); return .5 * (b - a) * t + .5 * (a + b), .5 * (b - a) * w
def declining_above(x, s=2.):
    """P(end > 1), one record at a time."""
    n = len(x); xm = x[-1]; y = x / xm
    parts = [gl(a * s, b * s, 10) for a, b in ((0, .5), (.5, 1.5), (1.5, 3), (3, 6))]
    m = np.concatenate([p[0] for p in parts]); wm = np.concatenate([p[1] for p in parts]) * np.exp(-.5 * (m / s) ** 2)
    def falling(z0, z1):
        v, w = gl(0, 1, 40); z = z1 - (z1 - z0) * v ** 2; wz = w * 2 * v * (z1 - z0)
        ls = np.log1p(-np.outer(y, np.minimum(z, 1 - 1e-15))).sum(0)
        return wm @ (np.exp((n - 1) * np.log(z)[None] + m[:, None] * ls[None] + n * np.log1p(m)[:, None]) @ wz)
    def rising(z0, z1):
        p = n * (1 + m); return (wm * np.exp(n * np.log1p(m) + m * np.log(y).sum()) * (z1 ** p - z0 ** p) / p).sum()
    below = falling(xm, 1.) + rising(xm, 1.); above = falling(0, .5 * xm) + falling(.5 * xm, xm) + rising(0., xm)
    return above / (above + below)

for law, inverse in LAWS.items():
    for n in (3, 5, 10, 20):
        x = np.sort(inverse(rng.random((R, n))), 1)
        covers = lambda bound: (bound >= 1).mean()
        add('uniform-first', law, n, dict(C=.95), covers(uniform_first(x, .95)))
        add('flat-priors', law, n, dict(C=.95), covers(flat(x, .95)))
        add('sighting-rate', law, n, dict(C=.95), covers(rate_known(x, .95)))
        for C in (.5, .8):
            if gap_rank(x, C) is not None: add('gap-rank', law, n, dict(C=C), covers(gap_rank(x, C)))
            if gap_quantile(x, C) is not None: add('gap-quantile', law, n, dict(C=C), covers(gap_quantile(x, C)))
        if n > 3:
            add('weibull-tail', law, n, dict(C=.95), covers(tail(x, .05)))
            add('weibull-tail-both', law, n, dict(C=.95), ((tail(x, .025) >= 1) & (tail(x, .975) <= 1)).mean())
        for k in sorted({2, min(5, n), min(10, n), n}):
            for beta in (1, 2, 3): add('top-k', law, n, dict(C=.95, k=k, beta=beta), covers(top_k(x, k, beta, .95)))
        add('window', law, n, dict(C=.95), (x[:, -1] ** n <= .05).mean())
        add('window-trend', law, n, dict(C=.95), (trend_p(x) <= .05).mean())
        add('declining', law, n, dict(C=.95), np.mean([declining_above(r) > .05 for r in np.sort(inverse(rng_declining.random((R_DECLINING, n))), 1)]), R_DECLINING)
    print(law, flush=True)

source = 'independent computation: make-coverage.py, Python %s, numpy %s' % (platform.python_version(), np.__version__)
with open(os.path.join(os.path.dirname(os.path.abspath(__file__)), 'coverage.json'), 'w') as f:
    f.write('{"source": %s, "rows": [\n%s\n]}\n' % (json.dumps(source), ',\n'.join(json.dumps(r) for r in rows)))
