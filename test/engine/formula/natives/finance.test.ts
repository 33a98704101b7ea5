import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';
import { differencesFromHyperFormula } from './againstHyperFormula';

const flows = {
  A1: -70000, A2: 12000, A3: 15000, A4: 18000, A5: 21000, A6: 26000,
  B1: -120000, B2: 39000, B3: 30000, B4: 21000, B5: 37000, B6: 46000, C1: 8000, C2: 9200, C3: 10000, C4: 12000, C5: 14500,
};

describe('functions of offices', () => {
  // Excel's documentation of each function, with the places printed there
  it.each([
    ['=PV(0.08/12,12*20,500,,0)', -59777.15, 2], ['=FV(0.06/12,10,-200,-500,1)', 2581.40, 2], ['=FV(0.12/12,12,-1000)', 12682.50, 2],
    ['=FV(0.11/12,35,-2000,,1)', 82846.25, 2], ['=FV(0.06/12,12,-100,-1000,1)', 2301.40, 2], ['=PMT(8%/12,10,10000)', -1037.03, 2],
    ['=PMT(8%/12,10,10000,0,1)', -1030.16, 2], ['=PMT(6%/12,18*12,0,50000)', -129.08, 2], ['=NPER(12%/12,-100,-1000,10000,1)', 59.6738657, 7],
    ['=NPER(1%,-100,-1000,10000)', 60.0821229, 7], ['=NPER(1%,-100,-1000)', -9.57859404, 8], ['=IPMT(10%/12,1,36,8000)', -66.67, 2],
    ['=IPMT(10%,3,3,8000)', -292.45, 2], ['=PPMT(10%/12,1,24,2000)', -75.62, 2], ['=PPMT(8%,10,10,200000)', -27598.05, 2],
    ['=CUMIPMT(9%/12,360,125000,13,24,0)', -11135.23213, 5], ['=CUMIPMT(9%/12,360,125000,1,1,0)', -937.5, 8],
    ['=CUMPRINC(9%/12,360,125000,13,24,0)', -934.1071234, 7], ['=CUMPRINC(9%/12,360,125000,1,1,0)', -68.27827118, 8],
    ['=NPV(10%,-10000,3000,4200,6800)', 1188.44, 2], ['=NPV(8%,C1:C5)-40000', 1922.06, 2], ['=NPV(8%,C1:C5,-9000)-40000', -3749.47, 2],
    ['=IRR(A1:A6)', 0.087, 3], ['=IRR(A1:A5)', -0.021, 3], ['=IRR(A1:A3,-10%)', -0.444, 3], ['=RATE(4*12,-200,8000)', 0.0077, 4],
    ['=MIRR(B1:B6,10%,12%)', 0.126, 3], ['=MIRR(B1:B4,10%,12%)', -0.048, 3], ['=MIRR(B1:B6,10%,14%)', 0.135, 3],
    ['=SLN(30000,7500,10)', 2250, 10], ['=SYD(30000,7500,10,1)', 4090.91, 2], ['=SYD(30000,7500,10,10)', 409.09, 2],
    ['=DDB(2400,300,3650,1)', 1.32, 2], ['=DDB(2400,300,120,1,2)', 40, 10], ['=DDB(2400,300,10,2,1.5)', 306, 10], ['=DDB(2400,300,10,10)', 22.12, 2],
    ['=DB(1000000,100000,6,1,7)', 186083.33, 2], ['=DB(1000000,100000,6,2,7)', 259639.42, 2], ['=DB(1000000,100000,6,7,7)', 15845.10, 2],
    ['=EFFECT(0.0525,4)', 0.0535427, 7], ['=NOMINAL(0.053543,4)', 0.05250032, 8], ['=RRI(96,10000,11000)', 0.0009933, 7], ['=PDURATION(2.5%,2000,2200)', 3.86, 2],
  ])('%s is %d', (formula, value, places) => expect(formulaOn(flows, formula).value).toBeCloseTo(value, places));

  it.each([
    ['=PV(0,10,-5)', 50], ['=FV(0,10,-5,-1)', 51], ['=PMT(0,10,50)', -5], ['=NPER(0,-5,50)', 10], // closed forms without interest
    ['=PMT(0.1,0,50)', '#NUM!'], ['=NPER(0,0,50)', '#NUM!'], ['=IPMT(0.1,4,3,50)', '#NUM!'], ['=EFFECT(0,4)', '#NUM!'], ['=NOMINAL(0.05,0)', '#NUM!'],
    ['=IRR(C1:C5)', '#NUM!'], ['=SLN(1,0,0)', '#DIV/0!'], ['=SYD(1,0,5,6)', '#NUM!'], ['=CUMIPMT(0.1,3,50,2,1,0)', '#NUM!'], ['=PV("x",1,1)', '#VALUE!'],
  ])('%s is %s', (formula, value) => expect(formulaOn(flows, formula).value).toBe(value));

  it('part a payment into interest and principal, at either end of the period', () => {
    for (const due of [0, 1]) {
      for (let k = 1; k <= 6; k++) {
        expect(formulaOn({}, `=IPMT(0.02,${k},6,900,-50,${due})+PPMT(0.02,${k},6,900,-50,${due})-PMT(0.02,6,900,-50,${due})`).value).toBeCloseTo(0, 10);
      }
    }
  });

  // closed form: what is owed grows by the interest of each period; payments at the beginning pay the interest of the period before
  it.each([0, 1])('follow the schedule of a loan, payments of kind %i', (due) => {
    const payment = formulaOn({}, `=PMT(0.02,6,900,-50,${due})`).value as number;
    let owed = 900;
    let interest = 0;
    for (let k = 1; k <= 6; k++) {
      if (due === 0) interest = owed * 0.02;
      expect(formulaOn({}, `=IPMT(0.02,${k},6,900,-50,${due})`).value).toBeCloseTo(-interest, 10);
      owed = due === 0 ? owed + interest + payment : owed + payment;
      if (due === 1) {
        interest = owed * 0.02;
        owed += interest;
      }
    }
    expect(owed).toBeCloseTo(50, 10);
  });

  it.each(['=PV(A1,B1,C1,D1,1)', '=FV(A1,B1,C1,D1,1)', '=PMT(A1,B1,C1,D1,1)', '=IPMT(A1,2,B1,C1,D1,0)', '=PPMT(A1,2,B1,C1,D1,0)', '=EFFECT(A1,B1)', '=NOMINAL(A1,B1)', '=NPV(A1,C1,D1)'])(
    '%s agrees with HyperFormula', (formula) => expect(differencesFromHyperFormula(formula, (from) =>
      ({ A1: from.between(0.001, 0.2), B1: Math.floor(from.between(2, 40)), C1: from.between(10, 500), D1: from.between(-500, 500) }), 40, 1e-10)).toEqual([]));

  it('have no slope', () => expect(formulaOn({ A1: 0.05 }, '=PV(A1,10,-5)').slopes.A1).toBeNaN());

  it('refuse a rate that is not found', () => expect(() => formulaOn({}, '=RATE(10,-1,-1)')).toThrow(/no rate is found/));
});
