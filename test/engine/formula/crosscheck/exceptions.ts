/** A function in which another engine cannot be the judge, and why. */
export interface Exception {
  readonly engine: 'HyperFormula' | 'LibreOffice';
  readonly name: string;
  /** `missing`: the engine does not have it. `differs`: the engine is wrong, or answers another question. */
  readonly how: 'missing' | 'differs';
  readonly why: string;
}

/** Each is checked to be true still; a function may be excepted for one engine only, so the other one judges it. */
export const exceptions: readonly Exception[] = [
  ...listed('missing', 'not among its functions', 'KURT TRIMMEAN PROB TREND GROWTH LOGEST ERF.PRECISE ERFC.PRECISE BINOM.DIST.RANGE'),
  ...listed('differs', 'its t, F and beta distributions are good to nine digits only', `
    CONFIDENCE.T T.DIST T.DIST.RT T.DIST.2T TDIST T.INV T.INV.2T TINV F.DIST F.DIST.RT FDIST F.INV F.INV.RT FINV BETA.INV BETAINV`),
  ...listed('differs', 'nine digits, and a density that is not divided by the width of the interval', 'BETA.DIST'),
  ...listed('differs', 'it rounds a sum of probabilities to ten decimal places', 'BINOM.DIST BINOMDIST'),
  ...listed('differs', 'it wants an argument more, as the younger function of the name has it', 'NORMSDIST LOGNORMDIST NEGBINOMDIST BETADIST'),
  { engine: 'HyperFormula', name: 'INTERCEPT', how: 'missing', why: 'not among its functions' },
  { engine: 'HyperFormula', name: 'FORECAST', how: 'missing', why: 'not among its functions' },
  { engine: 'HyperFormula', name: 'FORECAST.LINEAR', how: 'missing', why: 'not among its functions' },
  { engine: 'HyperFormula', name: 'LINEST', how: 'missing', why: 'not among its functions' },
  { engine: 'HyperFormula', name: 'CONVERT', how: 'missing', why: 'not among its functions' },
  { engine: 'HyperFormula', name: 'MDETERM', how: 'missing', why: 'not among its functions' },
  { engine: 'HyperFormula', name: 'MINVERSE', how: 'missing', why: 'not among its functions' },
  { engine: 'LibreOffice', name: 'SEQUENCE', how: 'missing', why: 'not among its functions before version 24.8' },
  {
    engine: 'HyperFormula', name: 'ACOT', how: 'differs',
    why: 'gives the angle between -π/2 and π/2 for negative arguments; the documentation of Excel says between 0 and π',
  },
  {
    engine: 'HyperFormula', name: 'INT', how: 'differs',
    why: 'cuts off towards 0, where the documentation of Excel has INT(-8.9) = -9',
  },
];

function listed(how: Exception['how'], why: string, names: string): Exception[] {
  return names.trim().split(/\s+/).map((name) => ({ engine: 'HyperFormula', name, how, why }));
}
