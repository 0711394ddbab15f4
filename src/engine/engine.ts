import { Issue } from "../core/issue";
import { tasks, type RequestOf, type ResultOf, type Runner, type TaskName } from "../core/tasks";
import type { ModelRequest } from "../core/var/sample";
import { ContentCache } from "./cache";
import { isHeavy } from "./cost";
import { SharedWork } from "./shared-work";
import { atOnce, inSlices, isLongWork, type LongWork } from "./slices";
import { openWorkerBeside } from "./worker-beside";
import { NoWorker, WorkerDesk, type WorkerLike } from "./worker-desk";

/** What a caller that can wait says about itself. */
export interface Waiting {
  /** Told when the caller no longer wants the result. */
  readonly left?: AbortSignal;
  /** True when only a cheap answer is worth having. */
  readonly preview?: boolean;
}

/** Runs tasks of the core; the same inputs are never computed twice while they are kept. */
export class Engine implements Runner {
  readonly #cache: ContentCache;
  readonly #desk: WorkerDesk | null;
  readonly #underWay = new Map<string, SharedWork<unknown>>();

  /** @param openWorker opens a worker for heavy work; null does it here */
  constructor(cache: ContentCache = new ContentCache(), openWorker: (() => WorkerLike) | null = null) {
    this.#cache = cache;
    this.#desk = openWorker && new WorkerDesk(openWorker);
  }

  /** Computes here and now. */
  run<N extends TaskName>(task: N, request: RequestOf<N>): ResultOf<N> {
    return this.#here(content(task, request), task, request);
  }

  /**
   * The same for callers that can wait: what is cheap or kept comes at once, heavy work is done beside the page.
   * @throws Issue of the request | "cancelled" | "not-in-preview"
   */
  async start<N extends TaskName>(
    task: N,
    request: RequestOf<N>,
    { left, preview = false }: Waiting = {},
  ): Promise<ResultOf<N>> {
    const key = content(task, request);
    if (this.#cache.has(key) || !isHeavy(task, request)) return this.#here(key, task, request);
    if (preview) throw new Issue({ code: "not-in-preview" });
    let work = this.#underWay.get(key) as SharedWork<ResultOf<N>> | undefined;
    if (work === undefined) {
      work = new SharedWork((stop) => this.#beside(task, request, key, stop));
      this.#underWay.set(key, work);
    }
    return work.wait(left);
  }

  readonly fit = (request: ModelRequest): ResultOf<"fit"> => this.run("fit", request);

  #here<N extends TaskName>(key: string, task: N, request: RequestOf<N>): ResultOf<N> {
    return this.#cache.get(key, () => {
      const begun = this.#begin(task, request);
      return isLongWork(begun) ? atOnce(begun) : begun;
    });
  }

  async #beside<N extends TaskName>(
    task: N,
    request: RequestOf<N>,
    key: string,
    stop: AbortSignal,
  ): Promise<ResultOf<N>> {
    // whoever asks after the last caller left begins anew
    const over = () => this.#underWay.delete(key);
    stop.addEventListener("abort", over, { once: true });
    try {
      const result = await this.#atDesk(task, request, stop);
      this.#cache.get(key, () => result);
      return result;
    } finally {
      if (!stop.aborted) over();
    }
  }

  async #atDesk<N extends TaskName>(task: N, request: RequestOf<N>, stop: AbortSignal): Promise<ResultOf<N>> {
    try {
      if (this.#desk !== null) return (await this.#desk.run({ task, request }, stop)) as ResultOf<N>;
    } catch (thrown) {
      if (!(thrown instanceof NoWorker)) throw thrown;
    }
    const begun = this.#begin(task, request);
    return isLongWork(begun) ? inSlices(begun, stop) : begun;
  }

  #begin<N extends TaskName>(task: N, request: RequestOf<N>): ResultOf<N> | LongWork<ResultOf<N>> {
    const compute = tasks[task] as (
      request: RequestOf<N>,
      run: Runner,
    ) => ResultOf<N> | LongWork<ResultOf<N>>;
    return compute(request, this);
  }
}

/** The content of a request as text. JSON writes NaN as null, which no finite number shares, so gaps stay gaps. */
const content = (task: TaskName, request: unknown): string => `${task} ${JSON.stringify(request)}`;

/** The one engine of a page: every call shares its cache. */
export const engine = new Engine(new ContentCache(), openWorkerBeside);
