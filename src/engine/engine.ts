import { tasks, type RequestOf, type ResultOf, type Runner, type TaskName } from "../core/tasks";
import type { ModelRequest } from "../core/var/sample";
import { ContentCache } from "./cache";

/** Runs tasks of the core; the same inputs are never computed twice while they are kept. */
export class Engine implements Runner {
  readonly #cache: ContentCache;

  constructor(cache: ContentCache = new ContentCache()) {
    this.#cache = cache;
  }

  run<N extends TaskName>(task: N, request: RequestOf<N>): ResultOf<N> {
    const compute = tasks[task] as (request: RequestOf<N>, run: Runner) => ResultOf<N>;
    return this.#cache.get(`${task} ${content(request)}`, () => compute(request, this));
  }

  readonly fit = (request: ModelRequest): ResultOf<"fit"> => this.run("fit", request);
}

/** The content of a request as text. JSON writes NaN as null, which no finite number shares, so gaps stay gaps. */
const content = (request: unknown): string => JSON.stringify(request);

/** The one engine of a page: every call shares its cache. */
export const engine = new Engine();
