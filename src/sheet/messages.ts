import { Issue, type IssueCode, type IssueFacts } from "../core/issue";
import { issueWords, unknownErrorWords, type Wording } from "../texts/en";

/** The two errors a spreadsheet shows with a message of ours: a refused argument, a result that does not exist. */
export type ErrorKind = "value" | "not-available";

/** What a cell shows in place of a result. */
export interface Message {
  readonly kind: ErrorKind;
  readonly text: string;
}

/** Issues of the data rather than of the request: the arguments are in order, but the result does not exist. */
const NOT_AVAILABLE: ReadonlySet<IssueCode> = new Set<IssueCode>([
  "too-few-rows",
  "block-needs-rows",
  "steps-leave-nothing",
  "constant-series",
  "exact-combination",
  "predicted-exactly",
  "singular-system",
  "covariance-not-positive",
  "unstable",
  "no-lags",
  "too-large",
]);

export const NO_WORDING: Wording = { series: [], drivers: [], firstRow: 1 };

/** One issue in words, with the names of the request it arose from. */
export function wordIssue(facts: IssueFacts, wording: Wording = NO_WORDING): string {
  return (issueWords[facts.code] as (f: IssueFacts, w: Wording) => string)(facts, wording);
}

/** The message for anything thrown while a call was answered; what is not an Issue is a fault of ours. */
export function messageFor(thrown: unknown, call: string, wording: Wording = NO_WORDING): Message {
  if (!(thrown instanceof Issue)) return { kind: "value", text: unknownErrorWords(call) };
  const { facts } = thrown;
  return { kind: NOT_AVAILABLE.has(facts.code) ? "not-available" : "value", text: wordIssue(facts, wording) };
}
