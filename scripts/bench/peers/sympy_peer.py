"""The same work by SymPy: from ln Q to thirteen properties, raw, and simplified with TeX.

Reads one JSON object from standard input, {"lnQ": text, "parameters": [names]}, and writes
{"rawMs", "displayMs", "characters"}; `displayMs` is null when SIMPLIFY_LIMIT_S did not suffice.
"""

import json
import signal
import statistics
import sys
import time

import sympy as sp

SIMPLIFY_LIMIT_S = 60
RUNS = 5


def properties(f, N, V, T, k, m):
    """The properties by their definitions from f = ln Q."""
    p = k * T * sp.diff(f, V)
    U = k * T**2 * sp.diff(f, T)
    S = k * f + U / T
    A = -k * T * f
    mu = -k * T * sp.diff(f, N)
    H = U + p * V
    G = A + p * V
    C_V = sp.diff(U, T)
    p_T = sp.diff(p, T)
    p_V = sp.diff(p, V)
    kappa_T = -1 / (V * p_V)
    alpha = -p_T / (V * p_V)
    C_p = C_V - T * p_T**2 / p_V
    mu_JT = -(T * p_T / p_V + V) / C_p
    w2 = V**2 / (N * m) * (T * p_T**2 / C_V - p_V)
    return [p, U, S, A, mu, H, G, C_V, kappa_T, alpha, C_p, mu_JT, w2]


class Expired(Exception):
    pass


def expire(*_):
    raise Expired()


def median_ms(work, runs):
    times = []
    for _ in range(runs):
        sp.core.cache.clear_cache()
        start = time.perf_counter()
        result = work()
        times.append((time.perf_counter() - start) * 1000)
    return statistics.median(times), result


def main():
    model = json.load(sys.stdin)
    names = ["N", "V", "T", "k", "h", "m", *model["parameters"]]
    symbols = {name: sp.Symbol(name, positive=True) for name in names}
    f = sp.sympify(model["lnQ"].replace("^", "**"), locals=symbols)
    variables = [symbols[name] for name in ("N", "V", "T", "k", "m")]

    def raw():
        return properties(f, *variables)

    def display():
        return [sp.simplify(x) for x in raw()]

    raw()
    raw_ms, _ = median_ms(raw, RUNS)
    display_ms = characters = None
    signal.signal(signal.SIGALRM, expire)
    signal.alarm(SIMPLIFY_LIMIT_S)
    try:
        times = []
        for _ in range(RUNS):
            sp.core.cache.clear_cache()
            start = time.perf_counter()
            shown = display()
            for expression in shown:
                sp.latex(expression)
            times.append((time.perf_counter() - start) * 1000)
        signal.alarm(0)
        display_ms = statistics.median(times)
        characters = sum(len(str(expression)) for expression in shown)
    except Expired:
        # What was finished within the limit still says something, if it is at least one run.
        if times:
            display_ms = statistics.median(times)
            characters = sum(len(str(expression)) for expression in shown)
    json.dump({"rawMs": raw_ms, "displayMs": display_ms, "characters": characters}, sys.stdout)


main()
