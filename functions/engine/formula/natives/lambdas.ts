import { EngineError } from '../../EngineError';
import { type Native, rangeFunction } from '../native';
import type { Run } from '../run';
import { type Err, type Scalar, err, num } from '../scalar';
import { type Lambda, type Value, isScalar } from '../value';
import { built, checkSize, decidedBy } from './arrays';
import { portion, sizeOf } from './follow';
import { errorFrom } from './linked';
import { isError, optionsOf, present, whole } from './options';

const alone = { shareable: false };

/**
 * MAP, REDUCE, SCAN, BYROW, BYCOL, MAKEARRAY: calls of a LAMBDA over the cells, rows or columns of arrays. The parts of a
 * reference are handed on as references. All but REDUCE want one value from each call.
 */
export const lambdas: Native[] = [
  rangeFunction('MAP', ['range', 'range'], map, { args: [2, 254], repeating: 1, ...alone }),
  rangeFunction('REDUCE', ['range', 'range', 'range'], (run, args) => fold(run, 'REDUCE', args), alone),
  rangeFunction('SCAN', ['range', 'range', 'range'], (run, args) => fold(run, 'SCAN', args), alone),
  rangeFunction('BYROW', ['range', 'range'], (run, [given, f]) => along(run, 'BYROW', given, f), alone),
  rangeFunction('BYCOL', ['range', 'range'], (run, [given, f]) => along(run, 'BYCOL', given, f), alone),
  rangeFunction('MAKEARRAY', ['range', 'range', 'range'], (run, [rows, cols, f]) => {
    const options = optionsOf(run, 'MAKEARRAY', [rows, cols], ['number', 'number']);
    if (isError(options)) return options;
    const [height, width] = [whole(options[0], 0), whole(options[1], 0)];
    const lambda = lambdaOf('MAKEARRAY', f, 2);
    if (lambda.k === 'error') return lambda;
    if (height < 1 || width < 1) return run.steps.error('#VALUE!', ...present(options));
    const made = built(height, width, (i, j) => single(run, lambda.call([num(i + 1), num(j + 1)])));
    return decidedBy(run, made, present(options));
  }, alone),
];

function map(run: Run, args: readonly Value[]): Value {
  const given = args.slice(0, -1);
  const lambda = lambdaOf('MAP', args[args.length - 1], given.length);
  if (lambda.k === 'error') return lambda;
  const sizes = given.map((value) => sizeOf(run, value));
  const [size] = sizes;
  if (!size || sizes.includes(undefined)) return err('#VALUE!');
  if (sizes.some((s) => s!.rows !== size.rows || s!.cols !== size.cols)) {
    throw new EngineError('refused', 'hands MAP arrays of different sizes, which cannot be followed');
  }
  return built(size.rows, size.cols, (i, j) => single(run, lambda.call(given.map((value) => portion(run, value, i, j, 1, 1)))));
}

/** REDUCE and SCAN: what is gathered so far and the next cell, row by row. */
function fold(run: Run, name: 'REDUCE' | 'SCAN', [start, given, f]: readonly Value[]): Value {
  const lambda = lambdaOf(name, f, 2);
  if (lambda.k === 'error') return lambda;
  if (start.k === 'missing') throw new EngineError('refused', `gives ${name} no value to start from, which cannot be followed`);
  const size = sizeOf(run, given);
  if (!size) return err('#VALUE!');
  checkSize(size.rows, size.cols);
  let gathered: Value = start;
  const next = (i: number, j: number): Value => lambda.call([gathered, portion(run, given, i, j, 1, 1)]);
  if (name === 'SCAN') return built(size.rows, size.cols, (i, j) => (gathered = single(run, next(i, j))));
  for (let i = 0; i < size.rows; i++) for (let j = 0; j < size.cols; j++) gathered = next(i, j);
  return gathered;
}

function along(run: Run, name: 'BYROW' | 'BYCOL', given: Value, f: Value): Value {
  const lambda = lambdaOf(name, f, 1);
  if (lambda.k === 'error') return lambda;
  const size = sizeOf(run, given);
  if (!size) return err('#VALUE!');
  return name === 'BYROW'
    ? built(size.rows, 1, (i) => single(run, lambda.call([portion(run, given, i, 0, 1, size.cols)])))
    : built(1, size.cols, (_i, j) => single(run, lambda.call([portion(run, given, 0, j, size.rows, 1)])));
}

/** The function of an argument. A function's bare name in its place, which is no name here, is refused. */
function lambdaOf(name: string, given: Value, parameters: number): Lambda | Err {
  if (given.k === 'lambda') return given.parameters === parameters ? given : err('#VALUE!');
  if (given.k !== 'error') return err('#VALUE!');
  if (given.v === '#NAME?') throw new EngineError('refused', `hands ${name} a function that is no LAMBDA, which cannot be followed`);
  return given;
}

/** The one value that a call gives; an array or a function instead is #CALC!. */
function single(run: Run, value: Value): Scalar {
  if (isScalar(value)) return value;
  if (value.k === 'missing') return run.scalar(value);
  const size = value.k === 'lambda' ? undefined : sizeOf(run, value);
  if (size?.rows === 1 && size.cols === 1) return run.scalar(value);
  return value.k === 'area' || value.k === 'matrix' ? errorFrom(run, '#CALC!', run.matrix(value).cells) : err('#CALC!');
}
