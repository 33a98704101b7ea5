import type { PortArea, WorkbookPort } from '../../functions/workbook';
import { addressOf, rowsOf } from './areas';
import type { CarryCall } from './carryCalls';
import { callFor, carryCalls } from './carryCalls';

/** What a cell's uncertainty is made of: the call that gives it, and its arguments for this result alone. */
export interface ResultCall {
  readonly call: CarryCall;
  readonly result: PortArea;
  /** Inputs and evidence in turn, those of other rows left out where they go row by row with the results. */
  readonly pairs: readonly PortArea[];
}

/** Finds the call that tells of the selected cell; words where there is none, or it cannot be repeated here. */
export async function resultCallFor(port: WorkbookPort, selected: PortArea): Promise<ResultCall | string> {
  const found = callFor(await carryCalls(port, selected.sheet), selected);
  if (!found) return 'Select a result whose uncertainty has been carried, or its u';
  const { call, result, index } = found;
  const pairs: PortArea[] = [];
  for (let i = 0; i < call.pairs.length; i += 2) {
    const [input, evidence] = [call.pairs[i], call.pairs[i + 1]];
    if (!input || !evidence) return `An argument of the call in ${addressOf({ ...call.at, rows: 1, cols: 1 })} is no plain reference: insert the budget beside it with UNC_BUDGET`;
    const count = call.results.rows * call.results.cols;
    const rowByRow = input.rows === count && input.cols === 1 && count > 1;
    pairs.push(rowByRow ? rowsOf(input, index, 1) : input, rowByRow && evidence.rows === count ? rowsOf(evidence, index, 1) : evidence);
  }
  return { call, result, pairs };
}
