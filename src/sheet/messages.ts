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
  "nothing-left-over",
  "singular-system",
  "likelihood-stuck",
  "gaps-too-many",
  "covariance-not-positive",
  "unstable",
  "no-lags",
  "needs-two-series",
  "start-needed",
  "plan-singular",
  "redraws-fail",
  "cancelled",
  "not-in-preview",
  "too-large",
]);

export const NO_WORDING: Wording = { series: [], drivers: [], firstRow: 1 };

/** Some hosts cut a message near 255 characters; names and quotations are cut first, so that the remedy stays. */
const LONGEST = 255;
const LONGEST_QUOTE = 80;
const LONGEST_NAME = 30;

const cut = (text: string, longest: number): string =>
  text.length <= longest ? text : `${text.slice(0, longest - 1)}…`;

/** The same data with every long text in it cut. */
function shortened<T>(data: T, longest: number): T {
  if (typeof data === "string") return cut(data, longest) as T;
  if (Array.isArray(data)) return data.map((item: unknown) => shortened(item, LONGEST_NAME)) as T;
  if (typeof data !== "object" || data === null) return data;
  return Object.fromEntries(
    Object.entries(data).map(([key, value]: [string, unknown]) => [key, shortened(value, longest)]),
  ) as T;
}

/** One issue in words, with the names of the request it arose from. */
export function wordIssue(facts: IssueFacts, wording: Wording = NO_WORDING): string {
  const words = issueWords[facts.code] as (f: IssueFacts, w: Wording) => string;
  const text = words(shortened(facts, LONGEST_QUOTE), shortened(wording, LONGEST_NAME));
  return text.length <= LONGEST ? text : `${text.slice(0, LONGEST - 2)}….`;
}

/** The message for anything thrown while a call was answered; what is not an Issue is a fault of ours. */
export function messageFor(thrown: unknown, call: string, wording: Wording = NO_WORDING): Message {
  if (!(thrown instanceof Issue)) return { kind: "value", text: unknownErrorWords(call) };
  const { facts } = thrown;
  return { kind: NOT_AVAILABLE.has(facts.code) ? "not-available" : "value", text: wordIssue(facts, wording) };
}
