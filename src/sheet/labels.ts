import type { Regressor } from "../core/var/regressors";

/** Names that the rows of a table are told by. */
export interface Names {
  readonly series: readonly string[];
  readonly drivers: readonly string[];
}

/** The label of one regressor, as it stands in the first column of a model block. */
export function regressorLabel(regressor: Regressor, names: Names): string {
  switch (regressor.kind) {
    case "constant":
      return "constant";
    case "trend":
      return regressor.power === 1 ? "trend" : "trend²";
    case "season":
      return `season ${regressor.season}`;
    case "wave":
      return `wave ${regressor.wave} ${regressor.part}`;
    case "lag":
      return `${names.series[regressor.series]}, lag ${regressor.lag}`;
    case "driver":
      return names.drivers[regressor.driver];
    case "innovation":
      return `innovation of ${names.series[regressor.series]}, lag ${regressor.lag}`;
  }
}

export const covarianceLabel = (name: string): string => `innovation cov ${name}`;
