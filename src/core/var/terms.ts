import { zeros, type Matrix } from "../matrix";
import type { Calendar, Terms } from "./settings";

/** A deterministic regressor. */
export type TermName =
  | { readonly kind: "constant" }
  | { readonly kind: "trend"; readonly power: 1 | 2 }
  | { readonly kind: "season"; readonly season: number }
  | { readonly kind: "wave"; readonly wave: number; readonly part: "sin" | "cos" };

/** Powers of t in every equation; a term inside the long-run relations stands in all of them all the same. */
const POWERS: { readonly [T in Terms]: number } = {
  none: 0,
  constant: 1,
  "inside-constant": 1,
  trend: 2,
  "inside-trend": 2,
  quadratic: 3,
};

/** Powers of t, then season: the m deterministic regressors in block order. */
export function termNames({ terms, cycle, waves }: Calendar): TermName[] {
  const names: TermName[] = [];
  const powers = POWERS[terms];
  if (powers > 0) names.push({ kind: "constant" });
  if (powers > 1) names.push({ kind: "trend", power: 1 });
  if (powers > 2) names.push({ kind: "trend", power: 2 });
  if (cycle === null) return names;
  if (waves === null) {
    for (let season = 1; season < cycle; season++) names.push({ kind: "season", season });
    return names;
  }
  for (let wave = 1; wave <= waves; wave++) {
    // sin(πt) is zero in every row, so the last sine of an even season does not exist
    if (2 * wave !== cycle) names.push({ kind: "wave", wave, part: "sin" });
    names.push({ kind: "wave", wave, part: "cos" });
  }
  return names;
}

/** Their number m, by arithmetic alone. */
export function termCount({ terms, cycle, waves }: Calendar): number {
  const powers = POWERS[terms];
  if (cycle === null) return powers;
  return powers + (waves === null ? cycle - 1 : 2 * waves - (2 * waves === cycle ? 1 : 0));
}

/** Value of one deterministic regressor at position t (t = 1 at the first row when start is 1). */
export function termValue(name: TermName, t: number, cycle: number | null): number {
  switch (name.kind) {
    case "constant":
      return 1;
    case "trend":
      return t ** name.power;
    case "season":
      return (modulo(t - name.season, cycle!) === 0 ? 1 : 0) - 1 / cycle!;
    case "wave": {
      // the angle is reduced first so that row 10,001 of a season is exactly as precise as row 1
      const angle = (2 * Math.PI * modulo(name.wave * t, cycle!)) / cycle!;
      return name.part === "sin" ? Math.sin(angle) : Math.cos(angle);
    }
  }
}

/** The m deterministic regressors at position t. */
export function termRow(calendar: Calendar, t: number): number[] {
  return termNames(calendar).map((name) => termValue(name, t, calendar.cycle));
}

/**
 * The matrix S with d[t − j] = S·d[t] for the deterministic row d: every basis here (powers, centred
 * indicators, waves) is closed under a shift in time, which is what lets a mean be carried through lags.
 * @returns m×m
 */
export function termShift(calendar: Calendar, j: number): Matrix {
  const names = termNames(calendar);
  const shift = zeros(names.length, names.length);
  const at = (wanted: (name: TermName) => boolean) => names.findIndex(wanted);
  names.forEach((name, i) => {
    const put = (wanted: (n: TermName) => boolean, value: number) => {
      const k = at(wanted);
      if (k >= 0) shift[i][k] += value;
    };
    switch (name.kind) {
      case "constant":
        put((n) => n.kind === "constant", 1);
        break;
      case "trend": {
        // (t − j)² = t² − 2j·t + j²
        put((n) => n.kind === "trend" && n.power === name.power, 1);
        if (name.power === 2) put((n) => n.kind === "trend" && n.power === 1, -2 * j);
        put((n) => n.kind === "constant", (-j) ** name.power);
        break;
      }
      case "season": {
        // season i read j rows back is season i + j; the season left out is minus the sum of the others
        const season = modulo(name.season + j, calendar.cycle!);
        if (season === 0) names.forEach((n, k) => n.kind === "season" && (shift[i][k] = -1));
        else put((n) => n.kind === "season" && n.season === season, 1);
        break;
      }
      case "wave": {
        const angle = (2 * Math.PI * modulo(name.wave * j, calendar.cycle!)) / calendar.cycle!;
        const same = (part: "sin" | "cos") => (n: TermName) =>
          n.kind === "wave" && n.wave === name.wave && n.part === part;
        put(same(name.part), Math.cos(angle));
        if (name.part === "sin") put(same("cos"), -Math.sin(angle));
        else put(same("sin"), Math.sin(angle));
        break;
      }
    }
  });
  return shift;
}

const modulo = (a: number, b: number): number => ((a % b) + b) % b;
