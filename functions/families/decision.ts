import { each } from '../declaration';
import { conformity } from '../engine/decide/conformity';
import { decide, decisionRules } from '../engine/decide/decide';
import { guardedLimit, sides, zones } from '../engine/decide/guardedLimit';
import { enScore, enVerdict, zScore, zVerdict, zetaScore } from '../engine/decide/scores';
import { choice, dof, flag, number, oneNumber } from '../parameters';

const family = 'Report and decide';

const value = number({ help: 'Measured value', leads: true });
const stdu = number({ help: 'Standard uncertainty u of the value', above: 0 });
const lower = number({ help: 'Lower limit; blank or none where there is none', words: { none: -Infinity }, optional: true, fallback: -Infinity });
const upper = number({ help: 'Upper limit; blank or none where there is none', words: { none: Infinity }, optional: true, fallback: Infinity });
const risk = oneNumber({ help: 'Risk of a wrong decision at the guarded limit, default 0.05', above: 0, below: 0.5, optional: true, fallback: 0.05 });
const assigned = number({ help: 'Assigned value of the comparison' });
const verdict = flag('TRUE spills the score and what it is called');

const scoreColumns = ({ full }: { full: boolean }): number => (full ? 2 : 1);

export const decisionFunctions = [
  each({
    name: 'UNC_CONFORM',
    family,
    help: 'Probability that the true value lies within the limits, given the measured value and its uncertainty.',
    parameters: { value, stdu, lower, upper, dof: dof('Degrees of freedom of u; blank or inf for a normal distribution') },
    result: 'probability',
    body: ({ value, stdu, lower, upper, dof }) => conformity(value, stdu, { lower, upper }, dof),
  }),
  each({
    name: 'UNC_GUARD',
    family,
    help: 'Acceptance or rejection limit with a guard band for a stated risk at that limit.',
    parameters: {
      limit: number({ help: 'Tolerance limit', leads: true }),
      stdu: number({ help: 'Standard uncertainty u, or a fraction of the value where relative', above: 0 }),
      side: choice({ help: 'upper (default) or lower limit', choices: sides }),
      risk,
      zone: choice({ help: 'acceptance (default: drawn inwards) or rejection (drawn outwards)', choices: zones }),
      relative: flag('TRUE where stdu is a fraction of the measured value'),
      dof: dof('Degrees of freedom of u; blank or inf for a normal distribution'),
    },
    result: 'limit',
    body: ({ limit, stdu, side, risk, zone, relative, dof }) => guardedLimit(limit, stdu, { side, risk, zone, relative, dof }),
  }),
  each({
    name: 'UNC_DECIDE',
    family,
    help: 'Pass, conditional or fail by a decision rule that allows for the uncertainty, with the rule in words.',
    parameters: {
      value,
      stdu,
      lower,
      upper,
      rule: choice({ help: 'guarded (default), acceptance, rejection or simple', choices: decisionRules }),
      risk,
    },
    result: 'decision, rule in words',
    columns: () => 2,
    body: ({ value, stdu, lower, upper, rule, risk }) => {
      const { decision, words } = decide(value, stdu, { lower, upper }, rule, risk);
      return [decision, words];
    },
  }),
  each({
    name: 'SCORE_Z',
    family,
    help: 'z score: difference from the assigned value over the standard deviation for proficiency assessment.',
    parameters: {
      value,
      assigned,
      sd: number({ help: 'Standard deviation for proficiency assessment', above: 0 }),
      full: verdict,
    },
    result: 'z; with full: z, verdict',
    columns: scoreColumns,
    body: ({ value, assigned, sd, full }) => scored(zScore(value, assigned, sd), zVerdict, full),
  }),
  each({
    name: 'SCORE_ZETA',
    family,
    help: 'Zeta score: difference from the assigned value over the combined standard uncertainty of both.',
    parameters: {
      value,
      stdu: number({ help: 'Standard uncertainty u of the value, not expanded', atLeast: 0 }),
      assigned,
      assigned_stdu: number({ help: 'Standard uncertainty u of the assigned value, not expanded', atLeast: 0 }),
      full: verdict,
    },
    result: 'zeta; with full: zeta, verdict',
    columns: scoreColumns,
    body: (v) => scored(zetaScore(v.value, v.stdu, v.assigned, v.assigned_stdu), zVerdict, v.full),
  }),
  each({
    name: 'SCORE_EN',
    family,
    help: 'En score: difference from the assigned value over the root sum of squares of both expanded uncertainties.',
    parameters: {
      value,
      expanded: number({ help: 'Expanded uncertainty U of the value', atLeast: 0 }),
      assigned,
      assigned_expanded: number({ help: 'Expanded uncertainty U of the assigned value, with the same coverage', atLeast: 0 }),
      full: verdict,
    },
    result: 'En; with full: En, verdict',
    columns: scoreColumns,
    body: (v) => scored(enScore(v.value, v.expanded, v.assigned, v.assigned_expanded), enVerdict, v.full),
  }),
];

function scored(score: number, verdictOf: (score: number) => string, full: boolean): number | [number, string] {
  return full ? [score, verdictOf(score)] : score;
}
