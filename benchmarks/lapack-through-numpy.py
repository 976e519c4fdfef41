"""Times of LAPACK's dgesv through numpy on the balance equations of full random chains, to hold against StationaryBenchmarks.

Run on the same machine, once with OPENBLAS_NUM_THREADS=1 and once with 2; unset OPENBLAS_CORETYPE first, which may name an old kernel.
Prints the least of several runs in milliseconds. Skipped, with a message, where numpy is not installed.
"""
import time

try:
    import numpy
except ImportError:
    print("skipped: numpy is not installed")
    raise SystemExit(0)

print(f"numpy {numpy.__version__}; states, milliseconds")
for states in (100, 500, 1000, 2000, 3000):
    random = numpy.random.default_rng(states)
    matrix = random.random((states, states)) + 1e-3
    matrix /= matrix.sum(axis=1, keepdims=True)
    system = numpy.eye(states) - matrix.T
    system[-1, :] = 1
    right = numpy.zeros(states)
    right[-1] = 1
    least = float("inf")
    for _ in range(200 if states < 1000 else 7):
        begin = time.perf_counter()
        numpy.linalg.solve(system, right)
        least = min(least, time.perf_counter() - begin)
    print(f"{states:5d} {least * 1e3:9.3f}")
