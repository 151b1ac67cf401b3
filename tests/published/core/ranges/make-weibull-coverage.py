"""Prints what the one-sided upper bound of the Weibull-type tail (k = n) really covers, by simulation in numpy, for finds
uniform on (0, 1) and for finds that thin out in a straight line (Beta(1, 2)): python3 make-weibull-coverage.py"""
import numpy as np

NOMINAL = (.5, .8, .9, .95, .99)
REPLICATES = 200_000
rng = np.random.default_rng(41)

def coverage(k, draw):
    covered = np.zeros(len(NOMINAL)); done = 0
    while done < REPLICATES:
        R = min(REPLICATES - done, 4_000_000 // k)
        t = np.sort(draw((R, k)), 1)[:, ::-1]
        span = t[:, 0] - t[:, -1]
        v = np.log(span[:, None] / (t[:, :1] - t[:, 1:-1])).sum(1) / (k - 1)
        for i, C in enumerate(NOMINAL):
            share = -np.log(1 - C) / k
            if share >= 1: covered[i] = np.nan; continue
            c = share ** v
            covered[i] += (t[:, 0] + span * c / (1 - c) >= 1).sum()
        done += R
    return ', '.join('undefined' if np.isnan(x) else '%.3f' % (x / REPLICATES) for x in covered)

for k in (3, 4, 5, 6, 7, 8, 9, 10, 12, 15, 20, 30, 50, 100):
    print('  { finds: %d, uniform: [%s], thinning: [%s] },' % (
        k, coverage(k, rng.random), coverage(k, lambda s: 1 - np.sqrt(rng.random(s)))), flush=True)
