import { readdirSync, readFileSync } from "node:fs";
import { join, relative } from "node:path";
import { fileURLToPath } from "node:url";
import generator from "custom-functions-metadata";

/** Where the add-in is served while it is being developed; the addresses in the sources start with it. */
export const DEVELOPMENT_URL = "https://localhost:3000/";

const ROOT = fileURLToPath(new URL("../../", import.meta.url));
const FUNCTIONS = fileURLToPath(new URL("../functions/", import.meta.url));

/**
 * @typedef {import("custom-functions-metadata").ICustomFunctionsMetadata} Generated
 * @typedef {Pick<Generated, "functions"> & { allowErrorForDataTypeAny: true }} Metadata
 */

/**
 * The functions.json of the add-in, made from the comments over the sheet functions.
 * @param {object} where
 * @param {string} where.baseUrl  the folder that serves the add-in, ending in a slash
 * @param {string} [where.sources]  the folder of the sheet functions
 * @returns {Promise<Metadata>}
 * @throws Error when the generator complains, an id occurs twice or a declared function is missing
 */
export async function buildMetadata({ baseUrl, sources = FUNCTIONS }) {
  const files = wrapperFiles(sources);
  const { metadataJson, errors } = await generator.generateCustomFunctionsMetadata(files);
  const { functions = [], ...rest } = /** @type {Partial<Generated>} */ (
    metadataJson === "" ? {} : JSON.parse(metadataJson)
  );
  const ids = functions.map(({ id }) => id);
  refuse([...errors, ...repeated(ids), ...skipped(files, ids)]);
  return {
    ...rest,
    // without this flag a range that holds an error cell never reaches a function; the generator cannot emit it
    allowErrorForDataTypeAny: true,
    functions: functions.map((entry) => ({ ...entry, ...movedHelp(entry, baseUrl) })),
  };
}

/**
 * The sources that declare sheet functions, in the order of their names.
 * @param {string} folder
 */
function wrapperFiles(folder) {
  return readdirSync(folder)
    .filter((name) => name.endsWith(".ts"))
    .sort()
    .map((name) => join(folder, name))
    .filter((file) => readFileSync(file, "utf8").includes("@customfunction"));
}

/**
 * The generator lets one id stand in two files.
 * @param {readonly string[]} ids
 */
function repeated(ids) {
  const again = ids.filter((id, i) => ids.indexOf(id) !== i);
  return [...new Set(again)].map((id) => `The id ${id} is declared more than once.`);
}

/**
 * The generator passes silently over anything that is not a top-level function declaration.
 * @param {readonly string[]} files
 * @param {readonly string[]} ids
 */
function skipped(files, ids) {
  return files.flatMap((file) =>
    [...readFileSync(file, "utf8").matchAll(/@customfunction[ \t]+([\w.]+)/gi)]
      .map(([, id]) => id)
      .filter((id) => !ids.includes(id))
      .map((id) => `${id} in ${relative(ROOT, file)} is declared but is not a top-level function.`),
  );
}

/** @param {readonly string[]} faults */
function refuse(faults) {
  if (faults.length > 0) throw new Error(`functions.json cannot be made:\n- ${faults.join("\n- ")}`);
}

/**
 * The address of help has to be absolute, so it moves with the place that serves the add-in.
 * @param {{ helpUrl?: string }} entry
 * @param {string} baseUrl
 */
function movedHelp({ helpUrl }, baseUrl) {
  if (!helpUrl?.startsWith(DEVELOPMENT_URL)) return {};
  return { helpUrl: baseUrl + helpUrl.slice(DEVELOPMENT_URL.length) };
}
