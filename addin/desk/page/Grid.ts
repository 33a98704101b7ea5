import { columnLetters } from '../../../functions/engine/graph/address';
import { h } from '../../pane/dom';

/** What the grid shows; rows and columns from 1. */
export interface GridSource {
  readonly rows: number;
  readonly cols: number;
  text(row: number, col: number): string;
  /** Why a cell is wrong; shown on hover and when the cell is reached. */
  message(row: number, col: number): string | undefined;
  isNumber(row: number, col: number): boolean;
  isBold(row: number, col: number): boolean;
}

export interface Selection {
  readonly row: number;
  readonly col: number;
  readonly rows: number;
  readonly cols: number;
}

const ROW_HEIGHT = 24;
const HEAD_WIDTH = 56;
const EXTRA = 4;

/**
 * A worksheet as a grid that one can walk through by keys: a real table of the rows and columns in view, whatever the size of the sheet.
 * It shows and selects; what keys and clicks mean beyond that is told to its listeners.
 */
export class Grid {
  readonly element: HTMLElement;
  private readonly scroller: HTMLElement;
  private readonly sizer: HTMLElement;
  private readonly table: HTMLTableElement;
  private source: GridSource | undefined;
  private widths: number[] = [];
  private lefts: number[] = [];
  private anchor = { row: 1, col: 1 };
  private end = { row: 1, col: 1 };
  private drawn = '';

  constructor(private readonly listeners: { selected(selection: Selection): void; edit(text: string | undefined): void; key(event: KeyboardEvent): void }) {
    this.table = h('table', { role: 'grid', 'aria-label': 'Worksheet', 'aria-multiselectable': 'true' });
    this.sizer = h('div', { class: 'sizer' }, this.table);
    this.scroller = h('div', { class: 'scroller', tabindex: '-1', onscroll: () => this.draw() }, this.sizer);
    this.element = h('div', { class: 'grid' }, this.scroller);
    this.table.addEventListener('keydown', (event) => this.onKey(event));
    this.table.addEventListener('mousedown', (event) => this.onMouse(event));
    this.table.addEventListener('mouseover', (event) => { if (event.buttons === 1) this.extendTo(event.target as Element); });
    this.table.addEventListener('dblclick', () => this.listeners.edit(undefined));
    new ResizeObserver(() => this.draw()).observe(this.scroller);
  }

  get selection(): Selection {
    const { anchor: a, end: e } = this;
    return { row: Math.min(a.row, e.row), col: Math.min(a.col, e.col), rows: Math.abs(a.row - e.row) + 1, cols: Math.abs(a.col - e.col) + 1 };
  }

  /** The cell that is edited. */
  get active(): { readonly row: number; readonly col: number } {
    return this.anchor;
  }

  /** Shows another sheet, or the same one after a change. */
  show(source: GridSource, keepPlace = false): void {
    this.source = source;
    this.measure();
    if (!keepPlace) {
      this.anchor = this.end = { row: 1, col: 1 };
      this.scroller.scrollTo(0, 0);
    }
    this.draw(true);
  }

  select(row: number, col: number, rows = 1, cols = 1, focus = true): void {
    this.anchor = { row, col };
    this.end = { row: row + rows - 1, col: col + cols - 1 };
    this.reveal(row, col);
    this.draw(true);
    if (focus) this.focus();
    this.listeners.selected(this.selection);
  }

  focus(): void {
    this.table.querySelector<HTMLElement>('td[tabindex="0"]')?.focus({ preventScroll: true });
  }

  private get rowCount(): number {
    return Math.min(1048576, (this.source?.rows ?? 0) + 40);
  }

  private get colCount(): number {
    return Math.min(16384, Math.max(12, (this.source?.cols ?? 0) + EXTRA));
  }

  /** Column widths by the longest text among the first rows, within bounds. */
  private measure(): void {
    const { source } = this;
    if (!source) return;
    this.widths = Array.from({ length: this.colCount }, (_, i) => {
      if (i >= source.cols) return 88;
      let widest = 62;
      for (let row = 1; row <= Math.min(source.rows, 120); row++) {
        const { length } = source.text(row, i + 1);
        // a text with nothing to its right runs over, so it needs no room of its own
        if (length > 0 && !(length > 12 && !source.isNumber(row, i + 1) && source.text(row, i + 2) === '')) widest = Math.max(widest, Math.min(230, length * (source.isBold(row, i + 1) ? 9.6 : 8.4) + 18));
      }
      return Math.round(widest);
    });
    let left = HEAD_WIDTH;
    this.lefts = this.widths.map((w) => (left += w) - w);
    this.sizer.style.width = `${left}px`;
    this.sizer.style.height = `${(this.rowCount + 1) * ROW_HEIGHT}px`;
  }

  private draw(anew = false): void {
    const { source, scroller } = this;
    if (!source) return;
    const top = Math.max(0, Math.floor(scroller.scrollTop / ROW_HEIGHT));
    const count = Math.ceil((scroller.clientHeight || 480) / ROW_HEIGHT) + 1;
    const first = this.lefts.findIndex((left, i) => left + this.widths[i] > scroller.scrollLeft + HEAD_WIDTH);
    const from = Math.max(0, first);
    let to = from;
    while (to < this.widths.length && this.lefts[to] < scroller.scrollLeft + (scroller.clientWidth || 900)) to++;
    const view = `${top} ${count} ${from} ${to}`;
    if (!anew && view === this.drawn) return;
    this.drawn = view;
    const hadFocus = this.table.contains(document.activeElement);
    const lastRow = Math.min(this.rowCount, top + count);
    this.table.setAttribute('aria-rowcount', String(this.rowCount + 1));
    this.table.setAttribute('aria-colcount', String(this.colCount + 1));
    // by its place, not by a transform: headings that stick reckon without transforms
    this.table.style.left = `${from === 0 ? 0 : this.lefts[from] - HEAD_WIDTH}px`;
    this.table.style.top = `${top * ROW_HEIGHT}px`;
    const columns = Array.from({ length: to - from }, (_, i) => from + i);
    const head = h('tr', { role: 'row', 'aria-rowindex': 1 }, h('th', { role: 'columnheader', class: 'corner', 'aria-colindex': 1 }, h('span', { class: 'unseen' }, 'Row')),
      ...columns.map((c) => h('th', { role: 'columnheader', scope: 'col', 'aria-colindex': c + 2 }, columnLetters(c + 1))));
    const rows: HTMLElement[] = [head];
    const { row: r0, col: c0, rows: rn, cols: cn } = this.selection;
    // the active cell stays reachable by the tabulator, in view or not
    const tabRow = Math.min(Math.max(this.anchor.row, top + 1), lastRow);
    const tabCol = Math.min(Math.max(this.anchor.col, from + 1), Math.max(from + 1, to));
    for (let row = top + 1; row <= lastRow; row++) {
      const cells = columns.map((c) => this.cell(source, row, c + 1, row >= r0 && row < r0 + rn && c + 1 >= c0 && c + 1 < c0 + cn, row === tabRow && c + 1 === tabCol));
      rows.push(h('tr', { role: 'row', 'aria-rowindex': row + 1 }, h('th', { role: 'rowheader', scope: 'row', 'aria-colindex': 1 }, String(row)), ...cells));
    }
    this.table.replaceChildren(h('colgroup', {}, widthOf(HEAD_WIDTH), ...columns.map((c) => widthOf(this.widths[c]))), h('tbody', { role: 'rowgroup' }, ...rows));
    if (hadFocus) this.focus();
  }

  private cell(source: GridSource, row: number, col: number, selected: boolean, tabStop: boolean): HTMLElement {
    const message = source.message(row, col);
    const active = row === this.anchor.row && col === this.anchor.col;
    const text = source.text(row, col);
    const over = text.length > 8 && !source.isNumber(row, col) && source.text(row, col + 1) === '';
    const classes = [over && 'over', selected && 'selected', active && 'active', message && 'wrong', source.isNumber(row, col) && 'number', source.isBold(row, col) && 'bold'].filter(Boolean).join(' ');
    return h('td', {
      role: 'gridcell', 'aria-colindex': col + 1, 'data-row': row, 'data-col': col, tabindex: tabStop ? 0 : -1, 'aria-selected': selected ? 'true' : 'false',
      class: classes || undefined, title: message, 'aria-description': message,
    }, text);
  }

  private reveal(row: number, col: number): void {
    const { scroller } = this;
    const top = (row - 1) * ROW_HEIGHT;
    const height = (scroller.clientHeight || 480) - 2 * ROW_HEIGHT;
    if (top < scroller.scrollTop) scroller.scrollTop = top;
    else if (top > scroller.scrollTop + height - ROW_HEIGHT) scroller.scrollTop = top - height + ROW_HEIGHT;
    const left = this.lefts[col - 1] ?? 0;
    const right = left + (this.widths[col - 1] ?? 0);
    if (left - HEAD_WIDTH < scroller.scrollLeft) scroller.scrollLeft = left - HEAD_WIDTH;
    else if (right > scroller.scrollLeft + scroller.clientWidth) scroller.scrollLeft = right - scroller.clientWidth + 4;
  }

  private onMouse(event: MouseEvent): void {
    const cell = (event.target as Element).closest<HTMLElement>('td[data-row]');
    if (!cell || event.button !== 0) return;
    event.preventDefault();
    const [row, col] = [Number(cell.dataset.row), Number(cell.dataset.col)];
    if (event.shiftKey) this.extend(row, col);
    else this.select(row, col);
  }

  private extendTo(target: Element): void {
    const cell = target.closest<HTMLElement>('td[data-row]');
    if (cell) this.extend(Number(cell.dataset.row), Number(cell.dataset.col));
  }

  private extend(row: number, col: number): void {
    this.end = { row, col };
    this.reveal(row, col);
    this.draw(true);
    this.focus();
    this.listeners.selected(this.selection);
  }

  private onKey(event: KeyboardEvent): void {
    const { key, shiftKey } = event;
    const control = event.ctrlKey || event.metaKey;
    const page = Math.max(1, Math.floor((this.scroller.clientHeight || 480) / ROW_HEIGHT) - 2);
    const from = shiftKey ? this.end : this.anchor;
    const moves: Record<string, [row: number, col: number]> = {
      ArrowUp: [control ? 1 : from.row - 1, from.col], ArrowDown: [control ? Math.max(from.row, this.source?.rows ?? 1) : from.row + 1, from.col],
      ArrowLeft: [from.row, control ? 1 : from.col - 1], ArrowRight: [from.row, control ? Math.max(from.col, this.source?.cols ?? 1) : from.col + 1],
      PageUp: [from.row - page, from.col], PageDown: [from.row + page, from.col],
      Home: [control ? 1 : from.row, 1], End: [control ? this.source?.rows ?? 1 : from.row, this.source?.cols ?? 1],
    };
    const move = moves[key];
    if (move) {
      event.preventDefault();
      const row = Math.min(Math.max(1, move[0]), this.rowCount);
      const col = Math.min(Math.max(1, move[1]), this.colCount);
      if (shiftKey) this.extend(row, col);
      else this.select(row, col);
    } else if (key === 'Enter' || key === 'F2') {
      event.preventDefault();
      this.listeners.edit(undefined);
    } else if (key.length === 1 && !control && !event.altKey) {
      event.preventDefault();
      this.listeners.edit(key);
    } else this.listeners.key(event);
  }
}

const widthOf = (px: number): HTMLElement => {
  const col = h('col');
  col.style.width = `${px}px`;
  return col;
};
