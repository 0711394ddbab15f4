import { Issue, type IssueFacts } from "../core/issue";
import type { TaskName } from "../core/tasks";

/** As much of a Web Worker as is used here. */
export interface WorkerLike {
  postMessage(message: unknown): void;
  terminate(): void;
  onmessage: ((event: { readonly data: unknown }) => void) | null;
  onerror: ((event: unknown) => void) | null;
}

export interface Errand {
  readonly task: TaskName;
  readonly request: unknown;
}

/** What a worker sends back: a result, a refusal as facts, or a fault of ours. */
export type Outcome =
  { readonly result: unknown } | { readonly issue: IssueFacts } | { readonly fault: string };

/** No worker can be had on this page. */
export class NoWorker extends Error {}

interface Job {
  readonly errand: Errand;
  readonly resolve: (result: unknown) => void;
  readonly reject: (reason: unknown) => void;
}

/** Hands errands to one worker, one after the other. A job given up while it runs takes its worker along. */
export class WorkerDesk {
  readonly #waiting: Job[] = [];
  #worker: WorkerLike | null = null;
  #running: Job | null = null;
  #broken = false;

  constructor(private readonly open: () => WorkerLike) {}

  /** @throws NoWorker | Issue, the request's own or "cancelled" */
  run(errand: Errand, stop: AbortSignal): Promise<unknown> {
    return new Promise((resolve, reject) => {
      const job = { errand, resolve, reject };
      stop.addEventListener("abort", () => this.#giveUp(job), { once: true });
      this.#waiting.push(job);
      this.#next();
    });
  }

  #next(): void {
    if (this.#running !== null) return;
    const job = this.#waiting.shift();
    if (job === undefined) return;
    this.#running = job;
    try {
      if (this.#broken) throw new NoWorker();
      this.#worker ??= this.#opened();
      this.#worker.postMessage(job.errand);
    } catch {
      this.#failed();
    }
  }

  #opened(): WorkerLike {
    const worker = this.open();
    worker.onmessage = ({ data }) => this.#answered(data as Outcome);
    // a worker that cannot be loaded says so here, and so does one that breaks
    worker.onerror = () => this.#failed();
    return worker;
  }

  #answered(outcome: Outcome): void {
    const job = this.#running!;
    this.#running = null;
    if ("result" in outcome) job.resolve(outcome.result);
    else job.reject("issue" in outcome ? new Issue(outcome.issue) : new Error(outcome.fault));
    this.#next();
  }

  #failed(): void {
    this.#broken = true;
    this.#dismiss();
    const jobs = [this.#running, ...this.#waiting.splice(0)];
    this.#running = null;
    for (const job of jobs) job?.reject(new NoWorker());
  }

  #giveUp(job: Job): void {
    const at = this.#waiting.indexOf(job);
    if (at >= 0) this.#waiting.splice(at, 1);
    else if (this.#running === job) {
      this.#running = null;
      this.#dismiss();
    } else return;
    job.reject(new Issue({ code: "cancelled" }));
    this.#next();
  }

  #dismiss(): void {
    this.#worker?.terminate();
    this.#worker = null;
  }
}
