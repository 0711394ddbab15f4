import { describe, expect, it } from "vitest";
import { normalTwoSided } from "../../../src/core/distributions";
import { lagCorrelations } from "../../../src/core/moments/lag-covariance";
import { leadsAndLags, type Lead } from "../../../src/core/moments/lead-lag";
import type { Matrix } from "../../../src/core/matrix";
import { randomSource } from "../../../src/core/random";
import { close } from "../../support/close";
import { frozen } from "../../support/frozen";
import { inventedSeries } from "../../support/invented";

const of = (leads: readonly Lead[], leader: number, follower: number) =>
  leads.find((lead) => lead.leader === leader && lead.follower === follower)!;

describe("four rows by hand, too few for a memory of their own", () => {
  // the second series is the first one row later
  const leads = leadsAndLags({ series: frozen([[1, 0], [0, 1], [-1, 0], [0, -1]]), lags: 1 }); // prettier-ignore
  const shidak = (p: number) => 1 - (1 - p) ** 2;

  it("the first leads by one row with correlation 2/4 over 2/4, three rows in the sum", () => {
    const { lag, correlation, p, bound } = of(leads, 0, 1);
    expect(lag).toBe(1);
    close(correlation, 1, { rtol: 1e-15 });
    close(p, shidak(normalTwoSided(Math.sqrt(3))), { rtol: 1e-13 });
    close(shidak(normalTwoSided(bound * Math.sqrt(3))), 0.05, { rtol: 1e-12 });
  });

  it("the other way round it is −1/4 over 2/4", () => {
    const { lag, correlation, p } = of(leads, 1, 0);
    expect(lag).toBe(1);
    close(correlation, -0.5, { rtol: 1e-15 });
    close(p, shidak(normalTwoSided(0.5 * Math.sqrt(3))), { rtol: 1e-13 });
  });

  it("the smaller p-value stands first", () => expect(leads[0].leader).toBe(0));
});

/** The leader remembers itself strongly; the second follows it by `by` rows with a sign; the third is alone. */
function ledBy(by: number, sign: number, seed: number): Matrix {
  const { normal } = randomSource(seed);
  const rows = 300;
  const leader: number[] = [];
  for (let t = 0; t < rows + 20; t++)
    leader.push(0.9 * (leader[t - 1] ?? 0) - 0.2 * (leader[t - 2] ?? 0) + normal());
  return Array.from({ length: rows }, (_, t) => [
    50 + leader[t + 20],
    3 + sign * leader[t + 20 - by] + normal(),
    normal(),
  ]);
}

describe("invented series with a known lead", () => {
  it.each([[0, 1], [1, 1], [2, -1], [5, 1], [5, -1]])("%i rows, sign %i", (by, sign) => {
    const leads = leadsAndLags({ series: frozen(ledBy(by, sign, 40 + by)), lags: 8 });
    const { lag, correlation, p, bound } = of(leads, 0, 1);
    expect(lag).toBe(by);
    expect(Math.sign(correlation)).toBe(sign);
    expect(p).toBeLessThan(1e-10);
    expect(Math.abs(correlation)).toBeGreaterThan(bound);
    // the series alone neither leads nor follows beyond the one in twenty that chance allows each pair
    for (const pair of [of(leads, 2, 0), of(leads, 0, 2), of(leads, 1, 2), of(leads, 2, 1)])
      expect(pair.p).toBeGreaterThan(0.01);
  }); // prettier-ignore

  it("two strong memories that have nothing to do with each other show no lead, though their plain correlations do", () => {
    let plain = 0;
    let white = 0;
    for (let seed = 1; seed <= 60; seed++) {
      const a = ledBy(3, 1, 1000 + seed);
      const b = ledBy(3, 1, 5000 + seed);
      const series = a.map((row, t) => [row[0], b[t][0]]);
      const raw = lagCorrelations(series, [0, 1, 2, 3, 4]).map((rho) => Math.abs(rho[1][0]));
      const { bound, p } = of(leadsAndLags({ series, lags: 4 }), 0, 1);
      if (Math.max(...raw) > bound) plain++;
      if (p < 0.05) white++;
    }
    // of 60 some 3 are due; nine or more have a chance of 0.3 %
    expect(white).toBeLessThan(9);
    expect(plain).toBeGreaterThan(12);
  });
});

describe("identities", () => {
  const series = frozen(inventedSeries(120, 3));
  const leads = leadsAndLags({ series, lags: 6 });

  it("every ordered pair once, p-values rising, lags within reach", () => {
    expect(new Set(leads.map(({ leader, follower }) => `${leader} ${follower}`)).size).toBe(6);
    leads.slice(1).forEach((lead, i) => expect(lead.p).toBeGreaterThanOrEqual(leads[i].p));
    leads.forEach(({ lag, p, bound, correlation }) => {
      expect(lag >= 0 && lag <= 6 && p >= 0 && p <= 1).toBe(true);
      expect(Math.abs(correlation) > bound).toBe(p < 0.05);
    });
  });

  it("units and offsets do not matter", () => {
    const other = leadsAndLags({ series: series.map(([a, b, c]) => [a * 1e6 - 5, b / 300, 4 - c]), lags: 6 });
    for (const { leader, follower, lag, correlation, p } of leads) {
      const found = of(other, leader, follower);
      expect(found.lag).toBe(lag);
      const turned = (leader === 2) !== (follower === 2) ? -1 : 1;
      close(found.correlation, turned * correlation, { rtol: 1e-8 });
      close(found.p, p, { rtol: 1e-6 });
    }
  });

  it("follows the series when these change places", () => {
    const turned = leadsAndLags({ series: series.map(([a, b, c]) => [c, a, b]), lags: 6 });
    for (const { leader, follower, correlation } of leads)
      close(of(turned, (leader + 1) % 3, (follower + 1) % 3).correlation, correlation, { rtol: 1e-9 });
  });
});

describe("what cannot be looked at", () => {
  const codeOf = (series: Matrix, lags: number) => {
    try {
      leadsAndLags({ series, lags });
      return "none";
    } catch (thrown) {
      return (thrown as { facts: { code: string } }).facts;
    }
  };
  const series = inventedSeries(60, 3);
  it("one series", () => expect(codeOf(series.map(([a]) => [a]), 3)).toEqual({ code: "needs-two-series" })); // prettier-ignore
  it("a constant", () =>
    expect(codeOf(series.map(([a, b]) => [a, b, 4]), 3)).toEqual({ code: "constant-series", series: 2 })); // prettier-ignore
  it("lags beyond the rows that are left", () =>
    expect(codeOf(series, 59)).toMatchObject({ code: "lags-beyond-rows", lag: 59 }));
  it("a series that its own past foretells exactly", () =>
    expect(codeOf(series.map(([a], t) => [a, t]), 3)).toMatchObject({ code: "predicted-exactly" })); // prettier-ignore
  it("millions of looks", () =>
    expect(codeOf(inventedSeries(2000, 12), 900)).toMatchObject({ code: "too-many-looks" }));
});
