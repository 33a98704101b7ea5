import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

describe('complex numbers', () => {
  it.each([
    // Excel's documentation of each function
    ['=COMPLEX(3,4)', '3+4i'], ['=COMPLEX(3,4,"j")', '3+4j'], ['=COMPLEX(0,1)', 'i'], ['=COMPLEX(1,0)', '1'], ['=COMPLEX(0,-1)', '-i'],
    ['=COMPLEX(1,1,"I")', '#VALUE!'], ['=IMREAL("6-9i")', 6], ['=IMAGINARY("3+4i")', 4], ['=IMAGINARY("0-j")', -1], ['=IMAGINARY(4)', 0], ['=IMREAL("i")', 0],
    ['=IMABS("5+12i")', 13], ['=IMARGUMENT("0")', '#DIV/0!'], ['=IMCONJUGATE("3+4i")', '3-4i'], ['=IMSUM("3+4i","5-3i")', '8+i'],
    ['=IMSUB("13+4i","5+3i")', '8+i'], ['=IMPRODUCT("3+4i","5-3i")', '27+11i'], ['=IMPRODUCT("1+2i",30)', '30+60i'],
    ['=IMDIV("-238+240i","10+24i")', '5+12i'], ['=IMDIV("1","0")', '#NUM!'], ['=IMSUM("1+i","1+j")', '#VALUE!'], ['=IMABS("3 + 4i")', '#NUM!'],
    ['=IMABS("x")', '#NUM!'], ['=IMREAL("1e2-1.5e-3j")', 100], ['=IMAGINARY("1e2-1.5e-3j")', -0.0015], ['=IMREAL("34")', 34], ['=IMREAL("34i")', 0],
    ['=IMEXP("0")', '1'], ['=IMLN("0")', '#NUM!'], ['=IMPOWER("0",0)', '#NUM!'],
  ])('%s is %s', (formula, value) => expect(formulaOn({}, formula).value).toBe(value));

  // Excel's documentation; the last digits of a text depend on the computer, so the parts are compared to twelve places
  it.each([
    ['IMEXP("1+i")', 1.46869393991589, 2.28735528717884], ['IMLN("3+4i")', 1.6094379124341, 0.927295218001612],
    ['IMLOG10("3+4i")', 0.698970004336019, 0.402719196273373], ['IMLOG2("3+4i")', 2.32192809488736, 1.33780421245098],
    ['IMSQRT("1+i")', 1.09868411346781, 0.455089860562227], ['IMPOWER("2+3i",3)', -46, 9],
    ['IMSIN("4+3i")', -7.61923172032141, -6.548120040911], ['IMCOS("1+i")', 0.833730025131149, -0.988897705762865],
  ])('%s', (formula, re, im) => {
    expect(formulaOn({}, `=IMREAL(${formula})`).value).toBeCloseTo(re, 12);
    expect(formulaOn({}, `=IMAGINARY(${formula})`).value).toBeCloseTo(im, 12);
  });

  it('has the angle π/2 and π on the axes', () => {
    expect(formulaOn({}, '=IMARGUMENT("2i")').value).toBe(Math.PI / 2);
    expect(formulaOn({}, '=IMARGUMENT(-2)').value).toBe(Math.PI);
    expect(formulaOn({}, '=IMARGUMENT("3+4i")').value).toBeCloseTo(0.92729522, 8); // Excel's documentation
  });

  it('taints a number that is read out of one', () =>
    expect(formulaOn({ A1: 3, B1: 4 }, '=IMABS(COMPLEX(A1,B1))')).toEqual({ value: 5, slopes: { A1: 0, B1: 0 }, tainted: ['A1', 'B1'] }));

  it.each(['=IMSUM(A1:A2)', '=IMPRODUCT("1",A1:A2)', '=IMSUM({"1","i"})'])('%s is refused', (formula) =>
    expect(() => formulaOn({ A1: 1, A2: 2 }, formula)).toThrow(/holds several numbers/));
});
