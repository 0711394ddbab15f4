"""Exact Gaussian likelihoods, with gaps and moving averages, as statsmodels' state spaces compute them.

python3 likelihood.py DATA_FOLDER > ../statsmodels-likelihood.json     No random numbers are drawn.
"""

import json
import sys
import warnings
from pathlib import Path

import numpy as np
import pandas as pd
import scipy
import statsmodels
from statsmodels.tsa.statespace.sarimax import SARIMAX
from statsmodels.tsa.statespace.varmax import VARMAX

warnings.filterwarnings("ignore")
folder = Path(sys.argv[1])


def read(file, columns):
    return pd.read_csv(folder / file)[columns].to_numpy(dtype=float)


macro = 100 * np.diff(np.log(read("macrodata.csv", ["realgdp", "realcons", "realinv"])), axis=0)
lynx = np.log(read("lynx.csv", ["lynx"]))
huron = read("LakeHuron.csv", ["LakeHuron"])


def rows(a):
    return [[None if np.isnan(v) else float(v) for v in row] for row in np.atleast_2d(np.asarray(a, dtype=float))]


def with_gaps(x):
    """Every seventh cell of a walk through the block, and two whole rows."""
    out = x.copy()
    for t in range(len(x)):
        for k in range(x.shape[1]):
            if (5 * t + 3 * k) % 7 == 0:
                out[t, k] = np.nan
    out[20:22] = np.nan
    return out


def system(name, x, phi, theta, sigma, constant):
    """Likelihood, smoothed cells and forecast of a vector model at given numbers."""
    k = x.shape[1]
    model = VARMAX(x, order=(len(phi), len(theta)), trend="c", enforce_stationarity=False, enforce_invertibility=False)
    ar = np.hstack(phi) if phi else np.zeros((k, 0))
    ma = np.hstack(theta) if theta else np.zeros((k, 0))
    lower = np.linalg.cholesky(sigma)
    params = np.concatenate([constant, ar.ravel(), ma.ravel(), lower[np.tril_indices(k)]])
    result = model.smooth(params)
    ahead = result.get_forecast(6)
    return {
        "name": name,
        "x": rows(x),
        "phi": [rows(m) for m in phi],
        "theta": [rows(m) for m in theta],
        "sigma": rows(sigma),
        "constant": list(map(float, constant)),
        "logLikelihood": float(result.llf),
        "smoothed": rows(result.smoothed_state[:k].T),
        "oneStep": rows(result.forecasts.T),
        "forecast": rows(ahead.predicted_mean),
        "errors": rows(np.sqrt(np.array([np.diag(v) for v in ahead.var_pred_mean]))),
    }


def optimum(name, x, order):
    """The largest likelihood of one series, with a mean."""
    # the stationary start is the default only with this on
    model = SARIMAX(x, order=order, trend="c", enforce_stationarity=True, enforce_invertibility=True)
    # one search after the other until none finds more: each by itself stops early
    result = model.fit(disp=0, maxiter=2000, method="nm", xtol=1e-10, ftol=1e-12, cov_type="none")
    for method in ("powell", "nm", "bfgs"):
        result = model.fit(result.params, disp=0, maxiter=5000, method=method, cov_type="none")
    return {
        "name": name,
        "x": rows(x),
        "p": order[0],
        "q": order[2],
        "params": list(map(float, result.params)),
        "logLikelihood": float(result.llf),
    }


def differenced(name, x, params):
    """How the likelihood of levels with a unit root differs between numbers: the constant left out drops."""
    model = SARIMAX(x, order=(1, 1, 1), use_exact_diffuse=True, enforce_stationarity=True, enforce_invertibility=False)
    values = [float(model.loglike(np.array(p))) for p in params]
    result = model.smooth(np.array(params[0]))
    ahead = result.get_forecast(6)
    return {
        "name": name,
        "x": rows(x),
        "params": params,
        "gain": values[1] - values[0],
        "forecast": list(map(float, ahead.predicted_mean)),
        "errors": list(map(float, ahead.se_mean)),
    }


phi1 = [np.array([[0.3, 0.2, -0.05], [0.1, 0.25, 0.02], [0.4, 0.9, 0.1]])]
phi2 = phi1 + [np.array([[0.05, -0.1, 0.03], [0.1, 0.05, 0.0], [-0.3, 0.2, 0.05]])]
theta1 = [np.array([[0.2, -0.1, 0.02], [0.05, 0.3, 0.0], [0.5, -0.4, 0.2]])]
sigma = np.array([[0.6, 0.3, 1.8], [0.3, 0.45, 0.6], [1.8, 0.6, 16.0]])
constant = np.array([0.4, 0.5, -0.3])
gappy = with_gaps(macro[:80])

print(
    json.dumps(
        {
            "provenance": {
                "kind": "library",
                "by": f"statsmodels {statsmodels.__version__}, numpy {np.__version__}, scipy {scipy.__version__}",
                "script": "scripts/likelihood.py",
                "seed": None,
            },
            "systems": [
                system("two lags, no gaps", macro[:80], phi2, [], sigma, constant),
                system("two lags, gaps", gappy, phi2, [], sigma, constant),
                system("one lag and a moving average, no gaps", macro[:80], phi1, theta1, sigma, constant),
                system("one lag and a moving average, gaps", gappy, phi1, theta1, sigma, constant),
                system("a moving average alone, gaps", gappy, [], theta1, sigma, constant),
            ],
            "optima": [
                optimum("lynx, two lags", lynx, (2, 0, 0)),
                optimum("lynx, two lags and a moving average", lynx, (2, 0, 1)),
                optimum("Lake Huron, one lag and a moving average", huron, (1, 0, 1)),
                optimum("Lake Huron with gaps, one lag and a moving average", with_gaps(huron), (1, 0, 1)),
            ],
            "differenced": [
                differenced("Lake Huron, no gaps", huron, [[0.4, 0.3, 0.5], [0.6, -0.2, 0.6]]),
                differenced("Lake Huron, gaps", with_gaps(huron)[1:], [[0.4, 0.3, 0.5], [0.6, -0.2, 0.6]]),
            ],
        }
    )
)
