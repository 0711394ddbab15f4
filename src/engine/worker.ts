import { Issue } from "../core/issue";
import { Engine } from "./engine";
import type { Errand, Outcome } from "./worker-desk";

/** The page's helper: does what it is sent with the same core, one errand after the other. */
const engine = new Engine();

function outcomeOf({ task, request }: Errand): Outcome {
  try {
    return { result: engine.run(task, request as never) };
  } catch (thrown) {
    return thrown instanceof Issue ? { issue: thrown.facts } : { fault: String(thrown) };
  }
}

self.onmessage = ({ data }: MessageEvent<Errand>) => self.postMessage(outcomeOf(data));
