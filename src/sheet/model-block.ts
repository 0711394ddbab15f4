import { Issue, type BlockFault } from "../core/issue";
import type { Matrix } from "../core/matrix";
import type { VarModel } from "../core/var/model";
import { regressorCount, regressorsOf } from "../core/var/regressors";
import { isBlank, type Cell, type OutTable } from "./cell";
import { covarianceLabel, regressorLabel, type Names } from "./labels";
import { digest, formatTag, isTag, parseTag } from "./model-tag";

/** A model block as read from cells. */
export interface ModelBlock {
  readonly model: VarModel;
  readonly names: Names;
  /** True when a number differs from what was written into the tag. */
  readonly edited: boolean;
}

/** Lays a model out in cells: tag and names, coefficients, innovation covariance. */
export function writeModelBlock(model: VarModel, names: Names): OutTable {
  return [
    [formatTag(model), ...names.series],
    ...model.regressors.map((regressor, r) => [regressorLabel(regressor, names), ...model.coefficients[r]]),
    ...names.series.map((name, k) => [covarianceLabel(name), ...model.noiseCovariance[k]]),
  ];
}

/**
 * Reads a model block by tag and position. Labels decide nothing; they are compared only to notice rows or
 * columns that were moved.
 * @throws Issue "model-block" naming the fault
 */
export function readModelBlock(cells: readonly (readonly Cell[])[]): ModelBlock {
  const tagCell = cells[0][0];
  if (!isTag(tagCell)) throw fault(tagElsewhere(cells));
  if (cells.length === 1 && cells[0].length === 1) throw fault({ kind: "one-cell" });
  const tag = parseTag(tagCell);
  const block = trim(cells);
  // counted before anything is laid out: a damaged tag may announce millions of rows
  const regressed = regressorCount(tag.settings, tag.series, tag.drivers);
  const count = regressed + tag.series * tag.settings.movingAverage;
  requireShape(block, 1 + count + tag.series, 1 + tag.series);
  const regressors = regressorsOf(tag.settings, tag.series, tag.drivers);
  const names = readNames(block, regressed - tag.drivers, tag.drivers);
  refuseMoved(
    block,
    [...regressors.map((r) => regressorLabel(r, names)), ...names.series.map(covarianceLabel)],
    names.series,
  );
  const numbers = block
    .slice(1)
    .map((row, i) => row.slice(1).map((cell, k) => readNumber(cell, i + 2, k + 2)));
  const coefficients = numbers.slice(0, regressors.length);
  const noiseCovariance = numbers.slice(regressors.length);
  const model: VarModel = {
    settings: tag.settings,
    series: tag.series,
    drivers: tag.drivers,
    regressors,
    coefficients,
    noiseCovariance,
    rows: tag.rows,
    start: tag.start,
  };
  return { model, names, edited: digest([coefficients, noiseCovariance] as Matrix[]) !== tag.sum };
}

const fault = (found: BlockFault): Issue => new Issue({ code: "model-block", fault: found });

function tagElsewhere(cells: readonly (readonly Cell[])[]): BlockFault {
  const row = cells.findIndex((line) => line.some(isTag));
  return row < 0
    ? { kind: "no-tag" }
    : { kind: "tag-elsewhere", row: row + 1, column: cells[row].findIndex(isTag) + 1 };
}

/** Without the all-blank rows and columns after the block, which a generous selection takes along. */
function trim(cells: readonly (readonly Cell[])[]): readonly (readonly Cell[])[] {
  const height = cells.findLastIndex((row) => !row.every(isBlank)) + 1;
  const width = cells.reduce((w, row) => Math.max(w, row.findLastIndex((cell) => !isBlank(cell)) + 1), 0);
  return cells.slice(0, height).map((row) => row.slice(0, width));
}

function requireShape(block: readonly (readonly Cell[])[], rows: number, columns: number): void {
  const width = block[0].length;
  if (width > columns) {
    const blank = block[0].findIndex((_, j) => block.every((row) => isBlank(row[j])));
    throw fault(
      blank >= 0
        ? { kind: "blank-column", column: blank + 1 }
        : { kind: "columns", have: width, need: columns },
    );
  }
  if (block.length > rows) {
    const blank = block.findIndex((row) => row.every(isBlank));
    throw fault(
      blank >= 0 ? { kind: "blank-row", row: blank + 1 } : { kind: "rows", have: block.length, need: rows },
    );
  }
  if (width < columns) throw fault({ kind: "columns", have: width, need: columns });
  if (block.length < rows) throw fault({ kind: "rows", have: block.length, need: rows });
}

/** Series names stand in the first row; driver names are the labels of their rows. */
function readNames(block: readonly (readonly Cell[])[], driversFrom: number, drivers: number): Names {
  const text = (cell: Cell) => (typeof cell === "string" ? cell.trim() : String(cell ?? ""));
  return {
    series: block[0].slice(1).map(text),
    drivers: block.slice(1 + driversFrom, 1 + driversFrom + drivers).map((row) => text(row[0])),
  };
}

/** A label that belongs to another row tells that rows were moved, and likewise for columns. */
function refuseMoved(
  block: readonly (readonly Cell[])[],
  expected: readonly string[],
  series: readonly string[],
): void {
  const labels = block.slice(1).map((row) => (typeof row[0] === "string" ? row[0].trim() : ""));
  const covariances = labels.slice(-series.length);
  const swapped = series.findIndex(
    (name, k) => covariances[k] !== covarianceLabel(name) && covariances.includes(covarianceLabel(name)),
  );
  const own = covariances.map((label) => label.replace(covarianceLabel(""), ""));
  // names and covariance rows disagree while the lag rows follow the covariance rows: the columns were moved
  if (
    swapped >= 0 &&
    labels.slice(0, -series.length).some((label) => label.startsWith(`${own[swapped]}, lag `))
  ) {
    throw fault({
      kind: "columns-moved",
      column: swapped + 2,
      name: series[swapped],
      expected: own[swapped],
    });
  }
  const row = labels.findIndex((label, i) => label !== expected[i] && expected.includes(label));
  if (row >= 0)
    throw fault({ kind: "rows-moved", row: row + 2, label: labels[row], expected: expected[row] });
}

function readNumber(cell: Cell, row: number, column: number): number {
  if (typeof cell === "number") return cell;
  if (isBlank(cell)) throw fault({ kind: "blank-cell", row, column });
  throw fault({
    kind: "not-a-number",
    row,
    column,
    text: typeof cell === "string" ? cell : "an error or a logical value",
  });
}
