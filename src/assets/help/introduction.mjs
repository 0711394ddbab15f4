import { optionTable } from "./options.mjs";

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
<code>G2#</code>, is used as it stands, even pasted elsewhere and edited. Most functions use the numbers of such a block; MODEL,
ESTIMATES, GRANGER and bands that are redrawn take its settings only and estimate the numbers anew.</p>

<h2>Options</h2>
<p>One text such as <code>"terms=trend; cycle=12"</code>, or two columns of keys and values.</p>
${optionTable}

<h2>How leads are read</h2>
<p>In LAGCOV and LAGCORR the row is a series now, the column a series k rows earlier: <strong>a large entry says that the
column series leads the row series by k rows.</strong> Trends and seasons make every lag look strong: take them out first
with STEPS. One cell in twenty passes the bound by chance.</p>

<h2>Conventions</h2>
<p>Lagged covariances divide by n and use the means over all rows. Criteria divide by the rows in the fit and count every
coefficient, constants too; all orders are compared on the same rows. The innovation covariance divides by rows less
coefficients. After a log the point forecast is the median, unless <code>point=mean</code>. Bands are normal on the scale of the fit and
then taken back to your units.</p>

<h2>Blank cells</h2>
<p>A blank cell is refused with its place, unless the call says <code>gaps=allow</code>: then <code>fit=likelihood</code> fits the model to all
cells that are there, and forecasts start from what they say. No cell is lost to a difference either: a series with gaps
is followed as the level it is. A block's numbers pass over gaps too, whatever they were fitted with.</p>

<h2>Long-run relations</h2>
<p>Series that wander, but not away from each other, can be held together by <code>longrun=1</code> or more relations (Johansen). The
block shows the model in levels that they imply; <code>terms=inside-constant</code> or <code>inside-trend</code> keeps a term within them. The
coefficients' errors are not known in this form, so bands are <code>known</code> or <code>redrawn</code>.</p>

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
