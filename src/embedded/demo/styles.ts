import {
  BorderStyleTypes,
  HorizontalAlign,
  VerticalAlign,
  WrapStrategy,
  type IStyleData,
} from "@univerjs/core";

const INK = { rgb: "#12343b" };
const MIDDLE = VerticalAlign.MIDDLE;
const { LEFT, CENTER, RIGHT } = HorizontalAlign;

export const TITLE: IStyleData = { fs: 16, bl: 1, cl: INK, vt: MIDDLE };
export const NOTE: IStyleData = { cl: { rgb: "#46606a" }, tb: WrapStrategy.WRAP, vt: VerticalAlign.TOP };
export const SECTION: IStyleData = { bl: 1, cl: { rgb: "#0b6068" }, vt: MIDDLE };
/** A formula shown as text, to be copied. */
export const SAMPLE: IStyleData = { ff: "Courier New", cl: INK, bg: { rgb: "#f2f6f6" }, vt: MIDDLE };

const head: IStyleData = { bl: 1, cl: INK, vt: MIDDLE };
export const HEAD: IStyleData = { ...head, bg: { rgb: "#dfecee" }, ht: RIGHT };
export const HEAD_LEFT: IStyleData = { ...HEAD, ht: LEFT };
export const HEAD_CENTER: IStyleData = { ...HEAD, ht: CENTER };
/** The look of what a formula fills: warm, so that it is told from what was counted. */
export const FORMULA_HEAD: IStyleData = { ...head, bg: { rgb: "#f6e3b3" }, ht: RIGHT };
export const FORMULA_HEAD_WRAPPED: IStyleData = { ...FORMULA_HEAD, fs: 10, tb: WrapStrategy.WRAP };
export const FORECAST: IStyleData = { n: { pattern: "0.0" }, bg: { rgb: "#fdf6e3" } };
export const FORECAST_MIDDLE: IStyleData = { ...FORECAST, bl: 1 };
export const FORECAST_COUNT: IStyleData = { ...FORECAST, n: { pattern: "0" } };

export const DATE: IStyleData = { n: { pattern: "yyyy-mm-dd" }, ht: LEFT, cl: { rgb: "#46606a" } };
/** For a table with many columns, and for those of its columns that only a checker reads. */
export const SMALL: IStyleData = { fs: 10 };
export const ASIDE: IStyleData = { ...SMALL, cl: { rgb: "#6b8087" } };
/** Keeps words clear of the figures on their left. */
export const INDENTED: IStyleData = { pd: { l: 10 } };
/** A line above, where another group of rows begins. */
export const RULED: IStyleData = { bd: { t: { s: BorderStyleTypes.THIN, cl: { rgb: "#a9bfc3" } } } };
export const CENTERED: IStyleData = { ht: CENTER };
export const decimals = (count: number): IStyleData => ({
  n: { pattern: count === 0 ? "0" : `0.${"0".repeat(count)}` },
});
