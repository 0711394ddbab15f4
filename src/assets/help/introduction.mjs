/** The hand-written part of the help page. */
export const introduction = `
<h1>Related series, forecast together, in cells that anyone can check</h1>
<p>From a block of related series Comove shows which leads which and at what lag, fits one joint model (a vector
autoregression) that lies visibly in cells, and fills a forecast block with one formula, with honest bands in the
units you measured in.</p>
<p class="caution"><strong>A forecast is not a guarantee, and a lead is not a cause.</strong> Where a decision can hurt
someone (dosing, running a grid or a plant, safety stock of medicines), local codes and the licensed practitioner
decide, not this sheet.</p>

<h2>Series</h2>
<p>A range with time down the rows, oldest first, and one column per series. A first row of text is taken as the names;
with names in, the results carry names too. A blank cell is a gap, never a zero. Blank rows above and below the data
are passed over, so whole columns can be given. Text or an error among the numbers is refused, with its place.</p>

<h2>Model</h2>
<p>Blank or <code>auto</code> chooses the number of lags; a whole number sets it; a range that MODEL has filled, such as
<code>G2#</code>, is used as it stands, even pasted elsewhere and edited. AHEAD, BANDS and ROOTS use the numbers of such a block;
MODEL takes its settings and estimates the numbers anew.</p>

<h2>Options</h2>
<p>One text such as <code>"terms=trend; cycle=12"</code>, or two columns of keys and values.</p>
<table>
<tr><th>key</th><th>values, the default first</th><th>meaning</th></tr>
<tr><td>fit</td><td>least-squares, yule-walker, nuttall-strand, shrinkage</td><td>how the coefficients are estimated</td></tr>
<tr><td>pull, fade</td><td>0.2, 1</td><td>shrinkage: how strongly lags are pulled to zero (the own first lag to one), and how that grows with the lag</td></tr>
<tr><td>terms</td><td>constant, none, trend, quadratic</td><td>what every equation holds beside the lags</td></tr>
<tr><td>cycle</td><td>none, or rows in a season</td><td>a season by indicators, or by waves</td></tr>
<tr><td>waves</td><td>none, or 1 to half a cycle</td><td>pairs of sine and cosine that carry the season</td></tr>
<tr><td>start</td><td>1</td><td>position of the first row, for windows that move</td></tr>
<tr><td>uselags</td><td>all, or a list such as 1 2 12</td><td>the lags used</td></tr>
<tr><td>steps</td><td>none, or log, sqrt, diff, diff 12 …</td><td>done before fitting and undone after; a bar separates the series</td></tr>
<tr><td>criterion</td><td>aicc, aic, bic, hq</td><td>what decides an automatic order</td></tr>
<tr><td>maxorder</td><td>by the number of rows</td><td>the largest order looked at</td></tr>
<tr><td>coverage</td><td>0.95</td><td>share of outcomes that the bands hold</td></tr>
<tr><td>bands</td><td>fitted, known</td><td>with the coefficients' sampling error, or without</td></tr>
<tr><td>joint</td><td>no, yes</td><td>bands that hold for all rows and series together</td></tr>
<tr><td>point</td><td>median, mean</td><td>which point forecast after a log or square root</td></tr>
<tr><td>testlags</td><td>by the order and the rows</td><td>RESIDTEST: one to three numbers, the lags of the portmanteau, LM and ARCH tests</td></tr>
<tr><td>adjust, spare</td><td>no, yes; 0</td><td>GRANGER: Holm's correction; lags fitted beyond the order and not tested</td></tr>
<tr><td>divisor</td><td>n, n-k</td><td>divisor of lagged covariances</td></tr>
<tr><td>labels</td><td>auto, yes, no</td><td>labels in the result</td></tr>
</table>

<h2>How leads are read</h2>
<p>In LAGCOV and LAGCORR the row is a series now, the column a series k rows earlier: <strong>a large entry says that the
column series leads the row series by k rows.</strong> Trends and seasons make every lag look strong: take them out first
with STEPS. One cell in twenty passes the bound by chance.</p>

<h2>Conventions</h2>
<p>Lagged covariances divide by n and use the means over all rows. Criteria divide by the rows in the fit and count every
coefficient, constants too; all orders are compared on the same rows. The innovation covariance divides by rows less
coefficients. After a log the point forecast is the median, unless <code>point=mean</code>. Bands are normal on the scale of the fit and
then taken back to your units.</p>

<h2>How the tests of what is left are read</h2>
<p>RESIDTEST asks of a model's residuals whether anything is left to predict, whether the spread changes, whether the shape is normal,
whether an equation changed, and whether the fit can be used. A reading speaks up where p is below 0.05, which chance alone does one
time in twenty for each row. The Ljung–Box figure of one series is approximate in a joint model. For <em>did the equation
change?</em> the published table of the largest Chow statistic (Hansen 1997) was not at hand: its distribution was simulated once, by 50,000 draws of 1,000 steps with a
fixed seed, for breaks that leave 15 % of the rows on either side. It covers up to 30 coefficients per equation and p from 0.001 to
0.99; outside, the p-value stays blank and the reading says why. With a trend among the terms it is approximate.</p>

<h2>When something is wrong</h2>
<p><code>#VALUE!</code>: an argument is refused. <code>#N/A</code>: the arguments are in order, but the result does not exist for these
data. Hover over the cell's mark, or select it, to read what was found and what to do.</p>
`;

/**
 * Formulas to try, by function.
 * @type {Readonly<Record<string, { formula: string, says: string }[]>>}
 */
export const examples = {
  LAGCOV: [{ formula: "=COMOVE.LAGCOV(B4:E160,2)", says: "Covariances at lags 0, 1 and 2." }],
  LAGCORR: [
    {
      formula: '=COMOVE.LAGCORR(COMOVE.STEPS(B4:E160,"diff 52"),4)',
      says: "Leads after the yearly season is taken out.",
    },
  ],
  STEPS: [{ formula: '=COMOVE.STEPS(B4:E160,"log, diff")', says: "Growth rates of every series." }],
  UNSTEP: [
    {
      formula: '=COMOVE.UNSTEP(B4:E160,"log, diff",H5:K16)',
      says: "Growth rates that continue the data, back in units.",
    },
  ],
  ESTIMATES: [
    {
      formula: '=COMOVE.ESTIMATES(B4:E160,2,"cycle=52; waves=1")',
      says: "Every coefficient with its standard error.",
    },
  ],
  FITTED: [{ formula: "=COMOVE.FITTED(B4:E160,2)", says: "One row ahead, for every row." }],
  RESIDUALS: [{ formula: "=COMOVE.RESIDUALS(B4:E160,G2#)", says: "What the block in G2 leaves over." }],
  PARTIALLAG: [{ formula: "=COMOVE.PARTIALLAG(B4:E160,6)", says: "Lags 1 to 6, each with its test." }],
  IMPLIEDCOV: [{ formula: "=COMOVE.IMPLIEDCOV(G2#,4)", says: "Compare with LAGCOV of the data." }],
  RESIDTEST: [
    { formula: "=COMOVE.RESIDTEST(B4:E160,G2#)", says: "What is left over by the block in G2, judged." },
    { formula: '=COMOVE.RESIDTEST(B4:E160,2,"testlags=12 3 2")', says: "The same for order 2, lags given." },
  ],
  GRANGER: [
    {
      formula: '=COMOVE.GRANGER(B4:E160,2,"adjust=yes")',
      says: "Row = effect, column = cause; corrected for looking at all pairs.",
    },
  ],
  ORDER: [{ formula: "=COMOVE.ORDER(B4:E160,6)", says: "Orders 0 to 6 side by side." }],
  MODEL: [
    {
      formula: '=COMOVE.MODEL(B4:E160,,"cycle=52; waves=1")',
      says: "An automatic order with a yearly wave.",
    },
  ],
  ROOTS: [{ formula: "=COMOVE.ROOTS(G2#)", says: "How fast the model in G2 forgets." }],
  AHEAD: [
    { formula: '=COMOVE.AHEAD(B4:E160,12,,"cycle=52; waves=1")', says: "Twelve rows of every series." },
    { formula: "=COMOVE.AHEAD(B4:E160,12,G2#)", says: "The same from a model block." },
  ],
  BANDS: [
    {
      formula: '=COMOVE.BANDS(B4:E160,12,G2#,"coverage=0.9")',
      says: "Limits that hold nine of ten outcomes.",
    },
  ],
};
