import { normalQuantile, normalTwoSided } from "../distributions";
import { Issue } from "../issue";
import { column, fromColumns, type Matrix } from "../matrix";
import { fitSettings } from "../var/fit";
import { lagMatrices } from "../var/lag-matrices";
import { bestOrder, compareOrders } from "../var/order";
import { allLags, DEFAULT_FADE, DEFAULT_PULL, type Shape } from "../var/settings";
import { lagCorrelations } from "./lag-covariance";

export interface LeadLagRequest {
  /** n×K, finite. */
  readonly series: Matrix;
  /** The lags 0…lags are looked at. */
  readonly lags: number;
}

/** The lag at which one series follows another most closely. */
export interface Lead {
  readonly leader: number;
  readonly follower: number;
  readonly lag: number;
  readonly correlation: number;
  /** What chance alone passes in one of twenty such pairs, looks at all lags counted. */
  readonly bound: number;
  /** Of the correlation, looks at all lags counted. */
  readonly p: number;
}

/** Products that one call may ask for. */
const WORK_LIMIT = 1e8;

/**
 * For every ordered pair the lag with the largest absolute correlation after both series went through the leader's own
 * autoregression: v[t] − c − Σφ(j)v[t − j], least squares with constant, order by AIC up to min(10, n/5) on common
 * rows and then estimated on all. With N rows in the sum p = 2(1 − Φ(|r|√N)); over lags + 1 looks (Šidák)
 * 1 − (1 − p)^(lags+1), and the bound is the |r| at which that is 0.05.
 * @returns K(K − 1) leads, smallest p first
 * @throws Issue "needs-two-series" | "lags-beyond-rows" | "constant-series" | "too-few-rows" | "predicted-exactly" | "too-many-looks"
 * Source: Box, Jenkins and Reinsel (2008), 12.1.1 (prewhitening); Šidák (1967)
 */
export function leadsAndLags({ series, lags }: LeadLagRequest): Lead[] {
  const count = series[0].length;
  if (count < 2) throw new Issue({ code: "needs-two-series" });
  const looks = count * (count - 1) * (lags + 1);
  const limit = Math.floor(WORK_LIMIT / series.length);
  if (looks > limit) throw new Issue({ code: "too-many-looks", looks, limit });
  const each = series[0].map((_, k) => k);
  const constant = each.find((k) => series.every((row) => row[k] === series[0][k]));
  if (constant !== undefined) throw new Issue({ code: "constant-series", series: constant });
  const leads = each.flatMap((leader) => {
    const phi = ownAutoregression(series, leader);
    const white = filtered(series, phi);
    if (lags > white.length - 2)
      throw new Issue({ code: "lags-beyond-rows", lag: lags, rows: white.length - 1 });
    return each.filter((k) => k !== leader).map((follower) => closest(white, leader, follower, lags));
  });
  return leads.sort(
    (a, b) => a.p - b.p || Math.abs(b.correlation) / b.bound - Math.abs(a.correlation) / a.bound,
  );
}

/** φ(1)…φ(p) of one series by itself. */
function ownAutoregression(series: Matrix, k: number): number[] {
  const y = series.map((row) => [row[k]]);
  const most = Math.floor(Math.min(10, y.length / 5));
  const order = bestOrder(compareOrders({ y, drivers: [], start: 1 }, OWN, most), "aic")!;
  const model = fitSettings({ series: y, drivers: [], start: 1 }, { ...OWN, lags: allLags(order) });
  return lagMatrices(model).map(([[phi]]) => phi);
}

const OWN: Shape = {
  fit: "least-squares",
  terms: "constant",
  cycle: null,
  waves: null,
  steps: [[]],
  longRun: null,
  movingAverage: 0,
  pull: DEFAULT_PULL,
  fade: DEFAULT_FADE,
};

/** Rows p + 1 … n of every series less what the filter expects; the means go out with the correlation. */
const filtered = (series: Matrix, phi: readonly number[]): Matrix =>
  series
    .slice(phi.length)
    .map((row, i) =>
      row.map((v, k) => phi.reduce((rest, f, j) => rest - f * series[i + phi.length - j - 1][k], v)),
    );

function closest(white: Matrix, leader: number, follower: number, lags: number): Lead {
  const pair = fromColumns([column(white, leader), column(white, follower)]);
  const correlations = lagCorrelations(
    pair,
    Array.from({ length: lags + 1 }, (_, k) => k),
  ).map((rho) => rho[1][0]);
  const lag = correlations.reduce((best, r, k) => (Math.abs(r) > Math.abs(correlations[best]) ? k : best), 0);
  const correlation = correlations[lag];
  const rows = white.length - lag;
  const p = normalTwoSided(Math.abs(correlation) * Math.sqrt(rows));
  const single = -Math.expm1(Math.log1p(-LEVEL) / (lags + 1));
  return {
    leader,
    follower,
    lag,
    correlation,
    bound: -normalQuantile(single / 2) / Math.sqrt(rows),
    p: p === 1 ? 1 : -Math.expm1((lags + 1) * Math.log1p(-p)),
  };
}

/** Chance that the bound is passed by accident. */
const LEVEL = 0.05;
