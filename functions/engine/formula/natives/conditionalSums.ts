import { type Native, rangeFunction } from '../native';
import type { Run } from '../run';
import { type Err, type Num, type Scalar, NONE, err, num } from '../scalar';
import { type Area, type Matrix, type Value, at } from '../value';
import { together } from './follow';
import { type Criterion, criterion } from './criteria';

/** What a family member does with the numbers selected, given what decided for them. */
type Finish = (run: Run, numbers: readonly Num[], deciders: readonly Scalar[]) => Scalar;

const one = { args: [2, 3] as [number, number] };
const several = { args: [3, 255] as [number, number], repeating: 2 };

/**
 * SUMIF, COUNTIF and their kin. Numbers selected enter by their own slopes; the criterion and the cells that it was compared
 * with, as far as they are numbers, are linked with slope 0.
 */
export const conditionalSums: Native[] = [
  rangeFunction('SUMIF', ['range', 'scalar', 'range'], (run, args) => single(run, args, sum), one),
  rangeFunction('AVERAGEIF', ['range', 'scalar', 'range'], (run, args) => single(run, args, average), one),
  rangeFunction('COUNTIF', ['range', 'scalar'], (run, args) => count(run, args)),
  rangeFunction('COUNTIFS', ['range', 'scalar'], (run, args) => count(run, args), { args: [2, 254], repeating: 2 }),
  multiple('SUMIFS', sum),
  multiple('AVERAGEIFS', average),
  multiple('MAXIFS', (run, numbers, deciders) => extreme(run, numbers, deciders, (a, b) => a > b)),
  multiple('MINIFS', (run, numbers, deciders) => extreme(run, numbers, deciders, (a, b) => a < b)),
];

function multiple(name: string, finish: Finish): Native {
  return rangeFunction(name, ['range', 'range', 'scalar'], (run, args) => {
    const tests = testsOf(run, args.slice(1));
    if ('v' in tests) return tests;
    const values = areaOf(run, args[0]);
    if ('v' in values) return values;
    const m = run.matrix(values);
    if (tests.some((t) => t.matrix.rows !== m.rows || t.matrix.cols !== m.cols)) return err('#VALUE!');
    return selected(run, tests, m, finish);
  }, several);
}

/** SUMIF and AVERAGEIF: of the last argument only its first cell counts, its size is that of the first argument. */
function single(run: Run, args: readonly Value[], finish: Finish): Scalar {
  const tests = testsOf(run, args.slice(0, 2));
  if ('v' in tests) return tests;
  const [{ matrix }] = tests;
  const given = args[2];
  if (given === undefined || given.k === 'missing') return selected(run, tests, matrix, finish);
  const first = areaOf(run, given);
  if ('v' in first) return first;
  const values: Area = { ...first, r2: first.r1 + matrix.rows - 1, c2: first.c1 + matrix.cols - 1 };
  return selected(run, tests, run.matrix(values), finish);
}

function count(run: Run, args: readonly Value[]): Scalar {
  const tests = testsOf(run, args);
  if ('v' in tests) return tests;
  const [{ matrix: first }] = tests;
  if (tests.some((t) => t.matrix.rows !== first.rows || t.matrix.cols !== first.cols)) return err('#VALUE!');
  const { height, width } = extent(tests.map((t) => t.matrix));
  let n = 0;
  for (let i = 0; i < height; i++) for (let j = 0; j < width; j++) if (meets(tests, i, j)) n++;
  if (tests.every((t) => t.meets(t.matrix.fill))) n += first.rows * first.cols - height * width;
  return run.steps.many(n, decidersOf(tests), 0);
}

/** One range with its criterion. */
interface Test {
  readonly matrix: Matrix;
  readonly by: Scalar;
  readonly meets: Criterion;
}

/** Ranges and criteria in turn. A range that is no reference to one rectangle is #VALUE!. */
function testsOf(run: Run, args: readonly Value[]): Test[] | Err {
  const tests: Test[] = [];
  for (let i = 0; i + 1 < args.length; i += 2) {
    const area = areaOf(run, args[i]);
    if ('v' in area) return area;
    const by = run.scalar(args[i + 1]);
    tests.push({ matrix: run.matrix(area), by, meets: criterion(by) });
  }
  return args.length % 2 === 0 ? tests : err('#VALUE!');
}

function areaOf(run: Run, value: Value): Area | Err {
  if (value.k === 'error') return value;
  const areas = run.areas(value);
  return areas?.length === 1 ? areas[0] : err('#VALUE!');
}

function selected(run: Run, tests: readonly Test[], values: Matrix, finish: Finish): Scalar {
  const { height, width } = extent([...tests.map((t) => t.matrix), values]);
  const numbers: Num[] = [];
  for (let i = 0; i < height; i++) {
    for (let j = 0; j < width; j++) {
      if (!meets(tests, i, j)) continue;
      const s = at(values, i, j);
      if (s.k === 'error') return s;
      if (s.k === 'number') numbers.push(s);
    }
  }
  return finish(run, numbers, decidersOf(tests));
}

function meets(tests: readonly Test[], i: number, j: number): boolean {
  for (const t of tests) if (!t.meets(at(t.matrix, i, j))) return false;
  return true;
}

/** The part beyond which all matrices hold nothing but their fill: references, whose fill is blank. */
function extent(matrices: readonly Matrix[]): { height: number; width: number } {
  return { height: Math.max(...matrices.map((m) => m.height)), width: Math.max(...matrices.map((m) => m.width)) };
}

function decidersOf(tests: readonly Test[]): Scalar[] {
  const deciders: Scalar[] = [];
  for (const t of tests) {
    if (t.by.d !== NONE) deciders.push(t.by);
    for (const s of t.matrix.cells) if (s.k === 'number' && s.d !== NONE) deciders.push(s);
  }
  return deciders;
}

function sum(run: Run, numbers: readonly Num[], deciders: readonly Scalar[]): Scalar {
  return run.steps.many(total(numbers), [...numbers, ...deciders], slopes(numbers.length, 1, deciders.length));
}

function average(run: Run, numbers: readonly Num[], deciders: readonly Scalar[]): Scalar {
  const n = numbers.length;
  if (n === 0) return run.steps.error('#DIV/0!', together(run, deciders));
  return run.steps.many(total(numbers) / n, [...numbers, ...deciders], slopes(n, 1 / n, deciders.length));
}

/** The first number that no other beats; 0 where none is selected. */
function extreme(run: Run, numbers: readonly Num[], deciders: readonly Scalar[], beats: (a: number, b: number) => boolean): Scalar {
  const by = together(run, [...numbers, ...deciders]);
  if (numbers.length === 0) return run.steps.chosen(num(0), by);
  return run.steps.chosen(numbers.reduce((best, x) => (beats(x.v, best.v) ? x : best)), by);
}

const total = (numbers: readonly Num[]): number => numbers.reduce((s, x) => s + x.v, 0);

const slopes = (n: number, slope: number, zeros: number): Float64Array => new Float64Array(n + zeros).fill(slope, 0, n);
