import { beforeAll, describe, expect, test } from 'vitest';
import { excel, portOf } from '../excel';
import type { Given, Shown } from '../excel';
import { expectPrinted, expectRelative } from '../published';

let call: (id: string, ...args: Given[]) => Promise<Shown[][]>;
beforeAll(async () => {
  call = await excel();
});

// One division and one square root: a few units of 2^-53.
const binary = 4e-16;

describe('STDU_FROM_TOL', () => {
  test('gives the u of a thermal expansion coefficient from ±0.40e-6 (JCGM 100:2008, 4.3.7, example 1)', async () => {
    expectPrinted((await call('STDU_FROM_TOL', 0.4e-6))[0][0], '0.23e-6');
  });
  test('gives the u of a voltmeter from ±15 µV (JCGM 100:2008, 4.3.7, example 2)', async () => {
    expectPrinted((await call('STDU_FROM_TOL', 15))[0][0], '8.7');
  });
  test('divides by the divisor of each shape (JCGM 100:2008, 4.3.7 and 4.3.9; arcsine: JCGM 101:2008, 6.4.6)', async () => {
    const rows = await call('STDU_FROM_TOL', 1, ['rectangular', 'triangular', 'Trapezoidal 0.5', 'arcsine', null]);
    [1 / 3, 1 / 6, 1.25 / 6, 1 / 2, 1 / 3].forEach((variance, i) => expectRelative(rows[i][0], Math.sqrt(variance), binary));
  });
  test('spills evidence with full', async () => {
    const [row] = await call('STDU_FROM_TOL', 3, 'triangular', true);
    expectRelative(row[0], 3 / Math.sqrt(6), binary);
    expect(row.slice(1)).toEqual(['inf', 'triangular']);
  });
  test('keeps the shape of a row and of a block', async () => {
    expect((await call('STDU_FROM_TOL', [[1, 2, 3]])).map((r) => r.length)).toEqual([3]);
    expect((await call('STDU_FROM_TOL', [[1, 2], [3, 4], [5, 6]])).map((r) => r.length)).toEqual([2, 2, 2]);
  });
  test('gives an error in the bad rows alone, a blank row for a blank one', async () => {
    const rows = await call('STDU_FROM_TOL', [3, 'x', -1, null, { error: '#N/A' }, '0.1', true, 0]);
    expectRelative(rows[0][0], Math.sqrt(3), binary);
    expect(rows.slice(1)).toEqual([
      ['#VALUE! STDU_FROM_TOL: tolerance must be a number > 0, got the text "x" in row 2'],
      ['#VALUE! STDU_FROM_TOL: tolerance must be a number > 0, got -1 in row 3'],
      [''],
      ['#N/A STDU_FROM_TOL: tolerance is the error #N/A in row 5'],
      ['#VALUE! STDU_FROM_TOL: tolerance must be a number > 0, got the text "0.1" in row 6'],
      ['#VALUE! STDU_FROM_TOL: tolerance must be a number > 0, got TRUE in row 7'],
      ['#VALUE! STDU_FROM_TOL: tolerance must be a number > 0, got 0 in row 8'],
    ]);
  });
  test('names the cell where its address is known', async () => {
    expect(await call('STDU_FROM_TOL', { cells: [[1], ['x']], address: "'My sheet'!C7:C8" })).toEqual([
      [expect.any(Number)],
      ['#VALUE! STDU_FROM_TOL: tolerance must be a number > 0, got the text "x" in cell C8'],
    ]);
  });
  test('refuses a shape without limits, an unknown one, shapes of ranges that disagree', async () => {
    expect(await call('STDU_FROM_TOL', 1, 'normal')).toEqual([[expect.stringMatching(/^#VALUE! STDU_FROM_TOL: needs a shape with limits .*, got normal$/)]]);
    expect(await call('STDU_FROM_TOL', [1, 2], 'round')).toEqual(
      [1, 2].map(() => [expect.stringMatching(/^#VALUE! STDU_FROM_TOL: shape needs one of .*, got "round"$/)]),
    );
    expect(await call('STDU_FROM_TOL', [1, 2, 3], ['arcsine', 'arcsine'])).toEqual([
      ['#VALUE! STDU_FROM_TOL: the shapes of tolerance (3 × 1) and shape (2 × 1) do not agree'],
    ]);
    expect(await call('STDU_FROM_TOL', [[1, 2, 3]], undefined, true)).toEqual([
      ['#VALUE! STDU_FROM_TOL: tolerance must be one column where each result takes 3 cells, got 1 × 3'],
    ]);
  });
});

describe('STDU_FROM_RANGE', () => {
  test('gives the u of a value between 7 and 10 (EURACHEM/CITAC CG 4, E.1) and their midpoint', async () => {
    const [[midpoint, u]] = await call('STDU_FROM_RANGE', 7, 10);
    expect(midpoint).toBe(8.5);
    expectPrinted(u, '0.87');
  });
  test('spills evidence with full', async () => {
    expect(await call('STDU_FROM_RANGE', 7, 10, undefined, true)).toEqual([[expect.closeTo(Math.sqrt(0.75), 15), 'inf', 'rectangular']]);
  });
  test('takes 0 as a limit, and refuses a missing limit and limits in the wrong order', async () => {
    expect(await call('STDU_FROM_RANGE', 0, 12)).toEqual([[6, expect.closeTo(Math.sqrt(12), 15)]]);
    expect(await call('STDU_FROM_RANGE', [1, null, 3], [null, null, 2])).toEqual([
      Array(2).fill('#VALUE! STDU_FROM_RANGE: upper is blank in row 1'),
      ['', ''],
      Array(2).fill('#VALUE! STDU_FROM_RANGE: needs a lower limit below the upper one, got 3 and 2 in row 3'),
    ]);
  });
});

describe('STDU_FROM_CERT', () => {
  test('gives the u of a resistor certified to ±129 µΩ at 99 % (JCGM 100:2008, 4.3.4)', async () => {
    expectPrinted((await call('STDU_FROM_CERT', 129, 0.99))[0][0], '50');
  });
  test('gives the u of a length in 10.07 mm to 10.15 mm with even chances (JCGM 100:2008, 4.3.5)', async () => {
    expectPrinted((await call('STDU_FROM_CERT', 0.04, 0.5))[0][0], '0.06');
  });
  test('gives the u of a comparator from ±0.01 µm at 95 % and six repeats (JCGM 100:2008, H.1.3.2)', async () => {
    const [row] = await call('STDU_FROM_CERT', 0.01, 0.95, 5, undefined, true);
    expectPrinted(row[0], '0.0039');
    expect(row.slice(1)).toEqual([5, 't']);
  });
  test('divides by k from 1 on, by 2 by default', async () => {
    expect(await call('STDU_FROM_CERT', [6, 6, 6], [3, null, 1])).toEqual([[2], [3], [6]]);
  });
  test('takes 95 for a percentage and says what to write', async () => {
    expect(await call('STDU_FROM_CERT', 1, 95)).toEqual([[expect.stringMatching(/^#VALUE! STDU_FROM_CERT: needs a coverage factor up to 15 .* write 0.95$/)]]);
  });
  test('refuses 0 degrees of freedom', async () => {
    expect(await call('STDU_FROM_CERT', 1, 0.95, -1)).toEqual([['#VALUE! STDU_FROM_CERT: dof must be a number > 0 or "inf", got -1']]);
  });
});

describe('STDU_FROM_RES', () => {
  test('gives 0.29 of the step of a digital display (JCGM 100:2008, F.2.2.1)', async () => {
    expectPrinted((await call('STDU_FROM_RES', 1))[0][0], '0.29');
  });
  test('takes the readable part of a division (closed form)', async () => {
    expectRelative((await call('STDU_FROM_RES', 0.1, 0.2))[0][0], 0.02 / Math.sqrt(12), 2 * binary);
  });
});

describe('STDU_FROM_REPEATS', () => {
  // JCGM 100:2008, 4.4.3, Table 1: twenty temperatures in °C.
  const temperatures = [
    96.9, 98.18, 98.25, 98.61, 99.03, 99.49, 99.56, 99.74, 99.89, 100.07,
    100.33, 100.42, 100.68, 100.95, 101.11, 101.2, 101.57, 101.84, 102.36, 102.72,
  ];
  test('gives the u of the mean of twenty temperatures (JCGM 100:2008, 4.4.3)', async () => {
    const [row] = await call('STDU_FROM_REPEATS', temperatures, undefined, undefined, undefined, true);
    expectPrinted(row[0], '0.333');
    expect(row.slice(1)).toEqual([19, 't']);
  });
  test('gives their standard deviation for a single reading (JCGM 100:2008, 4.4.3)', async () => {
    expectPrinted((await call('STDU_FROM_REPEATS', [temperatures], 1))[0][0], '1.489');
  });
  test('gives the u of a pooled deviation of 13 nm for the mean of five (JCGM 100:2008, H.1.3.2)', async () => {
    const [row] = await call('STDU_FROM_REPEATS', [215, 215], 5, 13, 24, true);
    expectPrinted(row[0], '5.8');
    expect(row.slice(1)).toEqual([24, 't']);
  });
  test('gives one result a row of a block, blanks passed over, and an error in the bad row alone', async () => {
    expect(await call('STDU_FROM_REPEATS', [[1, 3, null], [null, null, null], [5, null, null], [1, 'x', 2], [2, 2, 2]])).toEqual([
      [expect.closeTo(1, 15)],
      [''],
      [expect.stringMatching(/^#VALUE! STDU_FROM_REPEATS: needs two readings or more, .*, got one reading in row 3$/)],
      ['#VALUE! STDU_FROM_REPEATS: readings must be a number, got the text "x" in row 4, column 2'],
      [0],
    ]);
  });
  test('refuses zeros that may be blank readings', async () => {
    const zero = await excel({ blanks: 'zero', parameterAddresses: false });
    expect(await zero('STDU_FROM_REPEATS', [10, null, 12])).toEqual([
      ['#VALUE! STDU_FROM_REPEATS: readings is 0 or a blank cell, which cannot be told apart here in row 2; give a range without blanks'],
    ]);
  });
  test('looks such zeros up where it can', async () => {
    const port = portOf({ Data: [[10], [null], [0], [12]] });
    const zero = await excel({ blanks: 'zero', port });
    const looked = await zero('STDU_FROM_REPEATS', { cells: [[10], [null], [0], [12]], address: 'Data!A1:A4' });
    // Readings 10, 0, 12: mean 22/3, sum of squared deviations 248/3, s² = 124/3, u² = 124/9.
    expectRelative(looked[0][0], Math.sqrt(124) / 3, binary);
  });
});
