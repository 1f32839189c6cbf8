"""Reads a table with pandas, dates parsed, and prints the seconds of the second time. python3 pandas_csv.py TABLE.csv"""
import sys
import time

import pandas as pd

pd.read_csv(sys.argv[1], parse_dates=["time"])
start = time.perf_counter()
table = pd.read_csv(sys.argv[1], parse_dates=["time"])
print(f"{time.perf_counter() - start:.6f} {len(table)}")
