import { forecastAhead, type AheadRequest } from "./forecast/ahead";
import { forecastBands, type BandsRequest } from "./forecast/bands";
import { requireFinite } from "./forecast/finite";
import { responsesTo, shockShares, type ResponseRequest } from "./forecast/responses";
import { shockPast, type ShockPastRequest } from "./forecast/shock-past";
import { simulate, type SimulateRequest } from "./forecast/simulate";
import { whatIf, type WhatIfRequest } from "./forecast/what-if";
import type { Matrix } from "./matrix";
import { lagCorrelations, lagCovariances, type Divisor } from "./moments/lag-covariance";
import { applySteps, undoSteps, type StepPlan } from "./prepare/steps";
import { fitModel, settingsOf } from "./var/fit";
import { estimates } from "./var/estimates";
import { fittedLevels, residualRows } from "./var/one-step-levels";
import { grangerPValues, holm } from "./diagnostics/granger";
import { residualTests, type ResidualTestsRequest } from "./diagnostics/residual-tests";
import { partialLags } from "./moments/partial-lag";
import { leadsAndLags, type LeadLagRequest } from "./moments/lead-lag";
import { impliedCovariances } from "./moments/implied-covariance";
import type { VarModel } from "./var/model";
import { compareOrders } from "./var/order";
import { rootsOf } from "./var/roots";
import type { ModelRequest, Sample } from "./var/sample";
import type { Shape } from "./var/settings";
import { stepSample } from "./var/stepped";

/** How one task asks for another, so that a fit is computed once for all the calls that need it. */
export interface Runner {
  fit(request: ModelRequest): VarModel;
}

export interface LagRequest {
  readonly series: Matrix;
  readonly lags: readonly number[];
  readonly divisor: Divisor;
}

export interface StepsRequest {
  readonly series: Matrix;
  readonly plan: StepPlan;
}

export interface OrderRequest {
  readonly sample: Sample;
  readonly shape: Shape;
  readonly maxOrder: number;
}

/**
 * Everything the core computes, by name: the list that the engine runs, inline or in a worker.
 * Requests and results are plain data.
 */
export const tasks = {
  lagCovariance: ({ series, lags, divisor }: LagRequest) => lagCovariances(series, lags, divisor),
  lagCorrelation: ({ series, lags, divisor }: LagRequest) => lagCorrelations(series, lags, divisor),
  steps: ({ series, plan }: StepsRequest) => applySteps(series, plan),
  unstep: ({ series, plan, values }: StepsRequest & { readonly values: Matrix }) =>
    requireFinite(undoSteps(series, plan, values)),
  order: ({ sample, shape, maxOrder }: OrderRequest) =>
    compareOrders(stepSample(sample, shape.steps), shape, maxOrder),
  fit: (request: ModelRequest) => fitModel(request),
  fitted: ({ sample, plan }: ModelRequest, run: Runner) => fittedLevels(run.fit({ sample, plan }), sample),
  residuals: ({ sample, plan }: ModelRequest, run: Runner) => residualRows(run.fit({ sample, plan }), sample),
  estimates: ({ sample, plan, coverage }: ModelRequest & { readonly coverage: number }, run: Runner) =>
    estimates(run.fit({ sample, plan }), sample, coverage),
  granger: ({
    sample,
    plan,
    spare,
    adjust,
  }: ModelRequest & { readonly spare: number; readonly adjust: boolean }) => {
    const p = grangerPValues(sample, settingsOf(sample, plan), spare);
    return adjust ? holm(p) : p;
  },
  residualTests: ({ sample, plan, testLags }: ResidualTestsRequest, run: Runner) =>
    residualTests(run.fit({ sample, plan }), sample, testLags),
  partialLag: ({ series, lags }: { readonly series: Matrix; readonly lags: number }) =>
    partialLags(series, lags),
  impliedCovariance: ({ model, lags }: { readonly model: VarModel; readonly lags: number }) =>
    impliedCovariances(model, lags),
  leadLag: (request: LeadLagRequest) => leadsAndLags(request),
  roots: ({ model }: { readonly model: VarModel }) => rootsOf(model),
  ahead: (request: AheadRequest, run: Runner) => forecastAhead(request, run.fit),
  bands: (request: BandsRequest, run: Runner) => forecastBands(request, run.fit),
  whatIf: (request: WhatIfRequest, run: Runner) => whatIf(request, run.fit),
  response: (request: ResponseRequest) => responsesTo(request),
  shockShare: (request: Omit<ResponseRequest, "shock">) => shockShares(request),
  shockPast: (request: ShockPastRequest, run: Runner) => shockPast(request, run.fit),
  simulate: (request: SimulateRequest) => simulate(request),
};

export type Tasks = typeof tasks;
export type TaskName = keyof Tasks;
export type RequestOf<N extends TaskName> = Parameters<Tasks[N]>[0];
export type ResultOf<N extends TaskName> = Settled<ReturnType<Tasks[N]>>;
/** What long work comes to: it may be written as a generator that yields wherever it can be paused or given up. */
type Settled<T> = T extends Generator<unknown, infer R> ? R : T;
