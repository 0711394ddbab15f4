import { Issue } from "../issue";
import { isFiniteMatrix, type Matrix } from "../matrix";

/** Numbers that ran out of range are refused here: further on, one that is none would look like a blank. @throws Issue "too-large" */
export function requireFinite<M extends Matrix>(x: M): M {
  if (!isFiniteMatrix(x)) throw new Issue({ code: "too-large" });
  return x;
}
