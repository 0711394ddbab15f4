import { examples, examplesStand } from "./examples.mjs";
import { introduction } from "./introduction.mjs";
import { style } from "./style.mjs";

/**
 * @typedef {{ name: string, description?: string, optional?: boolean }} Parameter
 * @typedef {{ id: string, description?: string, parameters: Parameter[] }} SheetFunction
 */

/**
 * The help page: a hand-written introduction, then one section per function made from functions.json.
 * @param {{ functions: SheetFunction[] }} metadata
 * @returns {string} a whole HTML document without scripts or outside resources
 */
export function helpPage({ functions }) {
  const sorted = [...functions].sort((a, b) => a.id.localeCompare(b.id));
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>Comove help</title>
<style>${style}</style>
</head>
<body>
<main>
${introduction}
<h2 id="functions">The functions</h2>
<p>${examplesStand}</p>
<nav>${sorted.map(({ id }) => `<a href="#${id}">${id}</a>`).join(" ")}</nav>
${sorted.map(section).join("\n")}
</main>
</body>
</html>
`;
}

/** @param {SheetFunction} entry */
function section({ id, description, parameters }) {
  const signature = parameters.map(({ name, optional }) => (optional ? `[${name}]` : name)).join(", ");
  const rows = parameters.map(
    ({ name, description: words, optional }) =>
      `<tr><th scope="row">${name}</th><td>${escaped(words)}${optional ? " May be left out." : ""}</td></tr>`,
  );
  return `<section id="${id}">
<h3>COMOVE.${id}(${signature})</h3>
<p>${escaped(description)}</p>
<table>${rows.join("")}</table>
${(examples[id] ?? []).map(({ formula, says }) => `<p><code>${escaped(formula)}</code><br>${escaped(says)}</p>`).join("\n")}
</section>`;
}

/** @param {string | undefined} text */
const escaped = (text = "") => text.replace(/&/g, "&amp;").replace(/</g, "&lt;").replace(/>/g, "&gt;");
