import { readFileSync } from "node:fs";

const folder = new URL("../reference/data/", import.meta.url);

/** Columns of a data file by heading. Provenance of every file: test/reference/data/SOURCES.md. */
export function readCsv(file: string, columns: readonly string[]): number[][] {
  const [header, ...lines] = readFileSync(new URL(file, folder), "utf8").trim().split(/\r?\n/);
  const names = header.split(",").map((name) => name.replaceAll('"', ""));
  const at = columns.map((column) => names.indexOf(column));
  return lines.map((line) => {
    const cells = line.split(",").map((cell) => cell.replaceAll('"', ""));
    return at.map((i) => (cells[i] === "NA" ? NaN : Number(cells[i])));
  });
}

export const readText = (file: string): string => readFileSync(new URL(file, folder), "utf8");
