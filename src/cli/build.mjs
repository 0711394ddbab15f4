/** `npm run build [-- --self-hosted]`: the static site in dist/; self-hosted, with a copy of the vendor's office.js. */
import webpack from "webpack";
import configure from "../../webpack.config.js";

const unknown = process.argv.slice(2).filter((argument) => argument !== "--self-hosted");
if (unknown.length > 0) {
  console.error(`npm run build takes --self-hosted and nothing else; it was given ${unknown.join(" ")}.`);
  process.exit(1);
}
const selfHosted = process.argv.includes("--self-hosted");
webpack(configure({ selfHosted }, { mode: "production" }), (fault, stats) => {
  if (fault) throw fault;
  const report = stats.toString({ preset: "errors-warnings", colors: false });
  if (report.trim() !== "") console.log(report);
  if (stats.hasErrors()) process.exit(1);
  console.log(`dist/ is built${selfHosted ? ", with office.js inside it" : ""}.`);
});
