/**
 * `npm run excel`: builds, serves dist/ over https with a development certificate and side-loads the add-in. Needs
 * Excel on this machine, and the network once: the certificate and side-loading tools are fetched when first used.
 */
import { spawn, spawnSync } from "node:child_process";
import { readFileSync } from "node:fs";
import { createServer } from "node:https";
import { homedir } from "node:os";
import { join } from "node:path";
import { answerFromDist } from "./static-site.mjs";

/** Where the development manifest says that everything lies. */
const PORT = 3000;
const SIDE_LOADER = "office-addin-debugging@7";

/** Programs of npm are scripts on Windows, which only a shell can start. */
const shell = process.platform === "win32";

/**
 * @param {string} command
 * @param {string[]} args
 */
function run(command, ...args) {
  const { status } = spawnSync(command, args, { stdio: "inherit", shell });
  if (status !== 0) process.exit(status ?? 1);
}

run("npm", "run", "build");
run("npx", "--yes", "office-addin-dev-certs@2", "install");
const certificates = join(homedir(), ".office-addin-dev-certs");
const options = {
  key: readFileSync(join(certificates, "localhost.key")),
  cert: readFileSync(join(certificates, "localhost.crt")),
};

createServer(options, answerFromDist)
  .on("error", (/** @type {NodeJS.ErrnoException} */ fault) => {
    console.error(
      `Port ${PORT} cannot be used (${fault.code}). The development manifest needs it: free it and try again.`,
    );
    process.exit(1);
  })
  .listen(PORT, "127.0.0.1", () => {
    console.log(`Comove is served at https://localhost:${PORT}/ for Excel. Stop with Ctrl+C.`);
    console.log(`To take the add-in out of Excel again: npx ${SIDE_LOADER} stop manifest.xml`);
    spawn("npx", ["--yes", SIDE_LOADER, "start", "manifest.xml"], { stdio: "inherit", shell });
  });
