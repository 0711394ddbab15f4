import type { TaskName } from "../core/tasks";
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
    const { kind, text } = messageFor(thrown, call.name, wording);
    const { ErrorCode } = CustomFunctions;
    throw new CustomFunctions.Error(kind === "value" ? ErrorCode.invalidValue : ErrorCode.notAvailable, text);
  }
}
