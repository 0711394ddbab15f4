import type { Allowed, BlockFault, IssueCode, IssueFacts, WeightedColumn } from "../../core/issue";
import type { Regressor } from "../../core/var/regressors";

/** What a sentence may call by name. */
export interface Wording {
  readonly series: readonly string[];
  readonly drivers: readonly string[];
  /** Row of the range in which the first row of numbers stands. */
  readonly firstRow: number;
}

type Words<C extends IssueCode> = (facts: Extract<IssueFacts, { code: C }>, wording: Wording) => string;

const plural = (count: number, one: string, many = `${one}s`): string =>
  `${grouped(count)} ${count === 1 ? one : many}`;
const grouped = (value: number): string =>
  Math.abs(value) < 1e15 ? value.toLocaleString("en-US") : String(value);
const list = (items: readonly string[], last = "or"): string =>
  items.length < 2 ? (items[0] ?? "") : `${items.slice(0, -1).join(", ")} ${last} ${items.at(-1)}`;
/** Names of series: of many the first few. */
const names = (items: readonly string[]): string =>
  items.length > 5 ? `${items.slice(0, 4).join(", ")} and ${items.length - 4} more` : list(items, "and");

/** Who a sentence is about: "Series price", "Driver temperature", "Plan price". */
const who = (range: string, name: string): string =>
  `${range === "series" ? "Series" : range === "drivers" ? "Driver" : capital(range)} ${name}`;
const capital = (word: string): string => word.charAt(0).toUpperCase() + word.slice(1);

/** What is allowed, as the end of a sentence. */
export function allowedWords(allowed: Allowed): string {
  switch (allowed.kind) {
    case "one-of":
      return list(allowed.values);
    case "whole":
      return allowed.to === null
        ? `a whole number from ${grouped(allowed.from)}`
        : `a whole number from ${grouped(allowed.from)} to ${grouped(allowed.to)}`;
    case "number":
      return allowed.below === null
        ? `a number above ${allowed.above}`
        : `a number between ${allowed.above} and ${allowed.below}, ends left out`;
    case "number-from":
      return `a number from ${allowed.from}`;
    case "list":
      return allowed.of === "steps"
        ? "log or sqrt (only first), diff, diff 12 …, separated by commas, a bar between series"
        : allowed.of === "lags"
          ? "different whole numbers from 1, such as 1 2 12"
          : "one to three whole numbers from 1";
  }
}

const blockFaults: {
  readonly [K in BlockFault["kind"]]: (fault: Extract<BlockFault, { kind: K }>) => string;
} = {
  "one-cell": () => "This is one cell of a model block. Point at the whole block, F2#.",
  "no-tag": () =>
    "This is not a model block: its first cell does not begin with 'comove model'. Point at the whole result of MODEL.",
  "tag-elsewhere": ({ row, column }) =>
    `The model block begins in row ${row}, column ${column} of this range. Start the range at that cell.`,
  "bad-tag": ({ part }) =>
    `The first cell of this model block was changed: '${part}' cannot be read. Spill the block anew with MODEL, or undo the change.`,
  rows: ({ have, need }) =>
    have < need
      ? `This model block is cut off: it has ${plural(have, "row")}, its first cell announces ${need}. Point at the whole block.`
      : `This model block has ${plural(have, "row")}, its first cell announces ${need}. Remove the rows put in, or point at the block alone.`,
  columns: ({ have, need }) =>
    have < need
      ? `This model block is cut off: it has ${plural(have, "column")}, its first cell announces ${need}. Point at the whole block.`
      : `This model block has ${plural(have, "column")}, its first cell announces ${need}. Remove the columns put in, or point at the block alone.`,
  "blank-column": ({ column }) =>
    `Column ${column} of this model block is blank: a column was put in. Remove it.`,
  "blank-row": ({ row }) => `Row ${row} of this model block is blank: a row was put in. Remove it.`,
  "blank-cell": ({ row, column }) =>
    `Row ${row}, column ${column} of this model block is blank. Every coefficient needs a number; write 0 to leave one out.`,
  "not-a-number": ({ row, column, text }) =>
    `Row ${row}, column ${column} of this model block holds '${text}'. A number is needed there.`,
  "rows-moved": ({ row, label, expected }) =>
    `Row ${row} of this model block is '${label}' where '${expected}' belongs. Rows were moved; put them back in order.`,
  "columns-moved": ({ column, name, expected }) =>
    `Column ${column} of this model block is '${name}' where '${expected}' belongs. Columns were moved; put them back in order.`,
};

/** The words for a problem, one or two sentences, the important part first. */
export const issueWords: { readonly [C in IssueCode]: Words<C> } = {
  "no-numbers": ({ range }) =>
    `The range for ${range} holds no numbers. Point at the rows with data, with or without a header.`,
  "missing-argument": ({ argument }) =>
    `Nothing is given for ${argument}. Point at a range or write a value.`,
  "not-a-number-cell": ({ range, name, row, found }) =>
    `${who(range, name)}, row ${row}: ${found} is not a number. Correct the cell.`,
  gap: ({ range, name, row, allowable }) =>
    `${who(range, name)}, row ${row} is blank. ` +
    (allowable
      ? "Fill it, shorten the range, or set gaps=allow with fit=likelihood."
      : "Fill it or shorten the range."),
  "blank-series": ({ name }) => `Series ${name} is blank in every row. Leave its column out of the range.`,
  "header-number": ({ range, column, text }) =>
    `Column ${column} of ${range} is headed '${text}', which looks like a number. Give it a name, or turn the text into a number.`,
  "header-twice": ({ range, name }) =>
    `Two columns of ${range} are headed '${name}'. Give each its own name.`,
  "header-blank": ({ range, column }) =>
    `Column ${column} of ${range} has no name in the header row. Give it one.`,
  "drivers-short": ({ have, need, future }) =>
    future > 0
      ? `The drivers have ${plural(have, "row")} beside the series and ahead of it; ${grouped(need)} are needed, ${grouped(future)} of them ahead. Add the future rows.`
      : `The drivers have ${plural(have, "row")} beside the series; ${grouped(need)} are needed. Point at rows that stand beside all rows of the series.`,
  "columns-differ": ({ range, have, need }) =>
    `The range for ${range} has ${plural(have, "column")}; ${grouped(need)} are needed, one per series.`,
  "bad-argument": ({ argument, found, allowed }) =>
    `For ${argument}, ${found} will not do. Give ${allowedWords(allowed)}.`,
  "unknown-option": ({ key, allowed }) =>
    `There is no option '${key}'. Options here: ${list(allowed, "and")}.`,
  "option-not-here": ({ key, call, allowed }) =>
    `The option ${key} does not apply to ${call}. Options here: ${list(allowed, "and")}.`,
  "option-twice": ({ key }) => `The option ${key} is given twice. Keep one.`,
  "option-without-value": ({ text }) =>
    `In the options, ${text} is not a key with a value. Write them like terms=trend; cycle=12.`,
  "bad-option": ({ key, found, allowed }) =>
    `For the option ${key}, ${found} will not do. Give ${allowedWords(allowed)}.`,
  "option-needs": ({ key, needs }) =>
    `The option ${key} needs ${needs} beside it. Add ${needs}, or leave ${key} out.`,
  "longrun-needs-lag": () =>
    "Long-run relations pull on the row before, so the model needs an order of 1 or more. Raise the order, or leave longrun out.",
  "longrun-errors": ({ call }) =>
    call === "BANDS"
      ? "With long-run relations the coefficients' errors are not known in this form. Use bands=known or bands=redrawn."
      : `${call} has no errors to give for a model with long-run relations. Fit it without longrun.`,
  "ma-not-here": ({ call }) =>
    `${call} has no place for a moving-average part. Leave ma out, or use a block without it.`,
  "gaps-not-here": ({ call }) =>
    `${call} cannot look past gaps with numbers that no likelihood found. Use bands=known, or fit the block with fit=likelihood.`,
  "fit-all-lags": ({ fit }) =>
    fit === "longrun"
      ? "Long-run relations use all lags up to the order. Leave uselags out, or leave longrun out."
      : `The fit ${fit} uses all lags up to the order. Leave uselags out, or choose least-squares or yule-walker.`,
  "fit-without-drivers": ({ fit }) =>
    `The fit ${fit} takes no drivers. Leave the drivers out, or use fit=least-squares.`,
  "options-clash": ({ key, other }) =>
    other === "block"
      ? `The model block fixes the order, so ${key} has nothing to choose. Leave it out.`
      : key === "uselags"
        ? "The order given and the largest of uselags differ. Make them equal, or leave the order blank."
        : `The ${other === "uselags" ? "lags are" : "order is"} given, so ${key} has nothing to choose. Leave one of the two out.`,
  "option-against-block": ({ key, found, block }) =>
    `The option ${key}=${found} contradicts the model block (${block}). Leave it out, or fit a new block with it.`,
  "steps-count": ({ have, series }) =>
    `The steps hold ${plural(have, "list")} for ${series} series. Give one list for all, or one per series with | between.`,
  "labels-needed": () =>
    "This result is a table with words in it and always carries its labels. Leave labels=no out.",
  "bad-range-options": ({ columns }) =>
    `The options are ${columns} columns wide. Use two columns, keys and values, or one text like terms=trend; cycle=12.`,
  "model-block": ({ fault }) => (blockFaults[fault.kind] as (f: BlockFault) => string)(fault),
  "block-needed": ({ found }) =>
    `A model block is needed here, and ${found} is none. Fit one with MODEL and point at its whole spill, F2#.`,
  "block-names": ({ block, series }) =>
    `The model block is for ${names(block)}; this range holds ${names(series)}. Use the same series in the same order, header included.`,
  "block-drivers": ({ block, drivers }) =>
    block.length === 0
      ? `The model block uses no drivers, but ${names(drivers)} ${drivers.length === 1 ? "is" : "are"} given. Leave the drivers out.`
      : drivers.length === 0
        ? `The model block needs the drivers ${names(block)}. Point at them in the last argument.`
        : `The model block needs the drivers ${names(block)}; given are ${names(drivers)}. Use the same in the same order.`,
  "block-needs-rows": ({ order, rows }) =>
    `This model looks back ${plural(order, "row")}, but the range has only ${plural(rows, "row")} to start from. Use a longer range.`,
  "covariance-asymmetric": ({ row, column }, { series }) =>
    `The innovation covariance of ${series[row]} and ${series[column]} differs from that of ${series[column]} and ${series[row]}. Make the two cells equal.`,
  "covariance-not-positive": () =>
    "The innovation covariance is not positive definite: some mix of the series would have no variance or less. Correct the edited cells, or fit the block anew.",
  "too-few-rows": ({ order, series, rows, need, largest }) =>
    `${plural(order, "lag")} of ${series} series need${order === 1 ? "s" : ""} at least ${plural(need, "row")}; this range has ${grouped(rows)}. ` +
    (largest === null
      ? "Use more rows, or fewer series, terms or drivers."
      : `The largest order it can carry is ${grouped(largest)}. Use fewer lags or more rows.`),
  "too-heavy": ({ rows, coefficients }) =>
    `This fit would hold up the sheet: ${plural(rows, "row")} with ${plural(coefficients, "coefficient")} per equation. Use waves for a long season, fewer lags, or fewer rows.`,
  "filter-heavy": ({ rows, states }) =>
    `To look past gaps, ${grouped(states)} numbers would be carried through ${plural(rows, "row")}: too much here. Ask for fewer rows ahead, use shorter differences or fewer lags, or fill the gaps.`,
  "too-many-states": ({ states, limit }) =>
    `This model remembers ${grouped(states)} numbers, its series times its lags; at most ${grouped(limit)} can be worked out here. Use a shorter order or fewer series.`,
  "lags-beyond-rows": ({ lag, rows }) =>
    `Lag ${grouped(lag)} reaches beyond the ${plural(rows, "row")} of this range. Use lags up to ${grouped(rows - 1)}.`,
  "step-domain": ({ step, series, row, value }, wording) =>
    `Series ${wording.series[series]}, row ${wording.firstRow + row}: ${value} has no ${step === "log" ? "logarithm" : "square root"}. Choose other steps for this series, or correct the cell.`,
  "steps-leave-nothing": ({ lost, rows }) =>
    `The steps use up ${plural(lost, "row")}, and the range has ${grouped(rows)}. Use shorter differences or more rows.`,
  "constant-series": ({ series }, wording) =>
    `Series ${wording.series[series]} never changes. Leave it out: a constant can neither lead nor follow.`,
  "exact-combination": ({ columns }, wording) =>
    `${relationWords(columns, wording)} exactly. ${relationRemedy(columns, wording)}`,
  "predicted-exactly": ({ order }) =>
    `At order ${order} some series is predicted without any error, so orders cannot be compared. Look for a series that is a shifted or scaled copy of others.`,
  "nothing-left-over": ({ series }, wording) =>
    `Series ${wording.series[series]} is predicted without any error, so its equation has nothing to test against. Look for a series that is a shifted or scaled copy of others.`,
  "singular-system": () =>
    "The equations for the coefficients have no single solution for these data. Look for series that repeat each other, or use fewer lags.",
  "likelihood-stuck": ({ reason }) =>
    reason === "ma-root"
      ? "The likelihood leads to a moving average at its limit, which takes back a difference or a lag. Use a smaller ma, or fewer differences."
      : reason === "ar-root"
        ? "The likelihood leads to a model at the edge of stability. Use differences in the steps, or fit=least-squares."
        : "The likelihood has no clear top: lags and past innovations stand in for each other. Use a smaller ma or order, or fit=least-squares.",
  "gaps-too-many": () =>
    "So many cells are blank that the steps cannot be undone: some level is never seen. Fill cells near the first rows, or use fewer differences.",
  unstable: ({ modulus }) =>
    `This model is not stable: its largest root is ${modulus.toFixed(4)}, so it has no stationary state. Use differences, or correct the coefficients.`,
  "no-lags": () =>
    "This model has order 0: it has no lags, so there is nothing to show about them. Use an order of 1 or more.",
  "too-many-looks": ({ looks, limit }) =>
    `This would compare ${grouped(looks)} pairs and lags; at most ${grouped(limit)} are allowed with so many rows. Use fewer lags or series.`,
  "start-needed": ({ modulus }) =>
    `This model is not stable: its largest root is ${modulus.toFixed(4)}, so it has no stationary state to begin from. Give the rows before the draw as start.`,
  "drivers-not-here": ({ call }, { drivers }) =>
    `This model uses the drivers ${names(drivers)}, and ${call} has no place for them. Fit a block without drivers.`,
  "plan-rows": ({ have, limit }) =>
    `The plan has ${plural(have, "row")} under its names; 1 to ${grouped(limit)} are needed, one per row ahead. Blank cells are free.`,
  "plan-names": ({ plan, series }) =>
    `The plan is headed ${names(plan)}; the series are ${names(series)}. Use the same names in the same order.`,
  "plan-domain": ({ step, series, ahead, value }, wording) =>
    `Plan ${wording.series[series]}, row ${grouped(ahead)} ahead: ${value} has no ${step === "log" ? "logarithm" : "square root"}, which the steps of this series take. ${step === "log" ? "Impose a value above 0" : "Impose 0 or more"}, or choose other steps.`,
  "plan-too-large": ({ imposed }) =>
    `The plan imposes ${plural(imposed, "cell")}, too many so far ahead to weigh against each other. Impose fewer cells, or plan fewer rows.`,
  "plan-singular": () =>
    "The imposed cells cannot be told apart: under this model some follow from the others. Leave some of them blank, or look at the largest root with ROOTS.",
  cancelled: () => "This calculation was given up because the formula or its inputs changed.",
  "not-in-preview": () =>
    "This takes a moment, so the preview leaves it out. Press Enter to calculate it in the sheet.",
  "redraws-fail": ({ failed, drawn }) =>
    `${grouped(failed)} of ${grouped(failed + drawn)} redrawn samples could not be fitted: the model is too large for so few rows. Use fewer lags, more rows, or bands=fitted.`,
  "redraw-fit": ({ fit }) =>
    `bands=redrawn fits the model anew to every draw, which fit=${fit} is too slow for. Use bands=fitted, or another fit.`,
  "redraw-heavy": ({ draws }) =>
    `${grouped(draws)} draws of this size would take minutes. Use fewer draws, fewer lags or series, or a shorter horizon.`,
  "needs-two-series": () => "One series alone has no other to be led by. Point at two or more.",
  "too-large": () =>
    "Some numbers run beyond what a sheet can hold. Divide the series by a power of ten; if a long forecast explodes, look at the largest root with ROOTS.",
  "too-many-cells": ({ cells, limit }) =>
    `The result would have ${grouped(cells)} cells; at most ${grouped(limit)} are allowed. Ask for fewer lags, series or rows ahead.`,
};

/** A regressor or series as a sentence names it. */
function columnWords(column: WeightedColumn["column"], { series, drivers }: Wording): string {
  switch (column.kind) {
    case "series":
      return series[column.series];
    case "lag":
      return `${series[column.series]} ${plural(column.lag, "row")} earlier`;
    case "driver":
      return drivers[column.driver];
    case "innovation":
      return `innovation of ${series[column.series]} ${plural(column.lag, "row")} earlier`;
    default:
      return termWords(column);
  }
}

const termWords = (term: Exclude<Regressor, { kind: "lag" | "driver" | "innovation" }>): string => {
  switch (term.kind) {
    case "constant":
      return "a constant";
    case "trend":
      return term.power === 1 ? "the trend" : "the squared trend";
    case "season":
      return `season ${term.season}`;
    case "wave":
      return `wave ${term.wave} (${term.part})`;
  }
};

/** "goods + services = total", coefficients shown where they are not 1. */
function relationWords(columns: readonly WeightedColumn[], wording: Wording): string {
  const last = columns.at(-1)!;
  if (columns.length === 1) return `${columnWords(last.column, wording)} is zero`;
  // the relation Σ w·x = 0 is told as: what has the sign of the last = minus the others
  const term = ({ column, weight }: WeightedColumn) => {
    const factor = Number(Math.abs(weight / last.weight).toPrecision(6));
    return factor === 1 ? columnWords(column, wording) : `${factor} × ${columnWords(column, wording)}`;
  };
  const side = (positive: boolean) =>
    columns.filter(({ weight }) => weight * last.weight > 0 === positive).map(term);
  const sum = (terms: readonly string[]) =>
    terms.length > 4 ? `${terms.slice(0, 3).join(" + ")} + ${terms.length - 3} more` : terms.join(" + ");
  const left = side(false);
  const right = side(true);
  return left.length === 0 ? `${sum(right)} = 0` : `${sum(left)} = ${sum(right)}`;
}

const countWords = ["none", "one", "two", "three", "four", "five", "six", "seven", "eight", "nine"];

function relationRemedy(columns: readonly WeightedColumn[], wording: Wording): string {
  const removable = columns.filter(
    ({ column }) => column.kind === "series" || column.kind === "driver" || column.kind === "lag",
  );
  if (removable.length === 1) return `Remove ${columnWords(removable[0].column, wording)}.`;
  return removable.length === 0
    ? "Use fewer terms or more rows."
    : `Remove one of the ${countWords[removable.length] ?? removable.length}.`;
}

/** A bug of ours: never blamed on the input. */
export const unknownErrorWords = (call: string): string =>
  `${call} failed on something it should have handled. This is a fault of Comove, not of your data; please report the formula.`;
