import { EngineError } from '../EngineError';

/**
 * The z below which a standard normal variable lies with probability p.
 *
 * @param p   Probability in (0, 1).
 * @returns   Dimensionless; relative error about 1e-16, as published.
 * @throws    EngineError "domain" if p is not strictly between 0 and 1.
 * @source    M. J. Wichura, Algorithm AS 241 (PPND16), Applied Statistics 37 (1988) 477–484.
 * @example   normalQuantile(0.975) // 1.9599639845400538
 */
export function normalQuantile(p: number): number {
  if (!(p > 0 && p < 1)) throw new EngineError('domain', `normalQuantile needs a probability between 0 and 1, got ${p}`);
  const q = p - 0.5;
  if (Math.abs(q) <= 0.425) {
    const r = 0.180625 - q * q;
    return q * (polynomial(centralTop, r) / polynomial(centralBottom, r));
  }
  const r = Math.sqrt(-Math.log(q < 0 ? p : 1 - p));
  const z =
    r <= 5
      ? polynomial(tailTop, r - 1.6) / polynomial(tailBottom, r - 1.6)
      : polynomial(farTop, r - 5) / polynomial(farBottom, r - 5);
  return q < 0 ? -z : z;
}

/** The z above which a standard normal variable lies with probability `tail`: for tails too small to be written as 1 − p. */
export function normalUpperQuantile(tail: number): number {
  return -normalQuantile(tail);
}

function polynomial(coefficients: readonly number[], r: number): number {
  let value = 0;
  for (let i = coefficients.length - 1; i >= 0; i--) value = value * r + coefficients[i];
  return value;
}

/* eslint-disable no-loss-of-precision -- the coefficients stand as AS 241 prints them, lowest power first */
const centralTop = [
  3.387132872796366608, 133.14166789178437745, 1971.5909503065514427, 13731.693765509461125, 45921.953931549871457,
  67265.770927008700853, 33430.575583588128105, 2509.0809287301226727,
];
const centralBottom = [
  1, 42.313330701600911252, 687.1870074920579083, 5394.1960214247511077, 21213.794301586595867, 39307.89580009271061,
  28729.085735721942674, 5226.495278852854561,
];
const tailTop = [
  1.42343711074968357734, 4.6303378461565452959, 5.7694972214606914055, 3.64784832476320460504, 1.27045825245236838258,
  0.24178072517745061177, 0.0227238449892691845833, 7.7454501427834140764e-4,
];
const tailBottom = [
  1, 2.05319162663775882187, 1.6763848301838038494, 0.68976733498510000455, 0.14810397642748007459, 0.0151986665636164571966,
  5.475938084995344946e-4, 1.05075007164441684324e-9,
];
const farTop = [
  6.6579046435011037772, 5.4637849111641143699, 1.7848265399172913358, 0.29656057182850489123, 0.026532189526576123093,
  0.0012426609473880784386, 2.71155556874348757815e-5, 2.01033439929228813265e-7,
];
const farBottom = [
  1, 0.59983220655588793769, 0.13692988092273580531, 0.0148753612908506148525, 7.868691311456132591e-4, 1.8463183175100546818e-5,
  1.4215117583164458887e-7, 2.04426310338993978564e-15,
];
