"""Tables of coefficients and Granger tests, equation by equation, as statsmodels computes them for one regression.

/usr/bin/python3 coefficients.py DATA_FOLDER > ../statsmodels-coefficients.json     No random numbers are drawn.
"""

import json
import sys
from pathlib import Path

import numpy as np
import pandas as pd
import scipy
import statsmodels
import statsmodels.api as sm

folder = Path(sys.argv[1])


def read(file, columns):
    return pd.read_csv(folder / file)[columns].to_numpy(dtype=float)


german = np.diff(np.log(read("e1_west_german_inv_inc_cons_1960Q1_1982Q4.csv", ["invest", "income", "cons"])[:76]), axis=0)
macro = np.diff(np.log(read("macrodata.csv", ["realgdp", "realcons", "realinv"])), axis=0)
danish = read("danish_johansen_juselius_1990.csv", ["lrm", "lry", "ibo", "ide"])


def regressors(x, order):
    lagged = [x[order - lag : len(x) - lag] for lag in range(1, order + 1)]
    return np.hstack([np.ones((len(x) - order, 1)), *lagged])


def case(name, x, order, spare, alpha):
    series = x.shape[1]
    fits = [sm.OLS(x[order:, k], regressors(x, order)).fit() for k in range(series)]
    longer = [sm.OLS(x[order + spare :, k], regressors(x, order + spare)).fit() for k in range(series)]

    def granger(models):
        table = []
        for effect, fit in enumerate(models):
            row = []
            for cause in range(series):
                # the cause's coefficients at lags 1 … order, whatever is fitted beyond
                picked = np.zeros((order, len(fit.params)))
                for lag in range(order):
                    picked[lag, 1 + lag * series + cause] = 1
                row.append(None if cause == effect else float(fit.f_test(picked).pvalue))
            table.append(row)
        return table

    return {
        "name": name,
        "set": name.split()[0],
        "order": order,
        "spare": spare,
        "coverage": 1 - alpha,
        "coefficients": [f.params.tolist() for f in fits],
        "errors": [f.bse.tolist() for f in fits],
        "t": [f.tvalues.tolist() for f in fits],
        "p": [f.pvalues.tolist() for f in fits],
        "low": [f.conf_int(alpha)[:, 0].tolist() for f in fits],
        "high": [f.conf_int(alpha)[:, 1].tolist() for f in fits],
        "granger": granger(fits),
        "grangerSpare": granger(longer),
    }


print(
    json.dumps(
        {
            "provenance": {
                "kind": "library",
                "by": f"statsmodels {statsmodels.__version__} OLS, numpy {np.__version__}, scipy {scipy.__version__}",
                "script": "test/reference/scripts/coefficients.py",
                "seed": None,
                "note": "one list per equation, constant first, then all series at each lag; granger[effect][cause]",
            },
            "cases": [
                case("german order 2", german, 2, 1, 0.05),
                case("macro order 3", macro, 3, 2, 0.1),
                case("danish order 2", danish, 2, 1, 0.01),
            ],
        },
    )
)
