"""Vector autoregressions by least squares as statsmodels computes them.

python3 var.py DATA_FOLDER > ../statsmodels-var.json     No random numbers are drawn.
"""

import json
import sys
import warnings
from pathlib import Path

import numpy as np
import pandas as pd
import scipy
import statsmodels
from statsmodels.tsa.api import VAR

warnings.filterwarnings("ignore")
folder = Path(sys.argv[1])


def read(file, columns):
    return pd.read_csv(folder / file)[columns].to_numpy(dtype=float)


german = np.diff(np.log(read("e1_west_german_inv_inc_cons_1960Q1_1982Q4.csv", ["invest", "income", "cons"])[:76]), axis=0)
macro = np.diff(np.log(read("macrodata.csv", ["realgdp", "realcons", "realinv"])), axis=0)
danish = read("danish_johansen_juselius_1990.csv", ["lrm", "lry", "ibo", "ide"])
bjsales = np.diff(read("BJsales.csv", ["lead", "sales"]), axis=0)


def rows(a):
    return np.asarray(a, dtype=float).tolist()


def case(name, x, order, trend, most, driver=None):
    future = None
    if driver is not None:
        future = driver[len(x) : len(x) + 6].reshape(-1, 1)
        model = VAR(x, exog=driver[: len(x)].reshape(-1, 1))
    else:
        model = VAR(x)
    fit = model.fit(order, trend=trend)
    criteria = []
    if driver is None:
        for p in range(most + 1):
            # the same rows for every order: the first (most - p) are cut off before the fit
            f = VAR(x[most - p :]).fit(p, trend=trend) if p > 0 or trend != "n" else None
            criteria.append(None if f is None else {"order": p, "aic": f.aic, "bic": f.bic, "hq": f.hqic, "fpe": f.fpe})
    selected = VAR(x).select_order(most, trend=trend).selected_orders if driver is None else None
    low_high = fit.forecast_interval(x[-order:], 6, alpha=0.1, exog_future=future)
    return {
        "name": name,
        "set": name.split()[0],
        "order": order,
        "trend": trend,
        "most": most,
        "driver": None if driver is None else rows(driver.reshape(-1, 1)),
        "params": rows(fit.params),
        "sigma": rows(fit.sigma_u),
        "errors": rows(fit.stderr),
        "ahead": rows(fit.forecast(x[-order:], 6, exog_future=future)),
        "low": rows(low_high[1]),
        "high": rows(low_high[2]),
        "mse": [rows(m) for m in fit.mse(6)],
        "roots": sorted((1 / np.abs(fit.roots)).tolist(), reverse=True),
        "criteria": criteria,
        "selected": None if selected is None else {k: int(v) for k, v in selected.items()},
    }


outside = np.cos(np.arange(1, 260) ** 2 / 7)
print(
    json.dumps(
        {
            "provenance": {
                "kind": "library",
                "by": f"statsmodels {statsmodels.__version__} tsa.VAR, numpy {np.__version__}, scipy {scipy.__version__}",
                "script": "test/reference/scripts/var.py",
                "seed": None,
                "note": "params are ordered terms, driver, lags; a trend counts from 1 at the first row of the data",
            },
            "cases": [
                case("german order 2", german, 2, "c", 4),
                case("macro order 3", macro, 3, "c", 6),
                case("macro order 2 with trend", macro, 2, "ct", 4),
                case("macro order 1 with squared trend", macro, 1, "ctt", 4),
                case("german order 2 without terms", german, 2, "n", 4),
                case("danish order 2", danish, 2, "c", 3),
                case("bjsales order 5", bjsales, 5, "c", 8),
                case("macro order 2 with a driver", macro, 2, "c", 4, outside),
            ],
        },
    )
)
