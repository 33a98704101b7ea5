import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  formatAll,
  formatPlaces,
  formatSteps,
  leadingPlace,
  roundToDigits,
  roundToPlace,
  roundToSteps,
  worksheetDigits,
} from '../../../functions/engine/numbers/decimal';
import type { RoundingRule } from '../../../functions/engine/numbers/decimal';
import { excelRound } from '../../../functions/engine/numbers/excelRound';
import { expectRefusal } from './expectations';

const rules: RoundingRule[] = ['even', 'halfUp', 'ceiling', 'floor'];
const anyNumber = fc.double({ min: -1e308, max: 1e308, noNaN: true });

describe('worksheetDigits', () => {
  test('gives an entry back', () => {
    expect(worksheetDigits(0.285)).toEqual({ sign: 1, digits: '285', exponent: -3 });
    expect(worksheetDigits(-1200)).toEqual({ sign: -1, digits: '12', exponent: 2 });
    expect(worksheetDigits(0.1 + 0.2)).toEqual({ sign: 1, digits: '3', exponent: -1 });
    expect(worksheetDigits(1e300)).toEqual({ sign: 1, digits: '1', exponent: 300 });
    expect(worksheetDigits(5e-324).exponent).toBe(-338); // 4.94065645841247e-324: 15 digits, not the one that was typed
    expect(worksheetDigits(-0)).toEqual({ sign: 0, digits: '0', exponent: 0 });
  });

  test('is the number itself for every entry of up to 15 digits', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 999_999_999_999_999 }), fc.integer({ min: -290, max: 290 }), (n, e) => {
        const { sign, digits, exponent } = worksheetDigits(Number(`-${n}e${e}`));
        expect(sign).toBe(-1);
        expect(digits + '0'.repeat(exponent - e)).toBe(String(n));
      }),
      { seed: 41, numRuns: 1000 },
    );
  });

  test('refuses what is not finite', () => {
    for (const x of [NaN, Infinity]) expectRefusal(() => worksheetDigits(x), 'domain', `a finite number, got ${x}`);
  });
});

describe('roundToPlace', () => {
  // ISO 80000-1:2009, annex B: number, place, rounded by rule A (even), by rule B (up). B.4: 12.254 in one step.
  test.each([
    [12.223, -1, 12.2, 12.2],
    [12.251, -1, 12.3, 12.3],
    [12.275, -1, 12.3, 12.3],
    [1222.3, 1, 1220, 1220],
    [1225.1, 1, 1230, 1230],
    [1227.5, 1, 1230, 1230],
    [12.25, -1, 12.2, 12.3],
    [12.35, -1, 12.4, 12.4],
    [1225, 1, 1220, 1230],
    [1235, 1, 1240, 1240],
    [12.254, -1, 12.3, 12.3],
  ])('ISO 80000-1, annex B: %d to 10^%d', (x, place, even, halfUp) => {
    expect(roundToPlace(x, place, 'even')).toBe(even);
    expect(roundToPlace(x, place, 'halfUp')).toBe(halfUp);
    expect(roundToPlace(-x, place, 'even')).toBe(-even);
    expect(roundToPlace(-x, place, 'halfUp')).toBe(-halfUp);
  });

  // ASTM E29, examples of the rounding method
  test.each([
    [59940, 2, 59900],
    [59950, 2, 60000],
    [59960, 2, 60000],
    [56.4, 0, 56],
    [56.5, 0, 56],
    [56.6, 0, 57],
    [40.4, 0, 40],
    [40.5, 0, 40],
    [40.6, 0, 41],
    [0.54, -1, 0.5],
    [0.55, -1, 0.6],
    [0.56, -1, 0.6],
  ])('ASTM E29: %d to 10^%d', (x, place, rounded) => expect(roundToPlace(x, place, 'even')).toBe(rounded));

  test('takes ties as they were entered, not as they are stored', () => {
    expect(roundToPlace(0.285, -2, 'even')).toBe(0.28); // stored below the tie
    expect(roundToPlace(0.285, -2, 'halfUp')).toBe(0.29);
    expect(roundToPlace(2.675, -2, 'even')).toBe(2.68); // stored below the tie
    expect(roundToPlace(4.35, -1, 'even')).toBe(4.4); // stored below the tie
    expect(roundToPlace(1.1 * 1.1, -2, 'ceiling')).toBe(1.21); // 1.2100000000000002 shows 1.21
    expect(roundToPlace(0.1 + 0.2, -1, 'ceiling')).toBe(0.3);
  });

  test('rounds away and towards zero by magnitude', () => {
    expect(roundToPlace(10.01, 0, 'ceiling')).toBe(11);
    expect(roundToPlace(-10.01, 0, 'ceiling')).toBe(-11);
    expect(roundToPlace(10.99, 0, 'floor')).toBe(10);
    expect(roundToPlace(-10.99, 0, 'floor')).toBe(-10);
  });

  test('reaches the ends of the range', () => {
    expect(roundToPlace(1e300, -5, 'even')).toBe(1e300);
    expect(roundToPlace(1e-300, -5, 'even')).toBe(0);
    expect(roundToPlace(1e-300, -5, 'ceiling')).toBe(1e-5);
    expect(roundToPlace(1.5e-300, -300, 'even')).toBe(2e-300);
    expect(roundToPlace(5, 1, 'even')).toBe(0);
    expect(roundToPlace(5, 1, 'halfUp')).toBe(10);
    expect(roundToPlace(6, 1, 'even')).toBe(10);
    expect(roundToPlace(6, 2, 'even')).toBe(0);
    expect(roundToPlace(1, 1e6, 'halfUp')).toBe(0);
    expect(roundToPlace(Math.PI, -1e6, 'even')).toBe(Math.PI);
    for (const rule of rules) expect(Object.is(roundToPlace(-0, 3, rule), 0)).toBe(true);
    expect(Object.is(roundToPlace(-0.2, 0, 'even'), 0)).toBe(true);
    expectRefusal(() => roundToPlace(1, 309, 'ceiling'), 'notFinite', 'too large');
    expectRefusal(() => roundToPlace(1, 1e6, 'ceiling'), 'notFinite', 'too large');
    expectRefusal(() => roundToPlace(1, 0.5, 'even'), 'domain', 'whole number as place, got 0.5');
    expectRefusal(() => roundToPlace(Infinity, 0, 'even'), 'domain', 'finite number, got Infinity');
  });

  test('returns a number whose last digits lie beyond the 15 shown as it is', () => {
    expect(roundToPlace(0.1 + 0.2, -17, 'even')).toBe(0.1 + 0.2);
    expect(roundToPlace(0.1 + 0.2, -15, 'even')).toBe(0.3);
  });

  test('is idempotent, odd, and as near as its rule says', () => {
    fc.assert(
      fc.property(fc.integer({ min: -9_999_999, max: 9_999_999 }), fc.integer({ min: 0, max: 7 }), fc.constantFrom(...rules), (n, drop, rule) => {
        // Whole numbers make the law exact: n/1000 rounded at 10^(drop − 3) is n rounded to a multiple of 10^drop.
        const rounded = roundToPlace(n / 1000, drop - 3, rule);
        expect(roundToPlace(rounded, drop - 3, rule)).toBe(rounded);
        expect(roundToPlace(-n / 1000, drop - 3, rule)).toBe(0 - rounded);
        const step = 10 ** drop;
        const off = Math.round(rounded * 1000) - n;
        expect((n + off) % step === 0).toBe(true);
        const outward = n < 0 ? -off : off;
        if (rule === 'ceiling') expect(outward >= 0 && outward < step).toBe(true);
        else if (rule === 'floor') expect(outward <= 0 && -outward < step).toBe(true);
        else expect(2 * Math.abs(off) <= step).toBe(true);
        if (2 * Math.abs(off) === step && rule === 'even') expect(Math.abs((n + off) / step) % 2).toBe(0);
        if (2 * Math.abs(off) === step && rule === 'halfUp') expect(outward > 0).toBe(true);
      }),
      { seed: 42, numRuns: 3000 },
    );
  });
});

describe('roundToDigits', () => {
  test('rounds to significant figures', () => {
    expect(roundToDigits(0.0996, 2, 'even')).toBe(0.1);
    expect(roundToDigits(123450, 4, 'even')).toBe(123400);
    expect(roundToDigits(123450, 4, 'halfUp')).toBe(123500);
    expect(roundToDigits(-9.96, 2, 'even')).toBe(-10);
    expect(roundToDigits(0, 3, 'even')).toBe(0);
    expect(roundToDigits(2 / 3, 400, 'even')).toBe(2 / 3);
  });

  test('refuses fewer than one figure', () => {
    expectRefusal(() => roundToDigits(1, 0, 'even'), 'domain', 'at least 1 figure, got 0');
    expectRefusal(() => roundToDigits(1, 1.5, 'even'), 'domain', 'whole number as figures, got 1.5');
  });
});

describe('leadingPlace', () => {
  test('is the place of the first digit that shows', () => {
    expect(leadingPlace(12.3)).toBe(1);
    expect(leadingPlace(-0.05)).toBe(-2);
    expect(leadingPlace(0.9999999999999999)).toBe(0); // shows as 1
    expectRefusal(() => leadingPlace(0), 'domain', 'other than 0');
  });
});

describe('formatPlaces', () => {
  test('keeps trailing zeros and never uses an exponent', () => {
    expect(formatPlaces(12.1, 2)).toBe('12.10');
    expect(formatPlaces(0, 3)).toBe('0.000');
    expect(formatPlaces(1e-7, 8)).toBe('0.00000010');
    expect(formatPlaces(1e21, 1)).toBe('1000000000000000000000.0');
    expect(formatPlaces(-0.5, 1)).toBe('-0.5');
    expect(formatPlaces(1234, -1)).toBe('1230');
    expect(formatPlaces(1e300, 0)).toBe('1' + '0'.repeat(300));
  });

  test('rounds in decimal, half to even unless told', () => {
    expect(formatPlaces(2.675, 2)).toBe('2.68');
    expect(formatPlaces(0.285, 2)).toBe('0.28');
    expect(formatPlaces(0.285, 2, 'halfUp')).toBe('0.29');
  });

  test('has no minus zero', () => {
    expect(formatPlaces(-0.001, 2)).toBe('0.00');
    expect(formatPlaces(-4, -1)).toBe('0');
  });

  test('reads back as the rounded number', () => {
    fc.assert(
      fc.property(anyNumber, fc.integer({ min: -20, max: 30 }), (x, places) => {
        const text = formatPlaces(x, places);
        expect(text).toMatch(places > 0 ? new RegExp(`^-?\\d+\\.\\d{${places}}$`) : /^-?\d+$/);
        // 15 digits of x are what is written, so x itself comes back only where it has no more.
        const shown = Number(x.toPrecision(15));
        expect(Number(text)).toBe(roundToPlace(shown, -places, 'even'));
      }),
      { seed: 43, numRuns: 1000 },
    );
  });

  test('refuses places without end', () => {
    expectRefusal(() => formatPlaces(1, 401), 'domain', 'at most 400 decimal places, got 401');
  });
});

test('formatSteps places the point', () => {
  expect(formatSteps(1210n, 2)).toBe('12.10');
  expect(formatSteps(-5n, 2)).toBe('-0.05');
  expect(formatSteps(12n, -1)).toBe('120');
  expect(formatSteps(0n, -3)).toBe('0');
});

test('roundToSteps counts steps with their sign', () => {
  expect(roundToSteps(2.675, -2, 'even')).toBe(268n);
  expect(roundToSteps(-2.675, -2, 'even')).toBe(-268n);
  expect(roundToSteps(1e20, 18, 'even')).toBe(100n);
});

test('formatAll writes what shows and no more', () => {
  expect(formatAll(0.1 + 0.2)).toBe('0.3');
  expect(formatAll(1e-7)).toBe('0.0000001');
  expect(formatAll(1200)).toBe('1200');
  expect(formatAll(0)).toBe('0');
  expect(formatAll(-1 / 3)).toBe('-0.333333333333333');
});

describe('excelRound', () => {
  // Microsoft's function reference, examples of ROUND, ROUNDUP and ROUNDDOWN.
  test.each([
    [2.15, 1, 'half', 2.2],
    [2.149, 1, 'half', 2.1],
    [-1.475, 2, 'half', -1.48],
    [21.5, -1, 'half', 20],
    [626.3, -3, 'half', 1000],
    [1.98, -1, 'half', 0],
    [-50.55, -2, 'half', -100],
    [3.2, 0, 'up', 4],
    [76.9, 0, 'up', 77],
    [3.14159, 3, 'up', 3.142],
    [-3.14159, 1, 'up', -3.2],
    [31415.92654, -2, 'up', 31500],
    [3.2, 0, 'down', 3],
    [76.9, 0, 'down', 76],
    [3.14159, 3, 'down', 3.141],
    [-3.14159, 1, 'down', -3.1],
    [31415.92654, -2, 'down', 31400],
  ] as const)('%d to %d digits, %s', (x, digits, way, rounded) => expect(excelRound(x, digits, way)).toBe(rounded));

  // Common practice: what the worksheet shows for ties that are not exact in binary.
  test.each([
    [1.005, 2, 1.01],
    [2.675, 2, 2.68],
    [4.35, 1, 4.4],
    [0.285, 2, 0.29],
    [-2.5, 0, -3],
    [2.5, 0, 3],
  ])('ROUND(%d, %d)', (x, digits, rounded) => expect(excelRound(x, digits, 'half')).toBe(rounded));

  test('truncates a fractional number of digits and takes any size of it', () => {
    expect(excelRound(2.567, 1.9, 'half')).toBe(2.6);
    expect(excelRound(25, -0.9, 'half')).toBe(25);
    expect(excelRound(Math.E, 1e9, 'half')).toBe(Math.E);
    expect(excelRound(Math.E, -1e9, 'half')).toBe(0);
    expect(excelRound(Math.E, -1e9, 'down')).toBe(0);
    expect(excelRound(0, -1e9, 'up')).toBe(0);
    expectRefusal(() => excelRound(1, NaN, 'half'), 'domain', 'finite number of digits, got NaN');
  });
});
