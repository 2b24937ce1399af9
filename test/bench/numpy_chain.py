"""The benchmark's chain in NumPy, vectorised over frequency.

Reads the chain as JSON from the first line of standard input. Each further line asks for one form, "matrices" or
"pair"; with "runs" the whole chain is evaluated that many times, and the answer is a list of times in ms, without it
the answer is gain in dB and phase in degrees.
"""

import json
import sys
import time

import numpy as np

task = json.loads(sys.stdin.readline())
s = 2j * np.pi * np.array(task["freqsHz"])
source, load = task["sourceOhm"], 1 / task["loadOhm"]


def branches(part):
    return part["Rw"] + s * part["L"], 1 / (part["Rc"] + 1 / (s * part["C"]))


def matrices():
    """One 2x2 transmission matrix a section, multiplied from source to load."""
    a, b = np.ones_like(s), np.zeros_like(s)
    c, d = np.zeros_like(s), np.ones_like(s)
    for part in task["sections"]:
        z, y = branches(part)
        sa, sb, sc, sd = 1 + z * y, z, y, np.ones_like(s)
        a, b, c, d = a * sa + b * sc, a * sb + b * sd, c * sa + d * sc, c * sb + d * sd
    return polar(1 / ((a + b * load) + source * (c + d * load)))


def pair():
    """Voltage and current carried from the load to the source, as the program does it: the least there is to do."""
    v, i = np.ones_like(s), np.full_like(s, load)
    for part in reversed(task["sections"]):
        z, y = branches(part)
        i = i + y * v
        v = v + z * i
    return polar(1 / (v + source * i))


def polar(h):
    return 20 * np.log10(np.abs(h)), np.angle(h, deg=True)


def timed(evaluate):
    start = time.perf_counter()
    evaluate()
    return (time.perf_counter() - start) * 1e3


for line in sys.stdin:
    question = json.loads(line)
    evaluate = {"matrices": matrices, "pair": pair}[question["form"]]
    if "runs" in question:
        answer = [timed(evaluate) for _ in range(question["runs"])]
    else:
        gain_db, phase_deg = evaluate()
        answer = {"gainDb": gain_db.tolist(), "phaseDeg": phase_deg.tolist()}
    print(json.dumps(answer), flush=True)
