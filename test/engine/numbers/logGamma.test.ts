import { describe, expect, test } from 'vitest';
import { logBeta } from '../../../functions/engine/numbers/logBeta';
import { logGamma } from '../../../functions/engine/numbers/logGamma';
import { regularizedBeta } from '../../../functions/engine/numbers/regularizedBeta';
import { expectRefusal, expectRelative } from './expectations';

// Reference values: mpmath at 50 digits, arguments the doubles nearest to what is written.
describe('logGamma', () => {
  test('is the logarithm of the factorial at integers', () => {
    let factorial = 1;
    for (let n = 1; n <= 20; n++) {
      if (n > 1) factorial *= n - 1;
      expectRelative(logGamma(n), Math.log(factorial), 4e-15, n); // twenty roundings at most
    }
  });

  test.each([
    [1e-10, '23.025850929882735237'],
    [0.1, '2.252712651734205902'],
    [0.5, '0.57236494292470008707'],
    [1.5, '-0.12078223763524522235'],
    [2.5, '0.28468287047291915963'],
    [3.7, '1.4280723266653881292'],
    [9.99, '12.77931521435019336'],
    [10, '12.801827480081469611'],
    [25.25, '55.585686044869429708'],
    [171.5, '709.14316303092824227'],
    [1e5, '1051287.7089736568949'],
    [1e10, '220258509288.81058147'],
  ])('of %d', (x, reference) => {
    const allowed = Math.max(3e-15, 8e-15 / Math.abs(Number(reference))); // absolute below 1: terms of size 16 cancel
    expectRelative(logGamma(x), reference, allowed);
  });

  test('refuses what is not positive and finite', () => {
    for (const x of [0, -1, NaN, Infinity]) expectRefusal(() => logGamma(x), 'domain', `logGamma needs a positive finite number, got ${x}`);
  });
});

describe('logBeta', () => {
  test.each([
    [0.25, 0.5, '1.657106516191482173'],
    [0.5, 0.5, '1.1447298858494001741'],
    [5e7, 0.5, '-8.2914018362715099943'],
    [1e6, 2.5, '-34.254095399436516102'],
    [12.5, 15, '-18.97942213420137653'],
    [1000, 3000, '-2251.7315862675189659'],
    [0.1, 0.001, '6.9175522548379124144'],
  ])('of %d and %d, in either order', (a, b, reference) => {
    expectRelative(logBeta(a, b), reference, 5e-15);
    expect(logBeta(b, a)).toBe(logBeta(a, b));
  });
});

describe('regularizedBeta', () => {
  test.each([
    [0.5, 2, 3, '0.6875'], // 11/16, closed form
    [0.1, 0.5, 0.5, '0.20483276469913345754'],
    [0.01, 0.5, 30, '0.56066563109474878862'],
    [0.3, 20, 30, '0.069987093300507363226'],
    [0.9, 4.5, 20, '0.99999999999999996863'],
    [0.25, 100, 300, '0.50768065289827085001'],
    [0.26, 1000, 3000, '0.92702395660049473009'],
    [0.999, 50, 0.5, '0.75236901996537668139'],
    [0.75, 1.5, 1.5, '0.80449889052211467904'],
    [1e-8, 0.5, 5e4, '0.025227057646383242121'],
  ])('at %d with %d and %d', (x, a, b, reference) => {
    // The power x^a (1 − x)^b magnifies the rounding of a logarithm by a + b.
    expectRelative(regularizedBeta(x, a, b), reference, 2e-14 + 2e-16 * (a + b));
  });

  test('has its closed forms: x^a for b = 1, and the binomial sum for integers', () => {
    for (const x of [0.01, 0.3, 0.77]) {
      expectRelative(regularizedBeta(x, 3.5, 1), x ** 3.5, 1e-14, x);
      const y = 1 - x;
      expectRelative(regularizedBeta(x, 2, 4), 10 * x ** 2 * y ** 3 + 10 * x ** 3 * y ** 2 + 5 * x ** 4 * y + x ** 5, 1e-14, x);
    }
  });

  test('is 0 and 1 at the ends', () => {
    expect(regularizedBeta(0, 2, 3)).toBe(0);
    expect(regularizedBeta(1, 2, 3)).toBe(1);
  });

  test('refuses arguments outside their ranges', () => {
    expectRefusal(() => regularizedBeta(-0.1, 1, 1), 'domain', 'x from 0 to 1, got -0.1');
    expectRefusal(() => regularizedBeta(NaN, 1, 1), 'domain', 'x from 0 to 1, got NaN');
    expectRefusal(() => regularizedBeta(0.5, 0, 1), 'domain', 'positive finite parameters, got 0 and 1');
    expectRefusal(() => regularizedBeta(0.5, 1, Infinity), 'domain', 'got 1 and Infinity');
  });
});
