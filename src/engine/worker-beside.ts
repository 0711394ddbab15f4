import type { WorkerLike } from "./worker-desk";

// known only while the script that holds this module is first run
const script = typeof document === "undefined" ? null : document.currentScript;
const address = script instanceof Object && "src" in script ? script.src : "";

/** Opens worker.js, which lies beside functions.js; null where pages have no workers. */
export const openWorkerBeside: (() => WorkerLike) | null =
  typeof Worker === "undefined" || address === ""
    ? null
    : () => new Worker(new URL("worker.js", address)) as WorkerLike;
