"""Impulse responses and variance shares as statsmodels computes them.

/usr/bin/python3 responses.py DATA_FOLDER > ../statsmodels-responses.json     No random numbers are drawn.
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


def case(name, x, order, horizon):
    fit = VAR(x).fit(order, trend="c")
    irf = fit.irf(horizon)
    # decomp[series][ahead][shock]
    decomp = fit.fevd(horizon).decomp
    return {
        "name": name,
        "order": order,
        "horizon": horizon,
        "sigma": fit.sigma_u.tolist(),
        "unit": irf.irfs.tolist(),
        "orthogonal": irf.orth_irfs.tolist(),
        "shares": np.transpose(decomp, (1, 0, 2)).tolist(),
    }


print(
    json.dumps(
        {
            "provenance": {
                "kind": "library",
                "by": f"statsmodels {statsmodels.__version__} tsa.VAR irf and fevd, numpy {np.__version__}, scipy {scipy.__version__}",
                "script": "test/reference/scripts/responses.py",
                "seed": None,
                "note": "matrices are [responding][struck], shares [ahead][series][shock]",
            },
            "cases": [
                case("german", german, 2, 8),
                case("macro", macro, 3, 12),
                case("danish", danish, 2, 10),
            ],
        }
    )
)
