"""Sample sizes for a floor of a proportion, by plain search. Prints what floorSampleSize.test.ts expects.

scipy 1.17.1: binom.sf for the power, beta.ppf for Clopper-Pearson, the closed form for Wilson.
"""
from scipy.stats import beta, binom, norm


def lower(x, n, level, interval):
    tail = (1 - level) / 2
    if interval == "Clopper-Pearson":
        return 0 if x == 0 else beta.ppf(tail, x, n - x + 1)
    z, p = norm.ppf(1 - tail), x / n
    return max(0, (p + z * z / 2 / n - z * (p * (1 - p) / n + z * z / 4 / n / n) ** 0.5) / (1 + z * z / n))


def power(expected, floor, n, level, interval):
    least = next((x for x in range(n + 1) if lower(x, n, level, interval) > floor), n + 1)
    return least, binom.sf(least - 1, n, expected)


def size(expected, floor, wanted, level, interval, horizon):
    reached = [power(expected, floor, n, level, interval) for n in range(1, horizon)]
    enough = [p >= wanted for _, p in reached]
    first = enough.index(True) + 1
    n = max(at for at, good in enumerate(enough) if not good) + 2
    return first, n, *reached[n - 1]


for plan in [
    (0.9, 0.8, 0.9, 0.95, "Wilson", 400),
    (0.9, 0.75, 0.95, 0.95, "Wilson", 300),
    (0.9, 0.75, 0.95, 0.95, "Clopper-Pearson", 300),
    (0.9, 0.75, 0.95, 0.90, "Clopper-Pearson", 300),
]:
    print(plan[:-1], *size(*plan))
