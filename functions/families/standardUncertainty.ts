import { each } from '../declaration';
import { certificateToU } from '../engine/evidence/certificateToU';
import { rangeToU } from '../engine/evidence/rangeToU';
import { repeatsToU } from '../engine/evidence/repeatsToU';
import { resolutionToU } from '../engine/evidence/resolutionToU';
import { parseShape } from '../engine/evidence/shape';
import { toleranceToU } from '../engine/evidence/toleranceToU';
import { dof, full, number, numbersOfRow, parsed } from '../parameters';
import { evidenceCells, evidenceWidth, shapeByDof } from './evidenceCells';

const family = 'Evidence to standard uncertainty';
const result = 'u; with full: u, degrees of freedom, shape';
const rectangular = { kind: 'rectangular' } as const;

const limitShape = parsed(parseShape, {
  help: 'rectangular (default), triangular, trapezoidal 0.5 (top over base) or arcsine',
  optional: true,
});

export const standardUncertaintyFunctions = [
  each({
    name: 'STDU_FROM_TOL',
    family,
    help: 'Standard uncertainty from a tolerance given as ± a half-width.',
    parameters: {
      tolerance: number({ help: 'Half-width a of the limits ±a', above: 0 }),
      shape: limitShape,
      full,
    },
    result,
    columns: evidenceWidth,
    body: ({ tolerance, shape = rectangular, full }) => evidenceCells(full, toleranceToU(tolerance, shape), Infinity, shape),
  }),
  each({
    name: 'STDU_FROM_RANGE',
    family,
    help: 'Midpoint and standard uncertainty of a quantity that lies between two limits.',
    parameters: {
      lower: number({ help: 'Lower limit' }),
      upper: number({ help: 'Upper limit; for a purity of at least 99.5 % it is 100 %' }),
      shape: limitShape,
      full,
    },
    result: 'midpoint, u; with full: u, degrees of freedom, shape',
    columns: ({ full }) => (full ? 3 : 2),
    body: ({ lower, upper, shape = rectangular, full }) => {
      const { estimate, u } = rangeToU(lower, upper, shape);
      return full ? evidenceCells(full, u, Infinity, shape) : [estimate, u];
    },
  }),
  each({
    name: 'STDU_FROM_CERT',
    family,
    help: 'Standard uncertainty from the expanded uncertainty of a certificate.',
    parameters: {
      expanded: number({ help: 'Expanded uncertainty as stated', above: 0 }),
      coverage: number({ help: 'From 1 on a coverage factor k (default 2), below 1 a coverage probability', above: 0, optional: true }),
      dof: dof('Degrees of freedom stated with it; blank or inf if none'),
      shape: parsed(parseShape, { help: 'Shape of a stated probability; blank for t with finite degrees of freedom, else normal', optional: true }),
      full,
    },
    result,
    columns: evidenceWidth,
    body: ({ expanded, coverage, dof, shape, full }) =>
      evidenceCells(full, certificateToU(expanded, { coverage, dof, shape }).u, dof, shape ?? shapeByDof(dof)),
  }),
  each({
    name: 'STDU_FROM_RES',
    family,
    help: 'Standard uncertainty from a resolution: readable part × step / √12.',
    parameters: {
      step: number({ help: 'Smallest difference shown, or a scale division', above: 0 }),
      readable: number({ help: 'Part of a step that can be told apart: 1 digital (default), 0.2 for a fifth of a division', above: 0, optional: true, fallback: 1 }),
      full,
    },
    result,
    columns: evidenceWidth,
    body: ({ step, readable, full }) => evidenceCells(full, resolutionToU(step, readable), Infinity, rectangular),
  }),
  each({
    name: 'STDU_FROM_REPEATS',
    family,
    help: 'Standard uncertainty from repeated readings (Type A): s/√n of their mean. A block of rows gives one result a row.',
    parameters: {
      readings: numbersOfRow({ help: 'Readings: one row or column, or a block with one result a row; blank cells are passed over' }),
      averaged: number({ help: 'How many readings the reported value is the mean of; default all of them, 1 for a single one', atLeast: 1, whole: true, optional: true }),
      prior_s: number({ help: 'Standard deviation of one reading from earlier work, used in place of that of the readings', above: 0, optional: true }),
      prior_dof: number({ help: 'Degrees of freedom of prior_s; blank or inf if well known', above: 0, words: { inf: Infinity }, optional: true }),
      full,
    },
    result,
    columns: evidenceWidth,
    body: ({ readings, averaged, prior_s, prior_dof, full }) => {
      const { u, dof } = repeatsToU(readings, { averaged, priorS: prior_s, priorDof: prior_dof });
      return evidenceCells(full, u, dof, shapeByDof(dof));
    },
  }),
];
