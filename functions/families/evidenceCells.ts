import type { CellResult } from '../cells';
import { snapDof } from '../engine/coverage/truncateDof';
import { formatShape } from '../engine/evidence/shape';
import type { Shape } from '../engine/evidence/shape';

/** Width of a result: `u`, or with `full` the three columns that are ready to be evidence. */
export const evidenceWidth = ({ full }: { readonly full: boolean }): number => (full ? 3 : 1);

/** One result: u, or u, degrees of freedom and shape. */
export function evidenceCells(full: boolean, u: number, dof: number, shape: Shape): readonly CellResult[] {
  return full ? [u, dofCell(dof), formatShape(shape)] : [u];
}

/** Degrees of freedom as a cell, not truncated: `inf` in place of infinity, 9 in place of 8.999999999999998. */
export const dofCell = (dof: number): CellResult => (dof === Infinity ? 'inf' : snapDof(dof));

/** The shape that empty means: t where degrees of freedom are finite, else normal. */
export const shapeByDof = (dof: number): Shape => ({ kind: dof < Infinity ? 't' : 'normal' });
