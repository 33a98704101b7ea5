import { numberText } from '../numberText';
import type { Native } from '../native';
import type { Run } from '../run';
import type { Num, Scalar, Text } from '../scalar';
import { refuseUse } from './refuseUse';
import { severalCells, strictFunction } from './strictFunction';
import { made } from './texts';

interface Complex {
  readonly re: number;
  readonly im: number;
  readonly unit: 'i' | 'j' | '';
}

/** Complex numbers as text, `3+4i`. What is made from numbers is tainted text; parts are numbers read out of text. */
export const complexNumbers: Native[] = [
  strictFunction('COMPLEX', ['number', 'number', 'text'], (run, args) => {
    const [re, im] = args as [Num, Num];
    const unit = (args[2] as Text | undefined)?.v ?? 'i';
    return unit === 'i' || unit === 'j' ? made(run, shown({ re: re.v, im: im.v, unit }), args as Scalar[]) : run.steps.error('#VALUE!', ...(args as Scalar[]));
  }, { args: [2, 3] }),
  part('IMREAL', ({ re }) => re),
  part('IMAGINARY', ({ im }) => im),
  part('IMABS', ({ re, im }) => Math.hypot(re, im)),
  part('IMARGUMENT', ({ re, im }) => (re === 0 && im === 0 ? '#DIV/0!' : Math.atan2(im, re))),
  of('IMCONJUGATE', ({ re, im }) => [re, -im]),
  of('IMEXP', ({ re, im }) => [Math.exp(re) * Math.cos(im), Math.exp(re) * Math.sin(im)]),
  of('IMLN', (z) => logarithm(z, 1)), of('IMLOG10', (z) => logarithm(z, Math.LN10)), of('IMLOG2', (z) => logarithm(z, Math.LN2)),
  of('IMSQRT', ({ re, im }) => polar(Math.sqrt(Math.hypot(re, im)), Math.atan2(im, re) / 2)),
  of('IMSIN', ({ re, im }) => [Math.sin(re) * Math.cosh(im), Math.cos(re) * Math.sinh(im)]),
  of('IMCOS', ({ re, im }) => [Math.cos(re) * Math.cosh(im), -Math.sin(re) * Math.sinh(im)]),
  strictFunction('IMPOWER', ['text', 'number'], (run, args) => {
    const z = complexIn((args[0] as Text).v);
    const n = (args[1] as Num).v;
    if (!z || (z.re === 0 && z.im === 0 && n <= 0)) return run.steps.error('#NUM!', ...(args as Scalar[]));
    return result(run, polar(Math.hypot(z.re, z.im) ** n, Math.atan2(z.im, z.re) * n), z.unit, args as Scalar[]);
  }),
  pair('IMSUB', (a, b) => [a.re - b.re, a.im - b.im]),
  pair('IMDIV', (a, b) => {
    const size = b.re * b.re + b.im * b.im;
    return size === 0 ? undefined : [(a.re * b.re + a.im * b.im) / size, (a.im * b.re - a.re * b.im) / size];
  }),
  oneByOne(pair('IMSUM', (a, b) => [a.re + b.re, a.im + b.im], 255)),
  oneByOne(pair('IMPRODUCT', (a, b) => [a.re * b.re - a.im * b.im, a.re * b.im + a.im * b.re], 255)),
];

const NUMBER = String.raw`(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?`;
const FORM = new RegExp(`^([+-]?${NUMBER})?(?:([+-]?)(${NUMBER})?([ij]))?$`);

/** The number that a text means; undefined where it means none. */
function complexIn(text: string): Complex | undefined {
  const alone = new RegExp(`^([+-]?)(${NUMBER})?([ij])$`).exec(text);
  if (alone) return { re: 0, im: Number(`${alone[1]}${alone[2] ?? 1}`), unit: alone[3] as 'i' | 'j' };
  const match = FORM.exec(text);
  if (!match || text === '') return undefined;
  const [, re = '0', sign, size, unit] = match;
  if (unit === undefined) return { re: Number(re), im: 0, unit: '' };
  return sign === '' ? undefined : { re: Number(re), im: Number(`${sign}${size ?? 1}`), unit: unit as 'i' | 'j' };
}

function shown({ re, im, unit }: Complex): string {
  const letter = unit === '' ? 'i' : unit;
  if (im === 0) return numberText(re);
  const size = im === 1 ? '' : im === -1 ? '-' : numberText(im);
  return re === 0 ? `${size}${letter}` : `${numberText(re)}${im > 0 ? '+' : ''}${size}${letter}`;
}

const polar = (size: number, angle: number): [number, number] => [size * Math.cos(angle), size * Math.sin(angle)];

function logarithm({ re, im }: Complex, base: number): [number, number] | undefined {
  return re === 0 && im === 0 ? undefined : [Math.log(Math.hypot(re, im)) / base, Math.atan2(im, re) / base];
}

function result(run: Run, value: readonly [number, number] | undefined, unit: Complex['unit'], from: readonly Scalar[]): Scalar {
  if (!value || !value.every(Number.isFinite)) return run.steps.error('#NUM!', ...from);
  return made(run, shown({ re: value[0], im: value[1], unit }), from);
}

function part(name: string, value: (z: Complex) => number | '#DIV/0!'): Native {
  return strictFunction(name, ['text'], (run, [s]) => {
    const z = complexIn((s as Text).v);
    if (!z) return run.steps.error('#NUM!', s!);
    const found = value(z);
    return typeof found === 'string' ? run.steps.error(found, s!) : run.steps.fromText(found, s as Text);
  });
}

function of(name: string, value: (z: Complex) => [number, number] | undefined): Native {
  return strictFunction(name, ['text'], (run, [s]) => {
    const z = complexIn((s as Text).v);
    return z ? result(run, value(z), z.unit, [s!]) : run.steps.error('#NUM!', s!);
  });
}

/** A function of two or more numbers; units i and j must not be mixed. */
function pair(name: string, value: (a: Complex, b: Complex) => [number, number] | undefined, most = 2): Native {
  return strictFunction(name, ['text'], (run, args) => {
    const numbers = args.map((s) => complexIn((s as Text).v));
    const units = new Set(numbers.map((z) => z?.unit).filter((u) => u));
    if (numbers.some((z) => !z)) return run.steps.error('#NUM!', ...(args as Scalar[]));
    if (units.size > 1) return run.steps.error('#VALUE!', ...(args as Scalar[]));
    const unit = [...units][0] ?? '';
    let sum = numbers[0]!;
    for (const z of numbers.slice(1)) {
      const found = value(sum, z!);
      if (!found) return run.steps.error('#NUM!', ...(args as Scalar[]));
      sum = { re: found[0], im: found[1], unit };
    }
    return result(run, [sum.re, sum.im], unit, args as Scalar[]);
  }, { args: [most === 2 ? 2 : 1, most], repeating: 1 });
}

/** The same function, refused for several numbers in one argument: the sheet takes ranges there, by rules that are not documented. */
function oneByOne(native: Native): Native {
  return {
    ...native,
    body: (run, args) => {
      if (args.some((a) => a.k === 'matrix' || severalCells(run, a))) refuseUse(native.name, 'an argument holds several numbers');
      return native.body(run, args);
    },
  };
}
