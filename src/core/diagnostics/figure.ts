/** Why a figure does not exist for the data. */
export type Gap =
  /** Too few rows for the test. */
  | "rows"
  /** The test must look further back than the model does. */
  | "lags"
  /** Some columns are an exact combination of others. */
  | "exact"
  /** Too much to work out for a sheet that must answer. */
  | "heavy"
  /** The model has no lags, or no coefficients. */
  | "no-lags"
  | "no-coefficients"
  /** The test is one of regressions, and a moving average is none. */
  | "moving-average"
  /** The distribution is tabulated neither here nor so far out. */
  | "untabulated";

/** What a test or a measure comes to; null stands for what does not exist, `gap` for the reason. */
export interface Figure {
  readonly lags: number | null;
  readonly statistic: number | null;
  readonly df: number | null;
  /** Denominator degrees of freedom of an F. */
  readonly df2: number | null;
  readonly p: number | null;
  readonly gap: Gap | null;
  /** Where p lies when only a side of it is known. */
  readonly bound: { readonly side: "below" | "above"; readonly p: number } | null;
}

const NOTHING: Figure = {
  lags: null,
  statistic: null,
  df: null,
  df2: null,
  p: null,
  gap: null,
  bound: null,
};

export const figure = (parts: Partial<Figure>): Figure => ({ ...NOTHING, ...parts });

/** No figure, and why. */
export const missing = (gap: Gap, lags: number | null = null): Figure => figure({ gap, lags });
