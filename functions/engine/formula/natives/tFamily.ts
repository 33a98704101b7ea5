import { tCdf, tDensity, tUpperTail } from '../../numbers/tCdf';
import { tQuantile } from '../../numbers/tQuantile';
import type { Native } from '../native';
import { type WithSlopes, named } from './distribution';

/** Student's t-distribution. Degrees of freedom are cut off to whole numbers and have no slope. */
export const tFamily: Native[] = [
  ...named('T.DIST', 3, 3, ([x, freedom, cumulative]) => {
    const nu = Math.trunc(freedom);
    if (nu < 1) return '#NUM!';
    const f = tDensity(x, nu);
    return cumulative !== 0 ? [tCdf(x, nu), f, NaN, 0] : [f, (-f * (nu + 1) * x) / (nu + x * x), NaN, 0];
  }),
  ...named('T.DIST.RT', 2, 2, ([x, freedom]) => upper(x, Math.trunc(freedom), 1)),
  ...named('T.DIST.2T', 2, 2, ([x, freedom]) => (x < 0 ? '#NUM!' : upper(x, Math.trunc(freedom), 2))),
  ...named('TDIST', 3, 3, ([x, freedom, tails]) => {
    const sides = Math.trunc(tails);
    return x < 0 || (sides !== 1 && sides !== 2) ? '#NUM!' : upper(x, Math.trunc(freedom), sides);
  }),
  ...named('T.INV', 2, 2, ([p, freedom]) => {
    const nu = Math.trunc(freedom);
    if (!(p > 0 && p < 1) || nu < 1) return '#NUM!';
    const t = tQuantile(p, nu);
    return [t, 1 / tDensity(t, nu), NaN];
  }),
  ...named('T.INV.2T TINV', 2, 2, ([p, freedom]) => {
    const nu = Math.trunc(freedom);
    if (!(p > 0 && p <= 1) || nu < 1) return '#NUM!';
    const t = p === 1 ? 0 : -tQuantile(p / 2, nu);
    return [t, -1 / (2 * tDensity(t, nu)), NaN];
  }),
];

/** The probability above x, once or twice. */
function upper(x: number, nu: number, sides: number): WithSlopes {
  return nu < 1 ? '#NUM!' : [sides * tUpperTail(x, nu), -sides * tDensity(x, nu), NaN, NaN];
}
