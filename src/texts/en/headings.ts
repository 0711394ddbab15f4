/** Column headings. */
export const headings = {
  lag: "lag",
  series: "series",
  bound: "bound",
  low: "low",
  high: "high",
  order: ["order", "log det", "AIC", "AICc", "BIC", "HQ", "FPE", "LR", "LR p-value", "chosen by"],
  roots: ["modulus", "real", "imaginary", "period (rows)", "reading"],
} as const;
