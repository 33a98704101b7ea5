import { whereIn } from '../cells';
import { each, whole } from '../declaration';
import type { NumberBlock } from '../declaration';
import { biasToU } from '../engine/evidence/biasToU';
import { duplicatesToU } from '../engine/evidence/duplicatesToU';
import { pooledDeviation } from '../engine/evidence/pooledDeviation';
import { parseShape } from '../engine/evidence/shape';
import { toleranceToU } from '../engine/evidence/toleranceToU';
import { refusal } from '../errors';
import { flag, full, number, numbers, parsed } from '../parameters';
import { evidenceCells, evidenceWidth, shapeByDof } from './evidenceCells';

const family = 'Evidence to standard uncertainty';
const result = 'u; with full: u, degrees of freedom, shape';
const rectangular = { kind: 'rectangular' } as const;

/** The expansion coefficient of water near 20 °C, per °C. @source EURACHEM/CITAC CG 4, 3rd ed., A1 */
const WATER = 2.1e-4;

export const precisionFunctions = [
  whole({
    name: 'STDU_FROM_DUPLICATES',
    family,
    help: 'Repeatability of one determination as a standard uncertainty, from pairs of duplicates.',
    parameters: {
      first: numbers({ help: 'First result of each pair' }),
      second: numbers({ help: 'Second result of each pair, in the same shape; pairs of blank cells are passed over' }),
      relative: flag('TRUE takes each difference relative to the mean of its pair'),
      full,
    },
    result,
    body: ({ first, second, relative, full }) => {
      const [a, b] = pairsOf('first', first, 'second', second);
      const { u, dof } = duplicatesToU(a, b, relative);
      return [evidenceCells(full, u, dof, shapeByDof(dof))];
    },
  }),
  whole({
    name: 'STDU_FROM_BIAS',
    family,
    help: 'Standard uncertainty of the bias of a method, from reference materials or proficiency tests.',
    parameters: {
      biases: numbers({ help: 'Differences from the reference values, all absolute or all relative' }),
      reference_stdu: numbers({ help: 'Standard uncertainty of each reference value, in the same shape and unit', atLeast: 0 }),
      full,
    },
    result,
    body: ({ biases, reference_stdu, full }) => {
      const [b, u] = pairsOf('biases', biases, 'reference_stdu', reference_stdu);
      return [evidenceCells(full, biasToU(b, u), Infinity, shapeByDof(Infinity))];
    },
  }),
  each({
    name: 'STDU_FROM_TEMP',
    family,
    help: 'Standard uncertainty of a volume from the range of temperature about that of its calibration.',
    parameters: {
      volume: number({ help: 'Volume', above: 0, leads: true }),
      half_range: number({ help: 'Half of the temperature range, in °C', above: 0 }),
      expansion: number({ help: 'Coefficient of volume expansion per °C; default that of water, 0.00021', above: 0, optional: true, fallback: WATER }),
      shape: parsed(parseShape, { help: 'rectangular (default), triangular, trapezoidal 0.5 or arcsine', optional: true }),
      full,
    },
    result,
    columns: evidenceWidth,
    body: ({ volume, half_range, expansion, shape = rectangular, full }) =>
      evidenceCells(full, toleranceToU(volume * half_range * expansion, shape), Infinity, shape),
  }),
  each({
    name: 'SPEC_TOL',
    family,
    help: 'Half-width of an instrument\'s specification: a part of the reading, a part of the range, and counts of the last digit.',
    parameters: {
      reading: number({ help: 'Reading', leads: true }),
      relative_reading: number({ help: 'Part of the reading, as a fraction: 0.0005 or a cell showing 0.05 %', atLeast: 0 }),
      range: number({ help: 'Range, in the unit of the reading', atLeast: 0, optional: true, fallback: 0 }),
      relative_range: number({ help: 'Part of the range, as a fraction', atLeast: 0, optional: true, fallback: 0 }),
      step: number({ help: 'Value of one count of the last digit', atLeast: 0, optional: true, fallback: 0 }),
      counts: number({ help: 'Number of counts', atLeast: 0, optional: true, fallback: 0 }),
    },
    result: 'half-width, in the unit of the reading',
    body: ({ reading, relative_reading, range, relative_range, step, counts }) => {
      const tolerance = Math.abs(reading) * relative_reading + range * relative_range + step * counts;
      if (!(tolerance > 0 && tolerance < Infinity)) throw refusal('the specification gives no half-width above 0');
      return tolerance;
    },
  }),
  whole({
    name: 'SD_POOL',
    family,
    help: 'Pooled standard deviation of several series and its degrees of freedom.',
    parameters: {
      deviations: numbers({ help: 'Standard deviation of each series', atLeast: 0 }),
      dof: numbers({ help: 'Degrees of freedom of each, in the same shape', above: 0 }),
    },
    result: 'standard deviation, degrees of freedom',
    body: ({ deviations, dof }) => {
      const pooled = pooledDeviation(...pairsOf('deviations', deviations, 'dof', dof));
      return [[pooled.s, pooled.dof]];
    },
  }),
];

/** Two blocks of one shape as lists; places where both are blank are passed over, where one is, refused. */
function pairsOf(a: string, first: NumberBlock, b: string, second: NumberBlock): [number[], number[]] {
  const { rows, cols } = first.grid;
  if (second.grid.rows !== rows || second.grid.cols !== cols)
    throw refusal(`${b} must have the shape of ${a}, got ${second.grid.rows} × ${second.grid.cols} for ${rows} × ${cols}`);
  const pairs: [number, number][] = [];
  first.values.forEach((line, row) => line.forEach((x, col) => {
    const y = second.values[row][col];
    if (x === null && y === null) return;
    if (x === null || y === null) throw refusal(`${x === null ? a : b} is blank beside a number${whereIn(x === null ? first.grid : second.grid, row, col)}`);
    pairs.push([x, y]);
  }));
  if (pairs.length === 0) throw refusal(`${a} must hold at least one number`);
  return [pairs.map(([x]) => x), pairs.map(([, y]) => y)];
}
