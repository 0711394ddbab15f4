import type { Place } from "./fault-notes";

/** Why a call's result never came: the sheet changed while it ran. */
export class Interrupted extends Error {}

interface RunningCall {
  interrupted: boolean;
  /** Tells the function that its result is not wanted any more. */
  cancel(): void;
  /** Lets whoever waits for the result go on without it. */
  letGo(): void;
}

/** The object that the platform passes last; a function leaves its answer to a cancellation in it. */
export interface Invocation {
  readonly isInValuePreview: boolean;
  onCanceled: () => void;
}

/**
 * The calls that have not answered yet. When the sheet changes they are let go of at once, so that the calculation can
 * begin anew, but their work is given up only once it is known not to be asked for again.
 */
export class RunningCalls {
  readonly #calls = new Map<string, RunningCall>();

  /** Calls a function for a cell; an earlier call of it for the same cell is cancelled, after this one shares its work. */
  run(fn: string, place: Place, call: (invocation: Invocation) => unknown): unknown {
    const key = `${fn} ${place.sheet} ${place.row} ${place.column}`;
    const before = this.#calls.get(key);
    this.#calls.delete(key);
    const invocation: Invocation = { isInValuePreview: false, onCanceled: () => undefined };
    try {
      const result = call(invocation);
      return result instanceof Promise ? this.#keep(key, invocation, result) : result;
    } finally {
      before?.cancel();
    }
  }

  #keep(key: string, invocation: Invocation, result: Promise<unknown>): Promise<unknown> {
    return new Promise((resolve, reject) => {
      const running: RunningCall = {
        interrupted: false,
        cancel: () => invocation.onCanceled(),
        letGo: () => reject(new Interrupted()),
      };
      this.#calls.set(key, running);
      const over = () => {
        if (this.#calls.get(key) === running) this.#calls.delete(key);
      };
      result.finally(over).then(resolve, reject);
    });
  }

  /** Lets go of every call that is running. */
  interrupt(): void {
    for (const running of this.#calls.values()) {
      running.interrupted = true;
      running.letGo();
    }
  }

  /** A calculation has come to its end: what it did not ask for again is given up. */
  settle(): void {
    for (const [key, running] of this.#calls) {
      if (!running.interrupted) continue;
      this.#calls.delete(key);
      running.cancel();
    }
  }
}
