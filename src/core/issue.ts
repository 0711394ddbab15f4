import type { Regressor } from "./var/regressors";

/** What is allowed, told as data so that one place can put it into words. */
export type Allowed =
  | { readonly kind: "one-of"; readonly values: readonly string[] }
  | { readonly kind: "whole"; readonly from: number; readonly to: number | null }
  | { readonly kind: "number"; readonly above: number; readonly below: number | null }
  | { readonly kind: "number-from"; readonly from: number }
  | { readonly kind: "list"; readonly of: "lags" | "steps" | "test lags" };

/** A weighted column of an exact relation. */
export interface WeightedColumn {
  readonly column: Regressor | { readonly kind: "series"; readonly series: number };
  readonly weight: number;
}

/** Why a model block cannot be read. */
export type BlockFault =
  | { readonly kind: "one-cell" }
  | { readonly kind: "no-tag" }
  | { readonly kind: "tag-elsewhere"; readonly row: number; readonly column: number }
  | { readonly kind: "bad-tag"; readonly part: string }
  | { readonly kind: "rows"; readonly have: number; readonly need: number }
  | { readonly kind: "columns"; readonly have: number; readonly need: number }
  | { readonly kind: "blank-column"; readonly column: number }
  | { readonly kind: "blank-row"; readonly row: number }
  | { readonly kind: "blank-cell"; readonly row: number; readonly column: number }
  | { readonly kind: "not-a-number"; readonly row: number; readonly column: number; readonly text: string }
  | { readonly kind: "rows-moved"; readonly row: number; readonly label: string; readonly expected: string }
  | {
      readonly kind: "columns-moved";
      readonly column: number;
      readonly name: string;
      readonly expected: string;
    };

/**
 * Everything that can be wrong with a request or with the data, as facts without words.
 * Rows are counted as the user counts them (1 = first row of the range as passed).
 */
export type IssueFacts =
  // cells
  | { readonly code: "no-numbers"; readonly range: string }
  | { readonly code: "missing-argument"; readonly argument: string }
  | {
      readonly code: "not-a-number-cell";
      readonly range: string;
      readonly name: string;
      readonly row: number;
      readonly found: string;
    }
  | {
      readonly code: "gap";
      readonly range: string;
      readonly name: string;
      readonly row: number;
      /** Whether the call can be told to allow gaps. */
      readonly allowable: boolean;
    }
  | { readonly code: "blank-series"; readonly name: string }
  | { readonly code: "header-number"; readonly range: string; readonly column: number; readonly text: string }
  | { readonly code: "header-twice"; readonly range: string; readonly name: string }
  | { readonly code: "header-blank"; readonly range: string; readonly column: number }
  | { readonly code: "drivers-short"; readonly have: number; readonly need: number; readonly future: number }
  | { readonly code: "columns-differ"; readonly range: string; readonly have: number; readonly need: number }
  // scalars and options
  | {
      readonly code: "bad-argument";
      readonly argument: string;
      readonly found: string;
      readonly allowed: Allowed;
    }
  | { readonly code: "unknown-option"; readonly key: string; readonly allowed: readonly string[] }
  | {
      readonly code: "option-not-here";
      readonly key: string;
      readonly call: string;
      readonly allowed: readonly string[];
    }
  | { readonly code: "option-twice"; readonly key: string }
  | { readonly code: "option-without-value"; readonly text: string }
  | { readonly code: "bad-option"; readonly key: string; readonly found: string; readonly allowed: Allowed }
  | { readonly code: "option-needs"; readonly key: string; readonly needs: string }
  | { readonly code: "fit-without-drivers"; readonly fit: string }
  | { readonly code: "fit-all-lags"; readonly fit: string }
  | { readonly code: "longrun-needs-lag" }
  | { readonly code: "longrun-errors"; readonly call: string }
  | { readonly code: "ma-not-here"; readonly call: string }
  | { readonly code: "gaps-not-here"; readonly call: string }
  | { readonly code: "options-clash"; readonly key: string; readonly other: string }
  | {
      readonly code: "option-against-block";
      readonly key: string;
      readonly found: string;
      readonly block: string;
    }
  | { readonly code: "steps-count"; readonly have: number; readonly series: number }
  | { readonly code: "labels-needed" }
  | { readonly code: "bad-range-options"; readonly columns: number }
  // models
  | { readonly code: "model-block"; readonly fault: BlockFault }
  | { readonly code: "block-needed"; readonly found: string }
  | { readonly code: "block-names"; readonly block: readonly string[]; readonly series: readonly string[] }
  | { readonly code: "block-drivers"; readonly block: readonly string[]; readonly drivers: readonly string[] }
  | { readonly code: "block-needs-rows"; readonly order: number; readonly rows: number }
  | { readonly code: "covariance-asymmetric"; readonly row: number; readonly column: number }
  | { readonly code: "covariance-not-positive" }
  // data
  | {
      readonly code: "too-few-rows";
      readonly order: number;
      readonly series: number;
      readonly rows: number;
      readonly need: number;
      readonly largest: number | null;
    }
  | { readonly code: "too-heavy"; readonly rows: number; readonly coefficients: number }
  | { readonly code: "filter-heavy"; readonly rows: number; readonly states: number }
  | { readonly code: "too-many-states"; readonly states: number; readonly limit: number }
  | { readonly code: "lags-beyond-rows"; readonly lag: number; readonly rows: number }
  | {
      readonly code: "step-domain";
      readonly step: "log" | "sqrt";
      readonly series: number;
      readonly row: number;
      readonly value: number;
    }
  | { readonly code: "steps-leave-nothing"; readonly lost: number; readonly rows: number }
  | { readonly code: "constant-series"; readonly series: number }
  | { readonly code: "exact-combination"; readonly columns: readonly WeightedColumn[] }
  | { readonly code: "predicted-exactly"; readonly order: number }
  | { readonly code: "nothing-left-over"; readonly series: number }
  | { readonly code: "singular-system" }
  | { readonly code: "likelihood-stuck"; readonly reason: "ma-root" | "ar-root" | "flat" }
  | { readonly code: "gaps-too-many" }
  | { readonly code: "unstable"; readonly modulus: number }
  | { readonly code: "no-lags" }
  | { readonly code: "needs-two-series" }
  | { readonly code: "too-many-looks"; readonly looks: number; readonly limit: number }
  | { readonly code: "start-needed"; readonly modulus: number }
  | { readonly code: "drivers-not-here"; readonly call: string }
  | { readonly code: "plan-rows"; readonly have: number; readonly limit: number }
  | { readonly code: "plan-names"; readonly plan: readonly string[]; readonly series: readonly string[] }
  | {
      readonly code: "plan-domain";
      readonly step: "log" | "sqrt";
      readonly series: number;
      readonly ahead: number;
      readonly value: number;
    }
  | { readonly code: "plan-too-large"; readonly imposed: number }
  | { readonly code: "plan-singular" }
  | { readonly code: "cancelled" }
  | { readonly code: "not-in-preview" }
  | { readonly code: "redraws-fail"; readonly failed: number; readonly drawn: number }
  | { readonly code: "redraw-fit"; readonly fit: string }
  | { readonly code: "redraw-heavy"; readonly draws: number }
  | { readonly code: "too-large" }
  | { readonly code: "too-many-cells"; readonly cells: number; readonly limit: number };

export type IssueCode = IssueFacts["code"];

/** A refused request or a result that does not exist, thrown as data. `sheet/messages.ts` gives it words. */
export class Issue extends Error {
  override readonly name = "Issue";
  constructor(readonly facts: IssueFacts) {
    super(facts.code);
  }
}

export const refuse = (facts: IssueFacts): never => {
  throw new Issue(facts);
};
