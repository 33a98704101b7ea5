import { areaName, parseArea } from './area';
import type { Area } from './area';
import type { CellChange, SheetChanges } from './CellChange';
import { renderCell, renderResult, renderShared } from './renderCell';
import { scanXml } from './scanXml';
import type { XmlTag } from './scanXml';
import { applySplices } from './splice';
import type { Splice } from './splice';
import { prefixOf, withAttributes } from './xmlTree';

export interface WriteOptions {
  part: string;
  dynamicMark: number;
  /** Style of a cell that the file does not hold yet. */
  defaultStyle(row: number, col: number): number;
}

/**
 * The text of a worksheet part with some cells changed. Only the elements of those cells are replaced, rows and cells that
 * are missing are put in their places, `<dimension>` grows; all other characters stay.
 *
 * Law: `writeCells(text, new Map(), …)` is `text`.
 */
export function writeCells(text: string, changes: SheetChanges, options: WriteOptions): string {
  if (changes.size === 0) return text;
  const writer = new CellWriter(text, changes, options);
  scanXml(text, options.part, writer);
  return applySplices(text, writer.splices);
}

interface OpenTag {
  tag: XmlTag;
  start: number;
  end: number;
}
interface Range {
  start: number;
  end: number;
}

class CellWriter {
  readonly splices: Splice[] = [];
  private readonly rows: number[];
  private nextRow = 0;
  private depth = 0;
  private mainUri = '';
  private sheetData: OpenTag | undefined;
  private prefix = '';
  private row = 0;
  private rowTag: OpenTag | undefined;
  /** Changed cells of the current row that the file did not show yet, ascending. */
  private pending: [number, CellChange][] = [];
  private addedCols: number[] = [];
  private col = 0;
  private cell: (OpenTag & { change: CellChange; formula?: Range; value?: Range }) | undefined;
  private child: OpenTag | undefined;

  constructor(
    private readonly source: string,
    private readonly changes: SheetChanges,
    private readonly options: WriteOptions,
  ) {
    this.rows = [...changes.keys()].sort((a, b) => a - b);
  }

  readonly open = (tag: XmlTag, start: number, end: number): void => {
    this.depth++;
    if (this.depth === 1) this.mainUri = tag.uri;
    if (tag.uri !== this.mainUri) return;
    const at = { tag, start, end };
    if (this.depth === 2 && tag.local === 'sheetData') {
      this.sheetData = at;
      this.prefix = prefixOf(at);
    } else if (this.depth === 2 && tag.local === 'dimension') this.growDimension(at);
    else if (this.depth === 3 && this.sheetData && tag.local === 'row') this.openRow(at);
    else if (this.depth === 4 && this.rowTag && tag.local === 'c') this.openCell(at);
    else if (this.depth === 5 && this.cell) this.child = at;
  };

  readonly close = (tag: XmlTag, start: number, end: number): void => {
    this.depth--;
    if (tag.uri !== this.mainUri) return;
    if (this.depth === 4 && this.cell && this.child) {
      const range = { start: this.child.start, end };
      if (tag.local === 'f') this.cell.formula = range;
      if (tag.local === 'v' || tag.local === 'is') this.cell.value = range;
      this.child = undefined;
    } else if (this.depth === 3 && this.rowTag && tag.local === 'c') {
      if (this.cell) this.closeCell(this.cell, start, end);
      this.cell = undefined;
    } else if (this.depth === 2 && this.rowTag) this.closeRow(this.rowTag, start);
    else if (this.depth === 1 && this.sheetData && tag.local === 'sheetData') {
      this.insertInside(this.sheetData, start, this.newRows(Infinity));
      this.sheetData = undefined;
    }
  };

  private openRow(at: OpenTag): void {
    const { r } = at.tag.attributes;
    this.row = r === undefined ? this.row + 1 : Number(r.value);
    this.insert(at.start, this.newRows(this.row));
    if (this.rows[this.nextRow] === this.row) this.nextRow++;
    this.rowTag = at;
    this.col = 0;
    this.addedCols = [];
    this.pending = byColumn(this.changes.get(this.row));
  }

  private openCell(at: OpenTag): void {
    const { r } = at.tag.attributes;
    this.col = r === undefined ? this.col + 1 : parseArea(r.value, this.options.part).left;
    this.insert(at.start, this.newCells(this.col));
    if (this.pending.length > 0 && this.pending[0][0] === this.col) this.cell = { ...at, change: this.pending.shift()![1] };
  }

  private closeCell(cell: NonNullable<CellWriter['cell']>, closeStart: number, end: number): void {
    const { change, formula, tag } = cell;
    const { content } = change;
    const style = change.style ?? Number(tag.attributes.s?.value ?? 0);
    const keepsFormula = content === undefined || (content.kind === 'result' && formula !== undefined);
    if (!keepsFormula) {
      const xml = renderCell(this.row, this.col, style, content, { prefix: this.prefix, dynamicMark: this.options.dynamicMark });
      this.splices.push({ start: cell.start, end, text: xml });
      return;
    }
    const attributes: Record<string, string | undefined> = {};
    if (change.style !== undefined) attributes.s = String(change.style);
    if (change.shared && formula) this.splices.push({ ...formula, text: renderShared(change.shared, this.prefix) });
    if (content?.kind === 'result') {
      const { type, xml } = content.value === null ? { type: undefined, xml: '' } : renderResult(content.value, this.prefix);
      attributes.t = type;
      attributes.vm = undefined; // the rich value belonged to the old result
      const place = cell.value ?? { start: formula?.end ?? closeStart, end: formula?.end ?? closeStart };
      this.splices.push({ ...place, text: xml });
    }
    this.replaceTag(cell, withAttributes(this.source.slice(cell.start, cell.end), attributes));
  }

  private closeRow(rowTag: OpenTag, closeStart: number): void {
    const cells = this.newCells(Infinity);
    const spans = rowTag.tag.attributes.spans?.value.split(/[\s:]+/).map(Number) ?? [];
    const outside = this.addedCols.some((col) => !(col >= Math.min(...spans) && col <= Math.max(...spans)));
    // spans is only a hint to the reader, and a wrong one is worse than none
    this.insertInside(rowTag, closeStart, cells, outside ? { spans: undefined } : {});
    this.rowTag = undefined;
  }

  /** Rows that the file lacks, up to (not including) the given one. */
  private newRows(before: number): string {
    let xml = '';
    for (; this.nextRow < this.rows.length && this.rows[this.nextRow] < before; this.nextRow++) {
      const row = this.rows[this.nextRow];
      const cells = byColumn(this.changes.get(row)).map(([col, change]) => this.newCell(row, col, change)).join('');
      if (cells !== '') xml += `<${this.prefix}row r="${row}">${cells}</${this.prefix}row>`;
    }
    return xml;
  }

  /** Cells that the current row lacks, up to (not including) the given column. */
  private newCells(before: number): string {
    let xml = '';
    while (this.pending.length > 0 && this.pending[0][0] < before) {
      const [col, change] = this.pending.shift()!;
      const cell = this.newCell(this.row, col, change);
      if (cell !== '') this.addedCols.push(col);
      xml += cell;
    }
    return xml;
  }

  private newCell(row: number, col: number, { content, style }: CellChange): string {
    const nothing = content === undefined || content.kind === 'clear' || (content.kind === 'result' && content.value === null);
    if (nothing && style === undefined) return '';
    const { prefix } = this;
    return renderCell(row, col, style ?? this.options.defaultStyle(row, col), content, { prefix, dynamicMark: this.options.dynamicMark });
  }

  private growDimension(at: OpenTag): void {
    const stored = at.tag.attributes.ref?.value;
    if (stored === undefined) return;
    const area: Area = { ...parseArea(stored, `${this.options.part} dimension`) };
    const before = { ...area };
    for (const [row, cells] of this.changes) {
      for (const [col, { content }] of cells) {
        if (content === undefined || content.kind === 'clear') continue;
        area.top = Math.min(area.top, row);
        area.bottom = Math.max(area.bottom, row);
        area.left = Math.min(area.left, col);
        area.right = Math.max(area.right, col);
      }
    }
    if (areaName(area) === areaName(before)) return;
    this.replaceTag(at, withAttributes(this.source.slice(at.start, at.end), { ref: areaName(area) }));
  }

  private insert(at: number, xml: string): void {
    if (xml !== '') this.splices.push({ start: at, end: at, text: xml });
  }

  /** Appends to an element, which may be self-closing, and changes its tag. */
  private insertInside(open: OpenTag, closeStart: number, xml: string, changes: Record<string, undefined> = {}): void {
    const tag = withAttributes(this.source.slice(open.start, open.end), changes);
    if (xml !== '' && open.tag.isSelfClosing) this.replaceTag(open, `${tag.replace(/\s*\/>$/, '>')}${xml}</${open.tag.name}>`);
    else {
      this.replaceTag(open, tag);
      this.insert(closeStart, xml);
    }
  }

  private replaceTag({ start, end }: Range, tag: string): void {
    if (tag !== this.source.slice(start, end)) this.splices.push({ start, end, text: tag });
  }
}

function byColumn(cells: Map<number, CellChange> | undefined): [number, CellChange][] {
  return [...(cells ?? [])].sort((a, b) => a[0] - b[0]);
}
