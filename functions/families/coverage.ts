import { each } from '../declaration';
import { coverageFactor } from '../engine/coverage/coverageFactor';
import { coverageFor } from '../engine/coverage/coverageFor';
import { truncateDof } from '../engine/coverage/truncateDof';
import { parseShape } from '../engine/evidence/shape';
import { dof, number, parsed } from '../parameters';

const family = 'Report and decide';

export const coverageFunctions = [
  each({
    name: 'UNC_EXPAND',
    family,
    help: 'Expanded uncertainty U = k u.',
    parameters: {
      stdu: number({ help: 'Standard uncertainty u', above: 0 }),
      coverage: number({
        help: 'From 1 on the factor k, below 1 a coverage probability; default k = 2, or t at 95.45 % below 50 degrees of freedom',
        above: 0,
        optional: true,
      }),
      dof: dof('Effective degrees of freedom, truncated to an integer for k; blank or inf for a normal distribution'),
    },
    result: 'U',
    body: ({ stdu, coverage, dof }) => coverageFor(coverage, dof).k * stdu,
  }),
  each({
    name: 'UNC_FACTOR',
    family,
    help: 'Coverage factor k of a coverage probability.',
    parameters: {
      probability: number({ help: 'Coverage probability, two-sided: 0.95', above: 0, below: 1 }),
      dof: dof('Degrees of freedom, truncated to an integer; blank or inf for a normal distribution'),
      shape: parsed(parseShape, { help: 'Shape of the distribution; blank for t with finite degrees of freedom, else normal', optional: true }),
    },
    result: 'k',
    body: ({ probability, dof, shape }) =>
      coverageFactor({ probability, dof: truncateDof(dof), shape: shape?.kind, edgeRatio: shape?.edgeRatio }),
  }),
];
