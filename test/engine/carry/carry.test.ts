import { describe, expect, it } from 'vitest';
import { carried, carryOn, refusal } from './carryOn';

const relative = (value: number, expected: number): number => Math.abs(value - expected) / Math.abs(expected);

describe('identity of sources', () => {
  const one = (formula: string, tag?: string) => carried(carryOn({ S: { A1: 5, B1: 3, C1: formula } }, 'C1', [['A1', { u: 0.1, tag }]]));

  it('A1-A1 is exactly zero, A1/A1 too, A1*A1 counts twice', () => {
    expect(one('=A1-A1').u).toBe(0);
    expect(one('=A1/A1').u).toBe(0);
    expect(relative(one('=A1*A1').u, 2 * 5 * 0.1)).toBeLessThan(1e-15);
  });

  const three = (tag?: string) => carryOn({ S: { A1: 10, A2: 20, A3: 30, B1: '=SUM(A1:A3)' } }, 'B1', [['A1:A3', { u: 0.1, tag }]]);

  it('a tag adds linearly, each in quadrature, neither is refused with the two choices', () => {
    expect(relative(carried(three('pipette')).u, 0.3)).toBeLessThan(1e-15);
    expect(relative(carried(three('each')).u, 0.1 * Math.sqrt(3))).toBeLessThan(1e-15);
    expect(refusal(three())).toMatch(/depends on A\d and A\d, which one evidence row serves: write each \(independent\) or a tag \(shared\)/);
  });

  it('JCGM 100, 5.2.2: ten resistors compared with one standard', () => {
    const cells = Object.fromEntries(Array.from({ length: 10 }, (_, i) => [`A${i + 1}`, 1000]));
    const u = (tag: string) => carried(carryOn({ S: { ...cells, B1: '=SUM(A1:A10)' } }, 'B1', [['A1:A10', { u: 0.1, tag }]])).u;
    expect(relative(u('Rs'), 1)).toBeLessThan(1e-14);
    expect(relative(u('each'), 0.31622776601684)).toBeLessThan(1e-13); // printed 0.32
  });

  it('weighted tags carry a correlation', () => {
    const { u } = carried(carryOn({ S: { A1: 1, A2: 1, B1: '=A1+A2' } }, 'B1', [['A1', { u: 1, tag: 'T:0.8' }], ['A2', { u: 1, tag: 't : 0.5' }]]));
    expect(relative(u, Math.sqrt(1 + 1 + 2 * 0.4))).toBeLessThan(1e-15);
  });
});

describe('degrees of freedom', () => {
  it('AVERAGE of five cells with one evidence row has the degrees of freedom of the row', () => {
    const cells = { A1: 1, A2: 2, A3: 3, A4: 4, A5: 5, B1: '=AVERAGE(A1:A5)' };
    const { dof, u } = carried(carryOn({ S: cells }, 'B1', [['A1:A5', { u: 0.2, dof: 4, tag: 'each' }]]));
    expect(dof).toBeCloseTo(4, 12);
    expect(relative(u, 0.2 / Math.sqrt(5))).toBeLessThan(1e-15);
  });

  // JCGM 100:2008, H.3, Table H.6: thermometer corrections b_k at t_k; straight line; b at 30 degrees.
  const t = [21.521, 22.012, 22.512, 23.003, 23.507, 23.999, 24.513, 25.002, 25.503, 26.01, 26.511];
  const b = [-0.171, -0.169, -0.166, -0.159, -0.164, -0.165, -0.156, -0.157, -0.159, -0.161, -0.16];
  const table = Object.fromEntries(t.flatMap((x, i) => [[`A${i + 1}`, x], [`B${i + 1}`, b[i]]]));

  it.each([
    ['SLOPE and INTERCEPT', { D1: '=INTERCEPT(B1:B11,A1:A11)', D2: '=SLOPE(B1:B11,A1:A11)', D3: '=D1+D2*30' }],
    ['LINEST', { D3: '=INDEX(LINEST(B1:B11,A1:A11),1,2)+30*INDEX(LINEST(B1:B11,A1:A11),1,1)' }],
    ['FORECAST', { D3: '=FORECAST(30,B1:B11,A1:A11)' }],
  ])('H.3 through %s: u(b30) = 0.0041 with 9 degrees of freedom', (_name, formulas) => {
    const s = 0.0034975639635053; // residual standard deviation, recomputed; printed 0.0035
    const r = carried(carryOn({ S: { ...table, ...formulas } }, 'D3', [['B1:B11', { u: s, dof: 9, tag: 'each' }]]));
    expect(relative(r.estimate, -0.14937681273248)).toBeLessThan(1e-12); // printed -0.1494
    expect(relative(r.u, 0.0041385957528549)).toBeLessThan(1e-9); // printed 0.0041
    expect(r.dof).toBeCloseTo(9, 9);
  });
});

describe('refusals', () => {
  const chain = { A1: 5, B1: 2, C1: '=A1*B1', D1: '=C1+1' };
  const carry = (cells: Record<string, never> | object, given: [string, object][] = [['A1', { u: 0.1 }]]) =>
    refusal(carryOn({ S: { ...chain, ...cells } as never }, 'D1', given as never));

  it('a result edited by hand', () => {
    expect(carry({ D1: { formula: '=C1+1', shows: 12 } })).toBe('cell D1 shows 12, but its formula gives 11: typed over, or not recalculated');
    expect(carry({ D1: 11 })).toBe('result cell D1 holds a typed number, not a formula: no input reaches it');
  });

  it('an edited intermediate', () => {
    expect(carry({ C1: { formula: '=A1*B1', shows: 10.1 } })).toBe('cell C1 shows 10.1, but its formula gives 10: typed over, or not recalculated');
    const column = {
      A1: 1, A2: 2, A3: 3, B1: '=A1*2', B2: 4.5, B3: '=A3*2', C1: '=A1+B1', C2: '=A2+B2', C3: '=A3+B3',
    };
    const rows = carryOn({ S: column }, 'C1:C3', [['A1:A3', { u: 0.1, tag: 'each' }]]);
    expect(rows.map((r) => r.k)).toEqual(['carried', 'refused', 'carried']);
    expect(refusal([rows[1]])).toBe('cell B2 holds a typed number, but B1 and B3 hold one formula: its uncertainty would be lost');
  });

  it('an external link, an unsupported function, a circle', () => {
    expect(carry({ C1: '=A1*[1]Sheet1!B1' })).toBe('cell C1 links to another workbook ([1]Sheet1)');
    expect(carry({ C1: '=CUBEVALUE(A1)' })).toBe('cell C1 uses CUBEVALUE, which cannot be followed');
    expect(carry({ C1: '=IFERROR(CUBEVALUE(A1),3)' })).toBe('cell C1 uses CUBEVALUE, which cannot be followed');
    expect(carry({ C1: '=D1*A1', D1: '=C1+1' })).toBe('cells D1 → C1 → D1 form a circle');
  });

  it('a hidden formula', () => {
    expect(carry({ C1: { formula: '=A1*B1', shows: 10, rest: { hidden: true } } })).toMatch(/^cell C1 may hide its formula/);
  });

  it('an untouched result', () => {
    expect(carry({ C1: '=B1*2' })).toBe('no input reaches result cell D1');
  });

  it('text used as a number, a text round trip', () => {
    expect(carry({ A1: '5' })).toBe('input cell A1 holds text ("5"), not a number');
    expect(carry({ C1: '=VALUE(TEXT(A1,"0.00"))' })).toBe('cell C1 makes a number out of text that comes from input cell A1: its uncertainty would be lost');
    expect(carry({ C1: '=(A1&"")*2' })).toMatch(/^cell C1 makes a number out of text/);
  });

  it('a clamp, x² at 0, a decision at the limit', () => {
    expect(carry({ A1: -0.05, C1: '=MAX(0,A1)' })).toMatch(/^result cell D1 has no linear effect of input A1 but changes at \+u.*flat step is in cell C1/);
    expect(carry({ A1: 0, C1: '=A1^2' })).toMatch(/no linear effect of input A1 but changes/);
    expect(carry({ A1: 4.95, C1: '=IF(A1>5,1,2)*B1' }, [['A1', { u: 0.1 }], ['B1', { u: 0.1 }]])).toMatch(/no linear effect of input A1 but changes/);
    expect(carry({ A1: 4, C1: '=IF(A1>5,1,2)*B1' }, [['A1', { u: 0.1 }], ['B1', { u: 0.1 }]])).toBe('not refused: carried');
  });

  it('a square root of zero', () => {
    expect(carry({ A1: 0, C1: '=SQRT(A1)' })).toBe('result cell D1 has no finite slope at the estimates with respect to input cell A1');
  });

  it('an input given twice with the same evidence', () => {
    expect(() => carry({}, [['A1', { u: 0.1, row: 'E1' }], ['A1', { u: 0.1, row: 'E1' }]])).toThrow(/input cell A1 is given twice with the same evidence/);
  });

  it('a tag used with differing evidence', () => {
    expect(() => carry({}, [['A1', { u: 0.1, dof: 5, tag: 'T' }], ['B1', { u: 0.1, tag: 't ' }]])).toThrow(/tag "t" is used with 5 and with infinite degrees of freedom/);
    expect(() => carry({}, [['A1', { u: 0.1, shape: 'rectangular', tag: 'T' }], ['B1', { u: 0.1, tag: 'T' }]])).toThrow(/shapes rectangular and normal/);
  });
});

describe('several doubts of one cell', () => {
  it('add in quadrature; a formula cell may have one of its own', () => {
    const cells = { A1: 10, B1: '=A1*2' };
    expect(relative(carried(carryOn({ S: cells }, 'B1', [['A1', { u: 3 }], ['A1', { u: 4 }]])).u, 10)).toBeLessThan(1e-15);
    expect(relative(carried(carryOn({ S: cells }, 'B1', [['A1', { u: 3 }], ['B1', { u: 8 }]])).u, 10)).toBeLessThan(1e-15);
  });
});

describe('a chain of cells', () => {
  it('of ten thousand formulas is followed without recursion', () => {
    const cells: Record<string, string | number> = { A1: 1 };
    for (let i = 2; i <= 10000; i++) cells[`A${i}`] = `=A${i - 1}+1`;
    expect(carried(carryOn({ S: cells }, 'A10000', [['A1', { u: 0.5 }]]))).toMatchObject({ estimate: 10000, u: 0.5 });
  });
});
