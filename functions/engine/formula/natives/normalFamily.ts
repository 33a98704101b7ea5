import { normalCdf, normalDensity as density, normalWithin } from '../../numbers/normalCdf';
import { normalQuantile } from '../../numbers/normalQuantile';
import { tDensity } from '../../numbers/tCdf';
import { tQuantile } from '../../numbers/tQuantile';
import type { Native } from '../native';
import { type WithSlopes, named } from './distribution';

const inside = (p: number): boolean => p > 0 && p < 1;

/** The normal and lognormal distributions, with slopes by all arguments, and half-widths of confidence intervals. */
export const normalFamily: Native[] = [
  ...named('NORM.DIST NORMDIST', 4, 4, ([x, mean, sd, cumulative]) => (sd > 0 ? normal((x - mean) / sd, sd, cumulative !== 0) : '#NUM!')),
  ...named('NORM.INV NORMINV', 3, 3, ([p, mean, sd]) => {
    if (!inside(p) || !(sd > 0)) return '#NUM!';
    const z = normalQuantile(p);
    return [mean + sd * z, sd / density(z), 1, z];
  }),
  ...named('NORM.S.DIST', 2, 2, ([z, cumulative]) => {
    const [value, slope] = normal(z, 1, cumulative !== 0);
    return [value, slope, 0];
  }),
  ...named('NORMSDIST', 1, 1, ([z]) => [normalCdf(z), density(z)]),
  ...named('NORM.S.INV NORMSINV', 1, 1, ([p]) => (inside(p) ? [normalQuantile(p), 1 / density(normalQuantile(p))] : '#NUM!')),
  ...named('GAUSS', 1, 1, ([z]) => [(Math.sign(z) * normalWithin(Math.abs(z))) / 2, density(z)]),
  ...named('PHI', 1, 1, ([z]) => [density(z), -z * density(z)]),
  ...named('LOGNORM.DIST', 4, 4, ([x, mean, sd, cumulative]) => lognormal(x, mean, sd, cumulative !== 0)),
  ...named('LOGNORMDIST', 3, 3, ([x, mean, sd]) => lognormal(x, mean, sd, true)),
  ...named('LOGNORM.INV LOGINV', 3, 3, ([p, mean, sd]) => {
    if (!inside(p) || !(sd > 0)) return '#NUM!';
    const z = normalQuantile(p);
    const x = Math.exp(mean + sd * z);
    return [x, (x * sd) / density(z), x, x * z];
  }),
  ...named('CONFIDENCE CONFIDENCE.NORM', 3, 3, ([alpha, sd, size]) => {
    const n = Math.trunc(size);
    if (!inside(alpha) || !(sd > 0) || n < 1) return '#NUM!';
    const z = -normalQuantile(alpha / 2);
    return [(z * sd) / Math.sqrt(n), -sd / (2 * density(z) * Math.sqrt(n)), z / Math.sqrt(n), NaN];
  }),
  ...named('CONFIDENCE.T', 3, 3, ([alpha, sd, size]) => {
    const n = Math.trunc(size);
    if (!inside(alpha) || !(sd > 0) || n < 1) return '#NUM!';
    if (n === 1) return '#DIV/0!';
    const t = -tQuantile(alpha / 2, n - 1);
    return [(t * sd) / Math.sqrt(n), -sd / (2 * tDensity(t, n - 1) * Math.sqrt(n)), t / Math.sqrt(n), NaN];
  }),
];

function normal(z: number, sd: number, cumulative: boolean): readonly [number, number, number, number, number] {
  const f = density(z) / sd;
  if (cumulative) return [normalCdf(z), f, -f, -z * f, 0];
  return [f, (-z * f) / sd, (z * f) / sd, (f * (z * z - 1)) / sd, 0];
}

function lognormal(x: number, mean: number, sd: number, cumulative: boolean): WithSlopes {
  if (!(x > 0) || !(sd > 0)) return '#NUM!';
  const z = (Math.log(x) - mean) / sd;
  const f = density(z) / (sd * x);
  if (cumulative) return [normalCdf(z), f, -f * x, -z * f * x, 0];
  return [f, (-f / x) * (1 + z / sd), (f * z) / sd, (f * (z * z - 1)) / sd, 0];
}
