import { readdirSync } from "node:fs";

const folder = new URL("../../src/functions/", import.meta.url);

/** Modules that do something when they are loaded, rather than declare sheet functions. */
const NO_WRAPPERS = ["answer.ts", "register.ts"];

const modules = await Promise.all(
  readdirSync(folder)
    .filter((file) => file.endsWith(".ts") && !NO_WRAPPERS.includes(file))
    .map((file) => import(new URL(file, folder).href) as Promise<Record<string, SheetFunction>>),
);

type SheetFunction = (...args: readonly unknown[]) => unknown;

/** Every sheet function by its id, found by itself: all that the wrapper modules export. */
export const wrappers = new Map(modules.flatMap((exported) => Object.entries(exported)));
