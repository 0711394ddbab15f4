import { pageWords as words } from "../texts/en/page";
import type { BlankAs } from "./cells";
import type { HostSurroundings } from "./host-function";
import type { Grid } from "./workbook";

/** A choice for trying what older clients do: they hand over 0 for a blank cell. */
export function blankSwitch(around: HostSurroundings, { api }: Grid): HTMLElement {
  const box = document.createElement("fieldset");
  box.className = "blank-switch";
  const title = Object.assign(document.createElement("legend"), { textContent: words.blanksTitle });
  box.append(title, choice("nothing", words.blanksNothing, true), choice("zero", words.blanksZero, false));
  box.addEventListener("change", (event) => {
    around.blankAs = (event.target as HTMLInputElement).value as BlankAs;
    api.getFormula().executeCalculation();
  });
  return box;
}

function choice(value: BlankAs, text: string, checked: boolean): HTMLElement {
  const label = document.createElement("label");
  label.append(
    Object.assign(document.createElement("input"), { type: "radio", name: "blank", value, checked }),
    text,
  );
  return label;
}
