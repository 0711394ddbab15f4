import type { RequestOf, ResultOf, TaskName } from "../core/tasks";
import { engine } from "../engine/engine";
import type { Call, RawArguments } from "../sheet/call";
import type { OutTable } from "../sheet/cell";
import { messageFor, NO_WORDING } from "../sheet/messages";
import { checkTable } from "../sheet/tables";

/**
 * Answers a sheet function: cells → request → core → cells. Whatever goes wrong reaches the cell as one error
 * with a message.
 */
export function answer<N extends TaskName, Layout>(call: Call<N, Layout>, args: RawArguments): OutTable {
  let wording = NO_WORDING;
  try {
    const reading = call.read(args);
    wording = reading.wording;
    return checkTable(call.write(engine.run(call.task, reading.request), reading.layout));
  } catch (thrown) {
    throw cellError(thrown, call.name, wording);
  }
}

/**
 * The same for functions whose work may be heavy: it is done beside the page, given up when the host says so, and left
 * out of the formula preview.
 */
export async function answerLater<N extends TaskName, Layout>(
  call: Call<N, Layout>,
  args: RawArguments,
  invocation: CustomFunctions.CancelableInvocation | undefined,
): Promise<OutTable> {
  let wording = NO_WORDING;
  try {
    const reading = call.read(args);
    wording = reading.wording;
    const result = await started(call.task, reading.request, invocation);
    return checkTable(call.write(result, reading.layout));
  } catch (thrown) {
    throw cellError(thrown, call.name, wording);
  }
}

function started<N extends TaskName>(
  task: N,
  request: RequestOf<N>,
  invocation: CustomFunctions.CancelableInvocation | undefined,
): Promise<ResultOf<N>> {
  const caller = new AbortController();
  if (typeof invocation !== "object" || invocation === null) return engine.start(task, request);
  invocation.onCanceled = () => caller.abort();
  // declared as text, documented as a logical value
  const preview = String(invocation.isInValuePreview) === "true";
  return engine.start(task, request, { left: caller.signal, preview });
}

function cellError(thrown: unknown, call: string, wording: typeof NO_WORDING): CustomFunctions.Error {
  const { kind, text } = messageFor(thrown, call, wording);
  const { ErrorCode } = CustomFunctions;
  return new CustomFunctions.Error(kind === "value" ? ErrorCode.invalidValue : ErrorCode.notAvailable, text);
}
