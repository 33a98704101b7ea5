import { addressOf } from '../areas';
import { auditPort } from '../auditPort';
import { callLibrary, problemOf } from '../callLibrary';
import { carryCalls } from '../carryCalls';
import { cellsOf } from '../cells';
import { fill, h } from '../dom';
import { download } from '../download';
import { button } from '../form';
import type { Step, StepContext } from '../Steps';

/** Step 5: what was taken as exact, what is refused and what to do, the audit of the workbook, and the plan of what was added. */
export function checkStep({ host, say, written }: StepContext): Step {
  const exact = h('div', { 'aria-live': 'polite' });
  const audit = h('div', { 'aria-live': 'polite' });

  async function showExact(): Promise<void> {
    const selected = await host.selection();
    if (!selected) return;
    const items: HTMLElement[] = [];
    for (const call of await carryCalls(host.port, selected.sheet)) {
      const cells = await cellsOf(host.port, call.at);
      const wrong = cells.flat().filter((c) => typeof c?.value === 'object').length;
      const pairs = call.pairs.every((p) => p !== undefined) ? call.pairs.map((p) => p!) : undefined;
      const row = pairs && (await callLibrary(host.port, 'UNC_REPORT', [call.results, undefined, ...pairs]));
      const counts = row?.map((r) => (typeof r[7] === 'number' ? r[7] : 0)) ?? [];
      const problem = row?.flat().map(problemOf).find((p) => p !== undefined);
      items.push(h('li', {}, h('button', { type: 'button', class: 'link', onclick: () => void host.show(call.at) }, `${call.name} in ${addressOf({ ...call.at, rows: 1, cols: 1 })}`),
        ` for ${addressOf(call.results)}: ${Math.max(0, ...counts) === 0 ? 'no cell' : `at most ${Math.max(...counts)} cells`} taken as exact`, ...(wrong > 0 ? [`; ${wrong} results refused`] : []), ...(problem === undefined ? [] : [h('div', { class: 'wrong' }, problem)])));
    }
    fill(exact, items.length > 0 ? h('ul', {}, ...items) : h('p', {}, 'No uncertainty has been carried on this sheet yet'));
  }

  async function showAudit(): Promise<void> {
    say('Following every formula …');
    const { formulas, agree, library, refused } = await auditPort(host.port);
    fill(audit,
      h('p', {}, `${formulas} formulas followed, ${agree} agree with what the sheet shows; ${library} of the library`),
      ...(refused.length === 0 ? [h('p', {}, 'Every formula is read right: results of this workbook can be carried.')] : [
        h('p', { class: 'wrong' }, `${refused.length} cells cannot be followed; results that depend on them are refused. Mend these, or recalculate the workbook:`),
        h('ul', {}, ...refused.slice(0, 50).map((r) => h('li', {}, h('button', { type: 'button', class: 'link', onclick: () => void host.show({ ...r, rows: 1, cols: 1 }) }, addressOf({ ...r, rows: 1, cols: 1 })), ` ${r.why}`))),
      ]));
    say('');
  }

  function savePlan(): void {
    const columns = written.filter(({ step }) => host.stands(step)).flatMap((w) => w.columns);
    if (columns.length === 0) return say('Nothing that the pane has written stands in the workbook');
    download('plan.json', `${JSON.stringify({ title: 'Columns written by the pane', columns }, null, 2)}\n`);
    say(`The plan of ${columns.length} columns was saved: rootsum apply adds them to other workbooks`);
  }

  const element = h('div', {},
    h('h2', {}, 'Carried on this sheet'), exact, button('Look again', () => void showExact()),
    h('h2', {}, 'Audit of this workbook'), audit, button('Audit now', () => void showAudit(), true),
    h('h2', {}, 'Plan'), h('p', {}, 'What the pane has written, as a file that adds the same columns to other workbooks.'), button('Save the plan', savePlan));
  return { title: 'Check', element, shown: () => void showExact(), left: () => undefined };
}
