import type { Errand, Outcome, WorkerLike } from "../../src/engine/worker-desk";

/** A worker that answers when the test says so. */
export class FakeWorker implements WorkerLike {
  onmessage: WorkerLike["onmessage"] = null;
  onerror: WorkerLike["onerror"] = null;
  readonly errands: Errand[] = [];
  dismissed = false;

  postMessage(message: unknown): void {
    // what crosses over to a worker is copied
    this.errands.push(structuredClone(message) as Errand);
  }
  terminate(): void {
    this.dismissed = true;
  }
  answer(outcome: Outcome): void {
    this.onmessage?.({ data: structuredClone(outcome) });
  }
  break(): void {
    this.onerror?.(new Error("worker.js could not be loaded"));
  }
}

/** Opens fake workers and remembers them. */
export function fakeWorkers(): { open: () => WorkerLike; opened: FakeWorker[] } {
  const opened: FakeWorker[] = [];
  return {
    opened,
    open: () => {
      const worker = new FakeWorker();
      opened.push(worker);
      return worker;
    },
  };
}
