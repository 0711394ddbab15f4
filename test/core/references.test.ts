import { distributionSuite, momentSuite, varSuite } from "../support/references";
import distributions from "../reference/r-distributions.json";
import moments from "../reference/r-moments.json";
import var_ from "../reference/statsmodels-var.json";

/** The committed values; live.test.ts compares with the programs themselves. */
momentSuite(moments);
varSuite(var_);
distributionSuite(distributions);
