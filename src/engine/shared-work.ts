import { Issue } from "../core/issue";

/** One computation that several callers may wait for; it is given up when the last of them has left. */
export class SharedWork<T> {
  readonly #stop = new AbortController();
  readonly #result: Promise<T>;
  #waiting = 0;

  constructor(begin: (stop: AbortSignal) => Promise<T>) {
    this.#result = begin(this.#stop.signal);
  }

  /** @param left told when this caller no longer waits. @throws Issue "cancelled" to a caller that left */
  wait(left?: AbortSignal): Promise<T> {
    this.#waiting++;
    return new Promise<T>((resolve, reject) => {
      const leave = () => {
        reject(new Issue({ code: "cancelled" }));
        if (--this.#waiting === 0) this.#stop.abort();
      };
      if (left?.aborted) leave();
      else left?.addEventListener("abort", leave, { once: true });
      const settled = () => left?.removeEventListener("abort", leave);
      this.#result.then(
        (value) => (settled(), resolve(value)),
        (thrown: unknown) => (settled(), reject(thrown)),
      );
    });
  }
}
