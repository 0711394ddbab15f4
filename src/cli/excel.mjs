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

/**
 * @param {string} command
 * @param {string[]} args
 */
const run = (command, ...args) => {
  const { status } = spawnSync(command, args, { stdio: "inherit", shell: process.platform === "win32" });
  if (status !== 0) process.exit(status ?? 1);
};

run("npm", "run", "build");
run("npx", "--yes", "office-addin-dev-certs@2", "install");
const certificates = join(homedir(), ".office-addin-dev-certs");
const options = {
  key: readFileSync(join(certificates, "localhost.key")),
  cert: readFileSync(join(certificates, "localhost.crt")),
};
createServer(options, answerFromDist).listen(3000, () => {
  console.log("Comove is served at https://localhost:3000/ for Excel. Stop with Ctrl+C.");
  spawn("npx", ["--yes", "office-addin-debugging@7", "start", "manifest.xml"], {
    stdio: "inherit",
    shell: process.platform === "win32",
  });
});
