/** `npm start`: builds once and serves the embedded sheet on this machine only. `PORT` chooses another port. */
import { createServer } from "node:http";
import webpack from "webpack";
import configure from "../../webpack.config.js";
import { answerFromDist } from "./static-site.mjs";

const wanted = Number(process.env.PORT ?? 3000);

console.log("Building the embedded sheet …");
webpack(configure({}, { mode: "development" }), (fault, stats) => {
  if (fault) throw fault;
  if (stats.hasErrors()) {
    console.error(stats.toString({ preset: "errors-only", colors: false }));
    process.exit(1);
  }
  serve(wanted);
});

/** Listens at the port wanted, or at the next one free. */
function serve(port) {
  const server = createServer(answerFromDist);
  server.on("error", (fault) => {
    if (fault.code === "EADDRINUSE" && port < wanted + 20) serve(port + 1);
    else throw fault;
  });
  server.listen(port, "127.0.0.1", () => {
    console.log(`\n  Comove is ready: http://localhost:${port}/\n\n  Stop with Ctrl+C.`);
  });
}
