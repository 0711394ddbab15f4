/** Column headings. */
export const headings = {
  lag: "lag",
  series: "series",
  bound: "bound",
  low: "low",
  high: "high",
  order: ["order", "log det", "AIC", "AICc", "BIC", "HQ", "FPE", "LR", "LR p-value", "chosen by"],
  estimates: ["equation", "regressor", "coefficient", "low", "high", "std error", "t", "p-value"],
  effect: "effect",
  statistic: "statistic",
  pValue: "p-value",
  roots: ["modulus", "real", "imaginary", "period (rows)", "reading"],
} as const;
