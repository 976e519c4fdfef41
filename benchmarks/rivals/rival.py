"""The arithmetic of general-purpose libraries on the inputs that the benchmarks hand over, timed around the operation alone.

The program of the benchmarks starts this script, writes inputs to files and orders on standard input, and takes turns with it. By hand:
    prepare OPERATION KIND:PATH ...     KIND is doubles or integers; replies "ready"
    run COUNT                           replies with the least seconds of COUNT runs and one figure of the answer
It ends at the end of its input. Ends with exit code 3 where numpy or scipy is not installed.
"""
import platform
import sys
import time

try:
    import numpy
    import scipy
    import scipy.sparse
    import scipy.sparse.csgraph
    import scipy.sparse.linalg
except ImportError as absent:
    print(f"skipped: {absent}", flush=True)
    raise SystemExit(3)


def square(values):
    size = int(round(len(values) ** 0.5))
    return values.reshape(size, size)


def balance_equations(matrix):
    """The balance of every state but the last, whose equation is the sum of all shares."""
    system = numpy.eye(len(matrix)) - matrix.T
    system[-1, :] = 1
    right = numpy.zeros(len(matrix))
    right[-1] = 1
    return system, right


def stationary(values):
    system, right = balance_equations(square(values))
    return lambda: numpy.linalg.solve(system, right)[0]


def eigenvector(values):
    transposed = square(values).T.copy()

    def run():
        eigenvalues, vectors = numpy.linalg.eig(transposed)
        vector = vectors[:, numpy.argmin(abs(eigenvalues - 1))].real
        return vector[0] / vector.sum()

    return run


def hitting(values):
    matrix = square(values)
    system = numpy.eye(len(matrix) - 1) - matrix[:-1, :-1]
    right = numpy.ones(len(system))
    return lambda: numpy.linalg.solve(system, right)[0]


def fundamental(values):
    matrix = square(values)
    system = numpy.eye(len(matrix)) - matrix + 1 / len(matrix)

    def run():
        inverse = numpy.linalg.inv(system)
        return (inverse[-1, -1] - inverse[0, -1]) / inverse[:, -1].mean()

    return run


def absorption(values, ends):
    matrix, count = square(values), int(ends[0])
    among, into = matrix[:-count, :-count], matrix[:-count, -count:]
    system = numpy.eye(len(among)) - among
    right = numpy.hstack([into, numpy.ones((len(among), 1))])
    return lambda: numpy.linalg.solve(system, right)[0, 0]


def power(values, steps):
    matrix, count = square(values), int(steps[0])
    return lambda: numpy.linalg.matrix_power(matrix, count)[0, 0]


def transposed_rows(source, target, probability, size):
    return scipy.sparse.csr_matrix((probability, (target, source)), shape=(size, size))


def steps(source, target, probability, count):
    size = int(source.max()) + 1
    matrix = transposed_rows(source, target, probability, size)
    start = numpy.full(size, 1.0 / size)

    def run():
        current = start
        for _ in range(int(count[0])):
            current = matrix @ current
        return current[0]

    return run


def sparse_stationary(source, target, probability):
    size = int(source.max()) + 1
    balance = (scipy.sparse.identity(size) - transposed_rows(source, target, probability, size)).tocsc()
    # The share of the last state is set to one and its equation left out: a row of ones would fill the factors.
    system, right = balance[:-1, :-1].tocsc(), -balance[:-1, -1].toarray().ravel()

    def run():
        others = scipy.sparse.linalg.splu(system, permc_spec="MMD_AT_PLUS_A", options={"SymmetricMode": True}).solve(right)
        return others[0] / (others.sum() + 1)

    return run


def compressed_rows(source, target, probability):
    size = int(source.max()) + 1
    return lambda: scipy.sparse.csr_matrix((probability, (source, target)), shape=(size, size))[0, int(target[0])]


def strong_components(source, target, probability):
    size = int(source.max()) + 1
    matrix = scipy.sparse.csr_matrix((probability, (source, target)), shape=(size, size))
    return lambda: float(scipy.sparse.csgraph.connected_components(matrix, connection="strong")[0])


def pair_counts(path):
    size = int(path.max()) + 1
    wide = path.astype(numpy.int64)
    return lambda: float(numpy.bincount(wide[:-1] * size + wide[1:], minlength=size * size)[int(wide[0]) * size + int(wide[1])])


OPERATIONS = {
    operation.__name__: operation
    for operation in (
        stationary, eigenvector, hitting, fundamental, absorption, power, steps, sparse_stationary, compressed_rows, strong_components, pair_counts)
}
KINDS = {"doubles": numpy.float64, "integers": numpy.int32}


def read(word):
    kind, path = word.split(":", 1)
    return numpy.fromfile(path, dtype=KINDS[kind])


def least_of(runs, operation):
    least, figure = float("inf"), float("nan")
    for _ in range(runs):
        begin = time.perf_counter()
        figure = operation()
        least = min(least, time.perf_counter() - begin)
    return least, figure


def main():
    print(f"Python {platform.python_version()}, numpy {numpy.__version__}, scipy {scipy.__version__}", flush=True)
    prepared = None
    for line in sys.stdin:
        order, *words = line.split()
        if order == "prepare":
            prepared = OPERATIONS[words[0]](*map(read, words[1:]))
            print("ready", flush=True)
        else:
            least, figure = least_of(int(words[0]), prepared)
            print(f"{least!r} {float(figure)!r}", flush=True)


main()
