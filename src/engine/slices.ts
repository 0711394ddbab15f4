import { Issue } from "../core/issue";

/** Long work as the core writes it: a generator that yields wherever it can be paused or given up. */
export type LongWork<T> = Generator<unknown, T>;

export const isLongWork = <T>(value: T | LongWork<T>): value is LongWork<T> =>
  typeof value === "object" && value !== null && "next" in value && typeof value.next === "function";

/** Does long work in one go. */
export function atOnce<T>(work: LongWork<T>): T {
  for (;;) {
    const step = work.next();
    if (step.done) return step.value;
  }
}

/** How long the page may stand still; the program that shows it allows more. */
const SLICE_MILLISECONDS = 20;

/** Does long work bit by bit, so that the page stays alive where there is no worker. @throws Issue "cancelled" */
export async function inSlices<T>(work: LongWork<T>, stop: AbortSignal): Promise<T> {
  for (let until = performance.now() + SLICE_MILLISECONDS; ;) {
    const step = work.next();
    if (step.done) return step.value;
    if (performance.now() < until) continue;
    await new Promise((resume) => setTimeout(resume, 0));
    if (stop.aborted) throw new Issue({ code: "cancelled" });
    until = performance.now() + SLICE_MILLISECONDS;
  }
}
