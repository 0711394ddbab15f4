import type { BlankAs } from "./cells";
import type { HostSurroundings } from "./host-function";
import type { Grid } from "./workbook";

/** A choice for trying what older clients do: they hand over 0 for a blank cell. */
export function blankSwitch(around: HostSurroundings, { api }: Grid): HTMLElement {
  const box = document.createElement("fieldset");
  box.className = "blank-switch";
  box.innerHTML = `<legend>Blank cells arrive as</legend>
    <label><input type="radio" name="blank" value="nothing" checked> nothing</label>
    <label><input type="radio" name="blank" value="zero"> 0, as on some older clients</label>`;
  box.addEventListener("change", (event) => {
    around.blankAs = (event.target as HTMLInputElement).value as BlankAs;
    api.getFormula().executeCalculation();
  });
  return box;
}
