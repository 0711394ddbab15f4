"""Tests of residuals as statsmodels computes them, and the two systems' tests it lacks by plain numpy regressions.

python3 residuals.py DATA_FOLDER > ../statsmodels-residuals.json     No random numbers are drawn.
"""

import json
import sys
import warnings
from pathlib import Path

import numpy as np
import pandas as pd
import scipy
import statsmodels
import statsmodels.api as sm
from statsmodels.stats.diagnostic import acorr_breusch_godfrey, acorr_ljungbox, het_arch
from statsmodels.tsa.api import VAR

warnings.filterwarnings("ignore")
folder = Path(sys.argv[1])


def read(file, columns):
    return pd.read_csv(folder / file)[columns].to_numpy(dtype=float)


german = np.diff(np.log(read("e1_west_german_inv_inc_cons_1960Q1_1982Q4.csv", ["invest", "income", "cons"])[:76]), axis=0)
macro = np.diff(np.log(read("macrodata.csv", ["realgdp", "realcons", "realinv"])), axis=0)
lynx = np.log(read("lynx.csv", ["lynx"]))


def leftover(x, y):
    return y - x @ np.linalg.lstsq(x, y, rcond=None)[0]


def system_lm(u, z, lags):
    t, k = u.shape
    past = np.hstack([np.vstack([np.zeros((j, k)), u[: t - j]]) for j in range(1, lags + 1)])
    e = leftover(np.hstack([z, past]), u)
    return t * (k - np.trace(np.linalg.solve(u.T @ u, e.T @ e)))


def system_arch(u, lags):
    t, k = u.shape
    v = np.array([[row[i] * row[j] for i in range(k) for j in range(i + 1)] for row in u])
    y = v[lags:]
    one = np.ones((t - lags, 1))
    past = np.hstack([one] + [v[lags - j : t - j] for j in range(1, lags + 1)])
    whole, left = leftover(one, y), leftover(past, y)
    return (t - lags) * (y.shape[1] - np.trace(np.linalg.solve(whole.T @ whole, left.T @ left)))


def largest_chow(y, z):
    t, q = z.shape
    edge = int(np.ceil(0.15 * t))
    whole = sm.OLS(y, z).fit().ssr
    walds = []
    for b in range(edge, t - edge + 1):
        split = sm.OLS(y[:b], z[:b]).fit().ssr + sm.OLS(y[b:], z[b:]).fit().ssr
        walds.append((whole - split) / (split / (t - 2 * q)))
    return max(walds)


def design(x, order):
    t = len(x) - order
    return np.hstack([np.ones((t, 1))] + [x[order - j : len(x) - j] for j in range(1, order + 1)])


def system(name, x, order, lags):
    fit = VAR(x).fit(order)
    u, z = np.asarray(fit.resid), design(x, order)
    unit = z / np.linalg.norm(z, axis=0)
    box = [acorr_ljungbox(u[:, k], lags=[lags], model_df=order) for k in range(u.shape[1])]
    plain, adjusted = fit.test_whiteness(lags), fit.test_whiteness(lags, adjusted=True)
    shape = fit.test_normality()
    return {
        "name": name,
        "order": order,
        "lags": lags,
        "whiteness": [plain.test_statistic, int(plain.df), plain.pvalue],
        "adjusted": [adjusted.test_statistic, int(adjusted.df), adjusted.pvalue],
        "ljungBox": [[float(b["lb_stat"].iloc[0]), float(b["lb_pvalue"].iloc[0])] for b in box],
        "normality": [shape.test_statistic, int(shape.df), shape.pvalue],
        "lm": system_lm(u, z, 3),
        "arch": system_arch(u, 2),
        "chow": [largest_chow(x[order:, k], z) for k in range(x.shape[1])],
        "condition": float(np.linalg.cond(unit)),
    }


def single(name, x, order, lags):
    z = design(x, order)
    fit = sm.OLS(x[order:, 0], z).fit()
    lm, lm_p, f, f_p = acorr_breusch_godfrey(fit, nlags=lags)
    arch, arch_p = het_arch(fit.resid, nlags=lags)[:2]
    return {"name": name, "order": order, "lags": lags, "breuschGodfrey": [lm, lm_p, f, f_p], "arch": [arch, arch_p]}


print(
    json.dumps(
        {
            "provenance": {
                "kind": "library",
                "by": f"statsmodels {statsmodels.__version__}, numpy {np.__version__}, scipy {scipy.__version__}",
                "script": "test/reference/scripts/residuals.py",
                "seed": None,
                "note": "normality whitens by UᵀU/T; lm, arch and chow of a system are plain regressions in the script",
            },
            "systems": [system("german", german, 2, 12), system("macro", macro, 3, 15)],
            "singles": [single("lynx", lynx, 2, 2), single("lynx", lynx, 2, 4), single("lynx", lynx, 11, 1)],
        },
        ensure_ascii=False,
        default=float,
    )
)
