import { areaName, cellKey, cellName, cellOfKey, columnNumber, isOneCell, MAX_COLS, MAX_ROWS, parseArea } from './area';
import type { Area } from './area';
import type { BookCell, CellValue } from './BookCell';
import { BookError } from './BookError';
import { isoDateSerial } from './isoDate';
import { isMain, isTrue } from './namespaces';
import { scanXml } from './scanXml';
import type { XmlTag } from './scanXml';
import { sharedFormula } from './sharedFormula';
import { storedIn } from './SheetData';
import type { RowRecord, SharedGroup, SheetData } from './SheetData';
import type { CellStyles } from './styles';
import { decodeXstring } from './xstring';

/** What a sheet's cells refer to in the rest of the workbook. */
export interface SheetContext {
  part: string;
  strings: readonly string[];
  styles: CellStyles;
  /** By `cm` index. */
  dynamicMarks: readonly boolean[];
  date1904: boolean;
}

/**
 * Reads a worksheet part in one pass. Rows and cells may lack their references, but not stand out of order: a writer could
 * not put a cell in its place then.
 *
 * @throws BookError that names the cell, for what cannot be read without a guess.
 */
export function readSheet(text: string, context: SheetContext): SheetData {
  const reader = new SheetReader(context);
  scanXml(text, context.part, reader);
  return reader.finish();
}

/** What a filter column holds when it leaves rows out; without one it only says whether its button shows. */
const FILTER_CONDITIONS = new Set(['filters', 'customFilters', 'top10', 'dynamicFilter', 'colorFilter', 'iconFilter']);

class SheetReader {
  private readonly sheet: SheetData = {
    rows: [], byRow: new Map(), arrays: [], dataTables: [], shared: [], merges: [], filters: [], columnStyles: [], protected: false, mainUri: '',
  };
  private readonly owners = new Map<string, SharedGroup>();
  private readonly orphans: { si: string; key: number; cell: BookCell }[] = [];
  private depth = 0;
  private inData = false;
  /** The area of the filter that is being read, as long as no condition in it was met. */
  private filter: string | undefined;
  private record: RowRecord | undefined;
  private row = 0;
  private col = 0;
  /** Parts of the current cell. */
  private cellTag: XmlTag | undefined;
  private formulaTag: XmlTag | undefined;
  private formula = '';
  private stored: string | undefined;
  private inline: string | undefined;
  private phonetic = 0;
  private collecting: 'formula' | 'stored' | 'inline' | undefined;

  constructor(private readonly context: SheetContext) {}

  readonly open = (tag: XmlTag): void => {
    this.depth++;
    if (this.depth === 1) {
      if (tag.local !== 'worksheet' || !isMain(tag.uri)) throw new BookError(`part ${this.context.part} is not a worksheet`);
      this.sheet.mainUri = tag.uri;
    } else if (tag.uri === this.sheet.mainUri) {
      if (this.cellTag) this.openInCell(tag);
      else if (this.inData) {
        if (this.depth === 3 && tag.local === 'row') this.openRow(tag);
        else if (this.depth === 4 && tag.local === 'c' && this.record) this.openCell(tag);
      } else this.openOutside(tag);
    }
  };

  readonly close = (tag: XmlTag): void => {
    this.depth--;
    if (tag.uri !== this.sheet.mainUri) return;
    if (this.cellTag) {
      if (tag.local === 'rPh') this.phonetic--;
      else if (this.depth === 3 && tag.local === 'c') this.closeCell();
      else if (tag.local === 'f' || tag.local === 'v' || tag.local === 't') this.collecting = undefined;
    } else if (this.depth === 1 && tag.local === 'autoFilter') this.filter = undefined;
    else if (this.depth === 1 && tag.local === 'sheetData') this.inData = false;
    else if (this.depth === 2 && this.inData) this.record = undefined;
  };

  readonly text = (data: string): void => {
    if (this.collecting === 'stored') this.stored += data;
    else if (this.collecting === 'formula') this.formula += data;
    else if (this.collecting === 'inline') this.inline += data;
  };

  finish(): SheetData {
    for (const { si, key, cell } of this.orphans) {
      const group = this.owners.get(si);
      if (!group) {
        const { row, col } = cellOfKey(key);
        throw new BookError(`${this.context.part} cell ${cellName(row, col)} shares formula ${si}, which no cell holds`);
      }
      this.follow(group, key, cell);
    }
    for (const array of this.sheet.arrays) this.markParts(array);
    for (const area of this.sheet.dataTables) for (const [, , cell] of storedIn(this.sheet, area)) cell.dataTable = true;
    if (this.sheet.protected) this.markHidden();
    return this.sheet;
  }

  private openOutside(tag: XmlTag): void {
    const value = (name: string): string | undefined => tag.attributes[name]?.value;
    if (this.depth === 2 && tag.local === 'sheetData') this.inData = true;
    else if (this.depth === 2 && tag.local === 'sheetProtection') this.sheet.protected = isTrue(value('sheet'));
    else if (this.depth === 2 && tag.local === 'autoFilter') this.filter = value('ref');
    else if (this.depth === 4 && this.filter !== undefined && FILTER_CONDITIONS.has(tag.local)) {
      this.sheet.filters.push(parseArea(this.filter, `${this.context.part} autoFilter`));
      this.filter = undefined;
    } else if (this.depth === 3 && tag.local === 'mergeCell') this.sheet.merges.push(parseArea(value('ref') ?? '', `${this.context.part} mergeCell`));
    else if (this.depth === 3 && tag.local === 'col' && value('style') !== undefined) {
      this.sheet.columnStyles.push({ first: Number(value('min')), last: Number(value('max')), style: Number(value('style')) });
    }
  }

  private openRow(tag: XmlTag): void {
    const row = tag.attributes.r === undefined ? this.row + 1 : Number(tag.attributes.r.value);
    if (!Number.isInteger(row) || row < 1 || row > MAX_ROWS) throw new BookError(`part ${this.context.part} has a row numbered ${tag.attributes.r?.value ?? row}`);
    if (row <= this.row) throw new BookError(`part ${this.context.part} has row ${row} after row ${this.row}`);
    this.row = row;
    this.col = 0;
    this.record = { row, cols: [], cells: [] };
    if (isTrue(tag.attributes.customFormat?.value)) this.record.style = Number(tag.attributes.s?.value ?? 0);
    if (isTrue(tag.attributes.hidden?.value)) this.record.hidden = true;
    this.sheet.rows.push(this.record);
    this.sheet.byRow.set(row, this.record);
  }

  private openCell(tag: XmlTag): void {
    const col = tag.attributes.r === undefined ? this.col + 1 : columnIn(tag.attributes.r.value, this.row);
    if (!(col >= 1 && col <= MAX_COLS)) throw new BookError(`part ${this.context.part} has cell ${tag.attributes.r?.value ?? col} in row ${this.row}`);
    if (col <= this.col) throw new BookError(`part ${this.context.part} has cell ${cellName(this.row, col)} after ${cellName(this.row, this.col)}`);
    this.col = col;
    this.cellTag = tag;
    this.formulaTag = undefined;
    this.formula = '';
    this.stored = undefined;
    this.inline = undefined;
    this.phonetic = 0;
    this.collecting = undefined;
  }

  private openInCell(tag: XmlTag): void {
    if (this.depth === 5 && tag.local === 'v') {
      this.stored = '';
      this.collecting = 'stored';
    } else if (this.depth === 5 && tag.local === 'f') {
      this.formulaTag = tag;
      this.collecting = 'formula';
    } else if (this.depth === 5 && tag.local === 'is') this.inline = '';
    else if (tag.local === 'rPh') this.phonetic++;
    else if (tag.local === 't' && this.inline !== undefined && this.phonetic === 0) this.collecting = 'inline';
  }

  private closeCell(): void {
    const tag = this.cellTag!;
    this.cellTag = undefined;
    const cell: BookCell = { value: this.value(tag), style: Number(tag.attributes.s?.value ?? 0) };
    if (this.formulaTag) this.readFormula(cell, this.formulaTag, tag);
    else if (cell.value === undefined) cell.value = null;
    this.record!.cols.push(this.col);
    this.record!.cells.push(cell);
  }

  private value(tag: XmlTag): CellValue | undefined {
    const type = tag.attributes.t?.value ?? 'n';
    const stored = this.stored;
    if (type === 'inlineStr') return this.inline === undefined ? undefined : decodeXstring(this.inline);
    if (stored === undefined) return undefined;
    if (type === 'str') return decodeXstring(stored);
    const word = stored.trim();
    if (word === '') return undefined;
    if (type === 'n') return this.finite(Number(word), word);
    if (type === 's') {
      const string = /^\d+$/.test(word) ? this.context.strings[Number(word)] : undefined;
      if (string === undefined) throw this.badCell(`refers to shared string ${word}, which is missing`);
      return string;
    }
    if (type === 'b') return isTrue(word);
    if (type === 'e') return { error: word };
    if (type === 'd') return this.finite(isoDateSerial(word, this.context.date1904), word);
    throw this.badCell(`has the unknown type ${type}`);
  }

  private finite(value: number, word: string): number {
    if (!Number.isFinite(value)) throw this.badCell(`holds "${word.slice(0, 40)}" where a number is needed`);
    return value;
  }

  private readFormula(cell: BookCell, tag: XmlTag, cellTag: XmlTag): void {
    const type = tag.attributes.t?.value ?? 'normal';
    const text = decodeXstring(this.formula);
    const key = cellKey(this.row, this.col);
    if (type === 'dataTable') {
      this.sheet.dataTables.push(this.area(tag));
      return;
    }
    if (type === 'shared') {
      const si = tag.attributes.si?.value ?? '';
      const group = this.owners.get(si);
      if (text === '') {
        cell.formula = '';
        if (group) this.follow(group, key, cell);
        else this.orphans.push({ si, key, cell });
        return;
      }
      if (!group || tag.attributes.ref) {
        // An index may be used again: followers belong to the last owner before them.
        const owner: SharedGroup = { si, owner: key, followers: [], formula: lazyShared(text, this.row, this.col) };
        this.owners.set(si, owner);
        this.sheet.shared.push(owner);
      }
    }
    cell.formula = text;
    if (type === 'array') {
      const ref = tag.attributes.ref ? this.area(tag) : { top: this.row, left: this.col, bottom: this.row, right: this.col };
      if (ref.top !== this.row || ref.left !== this.col) throw this.badCell(`holds an array formula over ${areaName(ref)}, which does not begin there`);
      const dynamic = this.context.dynamicMarks[Number(cellTag.attributes.cm?.value ?? 0)] === true;
      cell.array = { ref, dynamic };
      if (!isOneCell(ref)) this.sheet.arrays.push({ ref, row: this.row, col: this.col, dynamic });
    }
  }

  private follow(group: SharedGroup, key: number, cell: BookCell): void {
    const { row, col } = cellOfKey(key);
    cell.formula = group.formula(row, col);
    group.followers.push(key);
  }

  private area(tag: XmlTag): Area {
    return parseArea(tag.attributes.ref?.value ?? '', `${this.context.part} cell ${cellName(this.row, this.col)}`);
  }

  private badCell(what: string): BookError {
    return new BookError(`${this.context.part} cell ${cellName(this.row, this.col)} ${what}`);
  }

  private markParts({ ref, row, col, dynamic }: SheetData['arrays'][number]): void {
    for (const [r, c, cell] of storedIn(this.sheet, ref)) {
      if ((r === row && c === col) || cell.formula !== undefined) continue;
      if (cell.partOfArray) throw new BookError(`${this.context.part} cell ${cellName(r, c)} belongs to two array formulas`);
      cell.partOfArray = { row, col, dynamic };
      if (cell.value === null) cell.value = undefined;
    }
  }

  private markHidden(): void {
    const { hidden } = this.context.styles;
    for (const { cells } of this.sheet.rows) {
      for (const cell of cells) if (cell.formula !== undefined && hidden[cell.style]) cell.hiddenFormula = true;
    }
  }
}

/** Most groups are read for their followers; a group without any never needs its formula taken apart. */
function lazyShared(text: string, row: number, col: number): SharedGroup['formula'] {
  let ready: SharedGroup['formula'] | undefined;
  return (toRow, toCol) => (ready ??= sharedFormula(text, row, col))(toRow, toCol);
}

/** Column of `B3` in row 3; NaN if the reference is not of that row. */
function columnIn(reference: string, row: number): number {
  let letters = 0;
  while (letters < reference.length && reference.charCodeAt(letters) > 64) letters++;
  return Number(reference.slice(letters)) === row ? columnNumber(reference.slice(0, letters)) : NaN;
}
