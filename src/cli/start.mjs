/** `npm start`: builds once and serves the embedded sheet on this machine only. `PORT` chooses another port. */
import { createServer } from "node:http";
import { wantedPort } from "./port.mjs";
import { answerFromDist } from "./static-site.mjs";
import { build } from "./webpack-run.mjs";

const TRIES = 20;

/**
 * Listens at the port wanted, or at the next one free.
 * @param {number} port
 * @param {number} tries
 */
function serve(port, tries = TRIES) {
  const server = createServer(answerFromDist);
  server.on("error", (/** @type {NodeJS.ErrnoException} */ fault) => {
    const next = port < 65_535 && tries > 1;
    if (fault.code === "EADDRINUSE" && next) serve(port + 1, tries - 1);
    else stop(`Port ${port} cannot be used (${fault.code}). Choose another one: PORT=8080 npm start`);
  });
  server.listen(port, "127.0.0.1", () => {
    console.log(`\n  Comove is ready: http://localhost:${port}/\n\n  Stop with Ctrl+C.`);
  });
}

/** @param {string} words */
function stop(words) {
  console.error(words);
  process.exit(1);
}

const port = wantedPort(process.env["PORT"]);
if (port === null) stop(`PORT is '${process.env["PORT"]}'. It has to be a whole number from 1 to 65535.`);
else {
  console.log("Building the embedded sheet …");
  const faults = await build({ mode: "development" });
  if (faults !== "") stop(faults);
  serve(port);
}
