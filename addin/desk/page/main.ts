import { nativeNames } from '../../../functions/engine/formula/natives';
import { sharedFormula } from '../book/sharedFormula';
import type { FunctionsMetadata } from '../../../functions/metadata';
import type { PortArea } from '../../../functions/workbook';
import { BookError } from '../book/BookError';
import { openBook } from '../book/openBook';
import type { FunctionBundle } from '../sheet/Desk';
import { storedFormula, typedFormula } from '../sheet/functionNames';
import { EditRefusal, Session } from '../sheet/Session';
import type { CellEdit } from '../sheet/Session';
import { typedConstant } from './cellText';
import { deskPaneHost } from './deskPaneHost';
import type { GridAccess } from './deskPaneHost';
import { fill, h } from '../../pane/dom';
import { download } from '../../pane/download';
import { FormulaBar } from './FormulaBar';
import { Grid } from './Grid';
import { loadFunctions } from './loadFunctions';
import { sheetSource } from './sheetSource';
import { cellsOfText, tabbedText } from './tabbedText';

/** The page of the desk: a workbook, its formula line, and the task pane beside it. Nothing that is opened here leaves the machine. */
class Page {
  private session: Session | undefined;
  private sheet = 0;
  private name = 'book.xlsx';
  /** The step after which the workbook was saved last, and the name of a file that would replace unsaved ones if it is opened once more. */
  private savedStep: object | undefined;
  private warnedOf: string | undefined;
  private closePane: (() => void) | undefined;
  private readonly moved = new Set<() => void>();
  private readonly status = h('div', { class: 'status', role: 'status', 'aria-live': 'polite' });
  private readonly tabs = h('div', { class: 'tabs', role: 'tablist', 'aria-label': 'Sheets' });
  private readonly pane = h('aside', { class: 'pane', 'aria-label': 'Uncertainty' });
  private readonly title = h('span', { class: 'book' });
  private readonly grid: Grid;
  private readonly bar: FormulaBar;

  constructor(private readonly bundle: FunctionBundle) {
    this.grid = new Grid({
      selected: () => this.selected(),
      edit: (text) => this.bar.begin(text),
      key: (event) => this.onKey(event),
    });
    this.bar = new FormulaBar((JSON.parse(bundle.metadata) as FunctionsMetadata).functions, nativeNames(), {
      done: (text, move) => void this.typed(text, move),
      cancelled: () => { this.selected(); this.grid.focus(); },
    });
    const file = h('input', {
      type: 'file', accept: '.xlsx,.xlsm', id: 'file', class: 'unseen',
      onchange: () => {
        const [chosen] = file.files ?? [];
        file.value = ''; // so that the same file can be chosen again
        if (chosen) void this.openFile(chosen);
      },
    });
    const button = (label: string, press: () => void, keys = ''): HTMLElement => h('button', { type: 'button', onclick: press, title: keys || undefined }, label);
    document.body.append(
      h('header', { class: 'top' }, h('h1', {}, 'Rootsum desk'), this.title,
        h('div', { class: 'tools' }, h('label', { for: 'file', class: 'button' }, 'Open…'), file, button('Save', () => void this.save(false), 'Ctrl+S'), button('Save values only', () => void this.save(true)),
          button('Undo', () => void this.undo(), 'Ctrl+Z'), button('Fill down', () => void this.fillDown(), 'Ctrl+D'), h('a', { href: 'reference.html', target: '_blank', rel: 'noopener' }, 'Reference'))),
      this.bar.element,
      h('div', { class: 'work' }, h('main', { class: 'sheet' }, this.grid.element, this.tabs), this.pane),
      this.status,
    );
    document.addEventListener('dragover', (event) => event.preventDefault());
    document.addEventListener('drop', (event) => {
      event.preventDefault();
      const [dropped] = event.dataTransfer?.files ?? [];
      if (dropped) void this.openFile(dropped);
    });
    window.addEventListener('beforeunload', (event) => { if (this.isUnsaved) event.preventDefault(); });
    document.addEventListener('copy', (event) => this.copy(event));
    document.addEventListener('paste', (event) => this.paste(event));
  }

  private get isUnsaved(): boolean {
    return this.session !== undefined && this.session.lastStep !== this.savedStep;
  }

  async openFile(file: File): Promise<void> {
    if (this.isUnsaved && this.warnedOf !== file.name) {
      this.warnedOf = file.name;
      return this.say(`${this.name} has changes that are not saved: save it first, or open ${file.name} once more to leave them`, true);
    }
    await this.open(file.name, () => file.arrayBuffer());
  }

  /** Opens a workbook; the one before stays where the new one is refused. */
  async open(name: string, bytes: () => Promise<ArrayBuffer>): Promise<void> {
    this.say(`Opening ${name} …`);
    await new Promise((painted) => requestAnimationFrame(() => setTimeout(painted)));
    try {
      const book = openBook(new Uint8Array(await bytes()));
      const session = await Session.open(book, this.bundle, (done, of) => this.say(`Computing ${name}: ${done} of ${of} cells`));
      this.session = session;
      this.savedStep = undefined;
      this.warnedOf = undefined;
      this.name = name;
      document.title = `${name} · Rootsum desk`;
      this.title.textContent = name;
      this.sheet = Math.max(0, book.sheets.findIndex((s) => s.kind === 'worksheet' && s.state === 'visible'));
      session.onChange(() => this.changed());
      this.drawTabs();
      this.grid.show(sheetSource(session, this.sheet));
      this.grid.select(1, 1, 1, 1, false);
      this.say(`${name}: ${book.sheets.length} sheets`);
      await this.openPane(session);
    } catch (problem) {
      const known = problem instanceof BookError;
      this.say(`${name} was not opened: ${known ? problem.message : `fault in the library (${String(problem)})`}`, true);
      if (!known) throw problem;
    }
  }

  private async openPane(session: Session): Promise<void> {
    this.closePane?.();
    const { mountPane } = await import('../../pane/mountPane');
    const access: GridAccess = {
      selection: () => this.area(),
      onSelection: (moved) => { this.moved.add(moved); return () => this.moved.delete(moved); },
      show: (area) => this.show(area),
    };
    this.closePane = mountPane(this.pane, deskPaneHost(session, access));
  }

  private area(): PortArea | undefined {
    if (!this.session) return undefined;
    const { row, col, rows, cols } = this.grid.selection;
    return { sheet: this.session.desk.working.sheetName(this.sheet), row, col, rows, cols };
  }

  private show({ sheet, row, col, rows, cols }: PortArea): void {
    const index = this.session?.desk.working.sheetIndex(sheet);
    if (index === undefined) return;
    if (index !== this.sheet) this.toSheet(index);
    this.grid.select(row, col, rows, cols, false);
  }

  private toSheet(index: number): void {
    this.sheet = index;
    this.drawTabs();
    this.grid.show(sheetSource(this.session!, index));
    this.selected();
  }

  private drawTabs(): void {
    const sheets = this.session!.book.sheets.filter((s) => s.kind === 'worksheet' && s.state === 'visible');
    fill(this.tabs, ...sheets.map((s) => h('button', {
      type: 'button', role: 'tab', 'aria-selected': s.index === this.sheet ? 'true' : 'false', tabindex: s.index === this.sheet ? 0 : -1,
      onclick: () => this.toSheet(s.index),
      onkeydown: (event: KeyboardEvent) => {
        const step = event.key === 'ArrowRight' ? 1 : event.key === 'ArrowLeft' ? -1 : 0;
        if (step === 0) return;
        const next = sheets[(sheets.indexOf(s) + step + sheets.length) % sheets.length];
        this.toSheet(next.index);
        this.tabs.querySelector<HTMLElement>('[aria-selected="true"]')?.focus();
      },
    }, s.name)));
  }

  private selected(): void {
    if (!this.session) return;
    const { row, col } = this.grid.active;
    this.bar.show(row, col, this.session.textOf(this.sheet, row, col));
    const message = this.session.messageOf(this.sheet, row, col);
    if (message !== undefined) this.say(message, true);
    else if (this.status.classList.contains('wrong')) this.say('');
    for (const listener of [...this.moved]) listener();
  }

  private changed(): void {
    this.grid.show(sheetSource(this.session!, this.sheet), true);
    this.selected();
  }

  private async typed(text: string, move: 'down' | 'right' | 'stay'): Promise<void> {
    const { session } = this;
    if (!session) return;
    const { row, col } = this.grid.active;
    if (text !== session.textOf(this.sheet, row, col)) {
      const content = text === '' ? null : text.startsWith('=') && text.length > 1 ? { formula: text } : { value: typedConstant(text) };
      if (!(await this.edit([{ sheet: this.sheet, row, col, content }]))) return;
    }
    if (move === 'down') this.grid.select(row + 1, col);
    else if (move === 'right') this.grid.select(row, col + 1);
  }

  /** @returns whether the edit was made; where not, why is said. */
  private async edit(edits: readonly CellEdit[]): Promise<boolean> {
    this.say('Computing …');
    try {
      await this.session!.edit(edits);
      this.say('');
      this.selected();
      return true;
    } catch (problem) {
      if (!(problem instanceof EditRefusal)) throw problem;
      this.say(`Not changed: ${problem.message}`, true);
      this.selected();
      return false;
    }
  }

  private async undo(): Promise<void> {
    if (this.session && !(await this.session.undo())) this.say('Nothing to take back');
  }

  private async fillDown(): Promise<void> {
    const { session } = this;
    if (!session) return;
    const { row, col, rows, cols } = this.grid.selection;
    const { working, names } = session.desk;
    const edits: CellEdit[] = [];
    for (let c = col; c < col + cols; c++) {
      const first = working.cell(this.sheet, row, c);
      if (first?.partOf) return this.say('Not filled: the first cell shows part of an array', true);
      const moved = first?.formula === undefined ? undefined : sharedFormula(storedFormula(typedFormula(first.formula, names), names), row, c);
      for (let r = row + 1; r < row + rows; r++) {
        const content = moved ? { formula: `=${typedFormula(moved(r, c), names)}` } : first?.value === undefined ? null : { value: first.value };
        edits.push({ sheet: this.sheet, row: r, col: c, content });
      }
    }
    if (edits.length === 0) return this.say('Select the cells to fill, the one to copy at the top');
    await this.edit(edits);
  }

  private onKey(event: KeyboardEvent): void {
    const control = event.ctrlKey || event.metaKey;
    const { row, col, rows, cols } = this.grid.selection;
    const act = event.key === 'Delete' || event.key === 'Backspace'
      ? () => this.edit(Array.from({ length: rows * cols }, (_, i) => ({ sheet: this.sheet, row: row + Math.floor(i / cols), col: col + (i % cols), content: null })).filter((e) => this.session?.desk.working.cell(this.sheet, e.row, e.col) && !this.session.desk.working.cell(this.sheet, e.row, e.col)?.partOf))
      : control && event.key.toLowerCase() === 'z' ? () => this.undo()
      : control && event.key.toLowerCase() === 'd' ? () => this.fillDown()
      : control && event.key.toLowerCase() === 's' ? () => this.save(false)
      : undefined;
    if (!act || !this.session) return;
    event.preventDefault();
    void act();
  }

  private copy(event: ClipboardEvent): void {
    if (!this.session || !this.inGrid()) return;
    const { row, col, rows, cols } = this.grid.selection;
    const source = sheetSource(this.session, this.sheet);
    const cells = Array.from({ length: rows }, (_, r) => Array.from({ length: cols }, (_x, c) => source.text(row + r, col + c)));
    event.clipboardData?.setData('text/plain', tabbedText(cells));
    event.preventDefault();
    this.say(`${rows} × ${cols} cells copied`);
  }

  private paste(event: ClipboardEvent): void {
    if (!this.session || !this.inGrid()) return;
    event.preventDefault();
    const { row, col } = this.grid.active;
    const cells = cellsOfText(event.clipboardData?.getData('text/plain') ?? '');
    const edits = cells.flatMap((line, r) => line.map((text, c): CellEdit => ({
      sheet: this.sheet, row: row + r, col: col + c, content: text === '' ? null : text.startsWith('=') && text.length > 1 ? { formula: text } : { value: typedConstant(text) },
    })));
    if (edits.length > 0) void this.edit(edits);
  }

  private inGrid(): boolean {
    return this.grid.element.contains(document.activeElement);
  }

  private async save(values: boolean): Promise<void> {
    if (!this.session) return;
    try {
      const bytes = await this.session.write(values);
      const name = this.name.replace(/(\.xls[xm])$/i, values ? '-values$1' : '-rootsum$1');
      download(name, bytes);
      if (!values) this.savedStep = this.session.lastStep;
      this.say(`${name} was saved with everything else in the file as it was`);
    } catch (problem) {
      if (!(problem instanceof BookError)) throw problem;
      this.say(`Not saved: ${problem.message}`, true);
    }
  }

  private say(text: string, wrong = false): void {
    this.status.textContent = text;
    this.status.classList.toggle('wrong', wrong);
  }
}

/** The command says which book it serves; without one it is the demo. */
async function start(): Promise<void> {
  const [bundle, served] = await Promise.all([loadFunctions(), fetch('book').then((response) => (response.ok ? response : fetch('demo.xlsx')))]);
  const name = decodeURIComponent(served.headers.get('x-book-name') ?? 'demo.xlsx');
  await new Page(bundle).open(name, () => served.arrayBuffer());
}

void start();
