"""Words of sfc64 from numpy at given states, among them carries out of every low half.

Run: python3 make-random.py   (Python 3.11.7, numpy 2.4.6); writes random.json beside itself. Words are hexadecimal.
"""
import json
from pathlib import Path
import numpy as np

STATES = [
    [1, 2, 3, 1],
    [0, 0, 0, 0],
    [2**64 - 1, 2**64 - 1, 2**64 - 1, 2**32 - 3],
    [0x243F6A8885A308D3, 0x13198A2E03707344, 0xA4093822299F31D0, 2**64 - 4],
]


def words(state, count):
    generator = np.random.SFC64()
    generator.state = {"bit_generator": "SFC64", "state": {"state": np.array(state, dtype=np.uint64)}, "has_uint32": 0, "uinteger": 0}
    return [f"{int(word):016x}" for word in generator.random_raw(count)]


cases = [{"state": [f"{s:016x}" for s in state], "words": words(state, 24)} for state in STATES]
values = {"source": f"numpy {np.__version__} SFC64.random_raw; make-random.py", "sfc64": cases}
Path(__file__).with_name("random.json").write_text(json.dumps(values, indent=1) + "\n")
