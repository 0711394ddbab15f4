import { describe, expect, it } from "vitest";
import { NoWorker, WorkerDesk } from "../../src/engine/worker-desk";
import { fakeWorkers } from "../support/fake-worker";

const errand = (request: unknown) => ({ task: "roots", request }) as const;
const never = new AbortController().signal;

describe("the desk", () => {
  it("opens no worker before there is work", () => {
    const { open, opened } = fakeWorkers();
    new WorkerDesk(open);
    expect(opened).toEqual([]);
  });

  it("hands errands to one worker, one after the other, in their order", async () => {
    const { open, opened } = fakeWorkers();
    const desk = new WorkerDesk(open);
    const [first, second] = [desk.run(errand(1), never), desk.run(errand(2), never)];
    const [worker] = opened;
    expect(worker.errands.map(({ request }) => request)).toEqual([1]);
    worker.answer({ result: "one" });
    expect(await first).toBe("one");
    expect(worker.errands.map(({ request }) => request)).toEqual([1, 2]);
    worker.answer({ result: "two" });
    expect(await second).toBe("two");
    expect(opened.length).toBe(1);
  });

  it("gives a refusal back as an issue, and a fault as an error", async () => {
    const { open, opened } = fakeWorkers();
    const desk = new WorkerDesk(open);
    const refused = desk.run(errand(1), never);
    opened[0].answer({ issue: { code: "constant-series", series: 2 } });
    await expect(refused).rejects.toMatchObject({ facts: { code: "constant-series", series: 2 } });
    const failed = desk.run(errand(2), never);
    opened[0].answer({ fault: "TypeError: x" });
    await expect(failed).rejects.toThrow("TypeError: x");
  });

  it("dismisses the worker of a job that is given up while it runs, and goes on with another", async () => {
    const { open, opened } = fakeWorkers();
    const desk = new WorkerDesk(open);
    const stop = new AbortController();
    const [first, second] = [desk.run(errand(1), stop.signal), desk.run(errand(2), never)];
    stop.abort();
    await expect(first).rejects.toMatchObject({ facts: { code: "cancelled" } });
    expect(opened.map(({ dismissed }) => dismissed)).toEqual([true, false]);
    opened[1].answer({ result: "two" });
    expect(await second).toBe("two");
  });

  it("forgets a job that is given up while it waits", async () => {
    const { open, opened } = fakeWorkers();
    const desk = new WorkerDesk(open);
    const stop = new AbortController();
    const [first, second] = [desk.run(errand(1), never), desk.run(errand(2), stop.signal)];
    stop.abort();
    await expect(second).rejects.toMatchObject({ facts: { code: "cancelled" } });
    opened[0].answer({ result: "one" });
    expect(await first).toBe("one");
    expect(opened[0].errands.length).toBe(1);
    expect(opened[0].dismissed).toBe(false);
  });

  it("does not mind when a job is given up after it is done", async () => {
    const { open, opened } = fakeWorkers();
    const desk = new WorkerDesk(open);
    const stop = new AbortController();
    const first = desk.run(errand(1), stop.signal);
    opened[0].answer({ result: "one" });
    await first;
    stop.abort();
    expect(opened[0].dismissed).toBe(false);
  });

  it("says that there is no worker when it cannot be opened or loaded, from then on at once", async () => {
    const refusing = new WorkerDesk(() => {
      throw new Error("workers are forbidden here");
    });
    await expect(refusing.run(errand(1), never)).rejects.toBeInstanceOf(NoWorker);
    const { open, opened } = fakeWorkers();
    const desk = new WorkerDesk(open);
    const jobs = [desk.run(errand(1), never), desk.run(errand(2), never)];
    opened[0].break();
    for (const job of jobs) await expect(job).rejects.toBeInstanceOf(NoWorker);
    await expect(desk.run(errand(3), never)).rejects.toBeInstanceOf(NoWorker);
    expect(opened.length).toBe(1);
  });
});
