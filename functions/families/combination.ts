import { shapeOf } from '../arguments';
import { whereIn } from '../cells';
import type { Grid } from '../cells';
import { whole } from '../declaration';
import type { NumberBlock } from '../declaration';
import { EngineError } from '../engine/EngineError';
import { combine } from '../engine/evidence/combine';
import { combinedUncertainty, degreesOfFreedom } from '../engine/quantity/quantity';
import { SourceTable } from '../engine/quantity/sourceTable';
import { readTags } from '../engine/quantity/tags';
import { refusal } from '../errors';
import { evidenceColumns, readEvidence } from '../evidenceRows';
import type { GivenEvidence } from '../evidenceRows';
import { full, numbers, range } from '../parameters';
import { evidenceCells, shapeByDof } from './evidenceCells';

export const combinationFunctions = [
  whole({
    name: 'UNC_COMBINE',
    family: 'Evidence to standard uncertainty',
    help: 'Combined standard uncertainty of several components: root sum of squares, or the law of propagation.',
    parameters: {
      evidence: range({ help: 'One row a component: u, degrees of freedom, shape, tag, group; blank rows are passed over' }),
      sensitivities: numbers({ help: 'Sensitivity coefficient of each row; default 1', optional: true }),
      correlations: numbers({ help: 'Correlation matrix of the rows; default none', optional: true }),
      full,
    },
    result: 'u; with full: u, effective degrees of freedom, shape',
    body: ({ evidence, sensitivities, correlations, full }) => {
      const components = readComponents(evidence, sensitivities);
      if (components.length === 0) return [full ? ['', '', ''] : ['']];
      const { u, nuEff } = correlations ? correlated(components, correlations, evidence.rows) : bySources(components);
      if (full && nuEff === undefined) {
        const none = refusal('correlations: correlated components of finite degrees of freedom have no effective degrees of freedom');
        return [[u, none, none]];
      }
      const dof = nuEff ?? Infinity;
      return [evidenceCells(full, u, dof, shapeByDof(dof))];
    },
  }),
];

/** One row of evidence that is not blank. */
interface Component {
  /** Its row, counted from 0. */
  readonly row: number;
  readonly given: GivenEvidence;
  readonly sensitivity: number;
  readonly where: string;
}

/** `nuEff` is undefined where Welch–Satterthwaite does not hold. */
interface Combined {
  readonly u: number;
  readonly nuEff: number | undefined;
}

function readComponents(evidence: Grid, sensitivities: NumberBlock | undefined): readonly Component[] {
  if (evidence.cols > evidenceColumns) throw refusal(`evidence must have 1 to ${evidenceColumns} columns, got ${shapeOf(evidence)}`);
  const c = sensitivities && vector('sensitivities', sensitivities, evidence.rows);
  return readEvidence(evidence.cells).flatMap((given, row) => {
    const where = whereIn(evidence, row, 0);
    if (!given.ok) throw refusal(`evidence: ${given.problem}${where}`);
    if (given.blank) return [];
    const sensitivity = c ? c[row] : 1;
    if (sensitivity === null) throw refusal(`sensitivities is blank in row ${row + 1}`);
    return [{ row, given, sensitivity, where }];
  });
}

/** A row or a column of n numbers. */
function vector(name: string, block: NumberBlock, n: number): readonly (number | null)[] {
  const flat = block.values.flat();
  const isVector = block.grid.rows === 1 || block.grid.cols === 1;
  if (!isVector || flat.length !== n) throw refusal(`${name} must be ${n} × 1 as evidence has ${n} rows, got ${shapeOf(block.grid)}`);
  return flat;
}

/** By a correlation matrix, in place of tags. */
function correlated(components: readonly Component[], { grid, values }: NumberBlock, rows: number): Combined {
  const tagged = components.find(({ given }) => given.tag !== undefined && readTags(given.tag).k === 'shared');
  if (tagged) throw refusal(`correlations cannot be given together with tags in the evidence, got a tag${tagged.where}`);
  if (grid.rows !== rows || grid.cols !== rows)
    throw refusal(`correlations must be ${rows} × ${rows} as evidence has ${rows} rows, got ${shapeOf(grid)}`);
  const filled = (row: number, col: number) => {
    const r = values[row][col];
    if (r === null) throw refusal(`correlations is blank in row ${row + 1}, column ${col + 1}`);
    return r;
  };
  return combine(
    components.map(({ given }) => given.u),
    components.map(({ sensitivity }) => sensitivity),
    components.map((a) => components.map((b) => filled(a.row, b.row))),
    components.map(({ given }) => given.dof),
  );
}

/** Effects of one source add with their signs; sources of one evaluation are one term of the effective degrees of freedom. */
function bySources(components: readonly Component[]): Combined {
  const table = new SourceTable();
  const effects = new Map<number, number>();
  for (const { row, given, sensitivity, where } of components) {
    if (given.exact) continue;
    try {
      const { u, dof, shape, tag = '', group = '' } = given;
      for (const share of table.add({ u, dof, shape, tags: readTags(tag), group, row: String(row) }))
        effects.set(share.source, (effects.get(share.source) ?? 0) + sensitivity * share.u);
    } catch (thrown) {
      throw thrown instanceof EngineError ? refusal(`evidence: ${thrown.message}${where}`) : thrown;
    }
  }
  return { u: combinedUncertainty(effects), nuEff: degreesOfFreedom(effects, table) };
}
