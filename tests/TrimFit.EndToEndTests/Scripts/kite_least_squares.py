"""Slope of turn rate over steering of the kite log, deg/s per %, by plain least squares: the outside value of RealLogTests.

Usage: python3 kite_least_squares.py LOG.csv     prints -2.174 for kite-v3-20191008_0019.csv
"""
import csv
import math
import sys


def number(text):
    try:
        return float(text)
    except ValueError:
        return math.nan


with open(sys.argv[1], newline="", encoding="utf-8") as log:
    rows = [(number(r["kite_actual_steering"]), math.degrees(number(r["kite_1_yaw_rate"]))) for r in csv.DictReader(log)]
rows = [(x, y) for x, y in rows if math.isfinite(x) and math.isfinite(y)]
mean_x = sum(x for x, _ in rows) / len(rows)
mean_y = sum(y for _, y in rows) / len(rows)
print(f"{sum((x - mean_x) * (y - mean_y) for x, y in rows) / sum((x - mean_x) ** 2 for x, _ in rows):.3f}")
