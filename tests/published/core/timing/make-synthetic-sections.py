"""Writes synthetic-sections.csv beside itself: three invented sections of known truth (numpy's PCG64, seeds 101, 203, 303)."""
import csv, os
import numpy as np

def draw(seed, ends, counts, base=0.0):
    r = np.random.default_rng(seed); out = []
    for end, n in zip(ends, counts):
        while True:
            h = np.round(np.sort(base + (end - base) * r.random(n)), 2)
            if len(set(h)) == n: break
        out.append([float(v) for v in h])
    return out

COUNTS = [25, 18, 14, 12, 10, 8, 6, 5]
ENDS = {'S1_sudden': (101, [30] * 8), 'S2_two_pulse': (203, [30, 22] * 4), 'S3_gradual': (303, [30, 28, 26, 24, 22, 20, 18, 16])}
with open(os.path.join(os.path.dirname(os.path.abspath(__file__)), 'synthetic-sections.csv'), 'w', newline='') as f:
    w = csv.writer(f); w.writerow(['set', 'taxon', 'true_end_m', 'occurrence_height_m'])
    for name, (seed, ends) in ENDS.items():
        for i, heights in enumerate(draw(seed, [float(e) for e in ends], COUNTS)):
            for h in heights: w.writerow([name, 'T%d' % (i + 1), ends[i], h])
