/** Where the examples have their cells; the tests compute every one of them on such a sheet. */
export const examplesStand =
  "In the examples the data stand in B4:E160 with their names in row 4, and a model block in G2.";

/**
 * Formulas to try, by function.
 * @type {Readonly<Record<string, readonly { formula: string, says: string }[]>>}
 */
export const examples = {
  AHEAD: [
    { formula: '=COMOVE.AHEAD(B4:E160,12,,"cycle=52; waves=1")', says: "Twelve rows of every series." },
    { formula: "=COMOVE.AHEAD(B4:E160,12,G2#)", says: "The same from a model block." },
  ],
  BANDS: [
    {
      formula: '=COMOVE.BANDS(B4:E160,12,G2#,"coverage=0.9")',
      says: "Limits that hold nine of ten outcomes.",
    },
    {
      formula: '=COMOVE.BANDS(B4:E160,4,1,"bands=redrawn; draws=200; seed=7")',
      says: "Limits that ask nothing about the shape of what is left over.",
    },
  ],
  ESTIMATES: [
    {
      formula: '=COMOVE.ESTIMATES(B4:E160,2,"cycle=52; waves=1")',
      says: "Every coefficient with its standard error.",
    },
  ],
  FITTED: [{ formula: "=COMOVE.FITTED(B4:E160,2)", says: "One row ahead, for every row." }],
  GRANGER: [
    {
      formula: '=COMOVE.GRANGER(B4:E160,2,"adjust=yes")',
      says: "Row = effect, column = cause; corrected for looking at all pairs.",
    },
  ],
  IMPLIEDCOV: [{ formula: "=COMOVE.IMPLIEDCOV(G2#,4)", says: "Compare with LAGCOV of the data." }],
  LAGCORR: [
    {
      formula: '=COMOVE.LAGCORR(COMOVE.STEPS(B4:E160,"diff 52"),4)',
      says: "Leads after the yearly season is taken out.",
    },
  ],
  LAGCOV: [
    { formula: "=COMOVE.LAGCOV(B4:E160,2)", says: "Covariances at lags 0, 1 and 2." },
    { formula: "=COMOVE.LAGCOV(B4:E160,{1,52})", says: "Covariances at lags 1 and 52 only." },
  ],
  LEADLAG: [
    {
      formula: '=COMOVE.LEADLAG(COMOVE.STEPS(B4:E160,"diff 52"),8)',
      says: "Every pair, the clearest lead first, with a reading in words.",
    },
  ],
  MODEL: [
    {
      formula: '=COMOVE.MODEL(B4:E160,,"cycle=52; waves=1")',
      says: "An automatic order with a yearly wave.",
    },
    { formula: '=COMOVE.MODEL(B4:E160,2,"fit=shrinkage; pull=0.1")', says: "Two lags, held close to zero." },
    {
      formula: '=COMOVE.MODEL(B4:E160,2,"longrun=1; terms=inside-constant")',
      says: "One long-run relation among the levels.",
    },
    {
      formula: '=COMOVE.MODEL(B4:C160,1,"fit=likelihood; ma=1; gaps=allow")',
      says: "Likelihood with a moving average; blank cells would be passed over.",
    },
  ],
  ORDER: [{ formula: "=COMOVE.ORDER(B4:E160,6)", says: "Orders 0 to 6 side by side." }],
  PARTIALLAG: [{ formula: "=COMOVE.PARTIALLAG(B4:E160,6)", says: "Lags 1 to 6, each with its test." }],
  RESIDTEST: [
    { formula: "=COMOVE.RESIDTEST(B4:E160,G2#)", says: "Five questions about what the block leaves over." },
  ],
  RESIDUALS: [{ formula: "=COMOVE.RESIDUALS(B4:E160,G2#)", says: "What the block in G2 leaves over." }],
  RESPONSE: [
    {
      formula: '=COMOVE.RESPONSE(G2#,8,"shock=unit")',
      says: "What one unit more in each series does to all of them, 0 to 8 rows later.",
    },
  ],
  ROOTS: [{ formula: "=COMOVE.ROOTS(G2#)", says: "How fast the model in G2 forgets." }],
  SHOCKPAST: [
    { formula: '=COMOVE.SHOCKPAST(B4:E160,"ice",G2#)', says: "What moved the series ice, week by week." },
  ],
  SHOCKSHARE: [
    {
      formula: "=COMOVE.SHOCKSHARE(G2#,12)",
      says: "Whose shocks the forecast error of each series comes from.",
    },
  ],
  SIMULATE: [
    { formula: '=COMOVE.SIMULATE(G2#,104,,"seed=7")', says: "Two invented years that behave as the model." },
  ],
  STEPS: [{ formula: '=COMOVE.STEPS(B4:E160,"log, diff")', says: "Growth rates of every series." }],
  UNSTEP: [
    {
      formula: '=COMOVE.UNSTEP(B4:E160,"log, diff",P5:S16)',
      says: "Growth rates in P5:S16 that continue the data, back in units.",
    },
  ],
  WHATIF: [
    {
      formula: "=COMOVE.WHATIF(B4:E160,U5:X16,G2#)",
      says: "The forecast if the numbers planned in U5:X16 come true; what is blank there stays free.",
    },
  ],
};
