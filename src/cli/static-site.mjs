import { createReadStream, statSync } from "node:fs";
import { extname, join, sep } from "node:path";
import { fileURLToPath } from "node:url";

const DIST = fileURLToPath(new URL("../../dist/", import.meta.url));

/** @type {Readonly<Record<string, string>>} */
const TYPES = {
  ".html": "text/html; charset=utf-8",
  ".js": "text/javascript; charset=utf-8",
  ".css": "text/css; charset=utf-8",
  ".json": "application/json",
  ".xml": "application/xml",
  ".png": "image/png",
};

/**
 * Answers a request with a file of dist/, as any static host would.
 * @param {import("node:http").IncomingMessage} request
 * @param {import("node:http").ServerResponse} response
 * @param {string} [folder] where the files lie
 */
export function answerFromDist(request, response, folder = DIST) {
  const file = fileFor(request.url ?? "/", folder);
  if (file === null) {
    response.writeHead(404, { "Content-Type": "text/plain" }).end("There is no such page here.");
    return;
  }
  response.writeHead(200, {
    "Content-Type": TYPES[extname(file)] ?? "application/octet-stream",
    "Cache-Control": "no-store",
    "Access-Control-Allow-Origin": "*",
  });
  // a build may take the file away between the look and the reading
  createReadStream(file)
    .on("error", () => response.destroy())
    .pipe(response);
}

/**
 * The file inside the folder that an address names.
 * @param {string} address  as it stands in the request: a path, perhaps with a query, perhaps nonsense
 * @param {string} folder
 * @returns {string | null}
 */
function fileFor(address, folder) {
  const path = pathIn(address);
  if (path === null) return null;
  const file = join(folder, path.endsWith("/") ? `${path}index.html` : path);
  const inside = file.startsWith(folder.endsWith(sep) ? folder : folder + sep);
  return inside && statSync(file, { throwIfNoEntry: false })?.isFile() ? file : null;
}

/**
 * Node answers every address that reaches it, so one that cannot be decoded must not end the server.
 * @param {string} address
 * @returns {string | null}
 */
function pathIn(address) {
  try {
    const path = decodeURIComponent(address.split(/[?#]/, 1)[0]);
    return path.includes("\0") ? null : path;
  } catch {
    return null;
  }
}
