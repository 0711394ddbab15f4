/**
 * Every option, in the order in which a reader meets it: key, values with the default first, meaning.
 * @type {readonly (readonly [key: string, values: string, meaning: string])[]}
 */
export const options = [
  [
    "fit",
    "least-squares, yule-walker, nuttall-strand, likelihood, shrinkage",
    "how the coefficients are estimated",
  ],
  [
    "pull",
    "0.2, any number above 0",
    "shrinkage: how far lags may stray from zero (the own first lag from one)",
  ],
  ["fade", "1, any number from 0", "shrinkage: how much less with every further lag"],
  [
    "terms",
    "constant, none, trend, quadratic, inside-constant, inside-trend",
    "what every equation holds beside the lags; the inside ones stand within long-run relations only",
  ],
  ["cycle", "none, or rows in a season", "a season by indicators, or by waves"],
  ["waves", "none, or 1 to half a cycle", "pairs of sine and cosine that carry the season"],
  ["start", "1", "position of the first row, for windows that move"],
  ["uselags", "all, or a list such as 1 2 12", "the lags used"],
  [
    "steps",
    "none, or log, sqrt, diff, diff 12 …",
    "done before fitting and undone after, separated by commas; a bar separates the series",
  ],
  [
    "longrun",
    "none, or 0 to the number of series",
    "long-run relations that tie the series together in levels (Johansen)",
  ],
  ["ma", "0, or a number of lags", "fit=likelihood: past innovations in every equation, a moving average"],
  [
    "gaps",
    "refuse, allow",
    "fit=likelihood: blank cells are passed over and all others used; belongs to the call, not to the block",
  ],
  ["criterion", "aicc, aic, bic, hq", "what decides an automatic order"],
  ["maxorder", "by the number of rows", "the largest order looked at"],
  ["coverage", "0.95, between 0 and 1", "share of outcomes that bands and intervals hold"],
  [
    "bands",
    "fitted, known, redrawn",
    "with the coefficients' own error, without it, or by refitting to series redrawn from what the model leaves over",
  ],
  ["joint", "no, yes", "bands that hold for all rows and series together"],
  ["point", "median, mean", "which point forecast after a log or square root"],
  ["draws", "1000, 20 to 100,000", "how often redrawn bands refit"],
  ["seed", "1", "start of the random numbers: the same seed gives the same draw"],
  [
    "shock",
    "orthogonal, unit, generalised",
    "RESPONSE: one standard deviation in column order, one unit, or in no order",
  ],
  [
    "testlags",
    "by the number of rows",
    "RESIDTEST: one to three numbers of lags, for what is left to predict, for its LM form, for changing spread",
  ],
  ["adjust", "no, yes", "GRANGER: Holm's correction for looking at all pairs"],
  ["spare", "0, or a number of lags", "GRANGER: lags fitted beyond the order and not tested"],
  ["divisor", "n, n-k", "divisor of lagged covariances"],
  ["labels", "auto, yes, no", "labels in the result; auto gives them when the series have names"],
];

const row = (/** @type {readonly string[]} */ [key, values, meaning]) =>
  `<tr id="option-${key}"><td>${key}</td><td>${values}</td><td>${meaning}</td></tr>`;

export const optionTable = `<table>
<tr><th>key</th><th>values, the default first</th><th>meaning</th></tr>
${options.map(row).join("\n")}
</table>`;
