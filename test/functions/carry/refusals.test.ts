import { describe, expect, it } from 'vitest';
import { formulaOn } from '../../engine/formula/formulaOn';
import { type Argument, callOn } from './callOn';
import { memoryPort } from './memoryPort';

const sheet = {
  A1: 'Sample', B1: 'Volume', C1: 'Factor', D1: 'Result', E1: 'u', F1: 'nu', G1: 'shape', H1: 'tag',
  A2: 's1', B2: 10, C2: 2, D2: '=B2*C2', E2: 0.1,
  A3: 's2', B3: 20, C3: 3, D3: '=B3*C3', E3: 0.1,
  A4: 's3', B4: 30, C4: 4, D4: '=B4*C4', E4: 0.1,
};

const without = (cell: string) => Object.fromEntries(Object.entries(sheet).filter(([name]) => name !== cell));

const carry = (changes: object, pairs: Argument[] = ['S!B2:B4', 'S!E2:E4'], results = 'S!D2:D4') =>
  callOn(memoryPort({ S: { ...sheet, ...changes } }), 'UNC_CARRY', [results], pairs);

describe('UNC_CARRY', () => {
  it('gives one u a row', async () => expect(await carry({})).toEqual([[0.2], [expect.closeTo(0.3, 12)], [0.4]]));

  it('one bad row does not spoil the others', async () => {
    expect(await carry({ D3: '=BESSELJ(B3,C3)' })).toEqual([[0.2], ['#VALUE! UNC_CARRY: cell D3 uses BESSELJ, which cannot be followed'], [0.4]]);
    expect(await carry({ B3: '20' })).toEqual([[0.2], ['#VALUE! UNC_CARRY: input cell B3 holds text ("20"), not a number'], [0.4]]);
    expect((await carry({ D3: { formula: '=B3*C3', shows: 61 } }))[1]).toEqual([
      '#VALUE! UNC_CARRY: cell D3 shows 61, but its formula gives 60: typed over, or not recalculated',
    ]);
    expect((await carry({ D3: 60 }))[1]).toEqual([
      '#VALUE! UNC_CARRY: cell D3 holds a typed number, but D2 and D4 hold one formula: its uncertainty would be lost',
    ]);
  });

  it.each([
    ['zero', { E3: 0 }, /^#VALUE! UNC_CARRY: input cell B3 has evidence that cannot be used \(evidence in E3\): u is 0; write exact/],
    ['text', { E3: '0.1' }, /^#VALUE! UNC_CARRY: input cell B3 has evidence that cannot be used \(evidence in E3\): u must be a number/],
    ['negative', { E3: -1 }, /^#VALUE! UNC_CARRY: input cell B3 .*u must be > 0, got -1/],
    ['an error', { E3: '=1/0' }, /^#VALUE! UNC_CARRY: input cell B3 .*u is the error #DIV\/0!/],
  ])('a u that is %s spoils its row only', async (_name, change, message) => {
    const [[a], [b], [c]] = await carry(change);
    expect([a, c]).toEqual([0.2, 0.4]);
    expect(b).toMatch(message);
  });

  it('a blank u, which arrives as 0, is looked up and refused', async () => {
    const [[a], [b]] = await callOn(memoryPort({ S: without('E3') }), 'UNC_CARRY', ['S!D2:D4'], ['S!B2:B4', 'S!E2:E4']);
    expect(a).toBe(0.2);
    expect(b).toMatch(/^#VALUE! UNC_CARRY: input cell B3 has no evidence \(evidence in E3\): u is blank; write exact/);
  });

  it('exact is no doubt, blank inputs and results are passed over', async () => {
    const port = memoryPort({ S: { ...without('B3'), D3: '=IF(B3="","",B3*C3)', E4: 'exact' } });
    expect(await callOn(port, 'UNC_CARRY', ['S!D2:D4'], ['S!B2:B4', 'S!E2:E4'])).toEqual([[0.2], [''], [0]]);
  });

  it('an input cell that shows "" is passed over where others of its column are summed', async () => {
    const port = memoryPort({ S: { ...sheet, B3: '=IF(A3="s2","",1)', D5: '=SUM(B2:B4)' } });
    expect(await callOn(port, 'UNC_CARRY', ['S!D5'], ['S!B2:B4', { literal: [[0.1, '', '', 'each']] }])).toEqual([[expect.closeTo(Math.hypot(0.1, 0.1), 12)]]);
  });

  it('an input argument that reaches no result is named', async () => {
    expect(await carry({ H2: 5 }, ['S!B2:B4', 'S!E2:E4', 'S!H2', { literal: 0.1 }])).toEqual([
      ['#VALUE! UNC_CARRY: input 2 (S!H2) reaches no result: take it out, or look for a formula typed over'],
    ]);
  });

  it('one evidence row serves a column of inputs', async () => expect(await carry({}, ['S!B2:B4', { literal: 0.2 }])).toEqual([[0.4], [expect.closeTo(0.6, 12)], [0.8]]));

  it('arguments that do not fit are refused with words', async () => {
    expect(await carry({}, ['S!B2:B4'])).toEqual([['#VALUE! UNC_CARRY: needs inputs and evidence in pairs, got 1 arguments: input 1 has no evidence']]);
    expect(await carry({}, ['S!B2:B4', 'S!E2:E3'])).toEqual([
      ['#VALUE! UNC_CARRY: input 1 has 3 cells (3 × 1), its evidence 2 rows (2 × 1): give one row, or one row an input cell'],
    ]);
    expect(await carry({}, [{ literal: 5 }, { literal: 0.1 }])).toEqual([['#VALUE! UNC_CARRY: input 1 must be a reference to cells of this workbook']]);
    expect(await carry({}, [{ literal: [[1]], address: '[Other.xlsx]S!B2' }, { literal: 0.1 }])).toEqual([
      ["#VALUE! UNC_CARRY: input 1 lies in another workbook ('[Other.xlsx]S'!B2); refer to cells of this workbook"],
    ]);
  });

  it('the same evidence row given through two arguments serves several inputs: each or a tag', async () => {
    const both = (tag?: string) => carry({ H2: tag ?? '' }, ['S!B2', 'S!E2:H2', 'S!C2', 'S!E2:H2'], 'S!D2');
    expect(await both()).toEqual([[expect.stringMatching(/write each \(independent\) or a tag \(shared\) in its tag column/)]]);
    expect(await both('each')).toEqual([[expect.closeTo(Math.hypot(0.1 * 2, 0.1 * 10), 12)]]);
    expect(await both('T')).toEqual([[expect.closeTo(0.1 * 2 + 0.1 * 10, 12)]]);
  });
});

describe('UNC_REPORT and UNC_BUDGET', () => {
  const port = memoryPort({ S: { ...sheet, D5: '=ROUND(D2-B2,3)*1000/7', I1: 3 } });

  it('count and list what was taken as exact, and note what was passed over', async () => {
    const [row] = await callOn(port, 'UNC_REPORT', ['S!D5', { literal: null }], ['S!B2', { literal: 0.1 }]);
    expect(row[7]).toBe(1);
    expect(row[8]).toMatch(/rounding inside formulas is passed over \(D5\)/);
    const table = await callOn(port, 'UNC_BUDGET', ['S!D5', { literal: null }], ['S!B2', { literal: 0.1 }]);
    const exact = table.filter(([s]) => String(s).startsWith('Taken as exact')).map((r) => [r[0], r[1], r[6]]);
    expect(exact).toEqual([
      ['Taken as exact: Factor', 'C2', 2],
      ['Taken as exact: the number 1000', 'in D5', 1000],
      ['Taken as exact: the number 7', 'in D5', 7],
    ]);
  });

  it('list constants of names, numbers stored as text and array constants', async () => {
    const p = memoryPort({ S: { A1: 10, A2: '4', B1: '=A1*A2*Factor+SUMPRODUCT(A1,{7})' } }, { Factor: '3' });
    const table = await callOn(p, 'UNC_BUDGET', ['S!B1', { literal: null }], ['S!A1', { literal: 0.1 }]);
    expect(table.filter(([s]) => String(s).startsWith('Taken as exact')).map((r) => [r[0], r[1]])).toEqual([
      ['Taken as exact: A2', 'A2'], ['Taken as exact: the number 7', 'in B1'], ['Taken as exact: the number 3', 'in B1'],
    ]);
  });

  it('an effect that cancels by more than half is noted', async () => {
    const p = memoryPort({ S: { A1: 10, A2: 8, B1: '=A1-0.9*A2' } });
    const [row] = await callOn(p, 'UNC_REPORT', ['S!B1', { literal: 2 }], ['S!A1:A2', { literal: [[0.1, '', '', 'pipette']] }]);
    expect(row[1]).toBeCloseTo(0.01, 12);
    expect(row[8]).toBe('the effects of tag "pipette" cancel by more than half');
  });

  it('double counting is noted where a formula cell has a doubt of its own above Type A evidence', async () => {
    const p = memoryPort({ S: { A1: 10, B1: '=A1*2', C1: '=B1+1' } });
    const [row] = await callOn(p, 'UNC_REPORT', ['S!C1', { literal: 2 }], ['S!A1', { literal: [[0.1, 5]] }, 'S!B1', { literal: 0.3 }]);
    expect(row[8]).toBe('possible double counting: B1 has a doubt of its own, and A1 below it Type A evidence');
  });

  it('a finite step that differs from the slope is flagged', async () => {
    const p = memoryPort({ S: { A1: 1, B1: '=A1^4' } });
    const table = await callOn(p, 'UNC_BUDGET', ['S!B1', { literal: 2 }], ['S!A1', { literal: 0.3 }]);
    expect(table[1][10]).toBe('differs: 1.86 at +u, -0.76 at -u');
    expect(table.at(-1)!.slice(0, 2)).toEqual(['Note', 'the effects of finite steps differ from the linear ones: check the result by Monte Carlo']);
  });

  it('UNC_CORREL refuses results fed by one evidence row that does not say', async () => {
    const matrix = await callOn(port, 'UNC_CORREL', ['S!D2:D3'], ['S!B2:B3', { literal: 0.1 }]);
    expect(matrix[0][1]).toMatch(/depend on B2 and B3, which one evidence row serves/);
    expect(matrix[0][0]).toBe(1);
  });
});

describe('labels in a budget', () => {
  const port = memoryPort({
    S: {
      A1: 'Item', B1: 'Symbol', C1: 'Value', A2: 'Flask volume', B2: 'Vf', C2: 250, A3: 'Aliquot volume', B3: 'Va', C3: 25, C4: '=C2/C3',
      E1: 'Reading', E2: 1, E3: 2, E5: '=SUM(E2:E3)',
    },
  });
  it('are the text beside a form cell, not its symbol, and the heading of a column', async () => {
    const form = await callOn(port, 'UNC_BUDGET', ['S!C4', { literal: 2 }], ['S!C2', { literal: 0.1 }, 'S!C3', { literal: 0.02 }]);
    expect(form.slice(1, 3).map((r) => r[0])).toEqual(['Aliquot volume', 'Flask volume']);
    const column = await callOn(port, 'UNC_BUDGET', ['S!E5', { literal: 2 }], ['S!E2:E3', { literal: [[0.1, '', '', 'Scale']] }]);
    expect(column[1].slice(0, 2)).toEqual(['Scale: Reading', 'E2, E3']);
  });
});

describe('calls at the same time', () => {
  it('share one reading of the workbook', async () => {
    const port = memoryPort({ S: sheet });
    const calls = await Promise.all([2, 3, 4].map((r) => callOn(port, 'UNC_CARRY', [`S!D${r}`], [`S!B${r}`, `S!E${r}`])));
    expect(calls.flat(2)).toEqual([0.2, expect.closeTo(0.3, 12), 0.4]);
  });
});

describe('twenty thousand rows', () => {
  it('go through one UNC_CARRY', async () => {
    const cells: Record<string, number | string> = { D1: 0.02 };
    for (let r = 1; r <= 20000; r++) {
      cells[`A${r}`] = r;
      cells[`B${r}`] = `=A${r}*$D$1+SQRT(A${r})`;
    }
    const us = await callOn(memoryPort({ S: cells }), 'UNC_CARRY', ['S!B1:B20000'], ['S!A1:A20000', { literal: 0.1 }, 'S!D1', { literal: 0.001 }]);
    expect(us).toHaveLength(20000);
    const r = 20000;
    expect(us[r - 1][0]).toBeCloseTo(Math.hypot(0.1 * (0.02 + 0.5 / Math.sqrt(r)), 0.001 * r), 12);
  });
});

describe('functions with a value but without a slope', () => {
  it.each([
    ['=T.DIST.2T(2,B1)', 5], ['=B1*YEAR(B1+40000)', 5], ['=CEILING(B1,0.5)', 5.2], ['=PMT(B1/100,12,1000)', 5], ['=PERCENTRANK(E1:E3,B1)', 2],
  ])('%s of an uncertain number is refused with words', async (formula, value) => {
    const stored = formulaOn({ B1: value, E1: 1, E2: 2, E3: 4 }, formula).value as number;
    const port = memoryPort({ S: { B1: value, E1: 1, E2: 2, E3: 4, D1: formula } });
    const [[shown]] = await callOn(port, 'UNC_CARRY', ['S!D1'], ['S!B1', { literal: 0.1 }]);
    expect(Number.isFinite(stored)).toBe(true);
    expect(shown).toMatch(/^#VALUE! .*D1.*slope/);
  });
});
