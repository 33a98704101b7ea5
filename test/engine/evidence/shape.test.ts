import { describe, expect, test } from 'vitest';
import { formatShape, halfWidthDivisor, parseShape } from '../../../functions/engine/evidence/shape';
import type { Shape } from '../../../functions/engine/evidence/shape';
import { expectRefusal } from '../numbers/expectations';

describe('parseShape', () => {
  test.each([
    ['normal', { kind: 'normal' }],
    [' Rectangular ', { kind: 'rectangular' }],
    ['TRIANGULAR', { kind: 'triangular' }],
    ['arcsine', { kind: 'arcsine' }],
    ['T', { kind: 't' }],
    ['trapezoidal 0.5', { kind: 'trapezoidal', edgeRatio: 0.5 }],
    ['Trapezoidal   0,5', { kind: 'trapezoidal', edgeRatio: 0.5 }],
    ['trapezoidal .25', { kind: 'trapezoidal', edgeRatio: 0.25 }],
    ['trapezoidal 1', { kind: 'trapezoidal', edgeRatio: 1 }],
  ])('reads "%s"', (text, shape) => expect(parseShape(text)).toEqual(shape));

  test('leaves empty text to the default', () => {
    expect(parseShape('')).toBeUndefined();
    expect(parseShape('  ')).toBeUndefined();
  });

  test('lists the choices where a word is not one of them', () => {
    const choices = 'shape needs one of normal, rectangular, triangular, trapezoidal 0.5 (top over base), arcsine, t, got';
    for (const text of ['square', 'normal 2', 'trapezoidal 0.5 0.5', '√3'])
      expectRefusal(() => parseShape(` ${text} `), 'choice', `${choices} "${text}"`);
  });

  test('asks for the edge ratio of a trapezoid', () => {
    expectRefusal(() => parseShape('trapezoidal'), 'domain', 'edge ratio, as in "trapezoidal 0.5", got none');
    for (const word of ['1.5', '-0.2', 'half', '0x1', '1e-1', '.'])
      expectRefusal(() => parseShape(`trapezoidal ${word}`), 'domain', `edge ratio from 0 to 1, got "${word}"`);
  });
});

test('formatShape writes what parseShape reads', () => {
  const shapes: Shape[] = [
    ...(['normal', 'rectangular', 'triangular', 'arcsine', 't'] as const).map((kind) => ({ kind })),
    { kind: 'trapezoidal', edgeRatio: 0.35 },
  ];
  for (const shape of shapes) expect(parseShape(formatShape(shape))).toEqual(shape);
  expectRefusal(() => formatShape({ kind: 'trapezoidal' }), 'domain', 'got none');
});

test('halfWidthDivisor refuses shapes without limits', () => {
  for (const kind of ['normal', 't'] as const) expectRefusal(() => halfWidthDivisor({ kind }), 'choice', `got ${kind}`);
});
