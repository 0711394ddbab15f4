import { chiSquareUpper } from "../distributions";
import { exceedsWork } from "../var/work";
import { figure, missing, type Figure } from "./figure";

/**
 * Whether the residuals of one series are correlated with their own past: T(T + 2)·Σ rᵢ²/(T − i), χ²(lags − |L|);
 * approximate in a system, whose other series the correction leaves out.
 * @param u      T residuals
 * @param fitted lags that the model uses
 * Source: Ljung and Box (1978), Biometrika 65, 297–303
 */
export function ljungBox(u: readonly number[], lags: number, fitted: number): Figure {
  const rows = u.length;
  if (lags < 1 || lags >= rows) return missing("rows", lags);
  const df = lags - fitted;
  if (df <= 0) return missing("lags", lags);
  if (exceedsWork(rows * lags)) return missing("heavy", lags);
  const product = (lag: number) => {
    let sum = 0;
    for (let t = lag; t < rows; t++) sum += u[t] * u[t - lag];
    return sum;
  };
  const whole = product(0);
  if (!(whole > 0)) return missing("exact", lags);
  let statistic = 0;
  for (let lag = 1; lag <= lags; lag++) statistic += (product(lag) / whole) ** 2 / (rows - lag);
  statistic *= rows * (rows + 2);
  return figure({ lags, statistic, df, p: chiSquareUpper(statistic, df) });
}
