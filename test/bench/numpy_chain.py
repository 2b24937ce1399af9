"""The benchmark's chain in NumPy, vectorised over frequency: one 2x2 transmission matrix a stage, multiplied.

Reads the chain as JSON from the first line of standard input. For each further line it evaluates the whole chain
that many times and answers with the least and the median time of one evaluation in ms, and once, for "gain", with
gain in dB.
"""

import json
import sys
import time

import numpy as np

task = json.loads(sys.stdin.readline())
freq = np.array(task["freqsHz"])
s = 2j * np.pi * freq


def response():
    a, b = np.ones_like(s), np.zeros_like(s)
    c, d = np.zeros_like(s), np.ones_like(s)
    for part in task["sections"]:
        z = part["Rw"] + s * part["L"]
        y = 1 / (part["Rc"] + 1 / (s * part["C"]))
        sa, sb, sc, sd = 1 + z * y, z, y, np.ones_like(s)
        a, b, c, d = a * sa + b * sc, a * sb + b * sd, c * sa + d * sc, c * sb + d * sd
    load = 1 / task["loadOhm"]
    h = 1 / ((a + b * load) + task["sourceOhm"] * (c + d * load))
    return 20 * np.log10(np.abs(h)), np.angle(h, deg=True)


for line in sys.stdin:
    word = line.strip()
    if word == "gain":
        print(json.dumps(response()[0].tolist()), flush=True)
        continue
    times = []
    for _ in range(int(word)):
        start = time.perf_counter()
        response()
        times.append((time.perf_counter() - start) * 1e3)
    times.sort()
    print(json.dumps({"min": times[0], "median": times[len(times) // 2]}), flush=True)
