"""The plain version of the main job: read a log, least squares of the turn rate on thrust and brakes with HAC errors, pull over power, plots, a page.

python3 plain_fit.py LOG.csv PAGE.html
Debian 12: python3-pandas 1.5.3, python3-statsmodels 0.13.5, python3-matplotlib 3.6.3.
"""
import base64
import io
import sys

import matplotlib

matplotlib.use("Agg")
import matplotlib.pyplot as plt
import numpy as np
import pandas as pd
import statsmodels.api as sm

log = pd.read_csv(sys.argv[1])
time = next(c for c in log.columns if c.startswith("time"))
seconds = pd.to_numeric(log[time], errors="coerce")
if seconds.isna().all():
    seconds = (pd.to_datetime(log[time]) - pd.to_datetime(log[time]).iloc[0]).dt.total_seconds()
log["second"] = np.floor(seconds - seconds.iloc[0])
means = log.groupby("second").mean(numeric_only=True)


def column(word):
    return means[next(c for c in means.columns if c.startswith(word))]


speed = column("rpm")
thrust = (speed / speed.max()) ** 2
brake = column("brake_right") - column("brake_left")
turn = column("yaw_rate") if any(c.startswith("yaw_rate") for c in means) else column("gyro_z")
design = sm.add_constant(pd.DataFrame({"thrust": thrust, "thrust2": thrust**2, "brake": brake}))
keep = design.notna().all(axis=1) & turn.notna()
design, turn = design[keep], turn[keep]
fit = sm.OLS(turn, design).fit(cov_type="HAC", cov_kwds={"maxlags": 20})
powers = pd.DataFrame({"const": 1.0, "thrust": np.linspace(0, 1, 41), "thrust2": np.linspace(0, 1, 41) ** 2, "brake": 0.0})
pull = fit.get_prediction(powers).summary_frame(alpha=0.05)


def picture(draw):
    figure, axes = plt.subplots(figsize=(9, 5))
    draw(axes)
    out = io.BytesIO()
    figure.savefig(out, format="svg")
    plt.close(figure)
    return base64.b64encode(out.getvalue()).decode()


def over_thrust(axes):
    axes.plot(thrust[keep], turn - fit.params["brake"] * brake[keep], ".", markersize=3)
    axes.plot(powers["thrust"], pull["mean"])
    axes.fill_between(powers["thrust"], pull["mean_ci_lower"], pull["mean_ci_upper"], alpha=0.3)
    axes.set_xlabel("thrust / full")
    axes.set_ylabel("turn rate, deg/s")


def over_time(axes):
    for name, values in (("turn", turn), ("thrust, %", 100 * thrust[keep]), ("brake", brake[keep])):
        axes.plot(turn.index, values, label=name)
    axes.legend()


def residuals(axes):
    axes.plot(turn.index, fit.resid, ".", markersize=3)


def track(axes):
    axes.plot(column("lon"), column("lat"))


pictures = "".join(f'<img src="data:image/svg+xml;base64,{picture(d)}">' for d in (over_thrust, over_time, residuals, track))
with open(sys.argv[2], "w") as page:
    page.write(f"<!doctype html><title>Turn over thrust</title><pre>{fit.summary()}</pre>{pull.iloc[[0, 20, 40]].to_html()}{pictures}")
print(pull.iloc[[0, 20, 40]])
