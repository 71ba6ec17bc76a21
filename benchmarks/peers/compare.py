"""Ratios of own times to the fastest reference per problem and number of digits.

usage: compare.py FOLDER > table.md; every CSV file in the folder is read, rows with library "odedsl" are ours.
Time to D digits: along the points of one method from loose to tight tolerance, the last place where the digits rise through D,
interpolated linearly in (digits, log time). "<": the loosest tolerance already gives more than D digits."""
import collections
import csv
import glob
import math
import os
import statistics
import sys

DIGITS = [4, 6, 8, 10]
points = collections.OrderedDict()
for name in sorted(glob.glob(os.path.join(sys.argv[1], "*.csv"))):
    if os.path.basename(name).startswith("ensemble"):
        continue
    for row in csv.DictReader(open(name)):
        time = min(float(row["wall_us_min"]), float(row.get("cpu_us_min") or 1e300))
        key = (row["library"], row["method"])
        points.setdefault(row["problem"], {}).setdefault(key, []).append((float(row["rtol"]), float(row["error_scd"]), time, row["status"]))


def time_at(series, digits):
    good = sorted((p for p in series if p[3] == "ok" and p[1] > -50), key=lambda p: -p[0])
    found = None
    for a, b in zip(good, good[1:]):
        if a[1] < digits <= b[1]:
            weight = (digits - a[1]) / (b[1] - a[1])
            found = (math.exp(math.log(a[2]) + weight * (math.log(b[2]) - math.log(a[2]))), "")
    if found is None and good and good[0][1] >= digits:
        found = (good[0][2], "<")
    return found


def best(series_by_method, digits, wanted):
    times = [(*t, " ".join(key)) for key, s in series_by_method.items() if wanted(key) for t in [time_at(s, digits)] if t]
    return min(times) if times else None


def show(found, own=False):
    if not found:
        return "–"
    name = found[2].split(" ", 1)[1] if own else found[2]
    return f"{found[1]}{found[0]:.3g} {name}"


ratios = {"best": [], "automatic": []}
print("| problem | digits | fastest reference, µs | own best, µs | ratio | automatic, µs | ratio |")
print("|---|---|---|---|---|---|---|")
for problem, methods in points.items():
    for digits in DIGITS:
        reference = best(methods, digits, lambda key: key[0] != "odedsl")
        own = best(methods, digits, lambda key: key[0] == "odedsl")
        automatic = best(methods, digits, lambda key: key == ("odedsl", "Automatic"))
        if not own:
            continue
        cells = []
        for name, value in (("best", own), ("automatic", automatic)):
            ratio = value[0] / reference[0] if value and reference else None
            if ratio:
                ratios[name].append(ratio)
            cells.append(f"{ratio:.2f}" if ratio else "–")
        auto = f"{automatic[1]}{automatic[0]:.3g}" if automatic else "–"
        print(f"| {problem} | {digits} | {show(reference)} | {show(own, True)} | {cells[0]} | {auto} | {cells[1]} |")
for name, values in ratios.items():
    if values:
        print(f"\nRatio of own {name} to the fastest reference: median {statistics.median(values):.2f}, "
              f"below 1 in {sum(v < 1 for v in values)} of {len(values)} places.")
