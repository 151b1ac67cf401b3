"""Collects reference rows and writes <name>.json beside this script; numbers rounded to ten digits."""
import json, os
import numpy as np
HERE = os.path.dirname(os.path.abspath(__file__))
class Ref:
    def __init__(self, name): self.name, self.rows = name, []
    def add(self, case, inputs, expected, tolerance, source):
        self.rows.append(dict(case=case, inputs=clean(inputs), expected=rounded(clean(expected)), tolerance=tolerance, source=source))
    def write(self):
        with open(os.path.join(HERE, self.name + ".json"), "w") as f:
            f.write("[\n" + ",\n".join(" " + json.dumps(r, ensure_ascii=False) for r in self.rows) + "\n]\n")
def clean(x):
    if isinstance(x, (np.bool_,)): return bool(x)
    if isinstance(x, (np.floating,)): return float(x)
    if isinstance(x, (np.integer,)): return int(x)
    if isinstance(x, np.ndarray): return [clean(v) for v in x]
    if isinstance(x, (list, tuple)): return [clean(v) for v in x]
    if isinstance(x, dict): return {k: clean(v) for k, v in x.items()}
    return x
def rounded(x):
    if isinstance(x, float): return float(f"{x:.10g}")
    if isinstance(x, list): return [rounded(v) for v in x]
    if isinstance(x, dict): return {k: rounded(v) for k, v in x.items()}
    return x
