"""Long-run relations by reduced-rank regression as statsmodels computes them.

python3 vecm.py DATA_FOLDER > ../statsmodels-vecm.json     No random numbers are drawn.
"""

import json
import sys
import warnings
from pathlib import Path

import numpy as np
import pandas as pd
import scipy
import statsmodels
from statsmodels.tsa.vector_ar.vecm import VECM, coint_johansen

warnings.filterwarnings("ignore")
folder = Path(sys.argv[1])


def read(file, columns):
    return pd.read_csv(folder / file)[columns].to_numpy(dtype=float)


danish = read("danish_johansen_juselius_1990.csv", ["lrm", "lry", "ibo", "ide"])
macro = np.log(read("macrodata.csv", ["realgdp", "realcons", "realinv"]))


def rows(a):
    return np.asarray(a, dtype=float).tolist()


def case(name, data, x, order, rank, terms, deterministic, seasons=0):
    result = VECM(x, k_ar_diff=order - 1, coint_rank=rank, deterministic=deterministic, seasons=seasons).fit()
    return {
        "name": name,
        "set": data,
        "order": order,
        "rank": rank,
        "terms": terms,
        "cycle": seasons or None,
        "lagMatrices": [rows(m) for m in result.var_rep],
        "sigma": rows(result.sigma_u),
        "rows": int(result.nobs),
        "forecast": rows(result.predict(steps=8)),
    }


print(
    json.dumps(
        {
            "provenance": {
                "kind": "library",
                "by": f"statsmodels {statsmodels.__version__}, numpy {np.__version__}, scipy {scipy.__version__}",
                "script": "scripts/vecm.py",
                "seed": None,
            },
            "cases": [
                case("Danish money, constant inside", "danish", danish, 2, 1, "inside-constant", "ci", 4),
                case("Danish money, constant", "danish", danish, 2, 1, "constant", "co", 4),
                case("Danish money, no terms", "danish", danish, 3, 2, "none", "n"),
                case("national accounts, trend inside", "macro", macro, 3, 1, "inside-trend", "coli"),
                case("national accounts, trend", "macro", macro, 2, 2, "trend", "colo"),
                case("national accounts, one lag", "macro", macro, 1, 1, "constant", "co"),
            ],
        }
    )
)
