import type { CellResult } from '../cells';
import { dofCell } from '../dofCell';
import { formatShape } from '../engine/evidence/shape';
import type { Shape } from '../engine/evidence/shape';

/** Width of a result: `u`, or with `full` the three columns that are ready to be evidence. */
export const evidenceWidth = ({ full }: { readonly full: boolean }): number => (full ? 3 : 1);

/** One result: u, or u, degrees of freedom and shape. */
export function evidenceCells(full: boolean, u: number, dof: number, shape: Shape): readonly CellResult[] {
  return full ? [u, dofCell(dof), formatShape(shape)] : [u];
}

/** The shape that empty means: t where degrees of freedom are finite, else normal. */
export const shapeByDof = (dof: number): Shape => ({ kind: dof < Infinity ? 't' : 'normal' });
