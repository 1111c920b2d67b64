import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { betaQuantile, betaTails, binomialTails } from "@/lib/reliability/special/incomplete-beta";
import { chiSquareUpper, gammaQuantile, gammaTails } from "@/lib/reliability/special/incomplete-gamma";
import { logGamma } from "@/lib/reliability/special/log-gamma";
import { normalQuantile, normalUpper } from "@/lib/reliability/special/normal";

// Reference values: sums and series in forty-digit arithmetic (mpmath 1.3.0), unless another source is named.

const relative = (value: number, truth: number) => Math.abs(value / truth - 1);

describe("the logarithm of the gamma function", () => {
  it.each([
    [0.001, 6.907178885383854],
    [0.5, 0.5723649429247001],
    [3.7, 1.4280723266653879],
    [25.5, 56.389167643719947],
    [30_000, 279_264.34428430943],
  ])("at %f is %f to 14 digits", (x, value) => expect(relative(logGamma(x), value)).toBeLessThan(1e-14));

  it("satisfies the recurrence log Γ(x + 1) = log Γ(x) + log x", () =>
    fc.assert(
      fc.property(fc.double({ min: 1e-3, max: 1e4, noNaN: true }), (x) => {
        const [above, below] = [logGamma(x + 1), logGamma(x) + Math.log(x)];
        expect(Math.abs(above - below)).toBeLessThan(1e-14 * (10 + Math.abs(above)));
      }),
    ));
});

describe("incomplete gamma", () => {
  it.each([
    [0.5, 0.1, 0.34527915398142298],
    [3.7, 1.2, 0.050597398498562509],
    [50, 30, 0.00051889146254803429],
    [1000, 1100, 0.99894067674607002],
  ])("lower tail, shape %f at %f", (shape, x, value) =>
    expect(relative(gammaTails(x, shape).lower, value)).toBeLessThan(1e-12),
  );

  it.each([
    [0.5, 20, 2.539628589470865e-10],
    [3.7, 30, 2.3916053483180657e-10],
    [50, 90, 1.6494985017178248e-6],
    [1000, 1100, 0.0010593232539299773],
  ])("upper tail, shape %f at %f", (shape, x, value) =>
    expect(relative(gammaTails(x, shape).upper, value)).toBeLessThan(1e-12),
  );

  it.each([
    [30_000, 29_500, 0.0018597541660679579],
    [30_000, 29_000, 2.6574573752766591e-9],
    [120, 80, 1.8190216415756701e-5],
  ])("at least %i events where %i are the mean: the Poisson sum", (events, mean, value) =>
    expect(relative(gammaTails(mean, events).lower, value)).toBeLessThan(1e-11),
  );

  // Standard tables of the chi-square distribution, from memory.
  it.each([
    [1, 3.841, 0.05],
    [3, 11.345, 0.01],
    [10, 18.307, 0.05],
  ])("chi-square with %i degrees beyond %f is %f", (degrees, x, p) =>
    expect(chiSquareUpper(x, degrees)).toBeCloseTo(p, 4),
  );

  it("quantiles come back to their probability in either tail", () =>
    fc.assert(
      fc.property(
        fc.double({ min: 0.1, max: 40_000, noNaN: true }),
        fc.double({ min: -12, max: -0.001, noNaN: true }),
        fc.constantFrom("lower", "upper"),
        (shape, exponent, tail) => {
          const probability = 10 ** exponent;
          const x = gammaQuantile(probability, shape, tail);
          expect(relative(gammaTails(x, shape)[tail], probability)).toBeLessThan(1e-10);
        },
      ),
    ));
});

describe("incomplete beta", () => {
  it.each([
    [600, 30_000, [0.0175, 0.9825], 0.0006517846941003297],
    [15_300, 30_000, [0.5, 0.5], 0.00027166327801320825],
    [29_990, 30_000, [0.9993, 0.0007], 0.0062375146221132339],
    [20, 30_000, [0.0001, 0.9999], 8.2764445354670141e-11],
  ] as const)("at least %i of %i: the binomial sum", (x, n, share, value) =>
    expect(relative(binomialTails(x, n, share).upper, value)).toBeLessThan(1e-10),
  );

  it("equals the sum of binomial probabilities for any small number", () =>
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 40 }),
        fc.nat(40),
        fc.double({ min: 0.001, max: 0.999, noNaN: true }),
        (n, at, share) => {
          const x = at % (n + 1);
          const choose = (k: number): number =>
            Array.from({ length: k }, (_, i) => (n - i) / (i + 1)).reduce((a, b) => a * b, 1);
          const outcomes = Array.from(
            { length: n + 1 },
            (_, k) => choose(k) * share ** k * (1 - share) ** (n - k),
          );
          const sum = (from: number, to: number): number =>
            outcomes.slice(from, to).reduce((a, b) => a + b, 0);
          const { lower, upper } = binomialTails(x, n, [share, 1 - share]);
          expect(relative(lower, sum(0, x + 1))).toBeLessThan(1e-11);
          expect(relative(upper, sum(x, n + 1))).toBeLessThan(1e-11);
        },
      ),
    ));

  it("quantiles come back to their probability in either tail", () =>
    fc.assert(
      fc.property(
        fc.double({ min: 0.5, max: 30_000, noNaN: true }),
        fc.double({ min: 0.5, max: 30_000, noNaN: true }),
        fc.double({ min: -10, max: -0.001, noNaN: true }),
        fc.constantFrom("lower", "upper"),
        (a, b, exponent, tail) => {
          const probability = 10 ** exponent;
          const found = betaTails(betaQuantile(probability, { a, b }, tail), { a, b })[tail];
          expect(relative(found, probability)).toBeLessThan(1e-9);
        },
      ),
    ));
});

describe("normal distribution", () => {
  it.each([
    [0.9, 1.28155156554460047],
    [0.95, 1.64485362695147271],
    [0.975, 1.95996398454005424],
    [0.995, 2.57582930354890076],
    [1e-7, -5.19933758219281693],
  ])("quantile at %f is %f", (probability, z) =>
    expect(relative(normalQuantile(probability), z)).toBeLessThan(1e-13),
  );

  it("quantile and upper tail are inverse, and symmetric", () =>
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 30, noNaN: true }), (z) => {
        expect(relative(-normalQuantile(normalUpper(z)), z)).toBeLessThan(1e-10);
        expect(normalUpper(-z)).toBeCloseTo(1 - normalUpper(z), 14);
      }),
    ));
});
