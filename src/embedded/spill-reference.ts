import type { Injector } from "@univerjs/core";
import {
  ErrorType,
  ErrorValueObject,
  FormulaExecuteStageType,
  IFormulaRuntimeService,
  LexerTreeBuilder,
  RangeReferenceObject,
  SuffixNodeFactory,
} from "@univerjs/preset-sheets-core";

/**
 * Makes the spill operator work, A1#: the engine reads it but answers #VALUE!, and does not read it at the end of
 * a formula. Both places are private, so the patch names them once, here.
 */
export function enableSpillReference(injector: () => Injector): void {
  readAtEnd();
  answerWithSpill(injector);
}

/* eslint-disable @typescript-eslint/no-explicit-any -- private parts of the engine have no types */

function readAtEnd(): void {
  const lexer = LexerTreeBuilder.prototype as any;
  const similar = lexer._checkSimilarErrorToken;
  lexer._checkSimilarErrorToken = function (token: string, at: number, characters: string[]) {
    const ends = token === "#" && characters.slice(at + 1).every((character) => character === " ");
    return ends || similar.call(this, token, at, characters);
  };
}

function answerWithSpill(injector: () => Injector): void {
  const factory = SuffixNodeFactory.prototype as any;
  const create = factory.checkAndCreateNodeType;
  factory.checkAndCreateNodeType = function (parameter: unknown) {
    const node = create.call(this, parameter);
    if (node?.getToken?.() === "#") {
      node._handlerPound = (value: any) =>
        spillOf(value, injector().get(IFormulaRuntimeService), this._currentConfigService);
    }
    return node;
  };
}

/** Stages in which dependencies are collected: there the answer must be a reference, or none is recorded. */
const COLLECTING = new Set<number>([
  FormulaExecuteStageType.IDLE,
  FormulaExecuteStageType.START,
  FormulaExecuteStageType.START_DEPENDENCY,
  FormulaExecuteStageType.START_DEPENDENCY_ARRAY_FORMULA,
]);

function spillOf(value: any, runtime: any, config: any): any {
  if (!value.isReferenceObject() || !value.isCell()) return ErrorValueObject.create(ErrorType.REF);
  const { startRow, startColumn } = value.getRangePosition();
  const unit = value.getUnitId();
  const sheet = value.getSheetId();
  const here = (data: any) => data?.[unit]?.[sheet]?.[startRow]?.[startColumn];
  const collecting = COLLECTING.has(runtime.getFormulaExecuteStage());
  // a cell computed anew in this run has run-time data; where it spilled before no longer counts
  const renewed =
    !collecting && value.getRuntimeData()?.[unit]?.[sheet]?.getValue?.(startRow, startColumn) !== undefined;
  const spill =
    here(value.getRuntimeArrayFormulaRange()) ?? (renewed ? undefined : here(value.getArrayFormulaRange()));
  if (!collecting) {
    const anchor = value.getCellByPosition(startRow, startColumn);
    const blocked = anchor?.isError?.() && anchor.getErrorType?.() === ErrorType.SPILL;
    if (blocked || (!spill && !here(config.getFormulaData())?.f))
      return ErrorValueObject.create(ErrorType.REF);
  }
  return spill ? referenceTo(spill, value) : value;
}

/** A reference to the spilled range that sees the same data as the reference to its first cell. */
function referenceTo({ startRow, startColumn, endRow, endColumn }: any, like: any): any {
  const range = { startRow, startColumn, endRow, endColumn };
  const reference = new RangeReferenceObject(range as any, like.getSheetId(), like.getUnitId()) as any;
  for (const part of [
    "UnitData",
    "UnitStylesData",
    "ArrayFormulaCellData",
    "ArrayFormulaRange",
    "RuntimeData",
    "RuntimeArrayFormulaCellData",
    "RuntimeArrayFormulaRange",
    "RuntimeFeatureCellData",
  ]) {
    reference[`set${part}`](like[`get${part}`]());
  }
  return reference;
}
