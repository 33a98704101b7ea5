import { describe, expect, test } from 'vitest';
import { coverageFor, twoSigmaProbability } from '../../../functions/engine/coverage/coverageFor';
import { readCoverage } from '../../../functions/engine/coverage/readCoverage';
import { normalWithin } from '../../../functions/engine/numbers/normalCdf';
import { tWithin } from '../../../functions/engine/numbers/tCdf';
import { expectPrinted, expectRefusal, expectRelative } from '../numbers/expectations';

describe('coverageFor', () => {
  test('JCGM 100:2008, H.1.6: 99 % with 16.7 effective degrees of freedom takes 16 and gives 2.92', () => {
    const { k, p, nuUsed } = coverageFor(0.99, 16.7411489);
    expectPrinted(k, '2.92');
    expect({ p, nuUsed }).toEqual({ p: 0.99, nuUsed: 16 });
  });

  test('JCGM 100:2008, 7.2.4: 95 % with 9 gives 2.26', () => {
    expectPrinted(coverageFor(0.95, 9).k, '2.26');
  });

  test('JCGM 100:2008, G.4.1: 18.9987 truncates to 18; the printed 2.09 is that of 19, which it rounds to', () => {
    expectPrinted(coverageFor(0.95, 18.998742314268).k, '2.10');
    expectPrinted(coverageFor(0.95, 19).k, '2.09');
  });

  test('interpolates on request: H.1, 31.6581602 nm at 99 % is 91.92836372921 nm with the real 16.7411489', () => {
    const { k, nuUsed } = coverageFor(0.99, 16.74114889695, true);
    expectRelative(k * 31.658160186629, 91.92836372921, 1e-12); // digits given
    expect(nuUsed).toBe(16.74114889695);
    expectRelative(coverageFor(0.99, 16.74114889695).k * 31.658160186629, 92.466572472895, 1e-12);
  });

  test('blank is 2 from 50 on', () => {
    for (const nu of [50, 50 - 1e-9, 77.7, Infinity]) expect(coverageFor(null, nu).k).toBe(2);
    expect(coverageFor(undefined, Infinity)).toEqual({ k: 2, p: normalWithin(2), nuUsed: Infinity });
    expect(coverageFor(null, 60.9).p).toBe(tWithin(2, 60));
  });

  test('blank is t at 95.45 % below 50 (JCGM 100:2008, Table G.2)', () => {
    expectRelative(twoSigmaProbability, 0.954499736103642, 1e-15); // erf(√2)
    for (const [nu, printed] of [[1, '13.97'], [4, '2.87'], [9, '2.32'], [10.9, '2.28'], [45, '2.06']] as const) {
      const found = coverageFor(null, nu);
      expectPrinted(found.k, printed, nu);
      expect(found.p).toBe(twoSigmaProbability);
      expect(found.nuUsed).toBe(Math.floor(nu));
    }
  });

  test('a factor is kept, and its probability stated', () => {
    const found = coverageFor(3, 20);
    expect(found.k).toBe(3);
    expectRelative(found.p, tWithin(3, 20), 0);
    expectPrinted(coverageFor(1, Infinity).p * 100, '68.27'); // JCGM 100:2008, Table G.1
    expectPrinted(coverageFor(1.96, Infinity).p * 100, '95.00');
    expectPrinted(coverageFor(2, 1).p, '0.705'); // (2/π) atan 2 = 0.70483
  });

  test('below 1 degree of freedom the real number is used', () => {
    expect(coverageFor(0.9, 0.75).nuUsed).toBe(0.75);
  });

  test('refuses a coverage that is none', () => {
    expectRefusal(() => coverageFor(0, 10), 'domain', 'coverage > 0, got 0');
    expectRefusal(() => coverageFor(-2, 10), 'domain', 'coverage > 0, got -2');
    expectRefusal(() => coverageFor(NaN, 10), 'domain', 'got NaN');
    expectRefusal(() => coverageFor(95, 10), 'domain', 'got 95; for 95 % write 0.95');
    expectRefusal(() => coverageFor(2, 0), 'domain', 'degrees of freedom > 0, got 0');
  });
});

describe('readCoverage', () => {
  test('tells factor from probability', () => {
    expect(readCoverage(1, 'x')).toEqual({ k: 1 });
    expect(readCoverage(15, 'x')).toEqual({ k: 15 });
    expect(readCoverage(0.999, 'x')).toEqual({ probability: 0.999 });
  });

  test('suggests the fraction where a percentage was meant', () => {
    expectRefusal(() => readCoverage(95.45, 'x'), 'domain', 'got 95.45; for 95.45 % write 0.9545');
    expectRefusal(() => readCoverage(250, 'x'), 'domain', 'got 250; for 95 % write 0.95');
    expectRefusal(() => readCoverage(Infinity, 'x'), 'domain', 'got Infinity');
  });
});
