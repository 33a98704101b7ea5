import { toNumber, toText } from './coerce';
import { compare } from './compare';
import type { BinaryOperator } from './expression';
import { type Err, type Num, type Scalar } from './scalar';
import type { Steps } from './steps';

/** Two scalars under an operator, with Excel's coercion; the left error comes first. */
export function binary(steps: Steps, operator: BinaryOperator, a: Scalar, b: Scalar): Scalar {
  if (a.k === 'error') return a;
  if (b.k === 'error') return b;
  switch (operator) {
    case '+':
    case '-':
    case '*':
    case '/':
    case '^': {
      const x = toNumber(steps, a);
      if (x.k === 'error') return x;
      const y = toNumber(steps, b);
      return y.k === 'error' ? y : arithmetic[operator](steps, x, y);
    }
    case '&': {
      const x = toText(steps, a);
      if (x.k === 'error') return x;
      const y = toText(steps, b);
      return y.k === 'error' ? y : steps.text(x.v + y.v, x, y);
    }
    case '=':
      return steps.decision(compare(a, b) === 0, a, b);
    case '<>':
      return steps.decision(compare(a, b) !== 0, a, b);
    case '<':
      return steps.decision(compare(a, b) < 0, a, b);
    case '<=':
      return steps.decision(compare(a, b) <= 0, a, b);
    case '>':
      return steps.decision(compare(a, b) > 0, a, b);
    case '>=':
      return steps.decision(compare(a, b) >= 0, a, b);
  }
}

/** The arithmetic of two numbers with slopes. */
export const add = (steps: Steps, a: Num, b: Num): Num | Err => steps.binary(a.v + b.v, a, 1, b, 1);
export const subtract = (steps: Steps, a: Num, b: Num): Num | Err => steps.binary(a.v - b.v, a, 1, b, -1);
export const multiply = (steps: Steps, a: Num, b: Num): Num | Err => steps.binary(a.v * b.v, a, b.v, b, a.v);

/** a / b; #DIV/0! where b is 0. */
export function divide(steps: Steps, a: Num, b: Num): Num | Err {
  if (b.v === 0) return steps.error('#DIV/0!', a, b);
  const q = a.v / b.v;
  return steps.binary(q, a, 1 / b.v, b, -q / b.v);
}

/** a ^ b as Excel has it: 0^0 is #NUM!, 0 to a negative power #DIV/0!, a negative base takes whole exponents only. */
export function power(steps: Steps, a: Num, b: Num): Num | Err {
  if (a.v === 0 && b.v === 0) return steps.error('#NUM!', a, b);
  if (a.v === 0 && b.v < 0) return steps.error('#DIV/0!', a, b);
  const y = a.v ** b.v;
  if (!Number.isFinite(y)) return steps.error('#NUM!', a, b);
  const slopeBase = b.v === 1 ? 1 : b.v * a.v ** (b.v - 1);
  const slopeExponent = a.v > 0 ? y * Math.log(a.v) : a.v === 0 ? 0 : NaN;
  return steps.binary(y, a, slopeBase, b, slopeExponent);
}

const arithmetic = { '+': add, '-': subtract, '*': multiply, '/': divide, '^': power };
