/** `npm run build [-- --self-hosted]`: the static site in dist/; self-hosted, with a copy of the vendor's office.js. */
import { build } from "./webpack-run.mjs";

const given = process.argv.slice(2);
const unknown = given.filter((argument) => argument !== "--self-hosted");
const selfHosted = given.includes("--self-hosted");

const faults =
  unknown.length > 0
    ? `npm run build takes --self-hosted and nothing else; it was given ${unknown.join(" ")}.`
    : await build({ mode: "production", selfHosted });
if (faults === "") console.log(`dist/ is built${selfHosted ? ", with office.js inside it" : ""}.`);
else {
  console.error(faults);
  process.exitCode = 1;
}
