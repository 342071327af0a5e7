"""Solves trusses as saddle-point systems: movements of all nodes, carried ones included, and a multiplier for every restraint and every
carriage. Reads JSON from stdin, writes JSON. Another formulation and another library than the engine's."""
import json
import sys

import numpy as np
import scipy.linalg


def solve(t):
    n = len(t["points"])
    x = np.array(t["points"], float)
    rows, stiffness = [], []
    for (a, b), ea in zip(t["bars"], t["stiffness"]):
        d = x[b] - x[a]
        length = np.linalg.norm(d)
        row = np.zeros(3 * n)
        row[3 * b:3 * b + 3] = d / length
        row[3 * a:3 * a + 3] -= d / length
        rows.append(row)
        stiffness.append(ea / length)
    for s in t["springs"]:
        row = np.zeros(3 * n)
        row[3 * s["node"]:3 * s["node"] + 3] = s["direction"]
        rows.append(row)
        stiffness.append(s["stiffness"])
    r = np.array(rows)
    k = r.T @ (np.array(stiffness)[:, None] * r)
    conditions = []
    for s in t["restraints"]:
        row = np.zeros(3 * n)
        row[3 * s["node"]:3 * s["node"] + 3] = s["direction"]
        conditions.append(row)
    held = len(conditions)
    for node, bar, f in t["carried"]:
        a, b = t["bars"][bar]
        for axis in range(3):
            row = np.zeros(3 * n)
            row[3 * node + axis] = 1
            row[3 * a + axis] -= 1 - f
            row[3 * b + axis] -= f
            conditions.append(row)
    c = np.array(conditions)
    scale = max(stiffness)
    system = np.block([[k, scale * c.T], [scale * c, np.zeros((len(c), len(c)))]])
    condition = float(np.linalg.cond(system))
    if not condition < 1e12:
        return {"condition": 1e300, "cases": []}
    factor = scipy.linalg.lu_factor(system)
    out = []
    for load in t["loads"]:
        f = np.zeros(3 * n + len(c))
        for node, force in load:
            f[3 * node:3 * node + 3] += force
        u = scipy.linalg.lu_solve(factor, f)
        u += scipy.linalg.lu_solve(factor, f - system @ u)
        axial = np.array(stiffness) * (r @ u[:3 * n])
        reactions = np.zeros(3 * n)
        for i in range(held):
            reactions -= scale * u[3 * n + i] * c[i]
        for i, s in enumerate(t["springs"]):
            reactions[3 * s["node"]:3 * s["node"] + 3] -= axial[len(t["bars"]) + i] * np.array(s["direction"])
        out.append({"axial": axial[:len(t["bars"])].tolist(), "moves": u[:3 * n].reshape(-1, 3).tolist(), "reactions": reactions.reshape(-1, 3).tolist()})
    return {"condition": condition, "cases": out}


json.dump([solve(t) for t in json.load(sys.stdin)], sys.stdout)
