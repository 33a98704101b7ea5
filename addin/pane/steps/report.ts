import { addressOf, areaOf } from '../areas';
import { resultCallFor } from '../budgetOf';
import type { ResultCall } from '../budgetOf';
import { callLibrary, problemOf } from '../callLibrary';
import { freeColumn, headingOf } from '../cells';
import { fill, h } from '../dom';
import { button, choices, field, figures, numberIn, table, textField, typedArgument } from '../form';
import type { Step, StepContext } from '../Steps';
import { writeColumns } from '../writeColumns';

/** Step 4: results as they stand in a report, and whether they keep a limit. */
export function reportStep(context: StepContext): Step {
  const { host, say } = context;
  const style = choices([['plusminus', '12.10 ± 0.12'], ['brackets', '12.10(6): u in the last digits'], ['scientific', '(1.210 ± 0.012)e1'], ['percent', '12.10 ± 1.0 %']], () => void show());
  const digits = choices([['2', 'two digits of u'], ['1', 'one digit of u']], () => void show());
  const k = textField('2', () => void show());
  const unit = textField('', () => void show());
  const lower = textField('', () => void show());
  const upper = textField('', () => void show());
  const rule = choices([['guarded', 'guarded: pass only where surely within'], ['acceptance', 'acceptance: guarded inwards'], ['rejection', 'rejection: fail only where surely outside'], ['simple', 'simple: the value alone']], () => void show());
  const view = h('div', { 'aria-live': 'polite' });
  const target = textField();
  let found: ResultCall | undefined;
  let stop: () => void = () => undefined;

  const factor = (): number | string | undefined => (style.value === 'brackets' ? undefined : numberIn(k));

  /** The columns of values and of u, as the call in the sheet has them. */
  const columns = ({ call }: ResultCall): [value: typeof call.at, u: typeof call.at] =>
    (call.name === 'UNC_REPORT' ? [{ ...call.at, cols: 1 }, { ...call.at, col: call.at.col + 1, cols: 1 }] : [call.results, call.at]);

  async function show(): Promise<void> {
    const selected = await host.selection();
    const call = selected && (await resultCallFor(host.port, { ...selected, rows: 1, cols: 1 }));
    if (call === undefined || typeof call === 'string') {
      found = undefined;
      return fill(view, h('p', {}, call ?? 'Select a result'));
    }
    const moved = found === undefined || found.call.at.row !== call.call.at.row || found.call.at.col !== call.call.at.col;
    found = call;
    const [values, us] = columns(call).map((a) => ({ ...a, rows: Math.min(5, a.rows) }));
    const texts = await callLibrary(host.port, 'UNC_TEXT', [values, us, style.value, Number(digits.value), unit.value || undefined, factor()]);
    const limits = numberIn(lower) !== undefined || numberIn(upper) !== undefined;
    const decisions = limits ? await callLibrary(host.port, 'UNC_DECIDE', [values, us, numberIn(lower), numberIn(upper), rule.value]) : [];
    fill(view, table('First results', limits ? ['Result', 'Decision'] : ['Result'], texts.map(([t], i) => [problemOf(t) ?? figures(t), ...(limits ? [problemOf(decisions[i]?.[0]) ?? String(decisions[i]?.[0] ?? '')] : [])])));
    if (moved) target.value = addressOf({ ...us, row: us.row - 1, col: await freeColumn(host.port, { ...columns(call)[1] }, 1), rows: 1, cols: 1 });
  }

  async function write(): Promise<void> {
    if (!found) return say('Select a result whose uncertainty has been carried', true);
    const [values, us] = columns(found);
    if (values.cols > 1) return say('Results must stand in one column to be written as text', true);
    const at = areaOf(target.value, us.sheet);
    if (!at || at.sheet !== us.sheet) return say(`Give the cell for the heading as an address on ${us.sheet}`, true);
    const [v, u] = [addressOf(values, us.sheet), addressOf(us, us.sheet)];
    const text = [v, u, `"${style.value}"`, digits.value, typedArgument(unit.value || undefined), typedArgument(factor())];
    while (text.at(-1) === '') text.pop();
    const name = await headingOf(host.port, values);
    const limits = numberIn(lower) !== undefined || numberIn(upper) !== undefined;
    await writeColumns(context, { sheet: us.sheet, row: us.row, col: at.col, rows: us.rows }, [
      { headings: [`${name || 'Result'}, reported`], formula: `=ROOTSUM.UNC_TEXT(${text.join(',')})` },
      ...(limits ? [{ headings: ['Decision', 'Rule'], formula: `=ROOTSUM.UNC_DECIDE(${[v, u, typedArgument(numberIn(lower)), typedArgument(numberIn(upper)), `"${rule.value}"`].join(',')})` }] : []),
    ]);
  }

  const element = h('div', {},
    h('p', {}, 'Select a result whose uncertainty has been carried. The first rows are shown as they would be written.'),
    field('Form', style), field('Rounding', digits), field('Coverage factor k', k, 'blank states u itself'), field('Unit', unit), field('Lower limit', lower), field('Upper limit', upper), field('Rule for the decision', rule),
    view, field('Heading goes to', target), button('Write the columns', () => void write(), true));
  return {
    title: 'Report', element,
    shown: () => {
      stop = host.onSelection(() => void show());
      void show();
    },
    left: () => stop(),
  };
}
