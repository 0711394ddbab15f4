import { describe, expect, it, vi } from "vitest";
import { Interrupted, RunningCalls, type Invocation } from "../../src/embedded/running-calls";

const place = { sheet: "s", row: 1, column: 2 };
/** A call that answers when told to, and says whether it was cancelled. */
function slow() {
  const cancelled = vi.fn();
  let answer!: (value: unknown) => void;
  const call = (invocation: Invocation) => {
    invocation.onCanceled = cancelled;
    return new Promise((resolve) => (answer = resolve));
  };
  return { call, cancelled, answer: (value: unknown) => answer(value) };
}

describe("running calls", () => {
  it("pass on what comes at once, and what comes later", async () => {
    const calls = new RunningCalls();
    expect(calls.run("A", place, () => 7)).toBe(7);
    const later = slow();
    const result = calls.run("A", place, later.call);
    later.answer(8);
    expect(await result).toBe(8);
  });

  it("that throw at once do so, and cancel the call before them", async () => {
    const calls = new RunningCalls();
    const old = slow();
    const first = calls.run("A", place, old.call) as Promise<unknown>;
    expect(() => calls.run("A", place, () => { throw new Error("no"); })).toThrow("no"); // prettier-ignore
    expect(old.cancelled).toHaveBeenCalledOnce();
    old.answer(1);
    await first;
  });

  it("of the same function for the same cell take the place of the one before, which is cancelled after they asked", () => {
    const calls = new RunningCalls();
    const [old, other, elsewhere] = [slow(), slow(), slow()];
    void calls.run("A", place, old.call);
    void calls.run("B", place, other.call);
    void calls.run("A", { ...place, row: 9 }, elsewhere.call);
    const order: string[] = [];
    old.cancelled.mockImplementation(() => order.push("cancelled"));
    void calls.run("A", place, () => {
      order.push("asked");
      return new Promise(() => undefined);
    });
    expect(order).toEqual(["asked", "cancelled"]);
    expect(other.cancelled).not.toHaveBeenCalled();
    expect(elsewhere.cancelled).not.toHaveBeenCalled();
  });

  it("are let go of when interrupted, and given up only if the next calculation does not ask again", async () => {
    const calls = new RunningCalls();
    const [wanted, dropped] = [slow(), slow()];
    const results = [calls.run("A", place, wanted.call), calls.run("B", place, dropped.call)];
    calls.interrupt();
    for (const result of results) await expect(result).rejects.toThrow(Interrupted);
    expect(wanted.cancelled).not.toHaveBeenCalled();
    const again = slow();
    void calls.run("A", place, again.call);
    calls.settle();
    expect(dropped.cancelled).toHaveBeenCalledOnce();
    expect(again.cancelled).not.toHaveBeenCalled();
  });

  it("that have answered are not cancelled any more", async () => {
    const calls = new RunningCalls();
    const done = slow();
    const result = calls.run("A", place, done.call);
    done.answer(1);
    await result;
    calls.interrupt();
    calls.settle();
    expect(done.cancelled).not.toHaveBeenCalled();
  });
});
