import { existsSync, readFileSync } from "node:fs";
import { createRequire } from "node:module";
import { fileURLToPath } from "node:url";
import { createContext, runInContext, type Context } from "node:vm";

/**
 * A host for the vendor's own client library, unchanged: it loads the library and the built functions into a
 * context of their own, hands over calls the way the spreadsheet does, as text over a bridge, and reads what the
 * library posts back. What it answers is what reaches a cell. The messages are undocumented, so the version of
 * the library is pinned in package.json.
 */
export interface VendorHost {
  /** The ids that the built functions have associated. */
  readonly registered: readonly string[];
  call(...call: CallOf): Promise<Answer>;
  /**
   * Many calls in one message. The library posts results 50 ms after a call and then not again for half a
   * second, so calls made one after the other wait half a second each.
   */
  callAll(calls: readonly CallOf[]): Promise<Answer[]>;
  /** A call that the spreadsheet takes back as soon as it is made. */
  callAndCancel(...call: CallOf): Promise<Answer>;
}

export type CallOf = readonly [name: string, params: readonly unknown[], kind?: ParameterKind];

export type Answer =
  | { readonly ok: true; readonly value: unknown }
  | { readonly ok: false; readonly code: string; readonly message: string };

/**
 * How the host says that cells are more than numbers and text: "errors" when it knows only error cells,
 * "rich" when every special cell comes as an object with a type.
 */
export type ParameterKind = "plain" | "errors" | "rich" | "cancelable";

/** An error cell in the two forms that hosts send. */
export const errorCell = (code: string): unknown => ({ type: "CustomFunctionError", code });
export const richCell = (value: object): unknown => ({ value: JSON.stringify(value) });
export const richError = (code: string): unknown =>
  richCell({ type: "Error", basicType: "Error", basicValue: code });

const FLAGS: Readonly<Record<ParameterKind, number>> = { plain: 0, cancelable: 1, errors: 4, rich: 4 | 8 };

/** The numbers that the library gives to errors on their way to the cell. */
const CODES: Readonly<Record<number, string>> = {
  1: "#N/A",
  5: "#DIV/0!",
  6: "#NUM!",
  7: "#VALUE!",
  8: "#NULL!",
};

const INVOKE = 1000;
const CANCEL = 1001;
const LONGEST_WAIT = 20_000;

const LIBRARY = createRequire(import.meta.url).resolve(
  "@microsoft/office-js/dist/custom-functions-runtime.debug.js",
);
export const BUILT_FUNCTIONS = fileURLToPath(new URL("../../dist/functions.js", import.meta.url));

export function openVendorHost(bundle = BUILT_FUNCTIONS): VendorHost {
  if (!existsSync(bundle)) throw new Error(`${bundle} is missing. Run npm run build first.`);
  const waiting = new Map<number, (answer: Answer) => void>();
  const bridge = openBridge((result) => {
    const [id, ok, value, code] = result;
    waiting.get(id)?.(
      ok ? { ok, value } : { ok, code: CODES[code!] ?? `host code ${code}`, message: String(value) },
    );
    waiting.delete(id);
  });
  const context = createContext(pageAround(bridge));
  runInContext(readFileSync(LIBRARY, "utf8"), context, { filename: "custom-functions-runtime.debug.js" });
  const registered = watchAssociations(context);
  runInContext(readFileSync(bundle, "utf8"), context, { filename: "functions.js" });

  let lastId = 0;
  const callAll = (calls: readonly CallOf[]): Promise<Answer[]> => {
    const ids = calls.map(() => ++lastId);
    const answers = ids.map((id, i) => answerTo(id, calls[i][0], waiting));
    bridge.invoke(
      calls.map(([name, params, kind = "plain"], i) => [ids[i], name, params, null, FLAGS[kind], null]),
    );
    return Promise.all(answers);
  };
  return {
    registered,
    callAll,
    call: async (...call) => (await callAll([call]))[0],
    callAndCancel: async (name, params) => {
      const answers = callAll([[name, params, "cancelable"]]);
      bridge.cancel(lastId);
      return (await answers)[0];
    },
  };
}

function answerTo(id: number, name: string, waiting: Map<number, (answer: Answer) => void>): Promise<Answer> {
  return new Promise((resolve, reject) => {
    const late = setTimeout(() => reject(new Error(`${name} never reached its cell`)), LONGEST_WAIT);
    waiting.set(id, (answer) => {
      clearTimeout(late);
      resolve(answer);
    });
  });
}

/** The host answers calls by id only; which ids exist is heard where they are associated. */
function watchAssociations(context: Context): string[] {
  const { CustomFunctions } = context as { CustomFunctions: { associate(id: string, fn: unknown): void } };
  const associate = CustomFunctions.associate.bind(CustomFunctions);
  const ids: string[] = [];
  CustomFunctions.associate = (id, fn) => {
    ids.push(id);
    associate(id, fn);
  };
  return ids;
}

type Result = readonly [id: number, ok: boolean, value: unknown, code?: number];

interface Bridge {
  /** Called by the library with one request as text. */
  sendMessageToHost(text: string): void;
  /** Set by the library. */
  onMessageFromHost(text: string): void;
  invoke(messages: readonly unknown[]): void;
  cancel(invocationId: number): void;
}

/** The two ends that the library and the spreadsheet talk over. */
function openBridge(onResult: (result: Result) => void): Bridge {
  const bridge: Bridge = {
    sendMessageToHost(text) {
      const request = JSON.parse(text) as { id: number; type: number };
      for (const result of resultsIn(request)) onResult(result);
      const message = { statusCode: 200, headers: {}, body: { Results: [], TraceIds: [] } };
      setTimeout(() => bridge.onMessageFromHost(JSON.stringify({ ...request, message })), 1);
    },
    onMessageFromHost: () => undefined,
    invoke(messages) {
      const entries = messages.map((message) => [1, INVOKE, null, message, null]);
      bridge.onMessageFromHost(JSON.stringify({ type: 3, message: { entries } }));
    },
    cancel(invocationId) {
      const entries = [[1, CANCEL, null, { invocationId }, null]];
      bridge.onMessageFromHost(JSON.stringify({ type: 3, message: { entries } }));
    },
  };
  return bridge;
}

/** Results stand in the arguments of whatever actions a request carries. */
function resultsIn(request: object): Result[] {
  const { message } = request as {
    message?: { body?: { Actions?: { ArgumentInfo?: { Arguments?: unknown[] } }[] } };
  };
  const args = (message?.body?.Actions ?? []).flatMap((action) => action.ArgumentInfo?.Arguments ?? []);
  return args.filter((arg): arg is Result[] => Array.isArray(arg)).flat();
}

/** As much of a browser page as the library looks at while it starts. */
function pageAround(bridge: Bridge): object {
  const nothing = (): void => undefined;
  const element = { style: {}, setAttribute: nothing, appendChild: nothing, insertBefore: nothing };
  // the library finds its own folder by the script tag that loaded it
  const script = {
    src: "https://localhost/office/custom-functions-runtime.debug.js",
    getAttribute: () => null,
  };
  const location = new URL("https://localhost/pane.html");
  const storage = { getItem: () => null, setItem: nothing, removeItem: nothing };
  const page: Record<string, unknown> = {
    console,
    setTimeout,
    clearTimeout,
    setInterval,
    clearInterval,
    queueMicrotask,
    performance,
    AbortController,
    URL,
    TextEncoder,
    TextDecoder,
    location,
    navigator: { userAgent: "", language: "en-US" },
    document: {
      readyState: "complete",
      location,
      URL: location.href,
      cookie: "",
      getElementsByTagName: (name: string) => [name === "script" ? script : element],
      getElementById: () => null,
      createElement: () => element,
      addEventListener: nothing,
    },
    history: {},
    name: "",
    external: {},
    sessionStorage: storage,
    localStorage: storage,
    addEventListener: nothing,
    removeEventListener: nothing,
    _richApiNativeBridge: bridge,
  };
  for (const itself of ["window", "self", "top", "parent"]) page[itself] = page;
  return page;
}
