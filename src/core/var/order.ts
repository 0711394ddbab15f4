import { Issue } from "../issue";
import { logDeterminant, PIVOT_FLOOR } from "../linalg";
import type { Matrix } from "../matrix";
import { chiSquareUpper } from "../distributions";
import { designOf } from "./design";
import { leastSquares, residualCovariance } from "./least-squares";
import { largestOrder, requireRows } from "./rows-needed";
import { allLags, type Criterion, type ModelSettings, type Shape } from "./settings";
import type { SteppedSample } from "./stepped";
import { refuseExactSeries } from "./exact";
import { termCount } from "./terms";

/** One order's figures; all orders of a comparison share the same rows. */
export interface OrderRow {
  readonly order: number;
  readonly logDet: number;
  readonly aic: number;
  /** Null where its denominator is not positive. */
  readonly aicc: number | null;
  readonly bic: number;
  readonly hq: number;
  readonly fpe: number;
  /** Against the order below; null at order 0. */
  readonly lr: number | null;
  readonly lrP: number | null;
}

/** Deterministic terms kept, all lags to the order, least squares: what criteria are computed from. */
const candidate = (shape: Shape, order: number): ModelSettings => ({
  ...shape,
  fit: "least-squares",
  longRun: null,
  movingAverage: 0,
  lags: allLags(order),
});

/**
 * Criteria for the orders 0…maxOrder, least squares, all on the same T = n − maxOrder rows.
 * Σ̃ = UᵀU/T, f = K·q: AIC = ln|Σ̃| + 2f/T; BIC = ln|Σ̃| + f·ln(T)/T; HQ = ln|Σ̃| + 2f·ln(ln T)/T;
 * FPE = |Σ̃|((T + q)/(T − q))^K; AICc = ln|Σ̃| + K(T + q)/(T − q − K − 1) − K;
 * LR = (T − q − ½)·ln(|Σ̃ₚ₋₁|/|Σ̃ₚ|), χ²(K²).
 * @throws Issue "too-few-rows" | "exact-combination" | "constant-series" | "predicted-exactly"
 * Source: Lütkepohl (2005), 4.3; Hurvich and Tsai (1993) for AICc
 */
export function compareOrders(sample: SteppedSample, shape: Shape, maxOrder: number): OrderRow[] {
  const series = sample.y[0].length;
  const drivers = sample.drivers[0]?.length ?? 0;
  const usable = rowsWithLags(sample.y, maxOrder);
  const rows = usable.length;
  // coefficients grow with the order, so all orders together cost about a third of as many of the largest
  requireRows(
    candidate(shape, maxOrder),
    { rows: rows + maxOrder, series, drivers },
    Math.max(1, (maxOrder + 1) / 3),
  );
  refuseExactSeries(sample.y, shape, sample.start);
  const out: OrderRow[] = [];
  for (let order = 0; order <= maxOrder; order++) {
    const { regressors, z, y } = designOf(sample, candidate(shape, order), maxOrder);
    const design = { regressors, z: usable.map((t) => z[t]), y: usable.map((t) => y[t]) };
    const { residuals } = leastSquares(design);
    const logDet = logDeterminant(residualCovariance(residuals, rows));
    if (logDet === null || someVanish(residuals, design.y))
      throw new Issue({ code: "predicted-exactly", order });
    out.push(
      orderRow({ order, logDet, rows, series, q: termCount(shape) + drivers + series * order }, out.at(-1)),
    );
  }
  return out;
}

/** Rows of a regression on so many lags, counted from the first, that no gap reaches. */
function rowsWithLags(y: Matrix, lags: number): number[] {
  const whole = y.map((row) => row.every(Number.isFinite));
  const out: number[] = [];
  for (let t = 0, run = 0; t < y.length; t++) {
    run = whole[t] ? run + 1 : 0;
    if (run > lags) out.push(t - lags);
  }
  return out;
}

/** True when what is left of some series is rounding noise, by the rule for exact combinations. */
const someVanish = (residuals: Matrix, y: Matrix): boolean =>
  y[0].some((_, k) => length(residuals, k) < PIVOT_FLOOR * length(y, k));

const length = (x: Matrix, k: number): number => Math.sqrt(x.reduce((sum, row) => sum + row[k] ** 2, 0));

function orderRow(
  {
    order,
    logDet,
    rows,
    series,
    q,
  }: { order: number; logDet: number; rows: number; series: number; q: number },
  below: OrderRow | undefined,
): OrderRow {
  const free = series * q;
  const denominator = rows - q - series - 1;
  const lr = below ? (rows - q - 0.5) * (below.logDet - logDet) : null;
  return {
    order,
    logDet,
    aic: logDet + (2 * free) / rows,
    aicc: denominator > 0 ? logDet + (series * (rows + q)) / denominator - series : null,
    bic: logDet + (free * Math.log(rows)) / rows,
    hq: logDet + (2 * free * Math.log(Math.log(rows))) / rows,
    fpe: Math.exp(logDet) * ((rows + q) / (rows - q)) ** series,
    lr,
    lrP: lr === null ? null : chiSquareUpper(Math.max(0, lr), series * series),
  };
}

/** The order with the smallest value of a criterion; the smaller order when two tie, null when none has it. */
export function bestOrder(rows: readonly OrderRow[], criterion: Criterion | "fpe"): number | null {
  let best: OrderRow | null = null;
  for (const row of rows) {
    const value = row[criterion];
    if (value !== null && Number.isFinite(value) && (best === null || value < best[criterion]!)) best = row;
  }
  return best && best.order;
}

/**
 * Largest order an automatic choice looks at when the user names none:
 * max(1, min(cap, ⌊(n/3 − m − d)/K⌋)), cap = 8, or cycle + 1 if larger.
 */
export function defaultMaxOrder(sample: SteppedSample, shape: Shape): number {
  const series = sample.y[0].length;
  const drivers = sample.drivers[0]?.length ?? 0;
  const cap = Math.max(8, (shape.cycle ?? 0) + 1);
  const room = Math.floor((sample.y.length / 3 - termCount(shape) - drivers) / series);
  return Math.max(1, Math.min(cap, room));
}

/** The order an automatic choice arrives at, always by the least-squares criteria. */
export function chooseOrder(
  sample: SteppedSample,
  shape: Shape,
  criterion: Criterion,
  maxOrder: number | null,
): number {
  const top = maxOrder ?? defaultMaxOrder(sample, shape);
  // long-run relations pull on the row before: they need a lag
  const least = shape.longRun === null ? 0 : 1;
  if (top < least) throw new Issue({ code: "longrun-needs-lag" });
  const orders = compareOrders(sample, shape, top).filter(({ order }) => order >= least);
  const best = bestOrder(orders, criterion);
  if (best !== null) return best;
  // the small-sample criterion exists for no order: there are too few rows to choose among orders at all
  const series = sample.y[0].length;
  const drivers = sample.drivers[0]?.length ?? 0;
  throw new Issue({
    code: "too-few-rows",
    order: top,
    series,
    rows: sample.y.length,
    need: top + termCount(shape) + drivers + series + 2,
    largest: largestOrder(shape, sample.y.length, series, drivers),
  });
}
