import type { Step, StepPlan } from "../core/prepare/steps";

const DIFF = /^diff(?:\s+(\d{1,6}))?$/;

/**
 * Reads lists of steps: `log, diff 12` for all series, or one list per series with bars between.
 * @returns the lists as written, or null when a word is not a step, a log or square root does not come first,
 *          or `none` stands beside other steps
 */
export function parseSteps(text: string): StepPlan | null {
  const lists = text.split("|").map(parseList);
  return lists.every((list) => list !== null) ? lists : null;
}

function parseList(text: string): Step[] | null {
  const words = text.split(",").map((word) => word.trim().toLowerCase().replace(/\s+/g, " "));
  if (words.length === 1 && (words[0] === "none" || words[0] === "")) return words[0] === "" ? null : [];
  const steps: Step[] = [];
  for (const [i, word] of words.entries()) {
    const diff = DIFF.exec(word);
    if (diff && Number(diff[1] ?? 1) >= 1) steps.push({ kind: "diff", span: Number(diff[1] ?? 1) });
    else if ((word === "log" || word === "sqrt") && i === 0) steps.push({ kind: word });
    else return null;
  }
  return steps;
}

/** One list for every series: a single list serves all. Null when the count does not fit. */
export function spreadSteps(plan: StepPlan, series: number): StepPlan | null {
  if (plan.length === 1) return Array.from({ length: series }, () => plan[0]);
  return plan.length === series ? plan : null;
}

const stepText = (step: Step): string =>
  step.kind === "diff" ? (step.span === 1 ? "diff" : `diff ${step.span}`) : step.kind;

const listText = (steps: readonly Step[]): string =>
  steps.length === 0 ? "none" : steps.map(stepText).join(", ");

/** The canonical text of a plan: one list when all series share it. */
export function formatSteps(plan: StepPlan): string {
  const lists = plan.map(listText);
  return lists.every((list) => list === lists[0]) ? lists[0] : lists.join(" | ");
}
