import { Issue } from "../issue";
import { cholesky } from "../linalg";
import type { Matrix } from "../matrix";
import type { VarModel } from "./model";

/**
 * Lower Cholesky factor of the innovation covariance.
 * @throws Issue "covariance-asymmetric" (in an edited block) | "covariance-not-positive"
 */
export function innovationRoot({ noiseCovariance: sigma }: VarModel): Matrix {
  for (let i = 0; i < sigma.length; i++) {
    for (let j = 0; j < i; j++) {
      const scale = Math.sqrt(Math.abs(sigma[i][i] * sigma[j][j]));
      // a pasted block keeps some nine digits: more difference than that is an edit of one side only
      if (Math.abs(sigma[i][j] - sigma[j][i]) > 1e-9 * scale)
        throw new Issue({ code: "covariance-asymmetric", row: i, column: j });
    }
  }
  const root = cholesky(sigma);
  if (root === null) throw new Issue({ code: "covariance-not-positive" });
  return root;
}
