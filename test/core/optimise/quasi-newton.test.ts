import { describe, expect, it } from "vitest";
import { minimise } from "../../../src/core/optimise/quasi-newton";
import { close } from "../../support/close";

const point = (...x: number[]) => Float64Array.from(x);

describe("the lowest point", () => {
  it("of a parabola that curves by one in every direction is found in one step", () => {
    const found = minimise(
      ([x, y]) => ({ value: 3 + ((x - 1) ** 2 + (y + 2) ** 2) / 2, gradient: point(x - 1, y + 2) }),
      point(0, 0),
    );
    close([...found.point], [1, -2]);
    expect(found.steps).toBe(1);
  });

  it("of Rosenbrock's valley is found from its usual start (Rosenbrock 1960)", () => {
    const found = minimise(
      ([x, y]) => ({
        value: 100 * (y - x * x) ** 2 + (1 - x) ** 2,
        gradient: point(-400 * x * (y - x * x) - 2 * (1 - x), 200 * (y - x * x)),
      }),
      point(-1.2, 1),
    );
    close([...found.point], [1, 1], { rtol: 1e-6 });
  });

  it("is looked for within the domain", () => {
    const found = minimise(
      ([x]) => (x <= 0 ? null : { value: x - Math.log(x), gradient: point(1 - 1 / x) }),
      point(8),
    );
    close([...found.point], [1], { rtol: 1e-6 });
  });

  it("that does not exist is not claimed", () => {
    const found = minimise(
      ([x]) => ({ value: Math.exp(-x / 100), gradient: point(-Math.exp(-x / 100) / 100) }),
      point(0),
    );
    expect(found.decrement).toBeGreaterThan(0);
    expect(found.steps).toBeGreaterThan(0);
  });

  it("comes out the same every time, and leaves the start alone", () => {
    const start = point(3, -1, 2);
    const run = () =>
      minimise(
        (x) => ({
          value: x.reduce((sum, v, i) => sum + (i + 1) * v ** 4 + v, 0),
          gradient: x.map((v, i) => 4 * (i + 1) * v ** 3 + 1),
        }),
        start,
      );
    expect(run()).toEqual(run());
    expect([...start]).toEqual([3, -1, 2]);
  });
});
