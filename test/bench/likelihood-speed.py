"""Seconds that statsmodels takes for the fits of likelihood-speed.ts: python3 likelihood-speed.py DATA_FOLDER"""

import json
import sys
import time
import warnings
from pathlib import Path

import numpy as np
import pandas as pd
from statsmodels.tsa.statespace.sarimax import SARIMAX
from statsmodels.tsa.statespace.varmax import VARMAX

warnings.filterwarnings("ignore")
folder = Path(sys.argv[1])
macro = 100 * np.diff(np.log(pd.read_csv(folder / "macrodata.csv")[["realgdp", "realcons", "realinv"]].to_numpy(dtype=float)), axis=0)
huron = pd.read_csv(folder / "LakeHuron.csv")[["LakeHuron"]].to_numpy(dtype=float)


def seconds(fit):
    begun = time.perf_counter()
    result = fit()
    return {"seconds": time.perf_counter() - begun, "logLikelihood": float(result.llf)}


print(
    json.dumps(
        {
            "one series, a lag and a moving average": seconds(
                lambda: SARIMAX(huron, order=(1, 0, 1), trend="c").fit(disp=0, cov_type="none")
            ),
            "three series, two lags": seconds(
                lambda: VARMAX(macro, order=(2, 0), trend="c").fit(disp=0, maxiter=1000, cov_type="none")
            ),
        }
    )
)
