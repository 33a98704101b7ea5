import { describe, expect, test } from 'vitest';
import { certificateToU } from '../../../functions/engine/evidence/certificateToU';
import { rangeToU } from '../../../functions/engine/evidence/rangeToU';
import { resolutionToU } from '../../../functions/engine/evidence/resolutionToU';
import { toleranceToU } from '../../../functions/engine/evidence/toleranceToU';
import { expectPrinted, expectRefusal, expectRelative } from '../numbers/expectations';

describe('toleranceToU', () => {
  test('JCGM 100:2008, 4.3.7, example 1: 0.40e-6 /°C rectangular is 0.23e-6', () => {
    expectPrinted(toleranceToU(0.4), '0.23');
    expectRelative(toleranceToU(0.4e-6) ** 2, 0.16e-12 / 3, 1e-15);
  });

  test('JCGM 100:2008, 4.3.7, example 2: 15 µV rectangular is 8.7 µV', () => {
    expectPrinted(toleranceToU(14e-6 * 0.928571e6 + 2e-6 * 1e6), '8.7');
  });

  test('JCGM 100:2008, H.1.3.4 (cyclic amplitude 0.5 °C, arcsine): 0.35 °C', () => {
    expectPrinted(toleranceToU(0.5, { kind: 'arcsine' }), '0.35');
  });

  test('EURACHEM/CITAC, A1: flask 100 mL ± 0.1 mL triangular is 0.04 mL', () => {
    expectPrinted(toleranceToU(0.1, { kind: 'triangular' }), '0.04');
  });

  test('closed forms: √3, √6, √(6/(1 + β²)), √2', () => {
    expectRelative(toleranceToU(1), 1 / Math.sqrt(3), 3e-16);
    expectRelative(toleranceToU(1, { kind: 'triangular' }), 1 / Math.sqrt(6), 3e-16);
    expectRelative(toleranceToU(1, { kind: 'trapezoidal', edgeRatio: 0.5 }), Math.sqrt(1.25 / 6), 3e-16);
    expectRelative(toleranceToU(1, { kind: 'arcsine' }), Math.SQRT1_2, 3e-16);
    expect(toleranceToU(0)).toBe(0);
  });

  test('refuses', () => {
    for (const a of [-1, NaN, Infinity]) expectRefusal(() => toleranceToU(a), 'domain', `half-width >= 0, got ${a}`);
    expectRefusal(() => toleranceToU(1, { kind: 'normal' }), 'choice', 'toleranceToU needs a shape with limits');
    expectRefusal(() => toleranceToU(1, { kind: 'trapezoidal', edgeRatio: 2 }), 'domain', 'got 2');
  });
});

describe('rangeToU', () => {
  test('EURACHEM/CITAC, E.1: 7 to 10 rectangular is 0.87', () => {
    const { estimate, u } = rangeToU(7, 10);
    expect(estimate).toBe(8.5);
    expectPrinted(u, '0.87');
  });

  test('purity of at least 99.5 %: 0.9975 and 0.0025/√3', () => {
    const { estimate, u } = rangeToU(0.995, 1);
    expect(estimate).toBe(0.9975);
    expectRelative(u, 0.0025 / Math.sqrt(3), 5e-14); // the difference of two limits near 1
  });

  test('does not overflow, and takes a shape', () => {
    expect(rangeToU(-1.6e308, 1.7e308).u).toBeLessThan(Infinity);
    expectRelative(rangeToU(-1, 1, { kind: 'triangular' }).u, 1 / Math.sqrt(6), 3e-16);
  });

  test('refuses limits that are not in order', () => {
    expectRefusal(() => rangeToU(2, 1), 'domain', 'got 2 and 1');
    expectRefusal(() => rangeToU(2, 2), 'domain', 'got 2 and 2');
    expectRefusal(() => rangeToU(NaN, 2), 'domain', 'got NaN and 2');
    expectRefusal(() => rangeToU(-Infinity, 2), 'domain', 'got -Infinity and 2');
  });
});

describe('certificateToU', () => {
  test('JCGM 100:2008, 4.3.4: 129 µΩ at 99 % normal is 50 µΩ', () => {
    const { u, k } = certificateToU(129, { coverage: 0.99 });
    expectPrinted(u, '50');
    expectPrinted(k, '2.58');
    expectRelative(u, 50.080958323701, 1e-13); // mpmath, 14 digits
  });

  test('JCGM 100:2008, 4.3.5: ± 0.04 mm at 50 % is 0.06 mm', () => {
    expectPrinted(certificateToU(0.04, { coverage: 0.5 }).u, '0.06');
  });

  test('JCGM 100:2008, H.1.3.1: 0.075 µm with k = 3 is 25 nm', () => {
    expectRelative(certificateToU(75, { coverage: 3 }).u, 25, 0);
  });

  test('JCGM 100:2008, H.1.3.2: 0.01 µm at 95 % from six comparisons, t(5) = 2.57, is 3.9 nm', () => {
    expectPrinted(certificateToU(10, { coverage: 0.95, dof: 5 }).u, '3.9');
  });

  test('is k = 2 where nothing is stated, whatever the degrees of freedom', () => {
    expect(certificateToU(0.1)).toEqual({ u: 0.05, k: 2 });
    expect(certificateToU(0.1, { dof: 5 })).toEqual({ u: 0.05, k: 2 });
  });

  test('a probability takes the shape that is stated', () => {
    expectRelative(certificateToU(0.95, { coverage: 0.95, shape: { kind: 'rectangular' } }).u, 1 / Math.sqrt(3), 3e-16);
    expectRelative(certificateToU(1, { coverage: 0.5, shape: { kind: 'arcsine' } }).u, 1, 3e-16); // √2 sin 45°
    expectPrinted(certificateToU(10, { coverage: 0.95, dof: 5, shape: { kind: 'normal' } }).u, '5.1'); // 10/1.96
  });

  test('refuses', () => {
    expectRefusal(() => certificateToU(1, { coverage: 95 }), 'domain', 'certificateToU needs a coverage factor up to 15');
    expectRefusal(() => certificateToU(1, { coverage: 95 }), 'domain', 'write 0.95');
    expectRefusal(() => certificateToU(1, { coverage: 0 }), 'domain', 'got 0');
    expectRefusal(() => certificateToU(-1), 'domain', 'expanded uncertainty >= 0, got -1');
    expectRefusal(() => certificateToU(NaN), 'domain', 'got NaN');
    expectRefusal(() => certificateToU(1, { dof: 0 }), 'domain', 'degrees of freedom > 0, got 0');
    expectRefusal(() => certificateToU(1, { coverage: 0.95, dof: 5, shape: { kind: 'rectangular' } }), 'domain', 'shape rectangular, got 5');
  });
});

describe('resolutionToU', () => {
  test('JCGM 100:2008, F.2.2.1: a digital step δx is 0.29 δx', () => {
    expectPrinted(resolutionToU(1), '0.29');
    expectRelative(resolutionToU(0.01), 0.01 / Math.sqrt(12), 3e-16);
  });

  test('a fifth of a division is a fifth of that', () => {
    expectRelative(resolutionToU(0.1, 0.2), 0.02 / Math.sqrt(12), 3e-16);
  });

  test('refuses', () => {
    for (const step of [0, -1, NaN, Infinity]) expectRefusal(() => resolutionToU(step), 'domain', `step > 0, got ${step}`);
    expectRefusal(() => resolutionToU(1, 0), 'domain', 'readable part > 0, got 0');
  });
});
