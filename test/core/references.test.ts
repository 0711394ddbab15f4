import { distributionSuite, momentSuite, varSuite } from "../support/references";
import { arimaSuite, likelihoodSuite, vecmSuite } from "../support/likelihood-references";
import arima from "../reference/r-arima.json";
import distributions from "../reference/r-distributions.json";
import moments from "../reference/r-moments.json";
import likelihood from "../reference/statsmodels-likelihood.json";
import var_ from "../reference/statsmodels-var.json";
import vecm from "../reference/statsmodels-vecm.json";

/** The committed values; live.test.ts compares with the programs themselves. */
momentSuite(moments);
varSuite(var_);
distributionSuite(distributions);
arimaSuite(arima);
likelihoodSuite(likelihood);
vecmSuite(vecm);
