import type { RequestOf, ResultOf, TaskName } from "../core/tasks";
import type { Wording } from "../texts/en";
import type { OutTable } from "./cell";

/** The arguments of a sheet function by name, as the host passed them. */
export type RawArguments = Readonly<Record<string, unknown>>;

/** A request read from cells: what the core needs, and what the answer is laid out with. */
export interface Reading<N extends TaskName, Layout> {
  readonly request: RequestOf<N>;
  readonly layout: Layout;
  readonly wording: Wording;
}

/**
 * One sheet function between its cells: how its arguments are read, which task of the core computes it, and
 * how the result is laid out.
 */
export interface Call<N extends TaskName = TaskName, Layout = unknown> {
  readonly name: string;
  readonly task: N;
  read(args: RawArguments): Reading<N, Layout>;
  write(result: ResultOf<N>, layout: Layout): OutTable;
}

/** Helps the compiler tie the parts of a call together. */
export const defineCall = <N extends TaskName, Layout>(call: Call<N, Layout>): Call<N, Layout> => call;
