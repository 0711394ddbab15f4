import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { join, relative } from "node:path";
import { fileURLToPath } from "node:url";
import { parseArgs } from "node:util";
import { buildMetadata, DEVELOPMENT_URL } from "./metadata.mjs";

/**
 * npm run manifest -- --url https://host/path/
 *
 * Writes the production manifest and functions.json into dist, ready to be uploaded beside the built files.
 */

/** The add-in as people install it. It never changes: to the host another id is another add-in. */
export const PRODUCTION_ID = "6a3f3cee-aef7-48ea-adcd-9ed5e0769525";

const ROOT = fileURLToPath(new URL("../../", import.meta.url));
const EXAMPLE = "for example: npm run manifest -- --url https://example.org/comove/";

/**
 * The folder that an address names, ending in a slash.
 * @param {string | undefined} text
 * @returns {string}
 * @throws Error in plain words when no add-in can be served from there
 */
export function folderUrl(text) {
  if (text === undefined || text.trim() === "") {
    throw new Error(`Say where the add-in will be served, ${EXAMPLE}`);
  }
  const url = parsed(text.trim());
  if (url === null) throw new Error(`'${text}' is not a web address. Give a whole one, ${EXAMPLE}`);
  if (url.protocol !== "https:") {
    throw new Error(
      `'${text}' does not start with https://. The host loads add-ins over https only, ${EXAMPLE}`,
    );
  }
  if (url.search !== "" || url.hash !== "" || url.username !== "" || url.password !== "") {
    throw new Error(`'${text}' is more than a folder. Leave out ?, # and any user name, ${EXAMPLE}`);
  }
  return url.href.endsWith("/") ? url.href : `${url.href}/`;
}

/**
 * Only what is written out in full counts: the parser would also mend "https:host".
 * @param {string} text
 */
function parsed(text) {
  if (!/^[a-z][a-z\d+.-]*:\/\/[^/\s]+\S*$/i.test(text)) return null;
  return URL.canParse(text) ? new URL(text) : null;
}

/**
 * The production manifest: its own id and name, every address under the given folder, the same namespace.
 * @param {string} xml  the development manifest
 * @param {string | undefined} url  where the add-in will be served
 * @returns {string}
 */
export function productionManifest(xml, url) {
  const folder = folderUrl(url).replaceAll("&", "&amp;").replaceAll("'", "&apos;");
  return xml
    .replace(/<!--.*?-->\s*/gs, "")
    .replace(/<Id>.*?<\/Id>/, `<Id>${PRODUCTION_ID}</Id>`)
    .replace(" (development)", "")
    .replaceAll(DEVELOPMENT_URL, () => folder);
}

/**
 * Writes both files.
 * @param {readonly string[]} args  what follows the command
 * @param {string} dist  the folder of the built files
 * @returns {Promise<string>} what was done and what is next
 */
export async function writeManifest(args, dist) {
  const url = folderUrl(urlAmong(args));
  if (!existsSync(join(dist, "functions.js"))) {
    throw new Error(
      `There is no build in ${relative(ROOT, dist)} yet. Run npm run build, then this command again.`,
    );
  }
  const files = {
    "manifest.xml": productionManifest(readFileSync(join(ROOT, "manifest.xml"), "utf8"), url),
    "functions.json": `${JSON.stringify(await buildMetadata({ baseUrl: url }), null, 1)}\n`,
  };
  const written = Object.entries(files).map(([name, text]) => {
    const file = join(dist, name);
    writeFileSync(file, text);
    return relative(ROOT, file);
  });
  return [
    `Wrote ${written.join(" and ")} for ${url}`,
    `Next: upload everything in ${relative(ROOT, dist)} to ${url}, check that ${url}pane.html opens in a browser,`,
    "then hand manifest.xml to whoever installs add-ins: the administrator's page for integrated apps, or a",
    "shared folder that is a trusted catalogue. Building again puts the development files back.",
  ].join("\n");
}

/** @param {readonly string[]} args */
function urlAmong(args) {
  try {
    return parseArgs({ args: [...args], options: { url: { type: "string" } } }).values.url;
  } catch {
    throw new Error(
      `'${args.join(" ")}' was not understood. This command takes --url and an address, ${EXAMPLE}`,
    );
  }
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  try {
    console.log(await writeManifest(process.argv.slice(2), join(ROOT, "dist")));
  } catch (fault) {
    console.error(fault instanceof Error ? fault.message : fault);
    process.exitCode = 1;
  }
}
