import { budgetTable } from '../carry/budgetTable';
import { correlations } from '../carry/correlations';
import { takenAsExact } from '../carry/exactCells';
import { notesOn } from '../carry/notes';
import { onlyOutcome, outcomes } from '../carry/outcomes';
import { readCarryCall } from '../carry/readCarryCall';
import { dofCell } from '../dofCell';
import { statement } from '../carry/statement';
import { type Declaration, whole } from '../declaration';
import { oneNumber, reference, repeatingReference } from '../parameters';

const rest = repeatingReference({
  label: 'input, evidence, …',
  help: 'Input cells, then their evidence (u | degrees of freedom | shape | tag | group): one row, or one row an input cell; again and again',
});

const results = reference({ help: 'Cells whose formulas are followed down to the inputs' });
const result = reference({ help: 'One cell whose formula is followed down to the inputs' });

const coverage = oneNumber({
  help: 'Coverage factor k (1 or more) or coverage probability (below 1); blank: k = 2, or t at 95.45 % where the effective degrees of freedom are below 50',
  above: 0, optional: true,
});

/** The functions that follow the workbook's own formulas. */
export const carryFamily: readonly Declaration[] = [
  whole({
    name: 'UNC_CARRY', family: 'Carry', readsWorkbook: true,
    help: 'Combined standard uncertainty of each result cell: follows the formulas down to the inputs and carries their uncertainty through, with all correlations',
    parameters: { results, rest },
    result: 'standard uncertainties in the shape of the results',
    body: async ({ results: grid, rest: pairs }, context) => {
      const call = await readCarryCall(context, grid, pairs);
      const us = outcomes(call, 1, (carried) => [carried.u]).map(([u]) => u);
      return Array.from({ length: grid.rows }, (_, i) => us.slice(i * grid.cols, (i + 1) * grid.cols));
    },
  }),
  whole({
    name: 'UNC_REPORT', family: 'Carry', readsWorkbook: true,
    help: 'One row for each result cell: value, standard uncertainty, effective degrees of freedom, coverage factor, coverage probability, expanded uncertainty, rounded text, number of cells taken as exact, notes',
    parameters: { results, coverage, rest },
    result: 'value | u | degrees of freedom | k | p | U | text | taken as exact | notes',
    body: async ({ results: grid, coverage: asked, rest: pairs }, context) => {
      const call = await readCarryCall(context, grid, pairs);
      return outcomes(call, 9, (carried) => {
        const { k, p, expanded, text } = statement(carried, asked, context.decimalSeparator);
        const exact = takenAsExact(call, carried).reduce((n, e) => n + (e.literal === undefined ? e.cells.length : 0), 0);
        return [carried.estimate, carried.u, dofCell(carried.dof), k, p, expanded, text, exact, notesOn(call, carried).join('; ')];
      });
    },
  }),
  whole({
    name: 'UNC_BUDGET', family: 'Carry', readsWorkbook: true,
    help: 'Uncertainty budget of one result: a row for each source with the largest component first, the totals, what was taken as exact, notes',
    parameters: { result, coverage, rest },
    result: 'a table of twelve columns with a heading row',
    body: async ({ result: grid, coverage: asked, rest: pairs }, context) => {
      const call = await readCarryCall(context, grid, pairs);
      const carried = onlyOutcome(call);
      return carried ? budgetTable(call, carried, asked, context.decimalSeparator) : [['']];
    },
  }),
  whole({
    name: 'UNC_CORREL', family: 'Carry', readsWorkbook: true,
    help: 'Correlation matrix of the result cells, from the sources that they share',
    parameters: { results, rest },
    result: 'a square matrix, a row and a column for each result cell',
    body: async ({ results: grid, rest: pairs }, context) => correlations(await readCarryCall(context, grid, pairs)),
  }),
];
