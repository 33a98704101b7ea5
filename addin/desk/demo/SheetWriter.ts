import { element, escapeXml, textElement, xmlPart } from './xml';
import { styleIndex } from './styles';
import type { StyleName } from './styles';
import type { SharedStrings, TextRun } from './sharedStrings';

export type Stored = number | string;

interface SheetExtras {
  /** Widths by column letter, in characters. */
  widths: Record<string, number>;
  /** First cell that scrolls, where panes are frozen. */
  frozenAt?: string;
  tabColor?: string;
  landscape?: boolean;
  /** XML of conditional formats and data validations, in that order. */
  conditionalFormats?: string[];
  dataValidations?: string[];
  showGridLines?: boolean;
}

export interface SheetLinks { drawing?: string; notes?: string; table?: string }

/** Collects the cells of one sheet and writes its part. Cells may come in any order; each address once. */
export class SheetWriter {
  readonly formulaAddresses: string[] = [];
  private readonly rows = new Map<number, Map<number, string>>();
  private readonly heights = new Map<number, number>();
  private readonly merges: string[] = [];
  private sharedFormulas = 0;

  constructor(readonly name: string, private readonly strings: SharedStrings, private readonly extras: SheetExtras) {}

  text(address: string, text: string | readonly TextRun[], style: StyleName = 'plain'): void {
    this.put(address, style, ' t="s"', `<v>${this.strings.indexOf(text)}</v>`);
  }

  number(address: string, value: number, style: StyleName): void {
    this.put(address, style, '', `<v>${value}</v>`);
  }

  /** A cell with a look and nothing in it. */
  blank(address: string, style: StyleName): void {
    this.put(address, style, '', '');
  }

  /** A formula with the value that the worksheet stores beside it; the value is given back. */
  formula<T extends Stored>(address: string, formula: string, value: T, style: StyleName): T {
    this.formulaCell(address, textElement('f', formula), value, style);
    return value;
  }

  /** One formula filled down a column, stored as the worksheet stores a fill: text in the first cell, then followers. */
  fillDown(column: string, firstRow: number, formula: string, values: readonly Stored[], style: StyleName): void {
    const shared = this.sharedFormulas;
    this.sharedFormulas += 1;
    values.forEach((value, i) => {
      const owner = element('f', { t: 'shared', ref: `${column}${firstRow}:${column}${firstRow + values.length - 1}`, si: shared }, escapeXml(formula));
      this.formulaCell(`${column}${firstRow + i}`, i === 0 ? owner : element('f', { t: 'shared', si: shared }), value, style);
    });
  }

  /** One text over several columns; the covered cells keep the look. */
  merged(range: string, text: string | readonly TextRun[], style: StyleName): void {
    const [first, last] = range.split(':');
    const from = split(first);
    const to = split(last);
    for (let row = from.row; row <= to.row; row += 1) {
      for (let column = from.column; column <= to.column; column += 1) {
        const address = `${columnLetters(column)}${row}`;
        if (address === first) this.text(address, text, style);
        else this.blank(address, style);
      }
    }
    this.merges.push(range);
  }

  /** A row of column headings, starting at `address`. */
  headings(address: string, texts: readonly string[], height = 32): void {
    const { row, column } = split(address);
    texts.forEach((text, i) => this.text(`${columnLetters(column + i)}${row}`, text, 'head'));
    this.heights.set(row, height);
  }

  height(row: number, points: number): void {
    this.heights.set(row, points);
  }

  /** The worksheet part. */
  part(links: SheetLinks, selected: boolean): string {
    const { extras } = this;
    const each = (name: string, items: string[] | undefined): string => (items?.length ? element(name, { count: items.length }, items.join('')) : '');
    return xmlPart(element('worksheet', {
      xmlns: 'http://schemas.openxmlformats.org/spreadsheetml/2006/main',
      'xmlns:r': 'http://schemas.openxmlformats.org/officeDocument/2006/relationships',
    }, [
      element('sheetPr', {}, (extras.tabColor ? element('tabColor', { rgb: extras.tabColor }) : '') + element('pageSetUpPr', { fitToPage: 1 })),
      element('dimension', { ref: this.dimension() }),
      element('sheetViews', {}, this.view(selected)),
      element('sheetFormatPr', { defaultRowHeight: 15 }),
      element('cols', {}, Object.entries(extras.widths).map(([letters, width]) => {
        const place = split(`${letters}1`).column;
        return element('col', { min: place, max: place, width, customWidth: 1 });
      }).join('')),
      element('sheetData', {}, this.sheetData()),
      each('mergeCells', this.merges.map((ref) => element('mergeCell', { ref }))),
      (extras.conditionalFormats ?? []).join(''),
      each('dataValidations', extras.dataValidations),
      element('printOptions', { horizontalCentered: 1 }),
      element('pageMargins', { left: 0.5, right: 0.5, top: 0.6, bottom: 0.6, header: 0.3, footer: 0.3 }),
      element('pageSetup', { paperSize: 9, orientation: extras.landscape ? 'landscape' : 'portrait', fitToWidth: 1, fitToHeight: 0 }),
      element('headerFooter', {}, textElement('oddFooter', '&L&A&RPage &P of &N')),
      links.drawing ? element('drawing', { 'r:id': links.drawing }) : '',
      links.notes ? element('legacyDrawing', { 'r:id': links.notes }) : '',
      links.table ? element('tableParts', { count: 1 }, element('tablePart', { 'r:id': links.table })) : '',
    ].join('')));
  }

  private formulaCell(address: string, formula: string, value: Stored, style: StyleName): void {
    this.formulaAddresses.push(address);
    if (typeof value === 'number') {
      if (!Number.isFinite(value)) throw new Error(`${this.name}!${address} needs a finite value, got ${value}`);
      this.put(address, style, '', `${formula}<v>${value}</v>`);
    } else {
      this.put(address, style, ' t="str"', `${formula}<v>${escapeXml(value)}</v>`);
    }
  }

  private put(address: string, style: StyleName, type: string, content: string): void {
    const { row, column } = split(address);
    const cells = this.rows.get(row) ?? new Map<number, string>();
    if (cells.has(column)) throw new Error(`${this.name}!${address} is written twice`);
    this.rows.set(row, cells);
    const head = `<c r="${address}" s="${styleIndex(style)}"${type}`;
    cells.set(column, content === '' ? `${head}/>` : `${head}>${content}</c>`);
  }

  private sheetData(): string {
    return sorted(this.rows).map(([row, cells]) => {
      const height = this.heights.get(row);
      return element('row', { r: row, ht: height, customHeight: height === undefined ? undefined : 1 },
        sorted(cells).map(([, cell]) => cell).join(''));
    }).join('');
  }

  private dimension(): string {
    const rows = [...this.rows.keys()];
    const columns = [...this.rows.values()].flatMap((cells) => [...cells.keys()]);
    return `${columnLetters(Math.min(...columns))}${Math.min(...rows)}:${columnLetters(Math.max(...columns))}${Math.max(...rows)}`;
  }

  private view(selected: boolean): string {
    const attributes = {
      showGridLines: this.extras.showGridLines === false ? 0 : undefined,
      tabSelected: selected ? 1 : undefined,
      workbookViewId: 0,
    };
    const { frozenAt } = this.extras;
    if (frozenAt === undefined) return element('sheetView', attributes);
    const { row, column } = split(frozenAt);
    return element('sheetView', attributes, element('pane', {
      xSplit: column > 1 ? column - 1 : undefined, ySplit: row - 1, topLeftCell: frozenAt,
      activePane: column > 1 ? 'bottomRight' : 'bottomLeft', state: 'frozen',
    }) + element('selection', { pane: column > 1 ? 'bottomRight' : 'bottomLeft', activeCell: frozenAt, sqref: frozenAt }));
  }
}

function sorted<T>(map: Map<number, T>): [number, T][] {
  return [...map.entries()].sort((a, b) => a[0] - b[0]);
}

function split(address: string): { row: number; column: number } {
  const match = /^([A-Z]+)(\d+)$/.exec(address);
  if (match === null) throw new Error(`split needs a cell address, got ${address}`);
  const column = [...match[1]].reduce((total, letter) => total * 26 + letter.charCodeAt(0) - 64, 0);
  return { row: Number(match[2]), column };
}

/** @example columnLetters(28) // 'AB' */
export function columnLetters(column: number): string {
  return column <= 0 ? '' : columnLetters(Math.floor((column - 1) / 26)) + String.fromCharCode(65 + ((column - 1) % 26));
}
