/** Size of the drawing in its own units; the style sheet stretches it to the width there is. */
const WIDTH = 200;
const HEIGHT = 28;
const MARGIN = 2;

/** The line of a series as an SVG path; what is not a number breaks it. */
export function sparklinePath(values: readonly number[]): string {
  const numbers = values.filter(Number.isFinite);
  if (numbers.length === 0) return "";
  const low = numbers.reduce((a, b) => Math.min(a, b));
  const high = numbers.reduce((a, b) => Math.max(a, b));
  const x = (t: number) => (values.length === 1 ? WIDTH / 2 : (t / (values.length - 1)) * WIDTH);
  // a series that never changes runs along the middle
  const share = (value: number) => (high === low ? 0.5 : (value - low) / (high - low));
  const y = (value: number) => HEIGHT - MARGIN - share(value) * (HEIGHT - 2 * MARGIN);
  return values
    .map((value, t) => {
      if (!Number.isFinite(value)) return "";
      const joined = t > 0 && Number.isFinite(values[t - 1]);
      return `${joined ? "L" : "M"}${x(t).toFixed(1)} ${y(value).toFixed(1)}`;
    })
    .join("");
}

/** A small picture of a series, for the eye only: the numbers stand in the sheet. */
export function sparkline(values: readonly number[]): SVGSVGElement {
  const namespace = "http://www.w3.org/2000/svg";
  const svg = document.createElementNS(namespace, "svg");
  svg.setAttribute("viewBox", `0 0 ${WIDTH} ${HEIGHT}`);
  svg.setAttribute("preserveAspectRatio", "none");
  svg.setAttribute("class", "sparkline");
  svg.setAttribute("aria-hidden", "true");
  const path = document.createElementNS(namespace, "path");
  path.setAttribute("d", sparklinePath(values));
  svg.append(path);
  return svg;
}
