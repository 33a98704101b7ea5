import { addressOf, areaOf } from '../areas';
import { barPicture } from '../barPicture';
import { resultCallFor } from '../budgetOf';
import type { ResultCall } from '../budgetOf';
import { callLibrary, problemOf } from '../callLibrary';
import type { LibraryCell } from '../callLibrary';
import { fill, h } from '../dom';
import { button, field, figures, table, textField } from '../form';
import type { Step, StepContext } from '../Steps';
import { cellsOf } from '../cells';
import { writeColumns } from '../writeColumns';

/** Step 3: where the uncertainty of the selected result comes from, live as the selection moves. */
export function budgetStep(context: StepContext): Step {
  const { host, say } = context;
  const view = h('div', { 'aria-live': 'polite' });
  const target = textField();
  let current: (ResultCall & { readonly size: { readonly rows: number; readonly cols: number } }) | undefined;
  let stop: (() => void)[] = [];
  let turn = 0;

  async function show(): Promise<void> {
    const mine = ++turn;
    const selected = await host.selection();
    const found = selected && (await resultCallFor(host.port, { ...selected, rows: 1, cols: 1 }));
    if (mine !== turn) return;
    if (found === undefined || typeof found === 'string') {
      current = undefined;
      return fill(view, h('p', {}, found ?? 'Select a result'));
    }
    const cells = await callLibrary(host.port, 'UNC_BUDGET', [found.result, undefined, ...found.pairs]);
    if (mine !== turn) return;
    const wrong = problemOf(cells[0][0]);
    if (wrong !== undefined) return fill(view, h('p', { class: 'wrong' }, wrong));
    const combined = cells.find((r) => typeof r[0] === 'string' && r[0].startsWith('Combined'))?.[cells[0].findIndex((c) => typeof c === 'string' && c.startsWith('Component'))];
    const [[shown]] = await cellsOf(host.port, found.u);
    if (mine !== turn) return;
    if (typeof combined !== 'number' || typeof shown?.value !== 'number' || Math.abs(combined - shown.value) > 1e-9 * combined) {
      current = undefined;
      return fill(view, h('p', { class: 'wrong' }, `What can be repeated here does not give the u in ${addressOf(found.u)}: write the budget with UNC_BUDGET`));
    }
    current = { ...found, size: { rows: cells.length, cols: cells[0].length } };
    target.value = addressOf({ ...found.call.at, row: found.call.at.row, col: found.call.at.col + found.call.at.cols + 1, rows: 1, cols: 1 });
    draw(cells);
  }

  function draw(cells: readonly (readonly LibraryCell[])[]): void {
    const [heading, ...rows] = cells;
    const at = (name: string): number => heading.findIndex((c) => typeof c === 'string' && c.startsWith(name));
    const [component, share] = [at('Component'), at('Share')];
    const sources = rows.filter((r) => typeof r[component] === 'number' && typeof r[share] === 'number' && r[2] !== '');
    const rest = rows.filter((r) => !sources.includes(r) && r[0] !== '');
    fill(view,
      h('h2', {}, addressOf(current!.result)),
      barPicture(sources.map((r) => ({ label: String(r[0]), share: r[share] as number }))),
      table('Budget', ['Source', 'Component', 'Share'], sources.map((r) => [String(r[0]), figures(r[component]), `${((r[share] as number) * 100).toFixed(1)} %`])),
      h('dl', {}, ...rest.flatMap((r) => [h('dt', {}, String(r[0])), h('dd', {}, typeof r[component] === 'number' ? figures(r[component], 5) : r.slice(1).filter((c) => c !== '').map((c) => problemOf(c) ?? figures(c, 5)).join('  '))])));
  }

  async function insert(): Promise<void> {
    if (!current) return say('Select a result whose uncertainty has been carried', true);
    const { result, pairs, size } = current;
    const at = areaOf(target.value, result.sheet);
    if (!at) return say('Give the cell for the heading as an address', true);
    const args = [addressOf(result, at.sheet), '', ...pairs.map((a) => addressOf(a, at.sheet))];
    await writeColumns(context, { sheet: at.sheet, row: at.row + 1, col: at.col, rows: size.rows }, [{ headings: [`Uncertainty budget of ${addressOf(result)}`], formula: `=ROOTSUM.UNC_BUDGET(${args.join(',')})` }], [size.cols]);
  }

  const element = h('div', {}, h('p', {}, 'Select a result, or its u: the sources are listed, the largest first.'), view, field('Insert the table at', target), button('Insert into the sheet', () => void insert(), true));
  return {
    title: 'Budget', element,
    shown: () => {
      stop = [host.onSelection(() => void show()), host.onChange(() => void show())];
      void show();
    },
    left: () => {
      stop.forEach((s) => s());
      stop = [];
    },
  };
}
