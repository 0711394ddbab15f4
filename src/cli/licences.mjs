import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";

/**
 * The licences of all packages that a build holds, each text once, as their owners ask.
 * @param {Iterable<string>} files  the source files of the build
 * @returns {string}
 * @throws Error naming the packages that grant nothing
 */
export function licences(files) {
  const folders = new Set([...files].flatMap((file) => packageFolder(file) ?? []));
  const packages = [...folders].map(licenceOf).sort((a, b) => a.title.localeCompare(b.title));
  const bare = packages.filter(({ text, licence }) => text === "" && licence === "");
  if (bare.length > 0)
    throw new Error(`No licence is granted by ${bare.map(({ title }) => title).join(", ")}.`);

  /** @type {Map<string, string[]>} */
  const titlesByText = new Map();
  for (const { title, licence, text } of packages) {
    const words = text === "" ? `Licence: ${licence}` : text;
    titlesByText.set(words, [...(titlesByText.get(words) ?? []), title]);
  }
  const sections = [...titlesByText].map(([text, titles]) => `${titles.join("\n")}\n\n${text}`);
  return `${["Comove contains the packages below under the licences that follow them.", ...sections].join(`\n\n${"-".repeat(72)}\n\n`)}\n`;
}

/**
 * The innermost package that a file belongs to.
 * @param {string} file
 */
function packageFolder(file) {
  return /^(.*[\\/]node_modules[\\/](?:@[^\\/]+[\\/])?[^\\/]+)[\\/]/.exec(file)?.[1];
}

/** @param {string} folder */
function licenceOf(folder) {
  /** @type {{ name: string, version: string, license?: string }} */
  const { name, version, license = "" } = JSON.parse(readFileSync(join(folder, "package.json"), "utf8"));
  const texts = readdirSync(folder)
    .filter(
      (file) => /^(licen[cs]e|notice|copying)(\.(md|txt))?$/i.test(file) && existsSync(join(folder, file)),
    )
    .sort()
    .map((file) => readFileSync(join(folder, file), "utf8").replaceAll("\r\n", "\n").trim());
  return { title: `${name} ${version}`, licence: license, text: texts.join("\n\n") };
}
