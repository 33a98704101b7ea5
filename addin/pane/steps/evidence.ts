import type { PortArea } from '../../../functions/workbook';
import { addressOf, areaOf } from '../areas';
import { callLibrary, problemOf } from '../callLibrary';
import type { LibraryArgument } from '../callLibrary';
import { freeColumn, headingOf, numbersIn } from '../cells';
import { fill, h } from '../dom';
import { button, choices, field, figures, formatOf, numberIn, table, textField } from '../form';
import type { Step, StepContext } from '../Steps';
import { writeColumns } from '../writeColumns';

const kinds = [
  ['tolerance', 'Tolerances (± half-widths)'], ['certificate', 'Certificates (expanded uncertainty)'], ['resolution', 'Resolutions (steps of a display)'], ['repeats', 'Repeats (one row a result)'],
] as const;
type Kind = (typeof kinds)[number][0];

/** What a heading and the form of the cells say about the evidence. */
export function proposeKind(heading: string, cols: number): Kind {
  if (cols > 1) return 'repeats';
  if (/resol|division|readab|digit|step|scale/i.test(heading)) return 'resolution';
  if (/cert|expand|\bU\b|k ?=/.test(heading)) return 'certificate';
  return 'tolerance';
}

/** Step 1: a column of what the laboratory knows becomes a column of standard uncertainties. */
export function evidenceStep(context: StepContext): Step {
  const { host, say } = context;
  const source = textField('', () => void read(false));
  const kind = choices(kinds, () => void preview());
  const shape = choices([['rectangular', 'rectangular: all values alike'], ['triangular', 'triangular: the middle more likely'], ['arcsine', 'arcsine: the ends more likely'], ['trapezoidal 0.5', 'trapezoidal, top half as long as the base']], () => void preview());
  const coverage = textField('2', () => void preview());
  const full = h('input', { type: 'checkbox', onchange: () => void place() });
  const target = textField();
  const rows = h('div', {});
  const details = h('div', {});
  let area: PortArea | undefined;
  let heading = '';
  let format: string | undefined;

  const arguments_ = (given: LibraryArgument): LibraryArgument[] => {
    switch (kind.value as Kind) {
      case 'tolerance': return [given, shape.value, full.checked || undefined];
      case 'certificate': return [given, numberIn(coverage), undefined, undefined, full.checked || undefined];
      case 'resolution': return [given, undefined, full.checked || undefined];
      default: return [given, undefined, undefined, undefined, full.checked || undefined];
    }
  };
  const names: Record<Kind, string> = { tolerance: 'STDU_FROM_TOL', certificate: 'STDU_FROM_CERT', resolution: 'STDU_FROM_RES', repeats: 'STDU_FROM_REPEATS' };

  async function read(fromSelection: boolean): Promise<void> {
    const chosen = await host.selection();
    const wanted = fromSelection ? chosen : areaOf(source.value, chosen?.sheet ?? '');
    area = wanted && (await numbersIn(host.port, wanted));
    if (!area) return say(fromSelection ? 'Select the cells that hold the tolerances, certificates, resolutions or repeats first' : 'There are no numbers in these cells', true);
    heading = await headingOf(host.port, area);
    source.value = addressOf(area);
    kind.value = proposeKind(heading, area.cols);
    say(heading === '' ? 'No heading was found above these cells' : `Read as: ${heading}`);
    await place();
  }

  async function place(): Promise<void> {
    if (!area) return;
    const width = full.checked ? 3 : 1;
    target.value = addressOf({ ...area, row: area.row - 1, col: await freeColumn(host.port, area, width), rows: 1, cols: 1 });
    await preview();
  }

  async function preview(): Promise<void> {
    const chosen = kind.value as Kind;
    fill(details, ...(chosen === 'tolerance' ? [field('Shape', shape)] : []), ...(chosen === 'certificate' ? [field('Coverage', coverage, '1 or more is a factor k; below 1 a probability: 0.95')] : []));
    if (!area) return;
    const first = { ...area, rows: Math.min(5, area.rows) };
    const result = await callLibrary(host.port, names[chosen], arguments_(first));
    format = formatOf(result.map((line) => line[0]));
    const given = await host.port.read([first]);
    fill(rows, table('First rows', [heading || 'Value', ...(full.checked ? ['u', 'degrees of freedom', 'shape'] : ['u'])], result.map((line, r) => [
      given[0].cells.slice(r * first.cols, (r + 1) * first.cols).map((c) => figures(c?.value)).join('  '), ...line.map((c) => problemOf(c) ?? figures(c)),
    ])));
  }

  async function write(): Promise<void> {
    if (!area) return read(true);
    const at = areaOf(target.value, area.sheet);
    if (!at || at.sheet !== area.sheet) return say(`Give the cell for the heading as an address on ${area.sheet}, such as K5`, true);
    const args = arguments_(area).map((arg) => (typeof arg === 'object' ? addressOf(arg, area!.sheet) : typeof arg === 'string' ? `"${arg}"` : arg === true ? 'TRUE' : (arg ?? '')));
    while (args.at(-1) === '') args.pop();
    const headings = full.checked ? [`u(${heading || 'value'})`, 'degrees of freedom', 'shape'] : [`u(${heading || 'value'})`];
    await writeColumns(context, { sheet: area.sheet, row: area.row, col: at.col, rows: area.rows }, [{ headings, formula: `=ROOTSUM.${names[kind.value as Kind]}(${args.join(',')})`, numberFormat: format }]);
  }

  const element = h('div', {},
    h('p', {}, 'Select a column of tolerances, certificates, resolutions or repeats in the sheet.'),
    button('Read the selection', () => void read(true)),
    field('Cells', source), field('They are', kind), details,
    h('div', { class: 'check' }, full, h('label', { for: (full.id = 'evidence-full') }, 'with degrees of freedom and shape')),
    rows, field('Heading goes to', target, 'The uncertainties spill below it'),
    button('Write the column', () => void write(), true));
  return { title: 'Evidence', element, shown: () => void preview(), left: () => undefined };
}
