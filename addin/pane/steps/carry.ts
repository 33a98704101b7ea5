import type { PortArea } from '../../../functions/workbook';
import { addressOf, areaOf } from '../areas';
import { callLibrary, problemOf } from '../callLibrary';
import { cellsOf, freeColumn, headingOf, numbersIn } from '../cells';
import { fill, h } from '../dom';
import { button, choices, field, figures, formatOf, textField } from '../form';
import { inputsOf } from '../inputsOf';
import type { InputGroup } from '../inputsOf';
import type { Step, StepContext } from '../Steps';
import { writeColumns } from '../writeColumns';

interface Row {
  readonly group: InputGroup;
  readonly evidence: HTMLInputElement;
  readonly sharing: HTMLSelectElement;
  readonly element: HTMLElement;
}

const REPORT = ['value', 'u', 'degrees of freedom', 'k', 'p', 'U', 'result', 'taken as exact', 'notes'];

/** Step 2: result cells are followed down to the typed numbers; each group of them gets its evidence, and u is carried through. */
export function carryStep(context: StepContext): Step {
  const { host, say } = context;
  const results = textField('', () => void follow(false));
  const list = h('div', { class: 'inputs' });
  const what = choices([['UNC_CARRY', 'u alone'], ['UNC_REPORT', 'a report row: value, u, k, U, text …']], () => void place());
  const target = textField();
  const outcome = h('p', { role: 'status', class: 'outcome' });
  let area: PortArea | undefined;
  let rows: Row[] = [];
  let format: string | undefined;

  async function follow(fromSelection: boolean): Promise<void> {
    const chosen = await host.selection();
    const wanted = fromSelection ? chosen : areaOf(results.value, chosen?.sheet ?? '');
    area = wanted && (await numbersIn(host.port, wanted));
    if (!area) return say('Select the result cells first', true);
    results.value = addressOf(area);
    say('Following the formulas …');
    const { groups, refusals } = await inputsOf(host.port, area);
    rows = await Promise.all(groups.map((group) => rowOf(group)));
    fill(list, ...rows.map((r) => r.element));
    const without = rows.filter((r) => r.evidence.value === '').length;
    say(refusals.length > 0 ? refusals[0] : groups.length === 0 ? 'These cells depend on no typed number' : `${groups.length} groups of input cells found; ${without} without evidence are taken as exact`, refusals.length > 0);
    await place();
  }

  async function rowOf(group: InputGroup): Promise<Row> {
    const proposed = await proposeEvidence(group);
    const evidence = textField(proposed ? addressOf(proposed) : '', () => { mark(); void preview(); });
    const sharing = choices([['', 'one row of evidence for each cell, or a tag beside it'], ['each', 'each: independent in every cell'], ['same', 'one source of doubt for all cells']], () => void preview());
    const state = h('span', { class: 'state' });
    const mark = (): void => {
      const exact = evidence.value.trim() === '';
      state.textContent = exact ? 'taken as exact' : 'with evidence';
      element.classList.toggle('exact', exact);
    };
    const element = h('fieldset', {}, h('legend', {}, `${group.label} `, h('small', {}, addressOf(group.area))), state, field('Evidence (cells with u)', evidence), field('Where one row serves several cells', sharing),
      button('Show', () => void host.show(group.area)));
    mark();
    return { group, evidence, sharing, element };
  }

  /** The column whose heading speaks of the input, u(Volume) say, in the same rows. */
  async function proposeEvidence({ area: { sheet, row, col, rows: count }, label }: InputGroup): Promise<PortArea | undefined> {
    const width = (await host.port.sheets()).find((s) => s.name === sheet)?.cols ?? 0;
    const key = label.toLowerCase().replace(/[^\p{L}\p{N}]+/gu, ' ').trim();
    for (let c = 1; c <= width; c++) {
      if (c === col) continue;
      const heading = (await headingOf(host.port, { sheet, row, col: c, rows: 1, cols: 1 })).toLowerCase();
      const told = /^u\s*[(,]?\s*(.+?)\)?$/.exec(heading)?.[1]?.replace(/[^\p{L}\p{N}]+/gu, ' ').trim();
      if (told === undefined || told === '' || !(told === key || key.startsWith(told) || told.startsWith(key))) continue;
      const found = { sheet, row, col: c, rows: count, cols: 1 };
      const cells = await cellsOf(host.port, found);
      if (cells.every(([cell]) => typeof cell?.value === 'number')) return found;
    }
    return undefined;
  }

  /** Inputs and their evidence in turn, as they are typed. */
  function pairs(): string[] | undefined {
    const home = area!.sheet;
    const found: string[] = [];
    for (const { group, evidence, sharing } of rows) {
      if (evidence.value.trim() === '') continue;
      const cells = areaOf(evidence.value, home);
      if (!cells) {
        say(`The evidence of ${group.label} must be an address, got ${evidence.value}`, true);
        return undefined;
      }
      const typed = addressOf(cells, home);
      const tag = sharing.value === 'each' ? 'each' : sharing.value === 'same' ? group.label.replaceAll('"', '""') : undefined;
      // u alone has no place for a tag: the row u | degrees of freedom | shape | tag is made around it
      const row = tag === undefined || cells.cols > 1 || cells.rows > 1 ? typed : `CHOOSE({1,2,3,4},${typed},"inf","normal","${tag}")`;
      found.push(addressOf(group.area, home), row);
    }
    return found;
  }

  async function place(): Promise<void> {
    if (!area) return;
    target.value = addressOf({ ...area, row: area.row - 1, col: await freeColumn(host.port, area, what.value === 'UNC_REPORT' ? REPORT.length : area.cols), rows: 1, cols: 1 });
    await preview();
  }

  async function preview(): Promise<void> {
    const told = rows.filter((r) => r.evidence.value.trim() !== '');
    format = undefined;
    if (!area || told.length === 0 || told.some((r) => r.sharing.value !== '')) return fill(outcome); // a tag is added only in the formula
    const given = told.map((r) => [r.group.area, areaOf(r.evidence.value, area!.sheet)] as const);
    if (given.some(([, e]) => e === undefined)) return fill(outcome);
    const cells = await callLibrary(host.port, 'UNC_CARRY', [area, ...given.flat()]);
    format = formatOf(cells.map((line) => line[0]));
    const wrong = cells.flat().map(problemOf).find((p) => p !== undefined);
    fill(outcome, wrong ?? `u of the first result: ${figures(cells[0][0])}`);
  }

  async function write(): Promise<void> {
    if (!area) return follow(true);
    const args = pairs();
    if (!args) return;
    if (args.length === 0) return say('Give evidence for at least one group of input cells', true);
    const at = areaOf(target.value, area.sheet);
    if (!at || at.sheet !== area.sheet) return say(`Give the cell for the heading as an address on ${area.sheet}`, true);
    const report = what.value === 'UNC_REPORT';
    const name = await headingOf(host.port, area);
    const formula = `=ROOTSUM.${what.value}(${[addressOf(area, area.sheet), ...(report ? [''] : []), ...args].join(',')})`;
    const where = { sheet: area.sheet, row: area.row, col: at.col, rows: report ? area.rows * area.cols : area.rows };
    const headings = report ? REPORT : Array.from({ length: area.cols }, () => `u(${name || 'result'})`);
    await writeColumns(context, where, [{ headings, formula, numberFormat: report ? undefined : format }]);
  }

  const element = h('div', {},
    h('p', {}, 'Select the result cells in the sheet. Their formulas are followed down to the numbers that were typed.'),
    button('Follow the selection', () => void follow(true)),
    field('Results', results), list, field('Write', what), field('Heading goes to', target), outcome,
    button('Write the column', () => void write(), true));
  return { title: 'Carry', element, shown: () => undefined, left: () => undefined };
}
