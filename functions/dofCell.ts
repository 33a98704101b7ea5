import type { CellResult } from './cells';
import { snapDof } from './engine/coverage/truncateDof';

/** Degrees of freedom as a cell, not truncated: `inf` in place of infinity, 9 in place of 8.999999999999998. */
export const dofCell = (dof: number): CellResult => (dof === Infinity ? 'inf' : snapDof(dof));
