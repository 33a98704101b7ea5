import type { Native } from '../native';
import type { Run } from '../run';
import { type Num, type Scalar, type Text } from '../scalar';
import { refuseUse } from './refuseUse';
import { strictFunction } from './strictFunction';
import { unitNamed } from './units';

/** CONVERT(number, from, to). Units that are not known here are refused; units of different quantities are #N/A. */
export const convert: Native[] = [
  strictFunction('CONVERT', ['number', 'text', 'text'], (run, args) => converted(run, args as readonly [Num, Text, Text])),
];

function converted(run: Run, [x, from, to]: readonly [Num, Text, Text]): Scalar {
  const [a, b] = [from, to].map((name) => unitNamed(name.v) ?? refuseUse('CONVERT', `the unit "${name.v}" is not known here`));
  if (a.measures !== b.measures) return run.steps.error('#N/A', from, to);
  if (a.measures === 'temperature') {
    const [value, slope] = temperature(x.v, SCALES[from.v], SCALES[to.v]);
    return run.steps.many(value, [x, from, to], [slope, 0, 0]);
  }
  const value = a.size === b.size ? x.v : (x.v * a.size) / b.size;
  return run.steps.many(scaled(value, a.power - b.power), [x, from, to], [scaled(a.size / b.size, a.power - b.power), 0, 0]);
}

/** Times a power of ten, with one rounding. */
const scaled = (size: number, power: number): number => (power < 0 ? size / 10 ** -power : size * 10 ** power);

/** A scale of temperature: degrees in one kelvin, and what it shows at 0 °C. */
interface Scale {
  readonly perKelvin: number;
  readonly atIce: number;
}

const CELSIUS: Scale = { perKelvin: 1, atIce: 0 };
const FAHRENHEIT: Scale = { perKelvin: 1.8, atIce: 32 };
const KELVIN: Scale = { perKelvin: 1, atIce: 273.15 };
const RANKINE: Scale = { perKelvin: 1.8, atIce: 491.67 };
const REAUMUR: Scale = { perKelvin: 0.8, atIce: 0 };

/** @source NIST Special Publication 811 (2008), appendix B.8; Réaumur: 80 degrees from ice to steam, common practice */
const SCALES: Record<string, Scale> = {
  C: CELSIUS, cel: CELSIUS, F: FAHRENHEIT, fah: FAHRENHEIT, K: KELVIN, kel: KELVIN, Rank: RANKINE, Reau: REAUMUR,
};

function temperature(x: number, from: Scale, to: Scale): [value: number, slope: number] {
  const slope = to.perKelvin / from.perKelvin;
  if (from === to) return [x, 1];
  const absolute = [from, to].every((s) => s === KELVIN || s === RANKINE);
  return [absolute ? x * slope : ((x - from.atIce) / from.perKelvin) * to.perKelvin + to.atIce, slope];
}
